/** Vectors of the model frame: pure functions on read-only triples. Lengths keep the unit they come in. */
import type { Vec3 } from "./types";
import { NEARLY_ALONG, ZERO_VECTOR } from "./tolerances";

export const VEC_ZERO: Vec3 = [0, 0, 0];
export const VEC_EAST: Vec3 = [1, 0, 0];
export const VEC_NORTH: Vec3 = [0, 1, 0];
export const VEC_UP: Vec3 = [0, 0, 1];

/** a + b. */
export function vecAdd(a: Vec3, b: Vec3): Vec3 {
  return [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
}

/** a - b: the way from b to a. */
export function vecSub(a: Vec3, b: Vec3): Vec3 {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
}

/** a times a number. */
export function vecScale(a: Vec3, factor: number): Vec3 {
  return [a[0] * factor, a[1] * factor, a[2] * factor];
}

/** a + factor·direction. */
export function vecAddScaled(a: Vec3, direction: Vec3, factor: number): Vec3 {
  return [a[0] + direction[0] * factor, a[1] + direction[1] * factor, a[2] + direction[2] * factor];
}

/** The vector turned round; zeros stay plain zeros. */
export function vecNegate(a: Vec3): Vec3 {
  return [0 - a[0], 0 - a[1], 0 - a[2]];
}

export function vecDot(a: Vec3, b: Vec3): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

/** Right-handed cross product. */
export function vecCross(a: Vec3, b: Vec3): Vec3 {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
}

export function vecLength(a: Vec3): number {
  return Math.hypot(a[0], a[1], a[2]);
}

export function vecDistance(a: Vec3, b: Vec3): number {
  return Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]);
}

/** Unit vector along a, or null when a has no direction (shorter than ZERO_VECTOR, or not finite). */
export function vecUnit(a: Vec3): Vec3 | null {
  const length = vecLength(a);
  return length > ZERO_VECTOR && Number.isFinite(length) ? [a[0] / length, a[1] / length, a[2] / length] : null;
}

/** Point between a (t = 0) and b (t = 1). */
export function vecLerp(a: Vec3, b: Vec3, t: number): Vec3 {
  return [a[0] + (b[0] - a[0]) * t, a[1] + (b[1] - a[1]) * t, a[2] + (b[2] - a[2]) * t];
}

/** Angle between two vectors of any length, radians 0 to π; exact near 0 and π too. 0 when either has no length. */
export function vecAngle(a: Vec3, b: Vec3): number {
  return Math.atan2(vecLength(vecCross(a, b)), vecDot(a, b));
}

/** Signed angle about a unit axis from a to b, radians in (-π, π], right-handed (counter-clockwise seen against the axis). */
export function vecSignedAngle(a: Vec3, b: Vec3, axis: Vec3): number {
  return Math.atan2(vecDot(vecCross(a, b), axis), vecDot(a, b) - vecDot(a, axis) * vecDot(b, axis));
}

/** a turned about a unit axis through the origin by an angle in radians, right-handed (Rodrigues' formula). */
export function vecRotate(a: Vec3, axis: Vec3, angleRad: number): Vec3 {
  const c = Math.cos(angleRad);
  const s = Math.sin(angleRad);
  const along = vecDot(a, axis) * (1 - c);
  const side = vecCross(axis, a);
  return [
    a[0] * c + side[0] * s + axis[0] * along,
    a[1] * c + side[1] * s + axis[1] * along,
    a[2] * c + side[2] * s + axis[2] * along,
  ];
}

/** The part of a square to a unit axis. */
export function vecReject(a: Vec3, axis: Vec3): Vec3 {
  return vecAddScaled(a, axis, -vecDot(a, axis));
}

/** A unit vector square to a unit vector: up where that is possible, north on a riser. */
export function vecPerpendicular(a: Vec3): Vec3 {
  const up = vecReject(VEC_UP, a);
  return (vecLength(up) > NEARLY_ALONG ? vecUnit(up) : vecUnit(vecReject(VEC_NORTH, a))) ?? VEC_EAST;
}

/** True when all three numbers are finite. */
export function vecIsFinite(a: Vec3): boolean {
  return Number.isFinite(a[0]) && Number.isFinite(a[1]) && Number.isFinite(a[2]);
}
