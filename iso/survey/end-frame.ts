/**
 * Position and axis of an end as a function of its inputs: places of marks first, then its own readings. Kept as a plain
 * function so that its covariance follows by differences, whatever it is made of.
 */
import { EigenvalueDecomposition, Matrix, solve } from "ml-matrix";
import { ZERO_VECTOR } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { VEC_NORTH, VEC_UP, vecAdd, vecAddScaled, vecCross, vecDot, vecLength, vecScale, vecSub, vecUnit, vecReject } from "../geometry/vec3";

export interface EndPose {
  readonly position: Vec3;
  /** Unit vector out of the end, to the gap. */
  readonly axis: Vec3;
}

/** Right hand and up of somebody who looks at a face that points along a unit direction; a level face is read with north up. */
export function faceFrame(points: Vec3): { readonly right: Vec3; readonly up: Vec3 } {
  const upright = vecUnit(vecReject(VEC_UP, points));
  const up = upright !== null && Math.abs(points[2]) < 0.999 ? upright : (vecUnit(vecReject(VEC_NORTH, points)) ?? VEC_UP);
  return { right: vecCross(up, points), up };
}

/** A direction leaned back at the top and at the right edge, as slopes (lean over span): the face then looks up, and to the right. */
export function axisLeaned(points: Vec3, upright: number, level: number): Vec3 {
  const { right, up } = faceFrame(points);
  return vecUnit(vecAddScaled(vecAddScaled(points, up, upright), right, level)) ?? points;
}

/** Where 12, 3, 6 and 9 o'clock lie on the face, right and up, in radii. */
export const CLOCK: readonly (readonly [number, number])[] = [[0, 1], [1, 0], [0, -1], [-1, 0]];

export interface FacePlane {
  readonly axis: Vec3;
  /** Of each distance handed in, mm; all zero with three. */
  readonly residuals: readonly number[];
}

/** Axis from distances between a face and a plane square to `points` ahead of it, at three or four clock places. */
export function axisFromFace(points: Vec3, radiusMm: number, distances: readonly { readonly clock: number; readonly mm: number }[]): FacePlane {
  const rows = distances.map(({ clock }) => [1, CLOCK[clock]![0] * radiusMm, CLOCK[clock]![1] * radiusMm]);
  const fit = solve(new Matrix(rows), Matrix.columnVector(distances.map(({ mm }) => mm)), true).to1DArray();
  const residuals = distances.map(({ mm }, at) => mm - rows[at]!.reduce((sum, v, k) => sum + v * fit[k]!, 0));
  return { axis: axisLeaned(points, fit[2]!, fit[1]!), residuals };
}

/** Centre and axis of the circle through bolt-hole centres: best plane, then best circle in it; null when they lie on one line. */
export function poseFromHoles(holes: readonly Vec3[], points: Vec3): EndPose | null {
  const middle = vecScale(holes.reduce(vecAdd), 1 / holes.length);
  const ways = holes.map((hole) => vecSub(hole, middle));
  const spread = new Matrix([0, 1, 2].map((i) => [0, 1, 2].map((j) => ways.reduce((sum, way) => sum + way[i]! * way[j]!, 0))));
  const { realEigenvalues: values, eigenvectorMatrix: vectors } = new EigenvalueDecomposition(spread, { assumeSymmetric: true });
  const order = [0, 1, 2].sort((a, b) => values[a]! - values[b]!);
  if (!(values[order[1]!]! > ON_A_LINE * values[order[2]!]!)) return null;
  const column = (k: number): Vec3 => vectors.getColumn(k) as unknown as Vec3;
  const normal = column(order[0]!);
  const axis = vecDot(normal, points) < 0 ? vecScale(normal, -1) : normal;
  const first = column(order[2]!);
  const second = vecCross(axis, first);
  const flat = ways.map((way) => [vecDot(way, first), vecDot(way, second)] as const);
  const fit = solve(new Matrix(flat.map(([x, y]) => [2 * x, 2 * y, 1])), Matrix.columnVector(flat.map(([x, y]) => x * x + y * y)), true).to1DArray();
  return { position: vecAddScaled(vecAddScaled(middle, first, fit[0]!), second, fit[1]!), axis };
}

/** Share of the spread of bolt holes across their longest line under which they count as lying on it: (3°)². */
const ON_A_LINE = 0.003;

/** Axis from a mark behind to the centre; null when both are in one spot. */
export function axisFromLine(back: Vec3, centre: Vec3): Vec3 | null {
  const way = vecSub(centre, back);
  return vecLength(way) > ZERO_VECTOR ? vecUnit(way) : null;
}
