import { describe, expect, it } from "vitest";
import type { RunDocument } from "@/iso";
import { type CellTarget, type Column } from "@/components/run-editor/cell-commit";
import { shownText, waitingDrafts } from "@/components/run-editor/drafts";
import { editorReducer, initialState } from "@/components/run-editor/editor-state";
import type { EditorAction, EditorState } from "@/components/run-editor/editor-types";
import { emptyDocument, testStamp } from "./fixtures";

function start(document: RunDocument = emptyDocument()): EditorState {
  return initialState(document, testStamp());
}

function type(state: EditorState, text: string, step: "next-row" | "right" = "next-row"): EditorState {
  return editorReducer(state, { type: "commit", target: state.cursor, text, step, stamp: testStamp() });
}

function at(row: number, column: Column, runId = "main"): CellTarget {
  return { runId, row, column };
}

/** Two flanges with a leg east and a leg up between them. */
function twoLegs(): EditorState {
  return type(type(type(type(start(), "wn"), "e 3-0"), "u 2-0", "right"), "wn");
}

describe("the editor's reducer", () => {
  it("starts an empty line at its first item and goes from row to row", () => {
    const state = twoLegs();
    expect(state.document.runs[0]?.points.map((point) => point.item.kind)).toEqual(["flange", "none", "flange"]);
    expect(state.cursor).toEqual(at(3, "move"));
  });

  it("gives every point an id of its own and the empty row keeps its id when it becomes a point", () => {
    const before = start();
    const after = type(before, "wn");
    expect(after.document.runs[0]?.points[0]?.id).toBe(before.nextIds["main"]);
    const ids = twoLegs().document.runs[0]?.points.map((point) => point.id) ?? [];
    expect(new Set(ids).size).toBe(3);
  });

  it("keeps a wrong text in its cell with one sentence, and out of the document", () => {
    const state = type(type(start(), "wn"), "e 3-1 1/3");
    expect(state.cursor).toEqual(at(1, "move"));
    expect(shownText(state, at(1, "move"))).toBe("e 3-1 1/3");
    expect(waitingDrafts(state.document, state.drafts)[0]?.draft.message).toMatch(/1\/3/);
    expect(state.document.runs[0]?.points).toHaveLength(1);
    const mended = type(state, "e 3-1 1/2");
    expect(waitingDrafts(mended.document, mended.drafts)).toHaveLength(0);
    expect(mended.document.runs[0]?.points).toHaveLength(2);
  });

  it("undoes and redoes one committed cell at a time", () => {
    const state = twoLegs();
    const once = editorReducer(state, { type: "undo" });
    expect(once.document.runs[0]?.points[2]?.item.kind).toBe("none");
    const all = [1, 2, 3].reduce((now) => editorReducer(now, { type: "undo" }), once);
    expect(all.document).toEqual(emptyDocument());
    expect(editorReducer(all, { type: "undo" })).toBe(all);
    const back = [1, 2, 3, 4].reduce((now) => editorReducer(now, { type: "redo" }), all);
    expect(back.document).toEqual(state.document);
  });

  it("adds no step when a cell is left as it was", () => {
    const state = twoLegs();
    const same = editorReducer(state, { type: "commit", target: at(1, "move"), text: "e 3-0", step: "right", stamp: testStamp() });
    expect(same.past).toHaveLength(state.past.length);
    expect(same.document).toBe(state.document);
  });

  it("previews a valid entry without touching the document", () => {
    const state = twoLegs();
    const typing = (text: string): EditorState => editorReducer(state, { type: "typing", target: state.cursor, text, stamp: testStamp() });
    expect(typing("n 1-0").preview?.runs[0]?.points).toHaveLength(4);
    expect(typing("n").preview).toBeNull();
    expect(typing("n 1-0").document).toBe(state.document);
  });

  it("inserts, moves and removes rows", () => {
    const run = (state: EditorState, action: EditorAction): EditorState => editorReducer(state, action);
    const inserted = run(twoLegs(), { type: "row-insert", target: at(1, "item"), stamp: testStamp() });
    expect(inserted.document.runs[0]?.points).toHaveLength(4);
    expect(inserted.cursor).toEqual(at(1, "move"));
    const moved = run(twoLegs(), { type: "row-move", target: at(1, "move"), by: 1, stamp: testStamp() });
    expect(moved.document.runs[0]?.points.map((point) => point.item.kind)).toEqual(["flange", "flange", "none"]);
    expect(moved.cursor.row).toBe(2);
    const removed = run(twoLegs(), { type: "row-remove", target: at(2, "move"), stamp: testStamp() });
    expect(removed.document.runs[0]?.points).toHaveLength(2);
    expect(run(removed, { type: "row-remove", target: at(2, "move"), stamp: testStamp() }).document).toBe(removed.document);
  });

  it("opens a branch with a tee and takes the empty branch away with it", () => {
    const tee = editorReducer(twoLegs(), { type: "commit", target: at(1, "item"), text: "tee 2", step: "stay", stamp: testStamp() });
    const branch = tee.document.runs[1];
    expect(branch).toMatchObject({ from: tee.document.runs[0]?.points[1]?.id, points: [] });
    const gone = editorReducer(tee, { type: "commit", target: at(1, "item"), text: "", step: "stay", stamp: testStamp() });
    expect(gone.document.runs).toHaveLength(1);
    const filled = editorReducer(tee, { type: "commit", target: at(0, "move", branch?.id), text: "n 2-0", step: "stay", stamp: testStamp() });
    const removed = editorReducer(filled, { type: "row-remove", target: at(1, "move"), stamp: testStamp() });
    expect(removed.document.runs).toHaveLength(1);
    expect(removed.document.runs[0]?.points).toHaveLength(2);
  });

  it("pastes rows from a spreadsheet as one step, keeping what it did not understand", () => {
    const before = twoLegs();
    const state = editorReducer(before, { type: "paste", target: at(3, "move"), text: "n 1-0\tgate\nsouthish\nu 2-0\tcap\tf\n", stamp: testStamp() });
    expect(state.document.runs[0]?.points.map((point) => point.item.kind)).toEqual(["flange", "none", "flange", "valve", "none", "cap"]);
    expect(waitingDrafts(state.document, state.drafts)).toHaveLength(1);
    expect(editorReducer(state, { type: "undo" }).document).toBe(before.document);
  });

  it("finds the row of a point", () => {
    const state = twoLegs();
    const id = state.document.runs[0]?.points[1]?.id ?? "";
    expect(editorReducer(state, { type: "show-point", pointId: id, focus: true }).cursor.row).toBe(1);
  });

  it("walks through all cells with Tab and back", () => {
    const step = (state: EditorState, way: "right" | "left"): EditorState => editorReducer(state, { type: "step", step: way });
    const state = editorReducer(twoLegs(), { type: "cursor", target: at(0, "note"), focus: false });
    expect(step(state, "right").cursor).toEqual(at(1, "move"));
    expect(step(step(state, "right"), "left").cursor).toEqual(at(0, "note"));
  });
});
