/** The one way the editor's document changes, and the ways back and forth. Pure. */
import type { RunDocument } from "@/iso";
import { runOf } from "./document-edits";
import type { CellTarget } from "./cell-commit";
import type { EditorState, Stamp } from "./editor-types";

export function idsFor(document: RunDocument, before: EditorState["nextIds"], stamp: Stamp): EditorState["nextIds"] {
  const used = new Set(document.runs.flatMap((run) => run.points.map((point) => point.id)));
  const spare = stamp.ids.filter((id) => !used.has(id));
  return Object.fromEntries(
    document.runs.map((run) => {
      const kept = before[run.id];
      return [run.id, kept && !used.has(kept) ? kept : (spare.shift() ?? `${run.id}-next`)];
    }),
  );
}

/** The nth fresh id of a stamp; beyond those it brought, one made from its first. */
export function stampId(stamp: Stamp, n: number): string {
  return stamp.ids[n] ?? `${stamp.ids[0] ?? "p"}x${n}`;
}

/** The old document goes on the history, what was undone is dropped. */
export function changed(state: EditorState, document: RunDocument, stamp: Stamp): EditorState {
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
  return { ...state, cursor: { ...state.cursor, runId: run.id, row }, anchor: null, wholeRows: false };
}

/** Moves the cursor; a block that was picked out is let go. */
export function moveTo(state: EditorState, target: CellTarget, focus: boolean): EditorState {
  const same = target.runId === state.cursor.runId && target.row === state.cursor.row && target.column === state.cursor.column;
  if (same && !focus) return state;
  const focusTurn = focus ? state.focusTurn + 1 : state.focusTurn;
  return { ...state, cursor: same ? state.cursor : target, focusTurn, anchor: null, wholeRows: false };
}

/** Picks out the block from `anchor` to `cursor`, which takes the focus. */
export function picked(state: EditorState, anchor: CellTarget, cursor: CellTarget, wholeRows: boolean): EditorState {
  return { ...state, anchor, cursor, wholeRows, focusTurn: state.focusTurn + 1 };
}

export function without(drafts: EditorState["drafts"], key: string): EditorState["drafts"] {
  if (!(key in drafts)) return drafts;
  return Object.fromEntries(Object.entries(drafts).filter(([each]) => each !== key));
}

export function undo(state: EditorState): EditorState {
  const document = state.past[state.past.length - 1];
  if (!document) return state;
  const next = { ...state, document, past: state.past.slice(0, -1), future: [state.document, ...state.future], preview: null, typing: null, report: null };
  return held({ ...next, focusTurn: state.focusTurn + 1 });
}

export function redo(state: EditorState): EditorState {
  const [document, ...future] = state.future;
  if (!document) return state;
  return held({ ...state, document, past: [...state.past, state.document], future, preview: null, typing: null, report: null, focusTurn: state.focusTurn + 1 });
}
