/** Shapes of the closing solver. Lengths in any one unit (the caller's), angles in radians unless the name says Deg. */
import type { Vec3 } from "../geometry/types";

/** Two fixed pipe ends and what may stand between them. */
export interface ClosingInput {
  /** Centre of each pipe end. */
  readonly p0: Vec3;
  readonly p1: Vec3;
  /** Axis pointing out of each end; any length but zero. */
  readonly d0: Vec3;
  readonly d1: Vec3;
  /** Bend radii of the two elbows. */
  readonly r0: number;
  readonly r1: number;
  /** Straight tangents of the elbows on the side of each end. */
  readonly a: number;
  readonly b: number;
  /** Root gap at each of the four joints. */
  readonly gap: number;
  /** Largest angle an elbow can be cut to. */
  readonly thetaMax: number;
  /** What the measurements may be off by; with it, the answer says when it is ill-conditioned. */
  readonly tolerance?: number;
  /** How far from one gap an elbow may stand from the other elbow and still count as welded straight to it. */
  readonly elbowToElbowWithin?: number;
}

/**
 * csc: bend, pipe, bend. single0: only the bend at end 0. single1: only the one at end 1. straight: pipe alone.
 * elbow-to-elbow: two bends and one gap between them, no pipe.
 */
export type ClosingKind = "csc" | "single0" | "single1" | "straight" | "elbow-to-elbow";

export interface ClosingSolution {
  readonly kind: ClosingKind;
  readonly theta0: number;
  readonly theta1: number;
  readonly theta0Deg: number;
  readonly theta1Deg: number;
  /** Distance between the bends' ends less two gaps, whatever the kind. */
  readonly length: number;
  /** Pipe to cut: where a bend is absent, its gap and tangent are pipe too; 0 for elbow-to-elbow. */
  readonly pipeLength: number;
  /** Unit direction of the pipe from end 0 to end 1. */
  readonly u: Vec3;
  /** Signed angle about u from the plane of bend 0 to that of bend 1; 0 both turn the same way; null when a bend is absent. */
  readonly roll: number | null;
  readonly rollDeg: number | null;
  /** The roll without its sign. */
  readonly dihedralDeg: number | null;
  readonly takeoff0: number;
  readonly takeoff1: number;
  /** Smaller eigenvalue of the closing's matrix B; the pipe direction errs by at most (error of the ends) / lambdaMin. */
  readonly lambdaMin: number;
  /** Length of F at the answer: how far off the closure is. */
  readonly residual: number;
}

export type ClosingReason = "bad-input" | "angle-sum" | "no-root" | "theta-max" | "length";

export interface ClosingResult {
  readonly status: "ok" | "infeasible" | "bad-input";
  readonly reason: ClosingReason | null;
  /** None or one: there is never a second way (see solver.ts). */
  readonly solutions: readonly ClosingSolution[];
  /** For the refusals theta-max and length: the only path there is, which breaks that limit. */
  readonly nearest: ClosingSolution | null;
  /** Angle the two ends turn through at least; null for bad input. */
  readonly angleSumMin: number | null;
  /** The refusal in one plain sentence, angles in degrees, no lengths (their unit is the caller's); null when it closes. */
  readonly sentence: string | null;
  readonly warnings: readonly "ill-conditioned"[];
}
