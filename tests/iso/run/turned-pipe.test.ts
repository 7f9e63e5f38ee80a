/**
 * Turns made of the pipe itself and of returns, worked by hand. Sources: ASME B16.9 (return centre to centre), plane geometry
 * for mitres and bends, with the mitre lengths of tests/fixtures/vectors/cuts.json (a published layout check) beside it.
 */
import { describe, expect, it } from "vitest";
import { buildModel } from "../../../iso/run/build-model";
import { emptyMarks } from "../../../iso/run/marks";
import type { Model } from "../../../iso/run/model-types";
import type { RunDocument } from "../../../iso/run/document";
import { bend, end, joint, mitre, pipe, RunBuilder, turnBack, valve } from "../../fixtures/run-builder";
import vectors from "../../fixtures/vectors/cuts.json";

const INCH = 25.4;
const open = end("open", "BEVEL");
const build = (document: RunDocument): Model => buildModel(document, emptyMarks(), []);
const cuts = (model: Model): number[] => model.pieces.map((p) => p.cutLengthMm / INCH);
const codes = (model: Model): string[] => model.problems.map((p) => p.code);
const close = (found: readonly number[], wanted: readonly number[]): void => {
  expect(found).toHaveLength(wanted.length);
  wanted.forEach((length, i) => expect(found[i]).toBeCloseTo(length, 9));
};
const six = { pipe: pipe("6") };
const turn = (item: ReturnType<typeof mitre>, settings = {}, toward = "N") => new RunBuilder("T", "imperial", { ...six, ...settings }).start(open).go("E", `5'`, item).go(toward, `5'`, open).done();

describe("mitres", () => {
  it("NPS 6, 90°, three pieces, R 9: pipe to the first cut takes out 9 - 9 tan 22.5°, the segment is 18 tan 22.5° (7.4558 published)", () => {
    const model = build(turn(mitre(3)));
    const tan = Math.tan(Math.PI / 8);
    close(cuts(model), [60 - 9 + 9 * tan - 0.0625, 18 * tan - 0.125, 60 - 9 + 9 * tan - 0.0625]);
    const published = vectors.mitre.find((m) => m.welds === 2 && m.R === 9)!;
    expect(cuts(model)[1]! + 0.125).toBeCloseTo(published.goreCentre, 9);
    const segment = model.pieces[1]!;
    expect(segment.ends.map((e) => [e.prep, e.cutAngleDeg])).toEqual([["mitre", expect.closeTo(22.5, 9)], ["mitre", expect.closeTo(22.5, 9)]]);
    expect(segment.odMm / INCH).toBeCloseTo(6.625, 9);
  });

  it("numbers its welds along flow, all of kind mitre, with one root gap each and the turn shared equally", () => {
    const welds = build(turn(mitre(4))).joints.filter((j) => j.kind === "mitre");
    expect(welds.map((j) => [j.key, j.number, j.a, j.b])).toEqual([
      ["p2:mitre-1", "1", "p2:1", "p2:segment-1"], ["p2:mitre-2", "2", "p2:segment-1", "p2:segment-2"], ["p2:mitre-3", "3", "p2:segment-2", "p3:1"],
    ]);
    for (const weld of welds) {
      expect(weld.gapMm).toBeCloseTo(3.175, 9);
      expect(weld.mismatchRad).toBeCloseTo(Math.PI / 6, 9);
    }
  });

  it("two pieces meet at the point: nothing taken out but half a gap each, and 45° of cut asks for permission", () => {
    const model = build(turn(mitre(2)));
    close(cuts(model), [60 - 0.0625, 60 - 0.0625]);
    expect(model.joints.filter((j) => j.kind === "mitre")).toHaveLength(1);
    expect(codes(model)).toEqual(["mitre-angle"]);
    expect(codes(build(turn(mitre(2), {}, "NE")))).toEqual([]);
  });

  it("five pieces end where the line goes on: each segment starts where the one before it ends, a gap apart", () => {
    const model = build(turn(mitre(5, 12 * INCH)));
    const [first, ...rest] = model.pieces;
    let last = first!;
    for (const piece of rest) {
      const apart = Math.hypot(...piece.start.map((c, i) => c - last.end[i]!));
      expect(apart).toBeGreaterThan(3);
      expect(apart).toBeLessThan(3.175 + 1e-6);
      last = piece;
    }
    expect(last.end.map((c) => c / INCH)).toEqual([expect.closeTo(60, 9), expect.closeTo(60, 9), expect.closeTo(0, 9)]);
  });

  it("says so when the radius leaves no throat, or the line does not turn", () => {
    expect(codes(build(turn(mitre(3, 3 * INCH))))).toContain("mitre-radius");
    expect(codes(build(turn(mitre(3), {}, "E")))).toContain("elbow-straight");
  });
});

