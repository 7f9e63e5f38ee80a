/**
 * The editor's state and what may be done to it. One reducer, no React, no clock, no randomness: ids, names and dates
 * come in with the action. Every change of the document is one step of the history, so a cell committed is one undo.
 */
import { pointMove, pointRemove, type RunDocument } from "@/iso";
import { COLUMNS, commitCell, newPoint, type CellTarget, type Column, type CommitContext } from "./cell-commit";
import { gridRows, landing } from "./cursor-steps";
import { pointPlace, runOf, withPoint, withPointsInserted } from "./document-edits";
import { draftKey } from "./drafts";
import type { Draft, EditorAction, EditorState, PointPatch, Stamp, Step } from "./editor-types";
import { pastedCells } from "./paste";

/** State of an editor just opened: an empty line starts at its first item, since the first point is its own datum. */
export function initialState(document: RunDocument, stamp: Stamp, emptyRows = true): EditorState {
  const main = document.runs[0];
  const fresh = (main?.points.length ?? 0) <= 1;
  const first = main?.points[0];
  const column: Column = fresh && (!first || first.item.kind === "none") ? "item" : "move";
  const cursor: CellTarget = { runId: main?.id ?? "main", row: 0, column };
  const state = { document, past: [], future: [], drafts: {}, cursor, focusTurn: 0, preview: null, typing: null, emptyRows, nextIds: {} };
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
    case "row-insert": return insertRow(state, action.target, action.stamp);
    case "row-remove": return removeRow(state, action.target, action.stamp);
    case "row-move": {
      const next = changed(state, pointMove(state.document, action.target.runId, action.target.row, action.target.row + action.by), action.stamp);
      return next === state ? state : moveTo(next, { ...action.target, row: action.target.row + action.by }, true);
    }
    case "point-patch": return changed(state, patched(state.document, action), action.stamp);
    case "points-insert": {
      const inserted = withPointsInserted(state.document, action.runId, action.row, action.points);
      return changed(state, action.patch ? patched(inserted, action.patch) : inserted, action.stamp);
    }
    case "document-patch": return changed(state, { ...state.document, ...action.patch }, action.stamp);
    case "paste": return paste(state, action);
    case "replace": return { ...changed(state, action.document, action.stamp), drafts: {} };
    case "undo": return undo(state);
    case "redo": return redo(state);
  }
}

function patched(document: RunDocument, change: PointPatch): RunDocument {
  return withPoint(document, change.pointId, (point) => ({ ...point, ...change.patch }));
}

function idsFor(document: RunDocument, before: EditorState["nextIds"], stamp: Stamp): EditorState["nextIds"] {
  const used = new Set(document.runs.flatMap((run) => run.points.map((point) => point.id)));
  const spare = stamp.ids.filter((id) => !used.has(id));
  return Object.fromEntries(
    document.runs.map((run) => {
      const kept = before[run.id];
      return [run.id, kept && !used.has(kept) ? kept : (spare.shift() ?? `${run.id}-next`)];
    }),
  );
}

/** The one way the document changes: the old one goes on the history, what was undone is dropped. */
function changed(state: EditorState, document: RunDocument, stamp: Stamp): EditorState {
  if (document === state.document) return { ...state, preview: null, typing: null };
  const nextIds = idsFor(document, state.nextIds, stamp);
  return held({ ...state, document, past: [...state.past, state.document], future: [], preview: null, typing: null, nextIds });
}

/** Keeps the cursor on a row that exists. */
function held(state: EditorState): EditorState {
  const run = runOf(state.document, state.cursor.runId) ?? state.document.runs[0];
  if (!run) return state;
  const row = Math.min(state.cursor.row, run.points.length);
  if (run.id === state.cursor.runId && row === state.cursor.row) return state;
  return { ...state, cursor: { ...state.cursor, runId: run.id, row } };
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

function without(drafts: EditorState["drafts"], key: string): EditorState["drafts"] {
  if (!(key in drafts)) return drafts;
  return Object.fromEntries(Object.entries(drafts).filter(([each]) => each !== key));
}

function typingOf(state: EditorState, action: Extract<EditorAction, { type: "typing" }>): Pick<EditorState, "preview" | "typing"> {
  if (action.text === null) return { preview: null, typing: null };
  const result = commitCell(state.document, action.target, action.text, contextFor(state, action.target, action.stamp));
  if (!result.ok) return { preview: null, typing: { ok: false, words: result.message } };
  return { preview: result.value === state.document ? null : result.value, typing: { ok: true, words: result.understood } };
}

function moveTo(state: EditorState, target: CellTarget, focus: boolean): EditorState {
  const same = target.runId === state.cursor.runId && target.row === state.cursor.row && target.column === state.cursor.column;
  if (same && !focus) return state;
  return { ...state, cursor: same ? state.cursor : target, focusTurn: focus ? state.focusTurn + 1 : state.focusTurn };
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

function insertRow(state: EditorState, target: CellTarget, stamp: Stamp): EditorState {
  const id = stamp.ids[stamp.ids.length - 1];
  const run = runOf(state.document, target.runId);
  if (!run || !id) return state;
  const point = newPoint(state.document, target.runId, { by: stamp.by, at: stamp.at, pointId: id }, target.row);
  const next = changed(state, withPointsInserted(state.document, run.id, target.row, [point]), stamp);
  return moveTo(next, { ...target, column: "move" }, true);
}

function removeRow(state: EditorState, target: CellTarget, stamp: Stamp): EditorState {
  const point = runOf(state.document, target.runId)?.points[target.row];
  if (!point) return state;
  const drafts = Object.fromEntries(Object.entries(state.drafts).filter(([key]) => !key.startsWith(`${point.id}:`)));
  const next = changed({ ...state, drafts }, pointRemove(state.document, point.id), stamp);
  return { ...next, focusTurn: next.focusTurn + 1 };
}

function paste(state: EditorState, action: Extract<EditorAction, { type: "paste" }>): EditorState {
  let document = state.document;
  const drafts: Record<string, Draft> = { ...state.drafts };
  pastedCells(action.text, action.target).forEach(({ target, text, line }) => {
    const context = { ...action.stamp, pointId: action.stamp.ids[line] ?? `${target.runId}-${line}`, branchId: `${action.stamp.branchId}${line}` };
    // A line that is not understood still takes its row, so that the lines after it stay in step.
    const rows = runOf(document, target.runId)?.points.length ?? 0;
    if (target.row >= rows) document = withPointsInserted(document, target.runId, rows, [newPoint(document, target.runId, context)]);
    const result = commitCell(document, target, text, context);
    if (result.ok) document = result.value;
    else drafts[draftKey(document, target)] = { text, message: result.message };
  });
  return { ...changed(state, document, action.stamp), drafts, focusTurn: state.focusTurn + 1 };
}

function undo(state: EditorState): EditorState {
  const document = state.past[state.past.length - 1];
  if (!document) return state;
  const next = { ...state, document, past: state.past.slice(0, -1), future: [state.document, ...state.future], preview: null, typing: null };
  return held({ ...next, focusTurn: state.focusTurn + 1 });
}

function redo(state: EditorState): EditorState {
  const [document, ...future] = state.future;
  if (!document) return state;
  return held({ ...state, document, past: [...state.past, state.document], future, preview: null, typing: null, focusTurn: state.focusTurn + 1 });
}
