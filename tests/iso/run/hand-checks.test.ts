/**
 * Cut lengths worked by hand from the standards' tables; gaps and gaskets 1/8 in, no gasket at the sheet's own end.
 * Sources: ASME B16.9 (butt-weld), B16.5 (flanges), B16.11 (socket-weld), B16.10 (valves, from memory), MSS SP-97 (outlets, from memory).
 */
import { describe, expect, it } from "vitest";
import { buildModel } from "../../../iso/run/build-model";
import { emptyMarks } from "../../../iso/run/marks";
import type { Model } from "../../../iso/run/model-types";
import type { RunDocument } from "../../../iso/run/document";
import { cap, elbow, end, flange, outlet, pipe, reducer, RunBuilder, tee, valve } from "../../fixtures/run-builder";
import { firstRun, slopedDrain } from "../../fixtures/sample-runs";

const INCH = 25.4;
const build = (document: RunDocument): Model => buildModel(document, emptyMarks(), []);
const cuts = (model: Model): number[] => model.pieces.map((p) => p.cutLengthMm / INCH);
const close = (found: readonly number[], wanted: readonly number[]): void => {
  expect(found).toHaveLength(wanted.length);
  wanted.forEach((length, i) => expect(found[i]).toBeCloseTo(length, 9));
};
/** Inches without float dust. */
const inches = (mm: number): number => Math.round((mm / INCH) * 1e6) / 1e6;
const open = end("open", "BEVEL");

describe("butt-weld and flanges", () => {
  it("first run: 28 1/4, 19 3/4, 13 and 25 5/8 in (B16.9, B16.5, B16.10)", () => {
    close(cuts(build(firstRun)), [28.25, 19.75, 13, 25.625]);
  });

  it("NPS 4 weld-neck class 150 face to LR 90 centre 37 1/2: 28 1/4 (3 hub, 6 take-out, two gaps); class 600: 27 (hub 4 + 1/4 face)", () => {
    const at = (ratingClass: 150 | 600) => new RunBuilder("T", "imperial").start(flange({ ratingClass })).go("E", `37 1/2"`).go("N", `3'`, open).done();
    expect(cuts(build(at(150)))[0]).toBeCloseTo(28.25, 9);
    const heavy = build(at(600)).pieces[0]!;
    expect(heavy.cutLengthMm / INCH).toBeCloseTo(27, 9);
    expect(heavy.terms.map((t) => [t.label, inches(t.valueMm)])).toEqual([
      ["face to centre", 37.5], ["weld-neck hub", -4], ["raised face", -0.25], ["root gap", -0.125], ["LR 90 take-out", -6], ["root gap", -0.125],
    ]);
  });

  it("NPS 4 45° elbow centre to gate-valve centre, class 150, 36: 25 5/8 (2 1/2, half of 9, gasket 1/8, hub 3, two gaps)", () => {
    const model = build(new RunBuilder("T").start(flange()).go("E", `3'`).go("NE", `3'`, valve()).done());
    const piece = model.pieces[1]!;
    expect(piece.cutLengthMm / INCH).toBeCloseTo(25.625, 9);
    expect(piece.terms.map((t) => [t.kind, inches(t.valueMm)])).toEqual([
      ["centre-to-centre", 36], ["take-out", -2.5], ["root-gap", -0.125], ["take-out", -4.5], ["gasket", -0.125], ["take-out", -3], ["root-gap", -0.125],
    ]);
    expect(piece.terms.filter((t) => t.unconfirmed).map((t) => t.label)).toEqual(["half the gate valve"]);
  });

  it("a face dimension that includes the gasket takes it off the pipe", () => {
    const at = (faceIncludesGasket: boolean) => cuts(build(new RunBuilder("T", "imperial", { faceIncludesGasket }).start(flange()).go("E", `37 1/2"`).go("N", `3'`, open).done()))[0]!;
    expect(at(false) - at(true)).toBeCloseTo(0.125, 9);
  });

  it("sets a slip-on back by its setting, never by its hub (common practice)", () => {
    const model = build(new RunBuilder("T").start(flange({ flange: "slip-on" })).go("E", `3'`, open).done());
    expect(cuts(model)).toEqual([expect.closeTo(36 - 0.25, 9)]);
    expect(model.joints.find((j) => j.number === "1")?.kind).toBe("slip-on");
    expect(model.pieces[0]!.ends.map((e) => e.prep)).toEqual(["square", "bevel"]);
  });

  it("a flange pair within a run: the point is the face, the gasket lies on the side stated", () => {
    const at = (gasketSide: "before" | "after") => cuts(build(new RunBuilder("T").start(open).go("E", `3'`, flange({ gasketSide })).go("E", `4'`, open).done()));
    close(at("after"), [36 - 3 - 0.125, 48 - 0.125 - 3 - 0.125]);
    close(at("before"), [36 - 0.125 - 3 - 0.125, 48 - 3 - 0.125]);
  });

  it("a cap's point is its outside end: 24 in to it leaves 21 3/8 of NPS 4 (cap 2 1/2, B16.9, one gap)", () => {
    close(cuts(build(new RunBuilder("T").start(open).go("E", `2'`, cap).done())), [21.375]);
  });

  it("fittings one root gap apart are welded face to face: one weld, no pipe", () => {
    const model = build(new RunBuilder("T").start(flange()).go("E", `3'`).go("U", `12 1/8"`).go("E", `3'`, open).done());
    expect(model.pieces).toHaveLength(2);
    expect(model.joints.filter((j) => j.number !== null).map((j) => j.key)).toEqual(["p1:out", "p2:in", "p3:in", "p3:out"]);
    expect(model.joints.find((j) => j.key === "p3:in")).toMatchObject({ a: "p2", b: "p3", gapMm: expect.closeTo(3.175, 9) });
    expect(model.problems.map((p) => p.code)).not.toContain("negative-length");
  });
});

