/**
 * How joints made in the field share what is off. A joint can be opened, shifted, tilted and turned a little; a fitter
 * spreads the misfit over the joints so that each takes as much as it can stand. Written down: the least weighted squares
 * of the joints' mismatches x, each weighed by its own limit, with the chain closed, M + Σ A·x = 0. Its answer,
 * x = -C·Aᵀ·(Σ A·C·Aᵀ)⁻¹·M with C the squared limits, is linear in the error M, so its chances follow from M's covariance.
 */
import { inverse, Matrix } from "ml-matrix";
import { FIT_LEAST_MM, FIT_LEAST_RAD, WELD_MISMATCH_RAD } from "../geometry/tolerances";
import { vecCross } from "../geometry/vec3";
import type { Vec3 } from "../geometry/types";
import type { PlacedJoint } from "./errors";
import type { FitLimits } from "./fit-settings";
import { transposed, twistAbout, twistAlong } from "./twist";

/** What one joint may be off by. Infinity: any amount. */
export interface JointLimits {
  readonly gapMm: number;
  readonly hiLoMm: number;
  readonly angleRad: number;
  /** Shift and rotation together at this radius; null where rotation does not matter. */
  readonly holes: { readonly offsetMm: number; readonly radiusMm: number } | null;
}

export interface SharedJoint {
  readonly id: string;
  readonly name: string;
  readonly limits: JointLimits;
  /** Field cut taken here. */
  readonly trimmed: boolean;
  /** Six rows: gap, level and upright shift, tilt about the level and the upright axis, rotation; from the far end's error. */
  readonly rows: readonly (readonly number[])[];
}

export type JointRole = "fitted" | "trimmed" | "set";

/** A butt weld turns freely about its own axis, and a trimmed end comes in by any amount: as far as a fit could ask. */
const FREE_TURN_RAD = 0.1;
const FREE_TRIM_MM = 100;

export function jointLimits({ joint }: PlacedJoint, limits: FitLimits, odMm: number, trimmed: boolean): JointLimits {
  if (joint.face.kind === "flange") {
    const holes = { offsetMm: limits.boltHoleMm, radiusMm: joint.face.boltCircleMm / 2 };
    return { gapMm: limits.flangeGapMm, hiLoMm: limits.boltHoleMm, angleRad: Math.atan(limits.flangeParallelPercent / 100), holes };
  }
  // A field cut is scribed to the face it meets: it takes up opening as well, up to the mismatch a weld may have.
  return { gapMm: limits.gapMm, hiLoMm: limits.hiLoMm, angleRad: trimmed ? WELD_MISMATCH_RAD : Math.atan(limits.openingMm / odMm), holes: null };
}

/**
 * @param joints the field joints and what each does; one of them at least has to be fitted.
 * @returns null when every limit is nothing, so that no joint can take anything.
 */
export function shareJoints(joints: readonly { readonly placed: PlacedJoint; readonly role: JointRole }[], limits: FitLimits, odMm: number, reference: Vec3): SharedJoint[] | null {
  const parts = joints.map(({ placed, role }) => {
    const own = jointLimits(placed, limits, odMm, role === "trimmed");
    return { placed, role, own, ways: jointWays(placed, reference), give: giveOf(own, role) };
  });
  const sum = Matrix.zeros(6, 6);
  for (const { ways, give } of parts) ways.forEach((way, k) => {
    for (let i = 0; i < 6; i++) for (let j = 0; j < 6; j++) sum.set(i, j, sum.get(i, j) + way[i]! * give[k]! * way[j]!);
  });
  const inverted = inverseOf(sum);
  if (!inverted) return null;
  return parts.map(({ placed, role, own, ways, give }) => {
    const rows = ways.map((way, k) => Array.from({ length: 6 }, (_, j) => -give[k]! * way.reduce((total, v, i) => total + v * inverted.get(i, j), 0)));
    return { id: placed.joint.id, name: placed.joint.name, limits: own, trimmed: role === "trimmed", rows };
  });
}

/** What opening, shifting, tilting and turning the joint by one does at the reference. */
function jointWays({ frame }: PlacedJoint, reference: Vec3): number[][] {
  const up = vecCross(frame.side, frame.along);
  return [
    twistAlong(frame.along), twistAlong(frame.side), twistAlong(up),
    twistAbout(frame.at, frame.side, reference), twistAbout(frame.at, up, reference), twistAbout(frame.at, frame.along, reference),
  ];
}

/** Squared give of each of the six. A joint set true gives only where a butt weld turns. */
function giveOf(own: JointLimits, role: JointRole): number[] {
  const turn = own.holes ? Math.max(own.holes.offsetMm / own.holes.radiusMm, FIT_LEAST_RAD) ** 2 : FREE_TURN_RAD ** 2;
  if (role === "set") return [0, 0, 0, 0, 0, own.holes ? 0 : turn];
  const gap = (role === "trimmed" ? FREE_TRIM_MM : Math.max(own.gapMm, FIT_LEAST_MM)) ** 2;
  const shift = Math.max(own.hiLoMm, FIT_LEAST_MM) ** 2;
  const tilt = Math.max(own.angleRad, FIT_LEAST_RAD) ** 2;
  return [gap, shift, shift, tilt, tilt, turn];
}

/** Scaled to like sizes first: millimetres and radians differ by thousands. */
function inverseOf(sum: Matrix): Matrix | null {
  const scale = Array.from({ length: 6 }, (_, i) => Math.sqrt(sum.get(i, i)));
  if (scale.some((s) => !(s > 0) || !Number.isFinite(s))) return null;
  const like = new Matrix(transposed(Array.from({ length: 6 }, (_, i) => scale.map((s, j) => sum.get(i, j) / (s * scale[i]!)))));
  const inverted = inverse(like, true);
  return new Matrix(Array.from({ length: 6 }, (_, i) => scale.map((s, j) => inverted.get(i, j) / (s * scale[i]!))));
}
