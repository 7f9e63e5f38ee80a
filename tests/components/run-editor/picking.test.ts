/** What is picked on the drawing, loops closed by typing, notes of a sheet, and the true shape's solids. */
import { describe, expect, it } from "vitest";
import { buildModel, emptyMarks, INCH_MM, parseRunDocument, pipeSize, vecDistance, type RunDocument } from "@/iso";
import { arc, shapeParts } from "@/components/run-editor/shape-parts";
import type { CellTarget, Column } from "@/components/run-editor/cell-commit";
import { dimensionEdit, dimensionMove, isOverall } from "@/components/run-editor/dimension-entry";
import { pieceFinder } from "@/components/run-editor/drawing-refs";
import { shownText } from "@/components/run-editor/drafts";
import { editorReducer, initialState } from "@/components/run-editor/editor-state";
import type { EditorState } from "@/components/run-editor/editor-types";
import { legendAt } from "@/components/run-editor/legend-strip";
import { notesOfSpool, withSpoolNotes } from "@/components/run-editor/sheet-notes";
import { emptyDocument, testStamp } from "./fixtures";

const at = (row: number, column: Column, runId = "main"): CellTarget => ({ runId, row, column });
const pasted = (text: string, state = initialState(emptyDocument(), testStamp()), target = at(0, "move")): EditorState => editorReducer(state, { type: "paste", target, text, stamp: testStamp() });
const type = (state: EditorState, target: CellTarget, text: string): EditorState => editorReducer(state, { type: "commit", target, text, step: "stay", stamp: testStamp() });
const idOf = (document: RunDocument, row: number): string => document.runs[0]?.points[row]?.id ?? "";

describe("a number on the drawing", () => {
  const state = pasted("0\twn\ne 3-1 1/2\t\nu 2-8\t\nE 2-0 N 1-0\t\nw 10-0 @ 1:100\tend\n");
  const edit = (row: number) => dimensionEdit(state.document, idOf(state.document, row))!;

  it("is edited as the length alone and keeps the leg's direction and slope", () => {
    expect(edit(1)).toMatchObject({ text: "3-1 1/2", target: at(1, "move") });
    expect(dimensionMove(state.document, edit(1), "4-0")).toMatchObject({ ok: true, value: "e 4-0" });
    expect(dimensionMove(state.document, edit(4), "12-0")).toMatchObject({ ok: true, value: "w 12-0 @ 1:100" });
  });

  it("takes a whole move, by the Move cell's own reader", () => {
    expect(dimensionMove(state.document, edit(1), "n 4-0")).toMatchObject({ ok: true, value: "n 4-0" });
    expect(edit(3).text).toBe("E 2-0 N 1-0");
    expect(dimensionMove(state.document, edit(3), "E 3-0 N 1-0")).toMatchObject({ ok: true });
  });

  it("says what to type and changes nothing by itself", () => {
    expect(dimensionMove(state.document, edit(1), "3-1 1/3")).toMatchObject({ ok: false, message: expect.stringMatching(/1\/3/) });
    expect(dimensionMove(state.document, edit(1), "")).toMatchObject({ ok: false });
    expect(dimensionEdit(state.document, "gone")).toBeNull();
    expect(isOverall({ kind: "dimension", id: "p1..p3" })).toBe(true);
  });
});

describe("what the drawing leads to", () => {
  const state = pasted("0\twn\ne 3-0\tgate\ne 3-0\tend fw\n");
  const model = buildModel(state.document, emptyMarks(), []);

  it("finds the cut piece of a mark, of a leg", () => {
    const piece = model.pieces[0]!;
    expect(pieceFinder(model)({ kind: "piece", id: piece.key })).toBe(piece.key);
    expect(pieceFinder(model)({ kind: "leg", id: piece.legId })).toBe(piece.key);
    expect(pieceFinder(model)({ kind: "joint", id: "x" })).toBeNull();
  });

  it("names the legend of what stands in a row", () => {
    expect([...legendAt(model, idOf(state.document, 1))]).toEqual(expect.arrayContaining(["gate"]));
    expect([...legendAt(model, idOf(state.document, 0))]).toEqual(expect.arrayContaining(["weld-neck", "shop-weld"]));
    expect(legendAt(model, null).size).toBe(0);
  });
});

