"use client";
import { useState } from "react";
import { type LineSettings, type RunDocument, type UnitSystem } from "@/iso";
import { LineSettingsForm } from "@/components/jobs/line-settings-form";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { lineSettingsIn } from "@/lib/rules/default-settings";
import { withUnits, type UnitMeaning } from "./unit-change";

export interface SettingsDrawerProps {
  readonly open: boolean;
  readonly document: RunDocument;
  readonly editable: boolean;
  readonly onChange: (patch: Partial<Pick<RunDocument, "settings" | "title" | "runs">>) => void;
  readonly onClose: () => void;
}

/** What this line owns: pipe, fittings, allowances, limits, units, texts as entered. Notes have a dialog of their own. */
export function SettingsDrawer({ open, document, editable, onChange, onClose }: SettingsDrawerProps) {
  return (
    <Dialog open={open} onClose={onClose} title={`Settings of line ${document.number}`} wide>
      <div className="space-y-8">
        <HeadFields document={document} editable={editable} onChange={onChange} />
        <LineSettingsForm
          settings={document.settings}
          editable={editable}
          fixedUnits
          saveLabel="Use these settings"
          onSave={async (settings: LineSettings) => {
            onChange({ settings });
            onClose();
          }}
        />
        {editable ? <UnitChange document={document} onChange={onChange} /> : null}
      </div>
    </Dialog>
  );
}

function HeadFields({ document, editable, onChange }: Omit<SettingsDrawerProps, "open" | "onClose">) {
  return (
    <div className="grid gap-4">
      <TextField label="Title" maxLength={120} defaultValue={document.title} readOnly={!editable} onBlur={(event) => event.target.value !== document.title && onChange({ title: event.target.value })} />
    </div>
  );
}

const UNIT_NAME: Readonly<Record<UnitSystem, string>> = { imperial: "NPS, feet and inches", metric: "DN, millimetres" };

/** Another unit system: the typed numbers stay as typed, so it has to be said what they mean. */
function UnitChange({ document, onChange }: Pick<SettingsDrawerProps, "document" | "onChange">) {
  const [asking, setAsking] = useState(false);
  const [trouble, setTrouble] = useState<string | null>(null);
  const { units } = document.settings;
  const other: UnitSystem = units === "imperial" ? "metric" : "imperial";
  const change = (meaning: UnitMeaning): void => {
    const result = withUnits(document, other, meaning);
    if (!result.ok) return setTrouble(result.message);
    onChange({ settings: lineSettingsIn(other, document.settings), runs: [...result.value.runs] });
    setAsking(false);
    setTrouble(null);
  };
  return (
    <section aria-label="Units" className="border-t border-hair pt-4">
      <h3>Units: {UNIT_NAME[units]}</h3>
      {asking ? (
        <>
          <p className="mt-1 text-soft">No typed number is converted. Say what the numbers of this line are:</p>
          {trouble ? <Notice tone="trouble" className="mt-2">{trouble}</Notice> : null}
          <div className="mt-3 flex flex-wrap gap-3">
            <Button onClick={() => change("same-lengths")}>They were right: keep every length, show it in {other === "metric" ? "millimetres" : "feet and inches"}</Button>
            <Button onClick={() => change("same-numbers")}>They were typed in {other === "metric" ? "millimetres" : "inches"}: read each again</Button>
            <Button tone="quiet" onClick={() => setAsking(false)}>Leave it</Button>
          </div>
          <p className="mt-2 text-sm text-soft">Allowances, field trim and shipping box start again from the usual ones of {UNIT_NAME[other]}. Undo brings everything back.</p>
        </>
      ) : (
        <Button className="mt-2" onClick={() => setAsking(true)}>
          Change to {UNIT_NAME[other]}
        </Button>
      )}
    </section>
  );
}
