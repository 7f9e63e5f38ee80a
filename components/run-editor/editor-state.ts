/**
 * The editor's state and what may be done to it. One reducer, no React, no clock, no randomness: ids, names and dates
 * come in with the action. Every change of the document is one step of the history, so a cell committed is one undo.
 */
import type { RunDocument } from "@/iso";
import { cleared, cut, extended, filled, pasted, rowsDoubled, rowsInserted, rowsMoved, rowsRemoved, stretchedTo } from "./block-actions";
import { COLUMNS, commitCell, type CellTarget, type Column, type CommitContext } from "./cell-commit";
import { gridRows, landing } from "./cursor-steps";
import { pointPlace, runOf, withItem, withPoint, withPointsInserted } from "./document-edits";
import { draftKey } from "./drafts";
import { changed, idsFor, moveTo, picked, redo, undo, without } from "./editor-history";
import type { EditorAction, EditorState, PointPatch, Stamp, Step } from "./editor-types";

/** State of an editor just opened: an empty line starts at its first item, since the first point is its own datum. */
export function initialState(document: RunDocument, stamp: Stamp, emptyRows = true): EditorState {
  const main = document.runs[0];
  const fresh = (main?.points.length ?? 0) <= 1;
  const first = main?.points[0];
  const column: Column = fresh && (!first || first.item.kind === "none") ? "item" : "move";
  const cursor: CellTarget = { runId: main?.id ?? "main", row: 0, column };
  const state = { document, past: [], future: [], drafts: {}, cursor, anchor: null, wholeRows: false, report: null, focusTurn: 0, preview: null, typing: null, emptyRows, nextIds: {} };
  return { ...state, nextIds: idsFor(document, {}, stamp) };
}

export function editorReducer(state: EditorState, action: EditorAction): EditorState {
  switch (action.type) {
    case "commit": return commit(state, action);
    case "typing": return { ...state, ...typingOf(state, action) };
    case "drop": return { ...state, drafts: without(state.drafts, draftKey(state.document, action.target)), preview: null, typing: null, focusTurn: state.focusTurn + 1 };
    case "cursor": return moveTo(state, action.target, action.focus);
    case "step": return stepped(state, action.step);
    case "show-point": {
      const place = pointPlace(state.document, action.pointId);
      return place ? moveTo(state, { ...place, column: state.cursor.column }, action.focus) : state;
    }
    case "row-insert": return rowsInserted(state, action.target, action.stamp);
    case "row-remove": return rowsRemoved(state, action.target, action.stamp);
    case "row-move": return rowsMoved(state, action.target, action.by, action.stamp);
    case "row-double": return rowsDoubled(state, action.target, action.stamp);
    case "extend": return extended(state, action.step);
    case "stretch": return stretchedTo(state, action.target, action.rows);
    case "pick-rows": return picked(state, { runId: action.runId, row: action.from, column: "move" }, { runId: action.runId, row: action.to, column: "move" }, true);
    case "pick-run": {
      const last = Math.max(0, (runOf(state.document, action.runId)?.points.length ?? 1) - 1);
      return picked(state, { runId: action.runId, row: 0, column: "move" }, { runId: action.runId, row: last, column: "move" }, true);
    }
    case "let-go": return state.anchor === null && !state.wholeRows ? state : { ...state, anchor: null, wholeRows: false };
    case "clear": return cleared(state, action.stamp);
    case "cut": return cut(state, action.stamp);
    case "fill": return filled(state, action.series, action.stamp);
    case "report-read": return { ...state, report: null };
    case "point-patch": return changed(state, patched(state.document, action), action.stamp);
    case "point-replace": return changed(state, withPoint(state.document, action.point.id, () => action.point), action.stamp);
    case "item-set": return changed(state, withItem(state.document, action.pointId, action.item, action.stamp.branchId), action.stamp);
    case "points-insert": {
      const inserted = withPointsInserted(state.document, action.runId, action.row, action.points);
      return changed(state, action.patch ? patched(inserted, action.patch) : inserted, action.stamp);
    }
    case "document-patch": return changed(state, withoutEmpty({ ...state.document, ...action.patch }), action.stamp);
    case "paste": return pasted(state, action.target, action.text, action.stamp);
    case "replace": return { ...changed(state, action.document, action.stamp), drafts: {} };
    case "undo": return undo(state);
    case "redo": return redo(state);
  }
}

/** A field that says nothing is left out, as in a document that never had it. */
function withoutEmpty(document: RunDocument): RunDocument {
  return Object.fromEntries(Object.entries(document).filter(([, value]) => value !== undefined)) as RunDocument;
}

function patched(document: RunDocument, change: PointPatch): RunDocument {
  return withPoint(document, change.pointId, (point) => ({ ...point, ...change.patch }));
}

export function contextFor(state: EditorState, target: CellTarget, stamp: Stamp): CommitContext {
  return { by: stamp.by, at: stamp.at, pointId: state.nextIds[target.runId] ?? stamp.ids[0] ?? "next", branchId: stamp.branchId };
}

function commit(state: EditorState, action: Extract<EditorAction, { type: "commit" }>): EditorState {
  const { target, text, stamp } = action;
  const key = draftKey(state.document, target);
  const result = commitCell(state.document, target, text, contextFor(state, target, stamp));
  if (!result.ok) {
    const drafts = { ...state.drafts, [key]: { text, message: result.message } };
    const next = { ...state, drafts, preview: null, typing: null };
    // Enter stays where the sentence stands; Tab and the arrows may leave, the text keeps waiting.
    return action.step === "next-row" || action.step === "stay" ? next : stepped(next, action.step);
  }
  return stepped({ ...changed(state, result.value, stamp), drafts: without(state.drafts, key) }, action.step);
}

function typingOf(state: EditorState, action: Extract<EditorAction, { type: "typing" }>): Pick<EditorState, "preview" | "typing"> {
  if (action.text === null) return { preview: null, typing: null };
  const result = commitCell(state.document, action.target, action.text, contextFor(state, action.target, action.stamp));
  if (!result.ok) return { preview: null, typing: { ok: false, words: result.message } };
  return { preview: result.value === state.document ? null : result.value, typing: { ok: true, words: result.understood } };
}

function stepped(state: EditorState, step: Step): EditorState {
  if (step === "stay") return state;
  const rows = gridRows(state.document, state.emptyRows);
  const at = rows.findIndex((row) => row.runId === state.cursor.runId && row.row === state.cursor.row);
  const column = COLUMNS.indexOf(state.cursor.column);
  const [nextAt, nextColumn] = landing(step, at, column, rows.length);
  const row = rows[Math.max(0, Math.min(rows.length - 1, nextAt))];
  if (!row) return state;
  return moveTo(state, { ...row, column: COLUMNS[nextColumn] ?? "move" }, true);
}
