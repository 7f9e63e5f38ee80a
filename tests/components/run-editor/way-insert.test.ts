import { describe, expect, it } from "vitest";
import { buildModel, emptyMarks, quickWays, threeElbowWays, type Model, type RunDocument, type Way, type WaysInput } from "@/iso";
import { EMPTY_END, endFromPoint, readClosingForm, type ClosingForm } from "@/components/run-editor/closing-form";
import { editorReducer, initialState } from "@/components/run-editor/editor-state";
import { planWayInsert } from "@/components/run-editor/closing-insert";
import { layWay, type Spot } from "../../oracle/lay-way";
import { emptyDocument, testStamp } from "./fixtures";

const IN = 25.4;
const MEETS_MM = 1e-6;
/** Cut lengths of two programs agree to float noise of typed texts, mm. */
const CUT_MM = 1e-6;
const FORM: ClosingForm = { nps: "4", rootGap: "1/8", end0: { ...EMPTY_END, direction: "E" }, end1: { ...EMPTY_END } };

function input(change: Partial<WaysInput> = {}): WaysInput {
  return {
    end0: { position: [0, 0, 0], direction: [1, 0, 0], nps: "4", straightMm: 0 },
    end1: { position: [48 * IN, 40 * IN, 30 * IN], direction: [0, -1, 0], nps: "4", straightMm: 0 },
    schedule: "STD", rootGapMm: IN / 8, angles: [90, 60, 45], radii: ["LR", "SR"], trimMaxDeg: 90, minimumPupMm: null, keepOuts: [], units: "imperial", takeOuts: [], ...change,
  };
}

function inserted(way: Way, asked: WaysInput): Model {
  const document: RunDocument = emptyDocument();
  const plan = planWayInsert(FORM, way, asked, buildModel(document, emptyMarks(), []), testStamp());
  if (!plan.ok) throw new Error(plan.message);
  return buildModel(plan.document, emptyMarks(), []);
}

/** Walked with the model's own cut pieces and, by hand from ASME B16.9 NPS 4, LR 90 6, LR 45 2 1/2, SR 90 4; others R·tan(θ/2). */
function reachIn(way: Way): number[] {
  return way.turns.map(({ fitting, angleRad }) => {
    if (fitting.make === "mitre") return (way.turns[0]!.radiusMm / IN) * (fitting.pieces === 2 ? 0 : Math.tan(angleRad / 2) - Math.tan(angleRad / (fitting.pieces - 1) / 2));
    if (fitting.whole && fitting.tabulated) return fitting.name === "LR 45" ? 2.5 : fitting.radius === "LR" ? 6 : 4;
    return (fitting.radius === "LR" ? 6 : 4) * Math.tan(angleRad / 2);
  });
}

/** Lays the model's pieces between the points that the model has, and says how far from the fixed end the last one ends. */
function missMm(model: Model, way: Way, asked: WaysInput): number {
  const nodes = model.nodes.map((node) => node.position);
  const straights = nodes.slice(1).map((to, j) => {
    const from = nodes[j]!;
    const size = Math.hypot(...to.map((x, i) => x - from[i as 0]));
    const piece = model.pieces.find((each) => each.legId === model.nodes[j + 1]!.pointId);
    return { direction: to.map((x, i) => (x - from[i as 0]) / size) as unknown as Spot, cut: piece?.cutLengthMm ?? null };
  });
  const { end } = layWay(nodes[0]!, straights, reachIn(way).map((x) => x * IN), IN / 8);
  const goal = asked.end1.position;
  return Math.hypot(...end.map((x, i) => x - goal[i as 0]));
}

function typed(...rows: readonly (readonly [move: string, item?: string])[]): RunDocument {
  return rows.reduce((now, [move, item], row) => {
    const at = (column: "move" | "item") => ({ runId: "main", row, column });
    const moved = editorReducer(now, { type: "commit", target: at("move"), text: move, step: "stay", stamp: testStamp() });
    return editorReducer(moved, { type: "commit", target: at("item"), text: item ?? "", step: "stay", stamp: testStamp() });
  }, initialState(emptyDocument(), testStamp())).document;
}

