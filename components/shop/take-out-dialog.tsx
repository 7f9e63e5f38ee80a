"use client";
import { useState } from "react";
import { formatWeight, parseLength, type UnitSystem } from "@/iso";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { apiSend, failureText, refreshApi } from "@/components/ui/fetcher";
import { TextField } from "@/components/ui/field";
import { Notice, useToast } from "@/components/ui/notice";
import { parseWeightKg, type TakeOutRow } from "./take-out-rows";

/** The shop's word on one take-out: confirmed as tabulated, or what was measured. */
export function TakeOutDialog({
  row,
  units,
  onClose,
}: {
  readonly row: TakeOutRow | null;
  readonly units: UnitSystem;
  readonly onClose: () => void;
}) {
  return (
    <Dialog open={row !== null} onClose={onClose} title={row?.words ?? ""}>
      {row ? <WordForm row={row} units={units} onDone={onClose} /> : null}
    </Dialog>
  );
}

function WordForm({
  row,
  units,
  onDone,
}: {
  readonly row: TakeOutRow;
  readonly units: UnitSystem;
  readonly onDone: () => void;
}) {
  const say = useToast();
  const [typed, setTyped] = useState("");
  const [trouble, setTrouble] = useState<string | null>(null);
  const parsed = typed.trim() === "" ? null : understood(row, typed, units);
  const record = async (valueMm: number | null) => {
    setTrouble(null);
    try {
      await apiSend("POST", "/api/shop/take-outs", { key: row.key, valueMm });
      await refreshApi("/api/shop");
      say(valueMm === null ? "Confirmed as tabulated." : row.kind === "weight" ? "Recorded as weighed." : "Recorded as measured.");
      onDone();
    } catch (failure) {
      setTrouble(failureText(failure));
    }
  };
  return (
    <>
      {trouble ? (
        <Notice tone="trouble" className="mb-3">
          {trouble}
        </Notice>
      ) : null}
      <WhatIsKnown row={row} units={units} />
      <TextField
        className="mt-4"
        label={row.kind === "weight" ? "What the shop weighed" : "What the shop measured"}
        hint={
          row.kind === "table"
            ? "Leave empty to confirm the table's number."
            : row.kind === "weight"
              ? "From the scale or the maker's list, such as 54 kg or 120 lb."
              : "Measure the part in hand."
        }
        figure
        value={typed}
        onChange={(event) => setTyped(event.target.value)}
        error={parsed && !parsed.ok ? parsed.message : undefined}
        caution={parsed?.ok ? `Understood: ${parsed.understood}` : undefined}
      />
      <DialogActions>
        <Button
          tone="primary"
          disabled={parsed === null ? row.kind !== "table" : !parsed.ok}
          onClick={() => void record(parsed?.ok ? parsed.mm : null)}
        >
          {parsed === null && row.kind === "table" ? "Confirm as tabulated" : row.kind === "weight" ? "Use what we weighed" : "Use what we measured"}
        </Button>
      </DialogActions>
    </>
  );
}

/** What the tables and the shop have so far. */
function WhatIsKnown({ row, units }: { readonly row: TakeOutRow; readonly units: UnitSystem }) {
  const unit = row.kind === "weight" ? "" : units === "metric" ? " mm" : " in";
  const own = row.word && row.word.valueMm !== null;
  return (
    <>
      <p>
        {row.kind === "table" ? (
          <>
            The table says <strong className="figure">{row.tableValue}</strong>
            {unit}.
          </>
        ) : row.kind === "weight" ? (
          "No table gives this weight. It is left out of every total until the shop says."
        ) : (
          "No table has this length. A line that needs it stops until the shop measures one."
        )}
        {own ? (
          <>
            {" "}
            The shop {row.kind === "weight" ? "weighed" : "measured"} <strong className="figure">{row.value}</strong>
            {unit}.
          </>
        ) : null}
      </p>
      {row.source === "" ? null : <p className="mt-1 text-sm break-words text-soft">Read from: {row.source}.</p>}
    </>
  );
}

type Understood = { readonly ok: true; readonly mm: number; readonly understood: string } | { readonly ok: false; readonly message: string };

/** The typed value of a row: a length in mm, or a weight in kg where the row is one. */
function understood(row: TakeOutRow, typed: string, units: UnitSystem): Understood {
  if (row.kind !== "weight") return parseLength(typed, units);
  const kg = parseWeightKg(typed, units);
  return kg === null ? { ok: false, message: "Type a weight, such as 54 kg or 120 lb." } : { ok: true, mm: kg, understood: formatWeight(kg, units) };
}
