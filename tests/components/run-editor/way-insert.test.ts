import { describe, expect, it } from "vitest";
import { buildModel, emptyMarks, quickWays, threeElbowWays, type Model, type RunDocument, type Way, type WaysInput } from "@/iso";
import { EMPTY_END, type ClosingForm } from "@/components/run-editor/closing-form";
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