describe("a way inserted into the run", () => {
  it("reaches the fixed end by its own cut lengths, for every way of whole and trimmed elbows of two questions", () => {
    for (const asked of [input(), input({ end1: { position: [36 * IN, 30 * IN, 0], direction: [-1, 0, 0], nps: "4", straightMm: 0 } })]) {
      const quick = quickWays(asked);
      if (!quick.ok) throw new Error(quick.sentence);
      const three = threeElbowWays({ ...asked, angles: [90, 45], radii: ["LR"] }).ways;
      const ways = [...quick.ways.filter((way) => way.kind !== "mitre" && way.kind !== "field-trim"), ...three.slice(0, 25)];
      expect(new Set(ways.map((way) => way.kind)).size).toBeGreaterThanOrEqual(3);
      for (const way of ways) {
        const model = inserted(way, asked);
        expect(model.problems.filter((problem) => problem.severity === "stop"), way.id).toEqual([]);
        expect(missMm(model, way, asked), way.id).toBeLessThan(MEETS_MM);
        expect(model.pieces.map((piece) => piece.cutLengthMm), way.id).toEqual(way.cuts.map((cut) => expect.closeTo(cut, 6)));
        expect(model.joints.filter((joint) => joint.kind === "butt"), way.id).toHaveLength(way.welds);
        const last = model.nodes[model.nodes.length - 1]!.position;
        expect(Math.hypot(...last.map((x, i) => x - asked.end1.position[i as 0]))).toBeLessThan(MEETS_MM);
      }
    }
  });

  it("weighs what the model weighs: LR 90s by the published table, the rest along the centre line", () => {
    const asked = input();
    const quick = quickWays(asked);
    if (!quick.ok) throw new Error(quick.sentence);
    for (const way of quick.ways.filter((each) => each.kind === "two-standard" || each.kind === "one-trimmed").slice(0, 20)) {
      const model = inserted(way, asked);
      const kg = [...model.pieces, ...model.components].reduce((sum, part) => sum + (part.weightKg ?? 0), 0);
      expect(way.weightKg, way.id).toBeCloseTo(kg, 6);
    }
  });

  it("takes mitres with their segments, and a reducer with its length (4 in for 4 x 3, ASME B16.9)", () => {
    const asked = input();
    const quick = quickWays(asked);
    if (!quick.ok) throw new Error(quick.sentence);
    const mitres = quick.ways.filter((way) => way.kind === "mitre");
    expect(mitres.map((way) => way.welds)).toEqual([4, 6, 8, 10]);
    for (const way of mitres) {
      const model = inserted(way, asked);
      expect(model.pieces.map((piece) => piece.cutLengthMm).sort()).toEqual([...way.cuts].sort().map((cut) => expect.closeTo(cut, 6)));
      expect(model.joints.filter((joint) => joint.kind === "butt" || joint.kind === "mitre")).toHaveLength(way.welds);
    }
    const reduced = input({ end1: { ...input().end1, nps: "3" } });
    const ways = quickWays(reduced);
    if (!ways.ok) throw new Error(ways.sentence);
    const pair = ways.ways.filter((way) => way.kind === "two-standard" || way.kind === "trimmed-pair");
    expect(pair.length).toBeGreaterThan(3);
    for (const way of pair) {
      const model = inserted(way, reduced);
      expect(model.components.filter((component) => component.kind === "reducer-concentric")).toHaveLength(1);
      expect(model.pieces.map((piece) => piece.cutLengthMm), way.title).toEqual(way.cuts.map((cut) => expect.closeTo(cut, 6)));
      expect(way.straights.find((straight) => straight.reducer)?.reducer?.lengthMm).toBeCloseTo(4 * IN, 9);
    }
  });

  it("goes in between two fittings of the run, and what follows keeps its place", () => {
    const before = typed(["", "wn"], ["e 4-0", "gate"], ["e 3-0"], ["n 5-0 u 3-0 e 2-0"], ["e 4-0", "gate"], ["e 3-0", "wn"]);
    const model = buildModel(before, emptyMarks(), []);
    const ids = before.runs[0]!.points.map((point) => point.id);
    const form: ClosingForm = { ...FORM, end0: { ...EMPTY_END, ...endFromPoint(model, ids[1]!, 0)! }, end1: { ...EMPTY_END, ...endFromPoint(model, ids[4]!, 1)! } };
    const read = readClosingForm(form, "imperial", []);
    if (!read.ok) throw new Error(JSON.stringify(read.messages));
    const asked = input({ end0: { ...read.input.end0, nps: "4", straightMm: 0, fixed: true }, end1: { ...read.input.end1, nps: "4", straightMm: 0, fixed: true } });
    const quick = quickWays(asked);
    if (!quick.ok) throw new Error(quick.sentence);
    expect(quick.ways.some((way) => way.kind === "two-standard")).toBe(true);
    expect(quick.ways.filter((way) => way.kind === "field-trim")).toEqual([]);
    for (const way of quick.ways.filter((each) => each.kind !== "mitre")) {
      const plan = planWayInsert(form, way, asked, model, testStamp());
      if (!plan.ok) throw new Error(plan.message);
      const after = buildModel(plan.document, emptyMarks(), []);
      const place = (from: Model, id: string) => from.nodes.find((node) => node.pointId === id)?.position.map((x) => expect.closeTo(x, 6));
      const stands = (id: string) => after.nodes.find((node) => node.pointId === id)?.position;
      for (const id of [ids[1]!, ids[4]!, ids[5]!]) expect(stands(id), way.id).toEqual(place(model, id));
      // The pipe before the first gate and after the second stays; between them stand the way's own pieces.
      expect(after.pieces.slice(1, -1).map((piece) => piece.cutLengthMm), way.id).toEqual(way.cuts.map((cut) => expect.closeTo(cut, 6)));
      expect(after.problems.filter((problem) => problem.severity === "stop"), way.id).toEqual([]);
    }
  });

  it("goes in at the end of the run, to a typed end; another size or gap is refused", () => {
    const before = typed(["", "wn"], ["e 3-0"], ["e 3-0", "exist"]);
    const model = buildModel(before, emptyMarks(), []);
    const last = before.runs[0]!.points[2]!.id;
    const form: ClosingForm = { ...FORM, end0: { ...EMPTY_END, ...endFromPoint(model, last, 0)! }, end1: { ...EMPTY_END, e: "14-0", n: "4-0", u: "3-0", direction: "S" } };
    const read = readClosingForm(form, "imperial", []);
    if (!read.ok) throw new Error(JSON.stringify(read.messages));
    const asked = input({ end0: { ...read.input.end0, nps: "4", straightMm: 0 }, end1: { ...read.input.end1, nps: "4", straightMm: 0 } });
    const way = threeElbowWays({ ...asked, angles: [90, 45], radii: ["LR"] }).ways[0];
    if (!way) throw new Error("no three elbows");
    const plan = planWayInsert(form, way, asked, model, testStamp());
    if (!plan.ok) throw new Error(plan.message);
    expect(plan.words).toMatch(/^Three elbows go in at the end of the run/);
    const after = buildModel(plan.document, emptyMarks(), []);
    const end = after.nodes[after.nodes.length - 1]!.position;
    expect(end.map((x) => x / IN)).toEqual([168, 48, 36].map((x) => expect.closeTo(x, 7)));
    expect(new Set(plan.document.runs[0]!.points.map((point) => point.id)).size).toBe(plan.document.runs[0]!.points.length);
    expect(planWayInsert(form, way, { ...asked, rootGapMm: 0 }, model, testStamp())).toMatchObject({ ok: false, message: expect.stringContaining("root gap") });
    expect(planWayInsert(form, way, { ...asked, end0: { ...asked.end0, nps: "6" } }, model, testStamp())).toMatchObject({ ok: false, message: expect.stringContaining("NPS 4 there") });
  });

  it("moves an end that is cut back, and refuses where the end is a fitting", () => {
    const asked = input({ end1: { position: [36 * IN, 30 * IN, 0], direction: [-1, 0, 0], nps: "4", straightMm: 0 }, angles: [45], radii: ["LR"], trimMaxDeg: 0 });
    const quick = quickWays(asked);
    if (!quick.ok) throw new Error(quick.sentence);
    const trimmed = quick.ways.find((way) => way.kind === "field-trim");
    if (!trimmed) throw new Error("no trim opens two 45s");
    const moved = Math.abs(trimmed.trims.end0Mm) + Math.abs(trimmed.trims.end1Mm);
    expect(moved).toBeGreaterThan(CUT_MM);
    const model = inserted(trimmed, asked);
    expect(model.pieces.map((piece) => piece.cutLengthMm)).toEqual(trimmed.cuts.map((cut) => expect.closeTo(cut, 6)));
    const last = model.nodes[model.nodes.length - 1]!.position;
    const first = model.nodes[0]!.position;
    expect(first[0]).toBeCloseTo(-trimmed.trims.end0Mm, 6);
    expect(last[0]).toBeCloseTo(36 * IN + trimmed.trims.end1Mm, 6);
    const fixed = { ...asked, end0: { ...asked.end0, fixed: true }, end1: { ...asked.end1, fixed: true } };
    expect(planWayInsert(FORM, trimmed, fixed, buildModel(emptyDocument(), emptyMarks(), []), testStamp())).toMatchObject({ ok: false, message: expect.stringContaining("cut back") });
  });
});
