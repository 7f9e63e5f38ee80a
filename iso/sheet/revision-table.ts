/** The revision block: newest first, so that the row that matters stands at the top. */
import type { SheetInput } from "./sheet-types";
import type { Table } from "./table";

/** Rows a first page shows; the whole history follows on a later page when there are more. */
export const REVISION_ROWS_SHOWN = 4;

export function revisionTable(input: SheetInput, most: number | null): Table | null {
  const rows = [...input.revision.rows].reverse();
  if (rows.length === 0) return null;
  const shown = most === null ? rows : rows.slice(0, most);
  return {
    title: "REVISIONS",
    lead: [],
    columns: [
      { head: "REV", share: 0, minMm: 11, align: "middle" },
      { head: "DESCRIPTION", share: 3, minMm: 30 },
      { head: "DATE", share: 0, minMm: 21 },
      { head: "BY", share: 0.5, minMm: 24 },
      { head: "CHECKED", share: 0.5, minMm: 24 },
      { head: "APPROVED", share: 0.5, minMm: 24 },
    ],
    rows: shown.map((row) => ({
      cells: [[{ text: row.code, face: "bold" as const }], row.description, row.date, row.by, row.checked, row.approved],
    })),
    foot: shown.length < rows.length ? [`${rows.length - shown.length} earlier: see the last sheet.`] : [],
  };
}