describe("socket-weld", () => {
  it("NPS 1 class 3000, two 90s, 24 centre to centre, 1/16 pull-back in each socket: 22 1/8 (B16.11)", () => {
    const model = build(new RunBuilder("T", "imperial", { pipe: pipe("1", "80") }).start(open).go("E", `2'`, elbow("sw-90")).go("U", `24"`, elbow("sw-90")).go("E", `2'`, open).done());
    expect(cuts(model)[1]).toBeCloseTo(22.125, 9);
    expect(model.pieces[1]!.ends.map((e) => e.prep)).toEqual(["square", "square"]);
  });
});

describe("small parts", () => {
  const one = { pipe: pipe("1", "80") };

  it("NPS 1 coupling class 3000, laying length 1/2: 1/4 and a pull-back off each pipe (B16.11)", () => {
    close(cuts(build(new RunBuilder("T", "imperial", one).start(open).go("E", `2'`, { kind: "coupling", half: false }).go("E", `3'`, open).done())), [24 - 0.25 - 0.0625, 36 - 0.25 - 0.0625]);
  });

  it("NPS 1 socket-weld flange class 150: hub 11/16 less the 1/2 socket, and the pull-back (B16.5, B16.11)", () => {
    close(cuts(build(new RunBuilder("T", "imperial", one).start(flange({ flange: "socket-weld" })).go("E", `2'`, open).done())), [24 - 0.1875 - 0.0625]);
  });

  it("stub-in 2 on 6: the blank reaches the ears of the saddle, sqrt(3.3125² - 1.0335²) from the run's centre line (geometry)", () => {
    const model = build(new RunBuilder("T", "imperial", { pipe: pipe("6") }).start(flange()).go("E", `3'`, { kind: "stub-in", branchNps: "2" }).go("E", `3'`, open).branch(2).go("U", `2'`, open).done());
    expect(cuts(model)[1]).toBeCloseTo(24 - Math.sqrt(3.3125 ** 2 - 1.0335 ** 2) - 0.125, 9);
    expect(model.spools).toHaveLength(1);
    expect(model.joints.find((j) => j.kind === "branch")).toMatchObject({ key: "p2:branch", a: "p2" });
  });
});

describe("branches and reducers", () => {
  it("outlet 2 on 6: its weld end stands 4 13/16 from the run's centre line (half of 6.625 plus 1 1/2)", () => {
    const model = build(new RunBuilder("T", "imperial", { pipe: pipe("6") }).start(flange()).go("E", `3'`, outlet("2")).go("E", `3'`, open).branch(2).go("U", `2'`, open).done());
    const part = model.components.find((c) => c.kind === "outlet")!;
    expect(part.ports.find((p) => p.id === "branch")!.position[2] / INCH).toBeCloseTo(4.8125, 9);
    const branch = model.pieces.find((p) => p.runId === "run-1")!;
    expect(branch.cutLengthMm / INCH).toBeCloseTo(24 - 4.8125 - 0.125, 9);
    expect(branch.nps).toBe("2");
    expect(model.pieces.filter((p) => p.runId === "main").map((p) => p.terms.filter((t) => t.kind === "centre-to-centre").length)).toEqual([2]);
  });

  it("eccentric reducer 6 x 4: the centre line shifts 1 1/16 towards the flat side, back again when it goes up", () => {
    const down = build(new RunBuilder("T", "imperial", { pipe: pipe("6") }).start(flange()).go("E", `3'`, reducer("4", "eccentric", "D")).go("E", `3'`, open).done());
    expect(down.legs[1]!.from[2] / INCH).toBeCloseTo(-1.0625, 9);
    expect(down.nodes[2]!.position[2] / INCH).toBeCloseTo(-1.0625, 9);
    expect(cuts(down)[1]).toBeCloseTo(36 - 5.5 - 0.125, 9);
    const up = build(new RunBuilder("T", "imperial", { pipe: pipe("4") }).start(flange()).go("E", `3'`, reducer("6", "eccentric", "D")).go("E", `3'`, open).done());
    expect(up.legs[1]!.from[2] / INCH).toBeCloseTo(1.0625, 9);
    close(cuts(up), [36 - 3 - 0.125 - 5.5 - 0.125, 36 - 0.125]);
  });

  it("reducing tee 6 x 4: run 5 5/8, branch 5 1/8 (B16.9)", () => {
    const model = build(new RunBuilder("T", "imperial", { pipe: pipe("6") }).start(open).go("E", `3'`, tee("4")).go("E", `3'`, open).branch(2).go("N", `2'`, open).done());
    close(cuts(model), [36 - 5.625 - 0.125, 36 - 5.625 - 0.125, 24 - 5.125 - 0.125]);
  });

  it("a tee that turns the run: what arrives stands on its run, the leaving pipe on its branch", () => {
    const model = build(new RunBuilder("T", "imperial", { pipe: pipe("6") }).start(open).go("E", `3'`, tee()).go("N", `3'`, open).branch(2).go("E", `2'`, open).done());
    close(cuts(model), [36 - 5.625 - 0.125, 36 - 5.625 - 0.125, 24 - 5.625 - 0.125]);
    expect(model.problems.filter((p) => p.severity === "stop")).toEqual([]);
  });
});

