"use client";
import { useState } from "react";
import { parseLength, type UnitSystem } from "@/iso";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { apiSend, failureText, refreshApi } from "@/components/ui/fetcher";
import { TextField } from "@/components/ui/field";
import { Notice, useToast } from "@/components/ui/notice";
import type { TakeOutRow } from "./take-out-rows";

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
  const unit = units === "metric" ? "mm" : "in";
  const parsed = typed.trim() === "" ? null : parseLength(typed, units);
  const record = async (valueMm: number | null) => {
    setTrouble(null);
    try {
      await apiSend("POST", "/api/shop/take-outs", { key: row.key, valueMm });
      await refreshApi("/api/shop");
      say(valueMm === null ? "Confirmed as tabulated." : "Recorded as measured.");
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
      <p>
        The table says <strong className="figure">{row.tableValue}</strong> {unit}.
        {row.word && row.word.valueMm !== null ? (
          <>
            {" "}
            The shop measured <strong className="figure">{row.value}</strong> {unit}.
          </>
        ) : null}
      </p>
      <p className="mt-1 text-sm break-words text-soft">Read from: {row.source}.</p>
      <TextField
        className="mt-4"
        label="What the shop measured"
        hint="Leave empty to confirm the table's number."
        figure
        value={typed}
        onChange={(event) => setTyped(event.target.value)}
        error={parsed && !parsed.ok ? parsed.message : undefined}
        caution={parsed?.ok ? `Understood: ${parsed.understood}` : undefined}
      />
      <DialogActions>
        <Button
          tone="primary"
          disabled={parsed !== null && !parsed.ok}
          onClick={() => void record(parsed?.ok ? parsed.mm : null)}
        >
          {parsed ? "Use what we measured" : "Confirm as tabulated"}
        </Button>
      </DialogActions>
    </>
  );
}
