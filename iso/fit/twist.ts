/** Small rigid motions and the little matrices they need. Six numbers: translation of a reference point, then rotation. */
import { FIT_RANK } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecCross, vecSub } from "../geometry/vec3";

/** A shift along a direction. */
export function twistAlong(direction: Vec3, amount = 1): number[] {
  return [direction[0] * amount, direction[1] * amount, direction[2] * amount, 0, 0, 0];
}

/** A rotation about an axis through a point, as the reference point feels it. */
export function twistAbout(point: Vec3, axis: Vec3, reference: Vec3, amount = 1): number[] {
  const t = vecCross(axis, vecSub(reference, point));
  return [t[0] * amount, t[1] * amount, t[2] * amount, axis[0] * amount, axis[1] * amount, axis[2] * amount];
}

/** Sum of the outer products of columns: their covariance. */
export function covarianceOf(columns: readonly (readonly number[])[], size = 6): number[][] {
  const sum = Array.from({ length: size }, () => new Array<number>(size).fill(0));
  for (const c of columns) for (let i = 0; i < size; i++) for (let j = 0; j < size; j++) sum[i]![j]! += c[i]! * c[j]!;
  return sum;
}

export function multiply(a: readonly (readonly number[])[], b: readonly (readonly number[])[]): number[][] {
  const width = b[0]?.length ?? 0;
  return a.map((row) => Array.from({ length: width }, (_, j) => row.reduce((sum, v, k) => sum + v * b[k]![j]!, 0)));
}

export function transposed(a: readonly (readonly number[])[]): number[][] {
  return (a[0] ?? []).map((_, j) => a.map((row) => row[j]!));
}

/** Lower factor L of a covariance, L·Lᵀ; a freedom that does not move gets a column of zeros. */
export function factorOf(covariance: readonly (readonly number[])[]): number[][] {
  const n = covariance.length;
  const l = Array.from({ length: n }, () => new Array<number>(n).fill(0));
  for (let j = 0; j < n; j++) {
    let left = covariance[j]![j]!;
    for (let k = 0; k < j; k++) left -= l[j]![k]! ** 2;
    if (!(left > FIT_RANK * covariance[j]![j]!)) continue;
    const d = Math.sqrt(left);
    l[j]![j] = d;
    for (let i = j + 1; i < n; i++) {
      let v = covariance[i]![j]!;
      for (let k = 0; k < j; k++) v -= l[i]![k]! * l[j]![k]!;
      l[i]![j] = v / d;
    }
  }
  return l;
}
