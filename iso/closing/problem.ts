/**
 * The closing as numbers: what is given (axes made unit, D between the tangents' ends), and what one pipe direction u
 * makes of it. Symbols are those of the essay in solver.ts. Scalars instead of vectors, because this runs thousands of
 * times behind each refusal's advice.
 */
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecLength, vecSub, vecUnit } from "../geometry/vec3";
import type { ClosingInput } from "./closing-types";

export interface Problem {
  readonly d0: Vec3;
  readonly d1: Vec3;
  readonly r0: number;
  readonly r1: number;
  readonly D: Vec3;
  /** Length everything is measured against. */
  readonly scale: number;
}

/** One direction of the pipe and all that follows from it. */
export interface State {
  readonly u: Vec3;
  readonly c0: number;
  readonly s0: number;
  readonly c1: number;
  readonly s1: number;
  readonly T0: number;
  readonly T1: number;
  readonly w: Vec3;
  readonly uw: number;
  /** Gradient of f on the sphere; zero at the answer. */
  readonly F: Vec3;
  readonly sizeF: number;
  readonly S: number;
}

/** Largest number taken as a coordinate or radius; beyond it float64 has no thousandths left. */
const LARGEST = 1e12;

const finite = (x: unknown): x is number => typeof x === "number" && Number.isFinite(x) && Math.abs(x) <= LARGEST;
const finiteVec = (v: unknown): v is Vec3 => Array.isArray(v) && v.length === 3 && v.every(finite);

/** The input as a problem, or one sentence saying what is wrong with it. Takes anything; never throws. */
export function problemOf(input: ClosingInput): Problem | string {
  if (input === null || typeof input !== "object") return "There is nothing to close between.";
  const { p0, p1, d0, d1, r0, r1, a, b, gap, thetaMax } = input;
  if (!finiteVec(p0) || !finiteVec(p1)) return "Give each end's position as three numbers.";
  if (!finiteVec(d0) || !finiteVec(d1)) return "Give each end's direction as three numbers.";
  const unit0 = vecUnit(d0);
  const unit1 = vecUnit(d1);
  if (!unit0 || !unit1) return "An end's direction has no length; say which way it points.";
  if (!finite(r0) || !finite(r1) || r0 <= 0 || r1 <= 0) return "The bend radii must be more than zero.";
  if (!finite(a) || !finite(b) || a < 0 || b < 0) return "A tangent cannot be shorter than nothing.";
  if (!finite(gap) || gap < 0) return "The root gap cannot be less than nothing.";
  if (!finite(thetaMax) || thetaMax <= 0 || thetaMax > Math.PI) return "The largest elbow angle must lie between 0 and 180 degrees.";
  const D = vecSub(vecAddScaled(p1, unit1, b + gap), vecAddScaled(p0, unit0, a + gap));
  return { d0: unit0, d1: unit1, r0, r1, D, scale: vecLength(D) + r0 + r1 };
}

/** Everything that follows from the pipe direction (x, y, z), which must be a unit vector. */
export function stateAt({ d0, d1, r0, r1, D }: Problem, x: number, y: number, z: number): State {
  const c0 = d0[0] * x + d0[1] * y + d0[2] * z;
  const c1 = -(d1[0] * x + d1[1] * y + d1[2] * z);
  const s0 = crossSize(d0, x, y, z);
  const s1 = crossSize(d1, x, y, z);
  const T0 = (r0 * s0) / (1 + c0);
  const T1 = (r1 * s1) / (1 + c1);
  const wx = D[0] + T1 * d1[0] - T0 * d0[0];
  const wy = D[1] + T1 * d1[1] - T0 * d0[1];
  const wz = D[2] + T1 * d1[2] - T0 * d0[2];
  const uw = wx * x + wy * y + wz * z;
  const F: Vec3 = [wx - uw * x, wy - uw * y, wz - uw * z];
  const sizeF = Math.sqrt(F[0] * F[0] + F[1] * F[1] + F[2] * F[2]);
  const S = D[0] * x + D[1] * y + D[2] * z - r0 * s0 - r1 * s1;
  return { u: [x, y, z], c0, s0, c1, s1, T0, T1, w: [wx, wy, wz], uw, F, sizeF, S };
}

function crossSize(d: Vec3, x: number, y: number, z: number): number {
  const a = d[1] * z - d[2] * y;
  const b = d[2] * x - d[0] * z;
  const c = d[0] * y - d[1] * x;
  return Math.sqrt(a * a + b * b + c * c);
}

/** f(u) = D·u + R0(θ0 - sin θ0) + R1(θ1 - sin θ1): at the answer, the length of the centre line. */
export function potentialAt(problem: Problem, s: State): number {
  const { D, r0, r1 } = problem;
  const along = D[0] * s.u[0] + D[1] * s.u[1] + D[2] * s.u[2];
  return along + r0 * (Math.atan2(s.s0, s.c0) - s.s0) + r1 * (Math.atan2(s.s1, s.c1) - s.s1);
}

/** B in a tangent basis t1, t2 of u: its three entries, and F's two. */
export interface TangentSystem {
  readonly t1: Vec3;
  readonly t2: Vec3;
  readonly b11: number;
  readonly b12: number;
  readonly b22: number;
  readonly f1: number;
  readonly f2: number;
}

/** B = (u·w)I - T0·e0e0ᵀ - T1·e1e1ᵀ and F, written in a tangent basis. A vanished bend adds nothing. */
export function tangentSystem({ d0, d1, r0, r1 }: Problem, s: State): TangentSystem {
  const [x, y, z] = s.u;
  const flat = Math.abs(z) < 0.6;
  const size = flat ? Math.sqrt(x * x + y * y) : Math.sqrt(y * y + z * z);
  const t1: Vec3 = flat ? [-y / size, x / size, 0] : [0, -z / size, y / size];
  const t2: Vec3 = [y * t1[2] - z * t1[1], z * t1[0] - x * t1[2], x * t1[1] - y * t1[0]];
  const k0 = s.s0 > 0 ? r0 / (s.s0 * (1 + s.c0)) : 0;
  const k1 = s.s1 > 0 ? r1 / (s.s1 * (1 + s.c1)) : 0;
  const a1 = d0[0] * t1[0] + d0[1] * t1[1] + d0[2] * t1[2];
  const a2 = d0[0] * t2[0] + d0[1] * t2[1] + d0[2] * t2[2];
  const g1 = d1[0] * t1[0] + d1[1] * t1[1] + d1[2] * t1[2];
  const g2 = d1[0] * t2[0] + d1[1] * t2[1] + d1[2] * t2[2];
  return {
    t1, t2,
    b11: s.uw - k0 * a1 * a1 - k1 * g1 * g1,
    b12: -k0 * a1 * a2 - k1 * g1 * g2,
    b22: s.uw - k0 * a2 * a2 - k1 * g2 * g2,
    f1: s.F[0] * t1[0] + s.F[1] * t1[1] + s.F[2] * t1[2],
    f2: s.F[0] * t2[0] + s.F[1] * t2[1] + s.F[2] * t2[2],
  };
}

/** Smaller eigenvalue of B. */
export function smallerEigenvalue({ b11, b12, b22 }: TangentSystem): number {
  const mean = (b11 + b22) / 2;
  return mean - Math.hypot((b11 - b22) / 2, b12);
}
