"use client";
import { useMemo, useState } from "react";
import type { Model, RunDocument, SheetInput } from "@/iso";
import { SheetPreview } from "@/components/sheet/sheet-preview";
import { ChoiceRow } from "@/components/ui/choice-row";
import type { LineDetail } from "@/lib/rules/api-types";

/** The draft sheet of a spool as it would print now. */
export function LineSheet({ line, document, model }: { readonly line: LineDetail; readonly document: RunDocument; readonly model: Model }) {
  const [wanted, setWanted] = useState<string | null>(null);
  const chosen = model.spools.find((each) => each.letter === wanted) ?? model.spools[0];
  const spool = chosen?.letter ?? null;
  const [openedAt] = useState(() => new Date().toISOString());
  const input = useMemo(() => (spool === null ? null : draftInput(line, document, spool, openedAt)), [line, document, spool, openedAt]);
  if (!input || !spool) return <p className="frame p-6 text-soft">No spool yet: the sheet stands here once there is pipe.</p>;
  return (
    <div className="min-h-0 flex-1 overflow-y-auto">
      {model.spools.length > 1 ? <ChoiceRow label="Spool" value={spool} onChange={setWanted} choices={model.spools.map(({ letter }) => ({ value: letter, label: `Spool ${letter}` }))} /> : null}
      <SheetPreview input={input} label={`Draft sheet of spool ${spool}`} />
    </div>
  );
}

function draftInput(line: LineDetail, document: RunDocument, spool: string, openedAt: string): SheetInput {
  const known = line.spools.find((row) => row.letter === spool);
  return {
    version: 1, document, marks: line.marks, takeOuts: line.takeOuts, spool,
    size: line.sheetSize, units: document.settings.units, titleBlock: line.titleBlock,
    revision: {
      sheetNumber: known?.sheetNumber ?? "", code: "", state: "draft", hold: false, rows: [],
      drawnBy: line.updatedBy, checkedBy: "", issuedAt: openedAt, statusUrl: "", auditHead: "",
      changedPointIds: [], accepted: [],
    },
  };
}
