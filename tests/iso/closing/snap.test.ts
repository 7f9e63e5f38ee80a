/** Snapping to a shop's steps against stored values worked out apart from this code. */
import { readFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { snapClosing, type ClosingCut, type ClosingInput, type SnapMismatch } from "@/iso";

interface Vector {
  name: string; input: ClosingInput; od: number; gridDeg: number; gridL: number;
  exact: number[]; snapped: number[]; report: SnapMismatch; naive: number[]; naiveReport: SnapMismatch; candidates: number;
}
const vectors = JSON.parse(readFileSync(path.resolve(import.meta.dirname, "../../fixtures/vectors/closing-snap.json"), "utf8")) as Vector[];

const numbers = (cut: ClosingCut): number[] => [cut.phi0, cut.theta0, cut.length, cut.roll, cut.theta1];

function same(got: number, wanted: number, within = 1e-6): void {
  expect(Math.abs(got - wanted)).toBeLessThanOrEqual(within * Math.max(1, Math.abs(wanted)));
}

describe("snapping", () => {
  it.each(vectors)("$name, $gridDeg° and $gridL in", (v) => {
    const got = snapClosing(v.input, v.od, { angleDeg: v.gridDeg, length: v.gridL })!;
    const turned = numbers(got.exact)[0]! - v.exact[0]!;
    const check = (cut: ClosingCut, wanted: number[]) =>
      // The first roll counts from another reference there: compare it by its change.
      numbers(cut).forEach((x, i) => same(i === 0 ? wrap(x - turned - wanted[0]!) : x - wanted[i]!, 0));
    check(got.exact, v.exact);
    check(got.snapped.cut, v.snapped);
    check(got.square.cut, v.naive);
    for (const [mine, theirs] of [[got.snapped.mismatch, v.report], [got.square.mismatch, v.naiveReport]] as const) {
      for (const key of Object.keys(theirs) as (keyof SnapMismatch)[]) same(mine[key], theirs[key]);
    }
    expect(got.candidates).toBe(v.candidates);
  });

  it("finds nothing to snap where nothing closes or there is no second bend", () => {
    const input = { ...vectors[0]!.input };
    expect(snapClosing({ ...input, p1: [0, 0, 0] }, 4.5, { angleDeg: 0.25, length: 0.0625 })).toBeNull();
    expect(snapClosing(input, 4.5, { angleDeg: 0, length: 0.0625 })).toBeNull();
  });
});

function wrap(rad: number): number {
  return Math.atan2(Math.sin(rad), Math.cos(rad));
}
