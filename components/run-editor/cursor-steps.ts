/** Where the cursor lands: rows of all runs in reading order, cells in the order of their columns. */
import type { Run, RunDocument } from "@/iso";
import { COLUMNS } from "./cell-commit";
import type { Step } from "./editor-types";

/** Rows of the whole grid in reading order; each run ends with its empty row, where there are any. */
export function gridRows(document: RunDocument, emptyRows: boolean): readonly { readonly runId: string; readonly row: number }[] {
  return document.runs.flatMap((run) => Array.from({ length: rowCount(run, emptyRows) }, (_, row) => ({ runId: run.id, row })));
}

/** Rows a run shows: a run without a point shows its empty row to a reader too. */
export function rowCount(run: Run, emptyRows: boolean): number {
  return run.points.length + (emptyRows || run.points.length === 0 ? 1 : 0);
}

/** Row (of gridRows) and column a step leads to; the caller keeps the row within the grid. */
export function landing(step: Step, at: number, column: number, rows: number): readonly [number, number] {
  const last = COLUMNS.length - 1;
  switch (step) {
    case "next-row": return [at + 1, 0];
    case "up": return [at - 1, column];
    case "down": return [at + 1, column];
    case "right": return column < last ? [at, column + 1] : at < rows - 1 ? [at + 1, 0] : [at, last];
    case "left": return column > 0 ? [at, column - 1] : at > 0 ? [at - 1, last] : [0, 0];
    case "row-start": return [at, 0];
    case "row-end": return [at, last];
    case "first": return [0, 0];
    default: return [rows - 1, 0];
  }
}