describe("bends", () => {
  const two = { pipe: pipe("2") };
  const bent = (radius: number, leg = `4'`) => new RunBuilder("T", "imperial", two).start(open).go("E", `3'`, bend(radius * INCH)).go("N", leg, bend(radius * INCH)).go("U", `3'`, open).done();

  it("NPS 2, two 90° bends to R 10: one pipe, each bend takes 20 - 5π off the corner-to-corner sum", () => {
    const model = build(bent(10));
    close(cuts(model), [36 + 48 + 36 - 2 * (20 - 5 * Math.PI)]);
    expect(model.joints).toEqual([]);
    expect(model.pieces[0]!.terms.filter((t) => t.kind === "bend").map((t) => t.valueMm / INCH)).toEqual([expect.closeTo(5 * Math.PI - 20, 9), expect.closeTo(5 * Math.PI - 20, 9)]);
  });

  it("starts the first bend 26 in from the end, and the second one developed length and 28 in of straight later; 90° between their planes", () => {
    const [a, b] = build(bent(10)).pieces[0]!.bends!;
    expect(a!.startMm / INCH).toBeCloseTo(26, 9);
    expect(a!.developedMm / INCH).toBeCloseTo(5 * Math.PI, 9);
    expect(b!.startMm / INCH).toBeCloseTo(26 + 5 * Math.PI + 28, 9);
    expect(b!.roll!.angleRad).toBeCloseTo(Math.PI / 2, 9);
    expect(b!.roll!.arcMm / INCH).toBeCloseTo((2.375 * Math.PI) / 4, 9);
  });

  it("stops when the straight between two bends is used up, and warns under three nominal sizes (common practice)", () => {
    expect(codes(build(bent(10, `19"`)))).toContain("bend-tangent");
    expect(codes(build(bent(10)))).toEqual([]);
    expect(codes(build(bent(5)))).toEqual(["bend-tight", "bend-tight"]);
  });

  it("a fitting after a bend shortens the same pipe", () => {
    const model = build(new RunBuilder("T", "imperial", two).start(open).go("E", `3'`, bend(10 * INCH)).go("N", `4'`).go("E", `3'`, open).done());
    close(cuts(model), [36 + 48 - 20 + 5 * Math.PI - 3 - 0.125, 36 - 3 - 0.125]);
  });
});

describe("returns", () => {
  const four = (toward: "N" | "E", back = "W") => new RunBuilder("T").start(open).go("E", `3'`, turnBack(toward)).go(back, `2'`, open).done();

  it("NPS 4 LR: the line comes back 12 in beside itself, only a gap taken out at each end (B16.9)", () => {
    const model = build(four("N"));
    close(cuts(model), [36 - 0.125, 24 - 0.125]);
    expect(model.nodes[2]!.position.map((c) => c / INCH)).toEqual([expect.closeTo(12, 9), expect.closeTo(12, 9), expect.closeTo(0, 9)]);
    expect(model.components[0]).toMatchObject({ kind: "return", asideName: "N", angleRad: Math.PI });
    expect(model.components[0]!.radiusMm! / INCH).toBeCloseTo(6, 9);
    expect(codes(model)).not.toContain("fold-back");
  });

  it("cannot shift the line along itself, and the line after it has to run back", () => {
    expect(codes(build(four("E")))).toContain("return-along");
    expect(codes(build(four("N", "N")))).toContain("return-angle");
  });
});

describe("rolls", () => {
  const roll = (model: Model) => model.components.map((c) => (c.roll ? [c.id, Math.round((c.roll.angleRad * 180) / Math.PI), c.roll.againstId] : [c.id, c.roll ?? null]));

  it("turning on the same way is no roll, turning back is half a turn, up from a turn to the north is 90° the other way round", () => {
    const walk = (...ways: string[]) => build(ways.reduce((b, way, i) => b.go(way, `3'`, i === ways.length - 1 ? open : { kind: "none" }), new RunBuilder("T").start(open)).done());
    expect(roll(walk("E", "N", "W"))).toEqual([["p2", null], ["p3", 0, "p2"]]);
    expect(Math.abs(roll(walk("E", "N", "E"))[1]![1] as number)).toBe(180);
    // Looking north, the first elbow came from the west (left); up is clockwise of left.
    expect(roll(walk("E", "N", "U"))[1]).toEqual(["p3", 90, "p2"]);
    expect(roll(walk("E", "N", "D"))[1]).toEqual(["p3", -90, "p2"]);
  });

  it("a stem is turned against the elbow before it; its arc is π OD deg / 360 (TRADE hand formula)", () => {
    const model = build(new RunBuilder("T").start(open).go("E", `3'`).go("N", `4'`, valve({ ends: "butt", faceToFaceMm: 300, stem: "U" })).go("N", `3'`, joint).go("N", `2'`, open).done());
    const stem = model.components.find((c) => c.kind === "valve")!;
    expect(stem.roll).toMatchObject({ againstId: "p2", angleRad: expect.closeTo(Math.PI / 2, 9) });
    expect(stem.roll!.arcMm / INCH).toBeCloseTo((Math.PI * 4.5 * 90) / 360, 9);
  });
});
