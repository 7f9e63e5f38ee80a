/** The block of cells that is picked out: a rectangle of one run between where it was begun and the cursor. Pure. */
import type { Point, RunDocument } from "@/iso";
import { cellText, COLUMNS, rowFactsAt, type CellTarget, type Column } from "./cell-commit";
import { runOf } from "./document-edits";
import type { EditorState } from "./editor-types";

export interface Block {
  readonly runId: string;
  readonly fromRow: number;
  readonly toRow: number;
  /** Positions in COLUMNS. */
  readonly fromColumn: number;
  readonly toColumn: number;
  /** Whole rows were picked out, so that cutting takes the rows themselves. */
  readonly rows: boolean;
}

type Picked = Pick<EditorState, "cursor" | "anchor" | "wholeRows">;

/** The block as it stands; a lone cursor is a block of one cell. */
export function blockOf({ cursor, anchor, wholeRows }: Picked): Block {
  const from = anchor !== null && anchor.runId === cursor.runId ? anchor : cursor;
  const [a, b] = [COLUMNS.indexOf(from.column), COLUMNS.indexOf(cursor.column)];
  return {
    runId: cursor.runId, fromRow: Math.min(from.row, cursor.row), toRow: Math.max(from.row, cursor.row),
    fromColumn: wholeRows ? 0 : Math.min(a, b), toColumn: wholeRows ? COLUMNS.length - 1 : Math.max(a, b), rows: wholeRows,
  };
}

/** True when more than the cursor's own cell is picked out. */
export function isBlock(state: Picked): boolean {
  const block = blockOf(state);
  return block.rows || block.fromRow !== block.toRow || block.fromColumn !== block.toColumn;
}

/** Rows an action on a row means: all of the block when the row is one of them, else the row alone. */
export function rowsMeant(state: Picked, target: CellTarget): { readonly from: number; readonly count: number } {
  const block = blockOf(state);
  const within = target.runId === block.runId && target.row >= block.fromRow && target.row <= block.toRow;
  return within ? { from: block.fromRow, count: block.toRow - block.fromRow + 1 } : { from: target.row, count: 1 };
}

/** Points of some rows; the empty row at a run's end has none. */
export function pointsOf(document: RunDocument, runId: string, from: number, count: number): readonly Point[] {
  return runOf(document, runId)?.points.slice(from, from + count) ?? [];
}

export function blockColumns(block: Block): readonly Column[] {
  return COLUMNS.slice(block.fromColumn, block.toColumn + 1);
}

/** The cells of a block row by row. */
export function blockCells(block: Block): readonly (readonly CellTarget[])[] {
  return Array.from({ length: block.toRow - block.fromRow + 1 }, (_, n) => blockColumns(block).map((column) => ({ runId: block.runId, row: block.fromRow + n, column })));
}

/** The block as a spreadsheet takes it: tabs between cells, a line a row. A tab or a new line within a note becomes a space. */
export function blockText(state: Pick<EditorState, "document" | "drafts"> & Picked, shown: (target: CellTarget) => string): string {
  return blockCells(blockOf(state))
    .map((row) => row.map((target) => shown(target).replace(/[\t\r\n]+/g, " ")).join("\t"))
    .join("\n");
}

/** What a stored cell shows, without waiting texts. */
export function storedText(document: RunDocument, target: CellTarget): string {
  const point = runOf(document, target.runId)?.points[target.row];
  return point ? cellText(point, target.column, rowFactsAt(document, target.runId, target.row)) : "";
}
