import { describe, expect, it } from "vitest";
import { buildModel, closeBetween, emptyMarks, INCH_MM, type ClosingFound, type Model, type RunDocument } from "@/iso";
import { directionText, endFromPoint, readClosingForm, EMPTY_END, type ClosingForm } from "@/components/run-editor/closing-form";
import { planInsert } from "@/components/run-editor/closing-insert";
import { closingPicture } from "@/components/run-editor/closing-picture";
import { editorReducer, initialState } from "@/components/run-editor/editor-state";
import { emptyDocument, testStamp } from "./fixtures";

/** Tape reading of the whole answer: a hundredth of an inch is far under it. */
const HUNDREDTH_IN = 2;

function formOf(end0: Partial<ClosingForm["end0"]>, end1: Partial<ClosingForm["end1"]>, change: Partial<ClosingForm> = {}): ClosingForm {
  return { nps: "6", rootGap: "0", end0: { ...EMPTY_END, ...end0 }, end1: { ...EMPTY_END, ...end1 }, ...change };
}

function answered(form: ClosingForm): { readonly found: ClosingFound; readonly input: Extract<ReturnType<typeof readClosingForm>, { ok: true }>["input"] } {
  const read = readClosingForm(form, "imperial", []);
  if (!read.ok) throw new Error(JSON.stringify(read.messages));
  const found = closeBetween(read.input);
  if (!found.ok) throw new Error(found.sentence);
  return { found, input: read.input };
}

function typed(...rows: readonly (readonly [move: string, item?: string])[]): RunDocument {
  const state = rows.reduce((now, [move, item], row) => {
    const at = (column: "move" | "item") => ({ runId: "main", row, column });
    const moved = editorReducer(now, { type: "commit", target: at("move"), text: move, step: "stay", stamp: testStamp() });
    return editorReducer(moved, { type: "commit", target: at("item"), text: item ?? "", step: "stay", stamp: testStamp() });
  }, initialState(emptyDocument(), testStamp()));
  return state.document;
}

function modelOf(document: RunDocument): Model {
  return buildModel(document, emptyMarks(), []);
}

