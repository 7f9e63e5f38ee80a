/** What is done to a block: several rows put in, taken out, moved or doubled; cells cleared, filled, pasted over. Pure; each is one step of the history. */
import { isBranchFitting, pointsInsert, pointsMove, pointsRemove, type Point, type RunDocument } from "@/iso";
import { blockCells, blockColumns, blockOf, isBlock, pointsOf, rowsMeant, storedText } from "./block";
import { COLUMNS, commitCell, newPoint, type CellTarget, type CommitContext } from "./cell-commit";
import { rowCount } from "./cursor-steps";
import { runOf, withItem, withPointsInserted } from "./document-edits";
import { draftKey } from "./drafts";
import { changed, moveTo, picked, stampId, without } from "./editor-history";
import type { Draft, EditorState, PasteRefusal, Stamp } from "./editor-types";
import { filledDown, filledSeries } from "./fill";
import { isTable, pastedCells, pastedLines } from "./paste";

function contextAt(stamp: Stamp, n: number): CommitContext {
  return { by: stamp.by, at: stamp.at, pointId: stampId(stamp, n), branchId: n === 0 ? stamp.branchId : `${stamp.branchId}x${n}` };
}

/** Stretches the block one cell; it stays within its run. */
export function extended(state: EditorState, step: "up" | "down" | "left" | "right"): EditorState {
  const { cursor } = state;
  const run = runOf(state.document, cursor.runId);
  if (!run) return state;
  const last = rowCount(run, state.emptyRows) - 1;
  const row = Math.max(0, Math.min(last, cursor.row + (step === "up" ? -1 : step === "down" ? 1 : 0)));
  const at = COLUMNS.indexOf(cursor.column) + (step === "left" ? -1 : step === "right" ? 1 : 0);
  const column = COLUMNS[Math.max(0, Math.min(COLUMNS.length - 1, at))] ?? cursor.column;
  return picked(state, state.anchor ?? cursor, { ...cursor, row, column }, state.wholeRows && (step === "up" || step === "down"));
}

/** Stretches the block to a cell; in another run it begins there. */
export function stretchedTo(state: EditorState, target: CellTarget, wholeRows: boolean): EditorState {
  const from = state.anchor ?? state.cursor;
  return picked(state, from.runId === target.runId ? from : target, target, wholeRows);
}

export function rowsInserted(state: EditorState, target: CellTarget, stamp: Stamp): EditorState {
  const { from, count } = rowsMeant(state, target);
  const added = Array.from({ length: count }, (_, n) => newPoint(state.document, target.runId, { ...contextAt(stamp, n), pointId: freshAt(stamp, n) }, from));
  const next = changed(state, pointsInsert(state.document, target.runId, from, added), stamp);
  return moveTo(next, { ...target, row: from, column: "move" }, true);
}

/** Ids from the stamp's end, since its first ones go to the empty rows. */
function freshAt(stamp: Stamp, n: number): string {
  return `${stamp.ids[stamp.ids.length - 1] ?? "p"}${n === 0 ? "" : `x${n}`}`;
}

export function rowsRemoved(state: EditorState, target: CellTarget, stamp: Stamp): EditorState {
  const { from, count } = rowsMeant(state, target);
  const gone = pointsOf(state.document, target.runId, from, count).map((point) => point.id);
  if (gone.length === 0) return state;
  const drafts = Object.fromEntries(Object.entries(state.drafts).filter(([key]) => !gone.some((id) => key.startsWith(`${id}:`))));
  const next = changed({ ...state, drafts }, pointsRemove(state.document, gone), stamp);
  return moveTo(next, { ...next.cursor, row: Math.min(from, runOf(next.document, next.cursor.runId)?.points.length ?? 0) }, true);
}

export function rowsMoved(state: EditorState, target: CellTarget, by: -1 | 1, stamp: Stamp): EditorState {
  const { from, count } = rowsMeant(state, target);
  const rows = pointsOf(state.document, target.runId, from, count).length;
  const next = rows === 0 ? state : changed(state, pointsMove(state.document, target.runId, from, rows, from + by), stamp);
  if (next.document === state.document) return state;
  if (!isBlock(state)) return moveTo(next, { ...target, row: target.row + by }, true);
  const shift = (at: CellTarget): CellTarget => ({ ...at, row: at.row + by });
  return picked(next, shift(state.anchor ?? state.cursor), shift(state.cursor), state.wholeRows);
}

