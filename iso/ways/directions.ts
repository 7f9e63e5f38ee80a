/**
 * Directions a pipe can take between standard turns. A direction u turned α from a and β from b lies on two circles of
 * the unit sphere, which meet in two points, touch in one, or miss:
 *
 *     u = p·a + q·b ± r·(a×b),   p = (cos α - c cos β)/(1 - c²),  q = (cos β - c cos α)/(1 - c²),   c = a·b
 *     r² (1 - c²)² = 4 sin σ sin(σ-α) sin(σ-β) sin(σ-γ),   σ = (α+β+γ)/2,  γ the angle from a to b
 *
 * The product of sines is the half-sum form of the spherical triangle (Todhunter, Spherical Trigonometry, art. 43-45): it
 * keeps its sign where the plain difference of squares has only rounding left. Where it vanishes all three are in one plane.
 */
import { WAYS_ANGLE, WAYS_FLAT } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecAngle, vecCross, vecDot, vecRotate, vecScale, vecUnit } from "../geometry/vec3";

/**
 * The two directions turned alpha from a and beta from b, out of their plane, plus side first; empty where the circles
 * miss or touch (planar ways are found by their own search) or a and b are parallel.
 */
export function directionsBetween(a: Vec3, b: Vec3, alpha: number, beta: number): readonly Vec3[] {
  const gamma = vecAngle(a, b);
  const half = (alpha + beta + gamma) / 2;
  if ([half, half - alpha, half - beta, half - gamma].some((angle) => Math.sin(angle) <= WAYS_ANGLE)) return [];
  return ([1, -1] as const).map((side) => directionBetween(a, b, alpha, beta, side)).filter((u) => u !== null);
}

/** One of the two, by its side; where the circles miss by rounding, the direction in the plane. null when a and b are parallel. */
export function directionBetween(a: Vec3, b: Vec3, alpha: number, beta: number, side: 1 | -1): Vec3 | null {
  const n = vecCross(a, b);
  const square = vecDot(n, n);
  if (square < WAYS_FLAT * WAYS_FLAT) return null;
  const c = vecDot(a, b);
  const half = (alpha + beta + Math.atan2(Math.sqrt(square), c)) / 2;
  const sides = Math.sin(half) * Math.sin(half - alpha) * Math.sin(half - beta) * Math.sin(alpha + beta - half);
  const r = (2 * Math.sqrt(Math.max(0, sides))) / square;
  const flat = vecAddScaled(vecScale(a, (Math.cos(alpha) - c * Math.cos(beta)) / square), b, (Math.cos(beta) - c * Math.cos(alpha)) / square);
  return vecUnit(vecAddScaled(flat, n, side * r));
}

/** Directions after each turn when all turns lie in the plane square to n: every choice of sides that ends along `into`. */
export function planarTurns(start: Vec3, into: Vec3, angles: readonly number[], n: Vec3): readonly (readonly Vec3[])[] {
  const found: Vec3[][] = [];
  for (let signs = 0; signs < 2 ** angles.length; signs += 1) {
    let total = 0;
    const directions = angles.map((angle, i) => {
      total += (signs >> i) % 2 === 0 ? angle : -angle;
      return vecRotate(start, n, total);
    });
    const last = directions[directions.length - 1] ?? start;
    if (vecAngle(last, into) > WAYS_ANGLE) continue;
    found.push([start, ...directions.slice(0, -1), ...(angles.length > 0 ? [into] : [])]);
  }
  return found;
}
