/** Texts that were not understood and wait in their cells. */
import type { RunDocument } from "@/iso";
import { cellText, COLUMNS, rowFactsAt, type CellTarget } from "./cell-commit";
import { gridRows } from "./cursor-steps";
import { runOf } from "./document-edits";
import type { Draft, EditorState } from "./editor-types";

export function draftKey(document: RunDocument, target: CellTarget): string {
  const point = runOf(document, target.runId)?.points[target.row];
  return `${point?.id ?? `${target.runId}:new`}:${target.column}`;
}

/** Entries that were not understood, for the problem list: each with its place. */
export function waitingDrafts(document: RunDocument, drafts: EditorState["drafts"]): readonly { readonly target: CellTarget; readonly draft: Draft }[] {
  if (Object.keys(drafts).length === 0) return [];
  return gridRows(document, true).flatMap((row) =>
    COLUMNS.flatMap((column) => {
      const target: CellTarget = { ...row, column };
      const draft = drafts[draftKey(document, target)];
      return draft ? [{ target, draft }] : [];
    }),
  );
}

/** What a cell shows: the waiting text, else what is stored. */
export function shownText(state: EditorState, target: CellTarget): string {
  const draft = state.drafts[draftKey(state.document, target)];
  const point = runOf(state.document, target.runId)?.points[target.row];
  return draft?.text ?? (point ? cellText(point, target.column, rowFactsAt(state.document, target.runId, target.row)) : "");
}