describe("elbows off their angle", () => {
  it("NPS 6 LR trimmed to 40°: take-out 83.2 mm from the inch table, 83.3 from the millimetre table", () => {
    const at = (units: "imperial" | "metric") => build(new RunBuilder("T", units, { pipe: pipe("6") }).start(open).go("N", units === "metric" ? "1000" : `40"`).go("040/0", units === "metric" ? "1000" : `40"`, open).done());
    for (const [units, mm] of [["imperial", 83.2], ["metric", 83.3]] as const) {
      const part = at(units).components.find((c) => c.kind === "trimmed-elbow")!;
      expect(part.angleRad).toBeCloseTo((40 * Math.PI) / 180, 9);
      const term = at(units).pieces[0]!.terms.find((t) => t.kind === "take-out")!;
      expect(-term.valueMm).toBeCloseTo(mm, 1);
    }
  });

  it("a riser from a line sloped 1/4 in per ft turns 88.81°: a standard 90 with the mismatch split, take-out A cos 45 / cos(θ/2)", () => {
    const model = build(slopedDrain);
    const riser = model.components.filter((c) => c.kind === "elbow")[0]!;
    const degrees = (riser.angleRad! * 180) / Math.PI;
    expect(degrees).toBeCloseTo(88.81, 2);
    const term = model.pieces[0]!.terms.find((t) => t.kind === "take-out" && t.componentId === riser.id)!;
    expect(-term.valueMm / INCH).toBeCloseTo((4.5 * Math.SQRT1_2) / Math.cos(riser.angleRad! / 2), 9);
    const welds = model.joints.filter((j) => j.pointId === riser.pointId);
    expect(welds.map((j) => (j.mismatchRad * 180) / Math.PI)).toEqual([expect.closeTo(0.597, 3), expect.closeTo(0.597, 3)]);
  });

  it("91.19° takes a standard 90 too; over 90° past the setting nothing can be trimmed from a 90", () => {
    const at = (degreesUp: number, within: number) => build(new RunBuilder("T", "imperial", { standardElbowWithinDeg: within }).start(open).go("E", `5'`).go(`270/${degreesUp}`, `5'`, open).done());
    expect(at(90 - 1.19, 3).components.map((c) => c.kind)).toEqual(["elbow"]);
    expect(at(90 - 1.19, 3).problems.map((p) => p.code)).toContain("elbow-mismatch");
    expect(at(90 - 1.19, 1).problems.filter((p) => p.severity === "stop").map((p) => p.code)).toEqual(["trim-over-90"]);
  });

  it("the tabulated 45° take-out is not R tan 22.5° (NPS 6: 3 3/4 in against 3.728): the table is used", () => {
    const model = build(new RunBuilder("T", "imperial", { pipe: pipe("6") }).start(open).go("E", `5'`).go("NE", `5'`, open).done());
    expect(-model.pieces[0]!.terms.find((t) => t.kind === "take-out")!.valueMm / INCH).toBeCloseTo(3.75, 9);
  });
});

describe("metric lines", () => {
  it("use the tables' millimetre columns: NPS 6 LR 229, not 228.6", () => {
    const model = build(new RunBuilder("T", "metric", { pipe: pipe("6") }).start(open).go("E", "1000").go("N", "1000", open).done());
    expect(model.pieces[0]!.terms.find((t) => t.kind === "take-out")!.valueMm).toBe(-229);
    expect(model.pieces[0]!.cutLengthMm).toBeCloseTo(1000 - 229 - 3, 9);
    expect(model.spools[0]!.materials.map((m) => m.size)).toEqual(["DN 150", "DN 150"]);
  });
});
