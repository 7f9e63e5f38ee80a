"use client";
import { useMemo, useState } from "react";
import { compareAsFitted, emptyAsFitted, fittedWanted, proposeView, sheetFacts, spoolNominalInches, type AsFittedDocument, type FittedPoint, type Model, type SheetInput, type Wanted } from "@/iso";
import { Button, buttonClass } from "@/components/ui/button";
import { apiSend, refreshApi, useApi } from "@/components/ui/fetcher";
import { Select, TextArea, TextField } from "@/components/ui/field";
import { timeText } from "@/components/ui/format";
import { useToast } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import type { MeasurementRow } from "@/lib/rules/as-fitted-types";
import { AsFittedPaste } from "./as-fitted-paste";
import { AsFittedPoints, READ_AS_OPTIONS } from "./as-fitted-points";
import { AsFittedResultView, verdictClass } from "./as-fitted-result";

export interface AsFittedProps {
  readonly spoolId: string;
  readonly input: SheetInput;
  readonly model: Model;
  /** Whether a measurement may be kept against this sheet. */
  readonly open: boolean;
}

const freshId = (): string => `m${crypto.randomUUID().slice(0, 12)}`;

function startingPoints(wanted: Wanted): FittedPoint[] {
  return wanted.faces.flatMap(({ mark }) => (["centre", "axis"] as const).map((what): FittedPoint => ({ id: freshId(), of: mark, what, at: ["", "", ""], leftOut: false })));
}

/** The finished spool measured and laid on its sheet: points in, verdict, picture and numbers out, kept by name. */
export function AsFittedSection({ spoolId, input, model, open }: AsFittedProps) {
  const facts = useMemo(() => sheetFacts(input, model), [input, model]);
  const wanted = useMemo(() => (facts.spool ? fittedWanted(model, facts.spool) : null), [model, facts]);
  const [editing, setEditing] = useState(false);
  const address = `/api/spools/${spoolId}/as-fitted`;
  if (!facts.spool || !wanted || wanted.faces.length === 0) return null;
  return (
    <Section
      title="As fitted"
      aside={
        <div className="flex flex-wrap gap-3" data-screen-only>
          <a className={buttonClass("plain", false)} href={`${address}/sheet`} target="_blank" rel="noreferrer">Blank record (PDF)</a>
          {editing ? null : <Button tone="primary" onClick={() => setEditing(true)}>Measure the spool</Button>}
        </div>
      }
    >
      <p className="mb-3 text-soft">
        The finished spool, measured from any origin, is laid on its sheet by the best fit, and each face is judged. Tolerances in the manner of PFI ES-3 (values from memory; set your own). Two readings; do not pull, jack or heat to fit.
      </p>
      <Records address={address} />
      {editing ? <Editor facts={facts} wanted={wanted} model={model} address={address} open={open} onDone={() => setEditing(false)} /> : null}
    </Section>
  );
}

function Records({ address }: { readonly address: string }) {
  const rows = useApi<readonly MeasurementRow[]>(address).data ?? [];
  if (rows.length === 0) return <p className="mb-3 text-soft">Not measured yet.</p>;
  return (
    <ul className="mb-4">
      {rows.map((row) => (
        <li key={row.id} className="flex flex-wrap items-start justify-between gap-x-6 gap-y-1 border-b border-hair py-2">
          <span className="min-w-0 flex-1 basis-72">
            <span className={verdictClass(row.verdict)}>{row.headline}</span>
            <span className="block text-sm text-soft">{row.by}, {timeText(row.at)}, rev {row.revisionCode}</span>
          </span>
          <a className={buttonClass("plain", false)} href={`${address}/sheet?record=${row.id}`} target="_blank" rel="noreferrer">Dimension record (PDF)</a>
        </li>
      ))}
    </ul>
  );
}

interface EditorProps {
  readonly facts: ReturnType<typeof sheetFacts>;
  readonly wanted: Wanted;
  readonly model: Model;
  readonly address: string;
  readonly open: boolean;
  readonly onDone: () => void;
}