describe("a loop closed by typing", () => {
  const base = pasted("0\twn\ne 3-0\ttee\ne 4-0\ttee\ne 2-0\tend\n");
  const branch = base.document.runs[1]?.id ?? "";
  const rows = pasted("n 2-0\ne 4-0\ns 2-0\n", base, at(0, "move", branch));

  it("meets the row named, shows it again, and lets go when something else is typed there", () => {
    const closed = type(rows, at(2, "item", branch), "meet 3");
    expect(closed.document.runs[1]?.to).toBe(idOf(base.document, 2));
    expect(shownText(closed, at(2, "item", branch))).toBe("meet 3");
    expect(parseRunDocument(closed.document)).toMatchObject({ ok: true });
    expect(type(closed, at(2, "item", branch), "end").document.runs[1]).not.toHaveProperty("to");
  });

  it.each([["meet 9", /no such row/], ["meet 1", /tee, a cross/], ["meet", /Type meet/]])("says what is wrong with %s", (text, message) => {
    const state = type(rows, at(2, "item", branch), text);
    expect(Object.values(state.drafts)[0]?.message).toMatch(message);
  });

  it("opens two branches at a cross", () => {
    expect(type(base, at(1, "item"), "cross 2").document.runs.filter((run) => run.from === idOf(base.document, 1))).toHaveLength(2);
  });
});

describe("notes of one sheet", () => {
  it("go with their spool and leave no trace when the last is gone", () => {
    const first = withSpoolNotes(emptyDocument(), "A", ["Paint after test"]);
    const document = { ...emptyDocument(), sheetNotes: first };
    expect(notesOfSpool(document, "A")).toEqual(["Paint after test"]);
    expect(notesOfSpool(document, "B")).toEqual([]);
    expect(withSpoolNotes(document, "A", [])).toBeUndefined();
    const state = editorReducer(initialState(document, testStamp()), { type: "document-patch", patch: { sheetNotes: undefined }, stamp: testStamp() });
    expect(state.document).not.toHaveProperty("sheetNotes");
  });
});

describe("the true shape", () => {
  const model = buildModel(pasted("0\twn\ne 3-0\t\nu 4-0\tgate\nu 2-0\tcap\n").document, emptyMarks(), []);

  it("draws pipe at its true outside (NPS 4: 4.500 in, ASME B36.10M) from end to end of each piece", () => {
    const tubes = shapeParts(model).filter((part) => part.solid === "tube" && part.tint === "pipe");
    expect(tubes).toHaveLength(model.pieces.length);
    for (const tube of tubes) if (tube.solid === "tube") expect(tube.radiusMm).toBeCloseTo((4.5 * INCH_MM) / 2, 6);
    expect(pipeSize("4")?.odInchMm).toBeCloseTo(4.5 * INCH_MM, 6);
  });

  it("bends an elbow on a circle of its radius (quarter circle of 152.4 about its center)", () => {
    const path = arc([0, 0, 0], [1, 0, 0], [152.4, 0, 152.4], [0, 0, 1]);
    for (const place of path) expect(vecDistance(place, [0, 0, 152.4])).toBeCloseTo(152.4, 6);
    expect(arc([0, 0, 0], [1, 0, 0], [5, 0, 0], [1, 0, 0])).toHaveLength(2);
  });

  it("turns a return through half a circle (common practice)", () => {
    const path = arc([0, 0, 0], [1, 0, 0], [0, 0, 300], [-1, 0, 0]);
    expect(Math.max(...path.map(([x]) => x))).toBeCloseTo(150, 6);
  });

  it("has a solid for every part that has a body, each with its row", () => {
    const points = new Set(model.nodes.map((node) => node.pointId));
    const parts = shapeParts(model);
    for (const part of parts) expect(points.has(part.pointId)).toBe(true);
    for (const component of model.components.filter(({ kind }) => !["gasket", "bolt-set", "pad"].includes(kind))) expect(parts.some((part) => part.pointId === component.pointId)).toBe(true);
  });
});
