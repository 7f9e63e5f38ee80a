/** What tests of files of points share. */
import { csvFile } from "@/lib/rules/exchange/csv-cells";
import { csvTable, decodeText, guessSeparator } from "@/lib/rules/exchange/csv-read";
import { cellShown } from "@/lib/rules/exchange/import-cell";
import { suggestColumns } from "@/lib/rules/exchange/point-columns";
import type { FreshIds } from "@/lib/rules/exchange/plan-import";
import { readPoints, type PointsRead, type ReadOptions } from "@/lib/rules/exchange/read-points";
import { POINT_READERS } from "@/components/exchange/point-words";

export const BASE: Omit<ReadOptions, "match" | "heads"> = {
  form: "offset", source: "from-drawing", by: "Pat", at: "2026-01-05", readers: POINT_READERS, unit: "in", decimal: "point", units: "imperial",
};

/** Reads a CSV text as the dialog would with what it suggests. */
export function readCsv(text: string, more: Partial<ReadOptions> = {}): PointsRead {
  const table = csvTable(text, guessSeparator(text), "file");
  const heads = table.rows[0]!.cells.map(cellShown);
  return readPoints(table.rows.slice(1), { ...BASE, heads, match: suggestColumns(heads), ...more });
}

/** A written file as its bytes read back. */
export function writtenText(rows: Parameters<typeof csvFile>[0]): string {
  return decodeText(new TextEncoder().encode(csvFile(rows))).text;
}

let made = 0;

/** Ids no other import of the test run got. */
export function freshIds(): FreshIds {
  return { point: () => `np${(made += 1)}`, run: () => `nr${(made += 1)}` };
}
