/** Spreadsheet habits of the grid: common practice of spreadsheets, each action one step of the history. */
import { describe, expect, it } from "vitest";
import { parseRunDocument, type RunDocument } from "@/iso";
import { blockOf, blockText, isBlock } from "@/components/run-editor/block";
import type { CellTarget, Column } from "@/components/run-editor/cell-commit";
import { shownText, waitingDrafts } from "@/components/run-editor/drafts";
import { editorReducer, initialState } from "@/components/run-editor/editor-state";
import type { EditorAction, EditorState } from "@/components/run-editor/editor-types";
import { filledDown, filledSeries } from "@/components/run-editor/fill";
import { emptyDocument, testStamp } from "./fixtures";

const at = (row: number, column: Column, runId = "main"): CellTarget => ({ runId, row, column });
const run = (state: EditorState, ...actions: readonly EditorAction[]): EditorState => actions.reduce(editorReducer, state);
const paste = (text: string, target = at(0, "move")): EditorAction => ({ type: "paste", target, text, stamp: testStamp() });
const column = (document: RunDocument, read: (point: RunDocument["runs"][number]["points"][number]) => unknown): unknown[] => (document.runs[0]?.points ?? []).map(read);

/** Flange, two legs, a valve, a cap. */
function five(): EditorState {
  return { ...run(initialState(emptyDocument(), testStamp()), paste("0\twn\ne 3-0\t\nu 2-0\t\nn 4-0\tgate\nn 1-0\tcap\n")), past: [] };
}
const pickedRows = (from: number, to: number): EditorAction => ({ type: "pick-rows", runId: "main", from, to });
const kinds = (state: EditorState): unknown[] => column(state.document, (point) => point.item.kind);

describe("a block of cells", () => {
  it("grows from the cursor with Shift and is let go by an ordinary step", () => {
    const state = run(five(), { type: "cursor", target: at(1, "move"), focus: false }, { type: "extend", step: "down" }, { type: "extend", step: "right" });
    expect(blockOf(state)).toEqual({ runId: "main", fromRow: 1, toRow: 2, fromColumn: 0, toColumn: 1, rows: false });
    expect(isBlock(run(state, { type: "step", step: "down" }))).toBe(false);
    expect(isBlock(run(state, { type: "let-go" }))).toBe(false);
  });

  it("stretches to a cell pressed with Shift and stays within its run", () => {
    const state = run(five(), { type: "cursor", target: at(3, "item"), focus: false }, { type: "stretch", target: at(1, "source"), rows: false });
    expect(blockOf(state)).toMatchObject({ fromRow: 1, toRow: 3, fromColumn: 1, toColumn: 3 });
    expect(blockOf(run(five(), { type: "extend", step: "up" })).fromRow).toBe(0);
  });

  it("copies as lines and tabs that paste back to the same run", () => {
    const state = run(five(), { type: "pick-run", runId: "main" });
    const text = blockText(state, (target) => shownText(state, target));
    expect(text.split("\n")).toHaveLength(5);
    const again = run(initialState(emptyDocument(), testStamp()), paste(text));
    expect(column(again.document, ({ offset, item, places, note }) => ({ offset, item, places, note }))).toEqual(column(state.document, ({ offset, item, places, note }) => ({ offset, item, places, note })));
    expect(again.report?.refused).toEqual([]);
  });

  it("takes one value into every cell of it", () => {
    const state = run(five(), { type: "cursor", target: at(1, "source"), focus: false }, { type: "extend", step: "down" }, { type: "extend", step: "down" }, paste("measured", at(3, "source")));
    expect(column(state.document, (point) => point.provenance.kind)).toEqual(["from-drawing", "measured", "measured", "measured", "from-drawing"]);
  });

  it("is emptied by Delete, and cut whole rows go out", () => {
    const emptied = run(five(), { type: "cursor", target: at(3, "item"), focus: false }, { type: "extend", step: "down" }, { type: "clear", stamp: testStamp() });
    expect(kinds(emptied)).toEqual(["flange", "none", "none", "none", "none"]);
    const cut = run(five(), pickedRows(1, 2), { type: "cut", stamp: testStamp() });
    expect(kinds(cut)).toEqual(["flange", "valve", "end"].map((kind, i) => (i === 2 ? "cap" : kind)));
    expect(cut.past).toHaveLength(1);
  });
});

