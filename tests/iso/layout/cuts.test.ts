/** Cuts of mitres and saddles against stored values, worked out apart from this code, and the published ones among them. */
import { readFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { mitreCut, saddleCut, type SaddleCut, type SaddleInput } from "@/iso";

interface Saddle { name: string; runOD: number; branchOD: number; betaDeg: number; offset: number; s16: number[]; drop16: number[]; depth: number; spacing: number; hole16: [number, number][] }
interface Mitre { name: string; R: number; od: number; turnDeg: number; welds: number; setback16: number[]; spacing: number; endCentre: number; gores: number; goreCentre: number; goreHeel: number; goreThroat: number; longShort: number; cutAngleDeg: number }

const vectors = JSON.parse(readFileSync(path.resolve(import.meta.dirname, "../../fixtures/vectors/cuts.json"), "utf8")) as { saddle: Saddle[]; mitre: Mitre[] };
const RELATIVE = 1e-6;

function near(got: number, wanted: number): void {
  expect(Math.abs(got - wanted)).toBeLessThanOrEqual(RELATIVE * Math.max(1, Math.abs(wanted)));
}

function cutOf(input: SaddleInput): SaddleCut {
  const result = saddleCut(input);
  if (!result.ok) throw new Error(result.message);
  return result.cut;
}

describe("saddles", () => {
  it.each(vectors.saddle)("$name", (v) => {
    const cut = cutOf({ runRadiusMm: v.runOD / 2, branchRadiusMm: v.branchOD / 2, branchOdMm: v.branchOD, angleRad: (v.betaDeg * Math.PI) / 180, offsetMm: v.offset });
    v.s16.forEach((s, i) => near(cut.reachMm[i]!, s));
    v.drop16.forEach((drop, i) => near(cut.dropMm[i]!, drop));
    near(cut.depthMm, v.depth);
    expect(cut.longestMm).toBeGreaterThanOrEqual(Math.max(...v.s16) - RELATIVE);
    expect(cut.shortestMm).toBeLessThanOrEqual(Math.min(...v.s16) + RELATIVE);
    near(cut.spacingMm, v.spacing);
    v.hole16.forEach(([along, arc], i) => { near(cut.hole[i]![0], along); near(cut.hole[i]![1], arc); });
  });

  it("wraps the template onto the run's surface: set on by the inside (4 on 6 STD, 0.682 in), set in by the outside (0.881 in)", () => {
    // Published set-in depth 0.8814 (branch tables of 4.5 on 6.625); the set-on one follows from the 4.026 in bore of 4 STD (ASME B36.10M).
    for (const [radius, depth] of [[4.026 / 2, 0.682], [4.5 / 2, 0.881]] as const) {
      const cut = cutOf({ runRadiusMm: 6.625 / 2, branchRadiusMm: radius, branchOdMm: 4.5, angleRad: Math.PI / 2, offsetMm: 0 });
      expect(cut.depthMm).toBeCloseTo(depth, 3);
    }
    for (const angleDeg of [30, 45, 60, 90]) for (const offsetMm of [0, 20, 40]) {
      const input = { runRadiusMm: 84.15, branchRadiusMm: 44, branchOdMm: 97, angleRad: (angleDeg * Math.PI) / 180, offsetMm };
      const cut = cutOf(input);
      cut.reachMm.forEach((s, i) => {
        const phi = (2 * Math.PI * i) / 16;
        // Run along x; the branch's axis in the x-z plane at y = offset; distance of the cut's point from the run's axis.
        const across = input.offsetMm + 44 * Math.sin(phi);
        const up = s * Math.sin(input.angleRad) - 44 * Math.cos(phi) * Math.cos(input.angleRad);
        expect(Math.abs(Math.hypot(across, up) - 84.15)).toBeLessThan(0.05);
      });
    }
  });

  it("says what cannot be", () => {
    const input = { runRadiusMm: 50, branchRadiusMm: 40, branchOdMm: 80, angleRad: Math.PI / 2, offsetMm: 20 };
    expect(saddleCut(input)).toMatchObject({ ok: false });
    expect(saddleCut({ ...input, offsetMm: 0, angleRad: 0 })).toMatchObject({ ok: false });
    expect(saddleCut({ ...input, runRadiusMm: Number.NaN })).toMatchObject({ ok: false });
  });
});

describe("mitres", () => {
  it.each(vectors.mitre)("$name", (v) => {
    const cut = mitreCut(v.R, v.od, (v.turnDeg * Math.PI) / 180, v.welds);
    v.setback16.forEach((s, i) => near(cut.setbackMm[i]!, s));
    near(cut.spacingMm, v.spacing);
    near(cut.endCentreMm, v.endCentre);
    expect(cut.segments).toBe(v.gores);
    near(cut.segmentCentreMm, v.goreCentre);
    near(cut.segmentBackMm, v.goreHeel);
    near(cut.segmentThroatMm, v.goreThroat);
    near(cut.longShortMm, v.longShort);
    near((cut.cutAngleRad * 180) / Math.PI, v.cutAngleDeg);
  });
});
