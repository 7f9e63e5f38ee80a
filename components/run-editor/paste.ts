/** Rows from a spreadsheet: tab-separated text laid over the grid from the cell it is pasted into. */
import { COLUMNS, type CellTarget } from "./cell-commit";

export interface PastedCell {
  readonly target: CellTarget;
  readonly text: string;
  /** Which pasted line it came from, from 0. */
  readonly line: number;
}

/** Most lines taken from one paste; a line of pipe longer than that is several lines. */
const MOST_LINES = 2_000;

/** Whether a pasted text is rows and columns, not a plain entry. */
export function isTable(text: string): boolean {
  return /\t|\n./.test(text.trimEnd());
}

/** Lines a pasted text has, without empty ones. */
export function pastedLines(text: string): number {
  return linesOf(text).length;
}

function linesOf(text: string): readonly string[] {
  return text.replace(/\r\n?/g, "\n").split("\n").filter((line) => line.trim() !== "").slice(0, MOST_LINES);
}

/** Lays pasted lines over the grid, to the right and down; empty cells leave what is there. */
export function pastedCells(text: string, from: CellTarget): readonly PastedCell[] {
  const start = COLUMNS.indexOf(from.column);
  return linesOf(text).flatMap((each, line) =>
    cellsOf(each, from.column === "move").flatMap((cell, i) => {
      const column = COLUMNS[start + i];
      return column && cell !== "" ? [{ target: { runId: from.runId, row: from.row + line, column }, text: cell, line }] : [];
    }),
  );
}

/** Three numbers in the first three columns are east, north and up and make one Move cell. */
function cellsOf(line: string, atMove: boolean): readonly string[] {
  const cells = line.split("\t").map((cell) => cell.trim());
  const [e, n, u, ...rest] = cells;
  const isOffset = atMove && [e, n, u].every((cell) => cell !== undefined && /^-?[\d.'" /-]+(mm|m|cm)?$/i.test(cell));
  return isOffset ? [`${e}, ${n}, ${u}`, ...rest] : cells;
}