describe("close between ends", () => {
  it("answers the common-practice check: NPS 6 long radius, 30 in set on 36 in of run, no gaps", () => {
    const { found } = answered(formOf({ direction: "E" }, { e: "36", n: "30", direction: "W" }));
    expect(found.bends.map((bend) => bend.angleText)).toEqual(["46.75°", "46.75°"]);
    expect(found.bends[0]?.takeOutText).toMatch(/^3 7\/8|^3 57\/64|^3 7/);
    expect(found.pipeLengthMm / INCH_MM).toBeCloseTo(33.407, HUNDREDTH_IN);
    expect(found.rollText).toMatch(/180/);
  });

  it("says per field what to type, and nothing while an end is still empty", () => {
    expect(readClosingForm(formOf({}, {}), "imperial", [])).toMatchObject({ ok: false, blank: true });
    const read = readClosingForm(formOf({ e: "x", direction: "E" }, { direction: "sideways" }), "imperial", []);
    expect(read).toMatchObject({ ok: false, blank: false });
    if (!read.ok) expect(Object.keys(read.messages).sort()).toEqual(["end0.e", "end1.direction"]);
    const half = readClosingForm(formOf({ e: "1-0", direction: "bogus" }, {}), "imperial", []);
    if (!half.ok) expect(Object.keys(half.messages)).toEqual(["end0.direction"]);
  });

  it("takes an end from a row: the weld end of a flange, the end of a bare pipe", () => {
    const model = modelOf(typed(["", "wn"], ["e 3-0"], ["u 2-0", "exist"]));
    const ids = model.document.runs[0]?.points.map((point) => point.id) ?? [];
    expect(endFromPoint(model, ids[0] ?? "", 0)).toMatchObject({ e: `3"`, n: `0"`, direction: "E" });
    expect(endFromPoint(model, ids[2] ?? "", 0)).toMatchObject({ e: `3'-0"`, u: `2'-0"`, direction: "U" });
  });

  it("writes directions so that they read back", () => {
    expect(directionText([0, Math.SQRT1_2, Math.SQRT1_2])).toBe("UN");
    expect(directionText([Math.sin(0.3), Math.cos(0.3), 0])).toMatch(/^017\.188734\/0$/);
  });

  it.each([["", "plain"], ["ecc 3 flat d", "after an eccentric reducer"]])("inserts at the end so that the run reaches the end given (%s)", (reducer) => {
    const document = typed(["", "wn"], ["e 4-0", reducer || "45"].slice(0, reducer ? 2 : 1) as [string, string?], ["e 3-0", "exist"]);
    const model = modelOf(document);
    const last = document.runs[0]?.points[2]?.id ?? "";
    const end0 = endFromPoint(model, last, 0);
    const form = formOf({ ...end0 }, { e: "14-0", n: "4-0", u: "1-0", direction: "W" }, { nps: reducer ? "3" : "4", rootGap: "1/8" });
    const { found, input } = answered(form);
    const plan = planInsert(form, found, input, model, testStamp());
    if (!plan.ok) throw new Error(plan.message);
    const after = modelOf(plan.document);
    const points = plan.document.runs[0]?.points ?? [];
    expect(points.map((point) => point.item.kind)).toEqual(["flange", reducer ? "reducer" : "none", "elbow", "elbow", "end"]);
    expect(after.problems.filter((problem) => problem.severity === "stop" || problem.code === "short-pup")).toEqual([]);
    const end = after.nodes.find((node) => node.pointId === points[4]?.id)?.position ?? [];
    expect([...end].map((mm) => mm / INCH_MM)).toEqual([expect.closeTo(168, 4), expect.closeTo(48, 4), expect.closeTo(12, 4)]);
    const closing = after.pieces.find((piece) => piece.legId === points[3]?.id);
    expect(closing?.cutLengthMm).toBeCloseTo(found.pipeLengthMm, 3);
    expect(after.joints.find((joint) => joint.pointId === points[4]?.id)).toMatchObject({ place: "field", b: null });
  });

  it("puts the closing between two rows and keeps what follows in its place", () => {
    const document = typed(["", "wn"], ["e 3-0", "gate"], ["N 3-0 E 6-0", "gate"], ["e 3-0", "wn"]);
    const model = modelOf(document);
    const ids = document.runs[0]?.points.map((point) => point.id) ?? [];
    const from = endFromPoint(model, ids[1] ?? "", 0);
    const form = formOf({ ...from, direction: "E" }, { ...endFromPoint(model, ids[2] ?? "", 1), direction: "W" }, { nps: "4", rootGap: "1/8" });
    const read = readClosingForm(form, "imperial", []);
    if (!read.ok) throw new Error(JSON.stringify(read.messages));
    const found = closeBetween(read.input);
    if (!found.ok) throw new Error(found.sentence);
    const plan = planInsert(form, found, read.input, model, testStamp());
    if (!plan.ok) throw new Error(plan.message);
    const after = modelOf(plan.document);
    expect(plan.document.runs[0]?.points).toHaveLength(6);
    const place = (from: Model, id: string) => from.nodes.find((node) => node.pointId === id)?.position.map((mm) => Math.round(mm * 1000) / 1000);
    expect(place(after, ids[2] ?? "")).toEqual(place(model, ids[2] ?? ""));
    expect(place(after, ids[3] ?? "")).toEqual(place(model, ids[3] ?? ""));
  });

  it("does not insert what a run cannot hold", () => {
    const model = modelOf(typed(["", "wn"], ["e 3-0"], ["e 3-0", "exist"]));
    const form = formOf({ direction: "E", radius: "own", ownRadius: "8" }, { e: "60", n: "30", direction: "W" });
    const { found, input } = answered(form);
    expect(planInsert(form, found, input, model, testStamp())).toMatchObject({ ok: false, message: expect.stringContaining("long- or short-radius") });
    const plain = formOf({ direction: "E" }, { e: "60", n: "30", direction: "W" });
    const other = answered(plain);
    expect(planInsert(plain, other.found, other.input, model, testStamp())).toMatchObject({ ok: false, message: expect.stringContaining("Take end 0 from a row") });
  });

  it("does not insert a closing worked out for another size or gap, nor one that takes a branch away", () => {
    const model = modelOf(typed(["", "wn"], ["e 3-0"], ["e 3-0", "exist"]));
    const last = model.document.runs[0]?.points[2]?.id ?? "";
    const end0 = endFromPoint(model, last, 0);
    const ends = [{ ...end0 }, { e: "14-0", n: "4-0", direction: "W" }] as const;
    const plan = (change: Partial<ClosingForm>) => {
      const form = formOf(...ends, change);
      const { found, input } = answered(form);
      return planInsert(form, found, input, model, testStamp());
    };
    expect(plan({ nps: "6", rootGap: "1/8" })).toMatchObject({ ok: false, message: expect.stringContaining("NPS 4 there") });
    expect(plan({ nps: "4", rootGap: "0" })).toMatchObject({ ok: false, message: expect.stringContaining("root gap") });
    expect(plan({ nps: "4", rootGap: "1/8" })).toMatchObject({ ok: true });
    const branched = modelOf(typed(["", "wn"], ["e 3-0"], ["e 3-0", "tee"], ["e 3-0"], ["N 3-0", "wn"]));
    const ids = branched.document.runs[0]?.points.map((point) => point.id) ?? [];
    const form = formOf({ ...endFromPoint(branched, ids[1] ?? "", 0) }, { ...endFromPoint(branched, ids[4] ?? "", 1) }, { nps: "4", rootGap: "1/8" });
    const { found, input } = answered(form);
    expect(planInsert(form, found, input, branched, testStamp())).toMatchObject({ ok: false, message: expect.stringContaining("carries a branch") });
  });

  it("starts an empty line with a typed closing, and draws it as a small run", () => {
    const form = formOf({ direction: "E" }, { e: "36", n: "30", direction: "W" }, { nps: "4", rootGap: "1/8" });
    const { found, input } = answered(form);
    const plan = planInsert(form, found, input, modelOf(emptyDocument()), testStamp());
    if (!plan.ok) throw new Error(plan.message);
    const line = modelOf(plan.document);
    expect(line.pieces).toHaveLength(1);
    expect(line.pieces[0]?.cutLengthMm).toBeCloseTo(found.pipeLengthMm, 3);
    const picture = modelOf(closingPicture(form, found, input, emptyDocument()));
    expect(picture.components.filter((component) => component.kind === "trimmed-elbow")).toHaveLength(2);
  });
});
