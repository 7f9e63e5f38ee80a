/** Vectors and paper: the identities they must keep (elementary geometry). */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  boxesOverlapOpen, boxGrow, boxOfPoints, segmentCrossesBoxOpen, segmentCrossingOpen, segmentDistance, vecAngle, vecCross, vecDot, vecLength,
  vecPerpendicular, vecRotate, vecSignedAngle, vecUnit, type Vec3,
} from "@/iso";

const component = fc.double({ min: -1e4, max: 1e4, noNaN: true });
const vector = fc.tuple(component, component, component).filter((v) => Math.hypot(...v) > 1e-3);

describe("vectors", () => {
  it("cross product is square to both, and the triple identity holds", () => {
    fc.assert(fc.property(vector, vector, (a, b) => {
      const c = vecCross(a, b);
      const scale = vecLength(a) ** 2 * vecLength(b) + vecLength(a) * vecLength(b) ** 2;
      expect(Math.abs(vecDot(a, c)) + Math.abs(vecDot(b, c))).toBeLessThan(1e-12 * scale + 1e-12);
    }), { seed: 1 });
  });

  it("turning keeps length and turns by the angle", () => {
    fc.assert(fc.property(vector, fc.double({ min: -3, max: 3, noNaN: true }), (v, angle) => {
      const axis = vecUnit(v)!;
      const side = vecPerpendicular(axis);
      expect(Math.abs(vecDot(side, axis))).toBeLessThan(1e-9);
      const turned = vecRotate(side, axis, angle);
      expect(vecLength(turned)).toBeCloseTo(1, 9);
      expect(vecSignedAngle(side, turned, axis)).toBeCloseTo(angle, 8);
    }), { seed: 2 });
  });

  it("measures tiny and straight angles, and has no direction for nothing", () => {
    expect(vecAngle([1, 0, 0], [1, 1e-9, 0])).toBeCloseTo(1e-9, 15);
    expect(vecAngle([1, 0, 0], [-1, 0, 0])).toBeCloseTo(Math.PI, 15);
    expect(vecUnit([0, 0, 0])).toBeNull();
    expect(vecUnit([NaN, 0, 0] as Vec3)).toBeNull();
  });
});

describe("paper", () => {
  it("counts only true crossings, not touching ends", () => {
    expect(segmentCrossingOpen([0, 0], [10, 0], [5, -5], [5, 5])).toEqual({ t: 0.5, s: 0.5 });
    expect(segmentCrossingOpen([0, 0], [10, 0], [10, 0], [10, 5])).toBeNull();
    expect(segmentCrossingOpen([0, 0], [10, 0], [0, 1], [10, 1])).toBeNull();
  });

  it("measures to the nearest point of a closed segment", () => {
    expect(segmentDistance([5, 3], [0, 0], [10, 0])).toBe(3);
    expect(segmentDistance([13, 4], [0, 0], [10, 0])).toBe(5);
    expect(segmentDistance([3, 4], [0, 0], [0, 0])).toBe(5);
  });

  it("tells overlapping boxes from touching ones, and segments through a box from those beside it", () => {
    const box = boxOfPoints([[0, 0], [4, 2]])!;
    expect(boxesOverlapOpen(box, { minX: 4, minY: 0, maxX: 8, maxY: 2 })).toBe(false);
    expect(boxesOverlapOpen(box, boxGrow({ minX: 4, minY: 0, maxX: 8, maxY: 2 }, 0.1))).toBe(true);
    expect(segmentCrossesBoxOpen([-1, 1], [5, 1], box)).toBe(true);
    expect(segmentCrossesBoxOpen([-1, 2], [5, 2], box)).toBe(false);
    expect(segmentCrossesBoxOpen([-1, 1], [-0.5, 1], box)).toBe(false);
    expect(boxOfPoints([])).toBeNull();
  });
});
