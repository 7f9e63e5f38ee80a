"use client";
import { useState } from "react";
import type { UnitSystem } from "@/iso";
import { itemEcho } from "@/components/run-editor/item-text";
import { moveEcho } from "@/components/run-editor/move-text";
import { placesEcho } from "@/components/run-editor/place-entry";
import { PROVENANCE_LABEL } from "@/components/run-editor/provenance-entry";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { Table, type Column } from "@/components/ui/table";
import { countWords } from "@/lib/rules/exchange/import-cell";
import type { GoodRow, RowFault } from "@/lib/rules/exchange/read-points";

const FAULT_COLUMNS: readonly Column<RowFault>[] = [
  { key: "row", head: "Row", figure: true, cell: (fault) => fault.row },
  { key: "column", head: "Column", cell: (fault) => fault.column },
  { key: "value", head: "Value", cell: (fault) => <span className="figure [overflow-wrap:anywhere]">{fault.value === "" ? "empty" : fault.value.slice(0, 60)}</span> },
  { key: "message", head: "What to do", cell: (fault) => fault.message },
];
/** Rows of a table shown at once; the rest on asking. */
const SHOWN = 100;

/** Rows that are not understood, all of them: nothing is left out unseen. */
export function FaultTable({ faults, badRows }: { readonly faults: readonly RowFault[]; readonly badRows: number }) {
  const [all, setAll] = useState(false);
  const shown = all ? faults : faults.slice(0, SHOWN);
  return (
    <div className="mb-5">
      <Notice tone="trouble" word={`${countWords(badRows)} ${badRows === 1 ? "row is" : "rows are"} not understood`} className="mb-2">
        Mend them in the file and choose it again, or leave them out below.
      </Notice>
      <div tabIndex={0} role="region" aria-label="Rows not understood" className="max-h-80 overflow-y-auto border border-hair px-2">
        <Table caption="Rows not understood" columns={FAULT_COLUMNS} rows={shown} rowKey={(fault) => `${fault.row} ${fault.column} ${fault.message}`} />
      </div>
      {faults.length > shown.length ? <Button tone="quiet" onClick={() => setAll(true)}>Show all {countWords(faults.length)}</Button> : null}
    </div>
  );
}

const PREVIEWED = 8;

/** The first good rows as the line will read them. */
export function GoodPreview({ good, units }: { readonly good: readonly GoodRow[]; readonly units: UnitSystem }) {
  if (good.length === 0) return <p className="text-soft">No row was understood.</p>;
  const runs = new Set(good.map((row) => row.run)).size;
  const columns: readonly Column<GoodRow>[] = [
    { key: "row", head: "Row", figure: true, cell: (row) => row.row },
    ...(runs > 1 ? [{ key: "run", head: "Run", cell: (row: GoodRow) => row.run || "main" }] : []),
    { key: "move", head: "Move", cell: (row) => <span className="figure">{moveEcho(row.point.offset, units) || "same place"}</span> },
    { key: "item", head: "Item", cell: (row) => itemWords(row) },
    { key: "source", head: "Source", cell: (row) => PROVENANCE_LABEL[row.point.provenance.kind] },
    { key: "note", head: "Note", cell: (row) => <span className="break-words">{row.point.note.slice(0, 60)}</span> },
  ];
  return (
    <>
      <p className="mb-1 font-medium">
        {countWords(good.length)} {good.length === 1 ? "row" : "rows"} understood{runs > 1 ? ` in ${runs} runs` : ""}
        {good.length > PREVIEWED ? `; the first ${PREVIEWED}:` : ":"}
      </p>
      <Table caption="Rows understood" columns={columns} rows={good.slice(0, PREVIEWED)} rowKey={(row) => String(row.row)} />
    </>
  );
}

function itemWords({ point }: GoodRow): string {
  const place = point.item.kind === "joint" && (point.places.in === "field" || point.places.in === "field-fit") ? point.places.in : null;
  const where = place === null && Object.keys(point.places).length > 0 ? placesEcho(point.places) : "";
  return [itemEcho(point.item, place), where].filter((part) => part !== "").join("; ");
}
