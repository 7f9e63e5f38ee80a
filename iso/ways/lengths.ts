/** Lengths along given directions that add up to a given way: three of them by Cramer's rule, two in their plane. */
import { WAYS_CLOSES_MM, WAYS_FLAT } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecCross, vecDot, vecLength } from "../geometry/vec3";

/** Lengths x, y, z with x·a + y·b + z·c = way, or null when the three directions lie in one plane. */
export function threeLengths(a: Vec3, b: Vec3, c: Vec3, way: Vec3): Vec3 | null {
  const bc = vecCross(b, c);
  const det = vecDot(a, bc);
  if (Math.abs(det) < WAYS_FLAT) return null;
  return [vecDot(way, bc) / det, vecDot(way, vecCross(c, a)) / det, vecDot(way, vecCross(a, b)) / det];
}

/** Lengths x, y with x·a + y·b = way, or null when they are parallel or the way leaves their plane. */
export function twoLengths(a: Vec3, b: Vec3, way: Vec3): readonly [number, number] | null {
  const n = vecCross(a, b);
  const square = vecDot(n, n);
  if (square < WAYS_FLAT) return null;
  const [x, y] = [vecDot(vecCross(way, b), n) / square, vecDot(vecCross(a, way), n) / square];
  const rest = vecAddScaled(vecAddScaled(way, a, -x), b, -y);
  return vecLength(rest) <= WAYS_CLOSES_MM ? [x, y] : null;
}