describe("several rows at once", () => {
  it("go in, move, double and go out as one step each", () => {
    const inserted = run(five(), pickedRows(1, 3), { type: "row-insert", target: at(1, "move"), stamp: testStamp() });
    expect(kinds(inserted)).toEqual(["flange", "none", "none", "none", "none", "none", "valve", "cap"]);
    const moved = run(five(), pickedRows(3, 4), { type: "row-move", target: at(4, "move"), by: -1, stamp: testStamp() });
    expect(kinds(moved)).toEqual(["flange", "none", "valve", "cap", "none"]);
    expect(blockOf(moved)).toMatchObject({ fromRow: 2, toRow: 3, rows: true });
    const doubled = run(five(), pickedRows(3, 4), { type: "row-double", target: at(3, "move"), stamp: testStamp() });
    expect(kinds(doubled)).toEqual(["flange", "none", "none", "valve", "cap", "valve", "cap"]);
    const removed = run(five(), pickedRows(1, 3), { type: "row-remove", target: at(3, "move"), stamp: testStamp() });
    expect(kinds(removed)).toEqual(["flange", "cap"]);
    for (const state of [inserted, moved, doubled, removed]) {
      expect(state.past).toHaveLength(1);
      expect(parseRunDocument(state.document).ok).toBe(true);
      expect(run(state, { type: "undo" }).document).toEqual(five().document.runs.length === 1 ? state.past[0] : null);
    }
  });

  it("stop at the ends of the run", () => {
    const top = run(five(), pickedRows(0, 1));
    expect(run(top, { type: "row-move", target: at(0, "move"), by: -1, stamp: testStamp() }).document).toBe(top.document);
    const foot = run(five(), pickedRows(3, 4));
    expect(run(foot, { type: "row-move", target: at(4, "move"), by: 1, stamp: testStamp() }).document).toBe(foot.document);
  });

  it("double a tee with an empty branch of its own", () => {
    const tee = run(five(), { type: "commit", target: at(2, "item"), text: "tee 2", step: "stay", stamp: testStamp() });
    const state = run(tee, { type: "row-double", target: at(2, "move"), stamp: testStamp() });
    expect(state.document.runs).toHaveLength(3);
    expect(parseRunDocument(state.document)).toMatchObject({ ok: true });
  });
});

describe("a paste", () => {
  it("takes the good lines and tells each bad one by its line", () => {
    const state = run(initialState(emptyDocument(), testStamp()), paste("0\twn\ne 3-0\tfrobnicate\nsouthish\tgate\nn 1-0\tcap\n"));
    expect(kinds(state)).toEqual(["flange", "none", "valve", "cap"]);
    expect(state.report).toMatchObject({ lines: 4, refused: [{ line: 2, text: "frobnicate", target: at(1, "item") }, { line: 3, text: "southish", target: at(2, "move") }] });
    expect(waitingDrafts(state.document, state.drafts)).toHaveLength(2);
    expect(run(state, { type: "report-read" }).report).toBeNull();
    expect(run(state, { type: "undo" }).document).toEqual(emptyDocument());
  });
});

describe("filling", () => {
  it("repeats the top row of the block, or the cell above", () => {
    const block = run(five(), { type: "cursor", target: at(1, "move"), focus: false }, { type: "extend", step: "down" }, { type: "extend", step: "down" }, { type: "fill", series: false, stamp: testStamp() });
    expect([1, 2, 3].map((row) => shownText(block, at(row, "move")))).toEqual(["e 3-0", "e 3-0", "e 3-0"]);
    expect(block.past).toHaveLength(1);
    const cell = run(five(), { type: "cursor", target: at(4, "item"), focus: false }, { type: "fill", series: false, stamp: testStamp() });
    expect(kinds(cell)[4]).toBe("valve");
  });

  it("counts names on and carries equal steps of length on", () => {
    expect(filledSeries(["N1"], 3, "note", "imperial")).toEqual(["N2", "N3", "N4"]);
    expect(filledSeries(["PS-07", "PS-09"], 2, "note", "imperial")).toEqual(["PS-11", "PS-13"]);
    expect(filledSeries(["e 1-0", "e 2-0"], 2, "move", "imperial")).toEqual([`e 3'-0"`, `e 4'-0"`]);
    expect(filledSeries(["e 300", "e 450"], 1, "move", "metric")).toEqual(["e 600"]);
  });

  it("copies what is no series: sizes, classes, one length, mixed directions", () => {
    expect(filledSeries(["wn 300"], 1, "item", "imperial")).toEqual(["wn 300"]);
    expect(filledSeries(["tee 2"], 1, "item", "imperial")).toEqual(["tee 2"]);
    expect(filledSeries(["e 1-0"], 1, "move", "imperial")).toEqual(["e 1-0"]);
    expect(filledSeries(["e 1-0", "n 2-0"], 1, "move", "imperial")).toEqual(["e 1-0"]);
    expect(filledDown(["a", "b"], 3)).toEqual(["a", "b", "a"]);
  });

  it("goes on below the filled cells of a block", () => {
    const noted = run(five(), { type: "commit", target: at(0, "note"), text: "N1", step: "stay", stamp: testStamp() });
    const state = run(noted, { type: "cursor", target: at(0, "note"), focus: false }, { type: "stretch", target: at(3, "note"), rows: false }, { type: "fill", series: true, stamp: testStamp() });
    expect(column(state.document, (point) => point.note)).toEqual(["N1", "N2", "N3", "N4", ""]);
  });
});