/** The same rows once more below; a doubled branch fitting gets an empty branch of its own. */
export function rowsDoubled(state: EditorState, target: CellTarget, stamp: Stamp): EditorState {
  const { from, count } = rowsMeant(state, target);
  const copies = pointsOf(state.document, target.runId, from, count).map((point, n): Point => ({
    ...point, id: freshAt(stamp, n), provenance: { ...point.provenance, by: stamp.by, at: stamp.at, second: null },
  }));
  if (copies.length === 0) return state;
  const inserted = pointsInsert(state.document, target.runId, from + copies.length, copies);
  const branched = copies.reduce((now, point, n) => (isBranchFitting(point.item) ? withItem(now, point.id, point.item, contextAt(stamp, n).branchId) : now), inserted);
  const next = changed(state, branched, stamp);
  const first = { ...target, row: from + copies.length };
  return copies.length === 1 ? moveTo(next, first, true) : picked(next, first, { ...first, row: first.row + copies.length - 1 }, state.wholeRows);
}

interface Cells {
  readonly target: CellTarget;
  readonly text: string;
  readonly line: number;
}

/** Writes texts into cells one after the other; what is not understood waits in its cell and is told. */
function written(state: EditorState, cells: readonly Cells[], stamp: Stamp): { readonly state: EditorState; readonly refused: readonly PasteRefusal[] } {
  let document = state.document;
  let drafts: Readonly<Record<string, Draft>> = state.drafts;
  const refused: PasteRefusal[] = [];
  for (const { target, text, line } of cells) {
    const context = contextAt(stamp, line);
    document = withRowsTo(document, target, context);
    const result = commitCell(document, target, text, context);
    const key = draftKey(document, target);
    drafts = result.ok ? without(drafts, key) : { ...drafts, [key]: { text, message: result.message } };
    if (result.ok) document = result.value;
    else refused.push({ line: line + 1, target, text, message: result.message });
  }
  return { state: { ...changed(state, document, stamp), drafts, focusTurn: state.focusTurn + 1 }, refused };
}

/** A line that is not understood still takes its row, so that the lines after it stay in step. */
function withRowsTo(document: RunDocument, target: CellTarget, context: CommitContext): RunDocument {
  const rows = runOf(document, target.runId)?.points.length ?? 0;
  return target.row < rows ? document : withPointsInserted(document, target.runId, rows, [newPoint(document, target.runId, context)]);
}

export function pasted(state: EditorState, target: CellTarget, text: string, stamp: Stamp): EditorState {
  const block = blockOf(state);
  const cells = !isTable(text) && isBlock(state)
    ? blockCells(block).flatMap((row, line) => row.map((each) => ({ target: each, text: text.trim(), line })))
    : pastedCells(text, isBlock(state) ? { runId: block.runId, row: block.fromRow, column: blockColumns(block)[0] ?? target.column } : target);
  const result = written(state, cells, stamp);
  const report = { lines: pastedLines(text), cells: cells.length, refused: result.refused };
  return { ...result.state, report };
}

/** Empties the block's cells: no move, no item, shop welds, from drawing, no note. */
export function cleared(state: EditorState, stamp: Stamp): EditorState {
  const rows = runOf(state.document, state.cursor.runId)?.points.length ?? 0;
  const cells = blockCells(blockOf(state)).flatMap((row, line) => row.filter((target) => target.row < rows).map((target) => ({ target, text: "", line })));
  return written(state, cells, stamp).state;
}

/** Cutting whole rows takes them out; cutting cells empties them. */
export function cut(state: EditorState, stamp: Stamp): EditorState {
  return blockOf(state).rows ? rowsRemoved(state, state.cursor, stamp) : cleared(state, stamp);
}

/** Fills the block from its top row, or one cell from the cell above it. A series goes on from the filled cells at the top. */
export function filled(state: EditorState, series: boolean, stamp: Stamp): EditorState {
  const { document } = state;
  const own = blockOf(state);
  const block = own.fromRow === own.toRow ? { ...own, fromRow: own.fromRow - 1 } : own;
  if (block.fromRow < 0) return state;
  const cells = blockColumns(block).flatMap((column) => {
    const targets = Array.from({ length: block.toRow - block.fromRow + 1 }, (_, n): CellTarget => ({ runId: block.runId, row: block.fromRow + n, column }));
    const texts = targets.map((target) => storedText(document, target));
    const open = texts.findIndex((text) => text === "");
    const seeds = series && open > 0 ? texts.slice(0, open) : texts.slice(0, 1);
    const more = series ? filledSeries(seeds, texts.length - seeds.length, column, document.settings.units) : filledDown(seeds, texts.length - seeds.length);
    return targets.slice(seeds.length).map((target, n) => ({ target, text: more[n] ?? "", line: target.row - block.fromRow }));
  });
  const kept = state.anchor === null ? null : { anchor: state.anchor, cursor: state.cursor, wholeRows: state.wholeRows };
  return { ...written(state, cells, stamp).state, ...kept };
}