function Editor({ facts, wanted, model, address, open, onDone }: EditorProps) {
  const { units } = facts.input;
  const [document, setDocument] = useState<AsFittedDocument>(() => emptyAsFitted(units, startingPoints(wanted)));
  const [pasting, setPasting] = useState(false);
  const result = useMemo(() => compareAsFitted(model, facts.spool!, document, spoolNominalInches(facts)), [model, facts, document]);
  const view = useMemo(() => facts.input.document.view ?? proposeView(model), [facts, model]);
  const hasAny = document.points.some((point) => point.at.some((text) => text.trim() !== ""));
  return (
    <div data-screen-only>
      <div className="mb-4 grid gap-3 sm:grid-cols-3">
        <Select label="A number without a unit is in" options={READ_AS_OPTIONS} value={document.readAs} onChange={(event) => setDocument({ ...document, readAs: event.target.value as AsFittedDocument["readAs"] })} />
        <Select
          label="Lay it on" value={document.hold} onChange={(event) => setDocument({ ...document, hold: event.target.value })}
          options={[{ value: "", label: "the best fit of all points" }, ...wanted.faces.map(({ mark }) => ({ value: mark, label: `end ${mark}, held exactly` }))]}
        />
        <TextField label="Measured with" maxLength={120} value={document.tool} onChange={(event) => setDocument({ ...document, tool: event.target.value })} />
      </div>
      <Tolerances document={document} metric={units === "metric"} onChange={setDocument} />
      <div className="mb-2 flex flex-wrap items-end justify-between gap-3">
        <h3>Measured points</h3>
        <Button onClick={() => setPasting(true)}>Paste points</Button>
      </div>
      <AsFittedPoints document={document} wanted={wanted} freshId={freshId} onChange={setDocument} />
      <TextArea className="my-4" label="Remarks" rows={2} maxLength={2000} value={document.note} onChange={(event) => setDocument({ ...document, note: event.target.value })} />
      {hasAny ? <AsFittedResultView result={result} document={document} wanted={wanted} view={view} units={units} onChange={setDocument} /> : null}
      <Keep address={address} document={document} ready={result.motion !== null || result.pairs.length > 0} open={open} onDone={onDone} />
      <AsFittedPaste open={pasting} readAs={document.readAs} freshId={freshId} onClose={() => setPasting(false)} onTake={(points, readAs) => setDocument({ ...document, readAs, points: [...points] })} />
    </div>
  );
}

function Tolerances({ document, metric, onChange }: { readonly document: AsFittedDocument; readonly metric: boolean; readonly onChange: (document: AsFittedDocument) => void }) {
  const set = (part: Partial<AsFittedDocument["tolerances"]>) => onChange({ ...document, tolerances: { ...document.tolerances, ...part } });
  return (
    <details className="mb-4 border-b border-hair pb-2">
      <summary className="min-h-11 cursor-pointer py-2 font-medium">Tolerances</summary>
      <div className="grid gap-3 sm:grid-cols-3">
        <TextField label="Position, +/-" hint={metric ? "usual: 3 mm to DN 250, 5 mm above" : "usual: 1/8 in to NPS 10, 3/16 above"} figure placeholder="usual" maxLength={60} value={document.tolerances.position} onChange={(event) => set({ position: event.target.value })} />
        <TextField label={metric ? "Square, per metre" : "Square, per foot"} hint={metric ? "usual: 5 mm (1 in 200)" : "usual: 1/16 in"} figure placeholder="usual" maxLength={60} value={document.tolerances.square} onChange={(event) => set({ square: event.target.value })} />
        <TextField label="Bolt holes, round the circle" hint={metric ? "usual: 1.5 mm" : "usual: 1/16 in"} figure placeholder="usual" maxLength={60} value={document.tolerances.holes} onChange={(event) => set({ holes: event.target.value })} />
      </div>
    </details>
  );
}

function Keep({ address, document, ready, open, onDone }: { readonly address: string; readonly document: AsFittedDocument; readonly ready: boolean; readonly open: boolean; readonly onDone: () => void }) {
  const say = useToast();
  const [busy, setBusy] = useState(false);
  const keep = async (): Promise<void> => {
    setBusy(true);
    try {
      await apiSend("POST", address, { document });
      await refreshApi("/api/spools");
      say("The measurement is kept.");
      onDone();
    } catch (error) {
      say(error instanceof Error ? error.message : "It was not kept. Try again.", "trouble");
    } finally {
      setBusy(false);
    }
  };
  return (
    <div className="mt-4">
      <div className="flex flex-wrap gap-3">
        <Button tone="primary" big disabled={!open || !ready} busy={busy} busyLabel="Keeping" onClick={() => void keep()}>Keep this measurement</Button>
        <Button big onClick={onDone}>Close without keeping</Button>
      </div>
      <p className="mt-2 text-sm text-soft">
        {open ? "A measurement keeps your name and the time and cannot be changed; a correction is a new one." : "Measurements are kept against an issued sheet that is not on hold and not closed; here they can only be tried."}
      </p>
    </div>
  );
}
