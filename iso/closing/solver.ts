/**
 * Closing between two fixed pipe ends.
 *
 * The picture. Out of end 0 (centre P0, axis d0) comes a tangent a, then an elbow of bend radius R0 cut to θ0; out of
 * end 1 (P1, d1) a tangent b and an elbow R1 cut to θ1; one straight pipe of length L joins the two. Each of the four
 * joints has a root gap g. Planar offset, rolling offset, skew and unequal ends are all this one problem; the unknown is
 * the direction u of the pipe, a point on the unit sphere, and everything else follows from it:
 *
 *     A0 = P0 + (a+g)d0     A1 = P1 + (b+g)d1     D = A1 - A0     S = L + 2g
 *     cos θ0 = d0·u         cos θ1 = -d1·u        Ti = Ri·tan(θi/2) = Ri|di×u|/(1 + cos θi)
 *     w = D + T1·d1 - T0·d0,   closure w = (S+T0+T1)u,   so F(u) = w - (u·w)u = 0;   S = D·u - R0 sin θ0 - R1 sin θ1
 *
 * One answer. F is the gradient on the sphere of f(u) = D·u + R0(θ0 - sin θ0) + R1(θ1 - sin θ1), whose value at the
 * answer is the length of the centre line. S, read as a function of a vector, is concave and homogeneous, so K = {S > 0}
 * is a convex cone; along a great circle f'' <= -S, so f is strictly concave on K. Hence at most one path has both bends
 * under 180° and S > 0, it is the highest point of f over K, and a sheet may say "the only cut that closes".
 *
 * Method. Newton on F in a tangent basis, with B = (u·w)I - T0·e0e0ᵀ - T1·e1e1ᵀ (eigenvalues between S and u·w, so never
 * singular in K), climbing f and staying in K, from the straight line D/|D| (newton.ts). When that start lies outside K,
 * or a step jams, polygon.ts shrinks a spherical polygon that must hold the answer; if it empties there is none.
 *
 * Why not the obvious way. Rolling-offset formulas need parallel ends; iterating take-outs (guess the angle, subtract
 * R·tan θ/2, guess again) diverges when the pipe is short, and can neither prove that nothing closes nor that nothing
 * else does. A search over two angles and a length finds answers, but no proof and no speed.
 *
 * Cases. Refusals in this order: bad-input; angle-sum (the ends turn through more than both elbows can); no-root (no path
 * at all: too close, or facing away); theta-max (the only path bends an elbow too far); length (its pipe is shorter than
 * nothing). A vanished bend takes its joint with it, so its gap and tangent become pipe. Elbow welded straight to elbow
 * has one gap and no pipe: S = g. S towards zero is a fold, where the angles swing wildly with the smallest error: then
 * the answer warns "ill-conditioned". A known path of this form in robotics is the circle-straight-circle curve in space
 * (Dubins 1957; Sussmann 1995; Hota and Ghose 2010).
 */
import type { Vec3 } from "../geometry/types";
import { CLOSING_ANGLE, CLOSING_FOLD, CLOSING_LENGTH, CLOSING_LENGTH_SHARE } from "../geometry/tolerances";
import { vecAngle, vecCross, vecDot, vecScale, vecUnit } from "../geometry/vec3";
import type { ClosingInput, ClosingKind, ClosingReason, ClosingResult, ClosingSolution } from "./closing-types";
import { newtonClimb } from "./newton";
import { polygonSearch } from "./polygon";
import { problemOf, smallerEigenvalue, tangentSystem, type Problem, type State, type TangentSystem } from "./problem";

const DEG = 180 / Math.PI;
/** A bend that the measurements' tolerance turns by more than this makes the answer ill-conditioned. */
const SHAKY_BEND_RAD = 1 / DEG;

/**
 * The only cut that closes between two fixed ends, or why there is none.
 * @param input lengths in any one unit, angles in radians; directions need not be unit vectors.
 * @returns status, reason and at most one solution; nonsense comes back as "bad-input". Never throws.
 */
export function solveClosing(input: ClosingInput): ClosingResult {
  const problem = problemOf(input);
  if (typeof problem === "string") return refused("bad-input", null, null, problem);
  const turn = vecAngle(problem.d0, vecScale(problem.d1, -1));
  if (turn > 2 * input.thetaMax + CLOSING_ANGLE) return refused("angle-sum", null, turn, angleSumSentence(turn, input.thetaMax));
  const start = vecUnit(problem.D);
  const state = (start && newtonClimb(problem, start)) ?? polygonSearch(problem);
  if (!state) return refused("no-root", null, turn, "No path of two elbows and a pipe joins these ends: they are too close together, or face away from each other.");
  return judged(input, problem, state, turn);
}

/** A path that exists against the limits of elbow and pipe. */
function judged(input: ClosingInput, problem: Problem, state: State, turn: number): ClosingResult {
  const system = tangentSystem(problem, state);
  const solution = solutionOf(input, problem, state, system);
  const most = Math.max(solution.theta0, solution.theta1);
  if (most > input.thetaMax + CLOSING_ANGLE) {
    return refused("theta-max", solution, turn, `The only path bends an elbow ${degrees(most)}, and it can be cut to ${degrees(input.thetaMax)} at most.`);
  }
  if (solution.pipeLength < -CLOSING_LENGTH - CLOSING_LENGTH_SHARE * problem.scale) {
    return refused("length", solution, turn, "The two elbows overlap: the pipe between them would be shorter than nothing.");
  }
  const shaky = input.tolerance !== undefined && shakes(problem, state, system, input.tolerance);
  return {
    status: "ok", reason: null, solutions: [solution], nearest: null, angleSumMin: turn, sentence: null,
    warnings: shaky ? ["ill-conditioned"] : [],
  };
}

function refused(reason: ClosingReason, nearest: ClosingSolution | null, angleSumMin: number | null, sentence: string): ClosingResult {
  const status = reason === "bad-input" ? "bad-input" : "infeasible";
  return { status, reason, solutions: [], nearest, angleSumMin, sentence, warnings: [] };
}

function solutionOf(input: ClosingInput, problem: Problem, s: State, system: TangentSystem): ClosingSolution {
  const theta0 = Math.atan2(s.s0, s.c0);
  const theta1 = Math.atan2(s.s1, s.c1);
  const kind = kindOf(input, problem, s, theta0, theta1);
  const length = s.S - 2 * input.gap;
  const roll = kind === "csc" || kind === "elbow-to-elbow" ? rollOf(problem, s.u) : null;
  return {
    kind, theta0, theta1, theta0Deg: theta0 * DEG, theta1Deg: theta1 * DEG,
    length, pipeLength: kind === "elbow-to-elbow" ? 0 : length + mergedLength(input, kind),
    u: s.u,
    roll, rollDeg: roll === null ? null : roll * DEG, dihedralDeg: roll === null ? null : Math.abs(roll) * DEG,
    takeoff0: s.T0, takeoff1: s.T1, lambdaMin: smallerEigenvalue(system), residual: s.sizeF,
  };
}

function kindOf(input: ClosingInput, problem: Problem, s: State, theta0: number, theta1: number): ClosingKind {
  const absent0 = theta0 <= CLOSING_ANGLE;
  const absent1 = theta1 <= CLOSING_ANGLE;
  if (absent0 && absent1) return "straight";
  if (absent1) return "single0";
  if (absent0) return "single1";
  const within = Math.max(input.elbowToElbowWithin ?? 0, CLOSING_LENGTH + CLOSING_LENGTH_SHARE * problem.scale);
  const touching = input.gap > 0 && s.S > CLOSING_FOLD * problem.scale && Math.abs(s.S - input.gap) <= within;
  return touching ? "elbow-to-elbow" : "csc";
}

/** A vanished bend merges its two joints into one: that gap, and the bend's tangent, are pipe. */
function mergedLength({ a, b, gap }: ClosingInput, kind: ClosingKind): number {
  const at0 = kind === "single1" || kind === "straight" ? gap + a : 0;
  const at1 = kind === "single0" || kind === "straight" ? gap + b : 0;
  return at0 + at1;
}

/** Signed angle about u from d0×u to d1×u, in (-π, π]. */
function rollOf({ d0, d1 }: Problem, u: Vec3): number {
  const n0 = vecCross(d0, u);
  const n1 = vecCross(d1, u);
  const roll = Math.atan2(vecDot(vecCross(n0, n1), u), vecDot(n0, n1));
  return roll <= -Math.PI + CLOSING_ANGLE ? Math.PI : roll;
}

/** Whether an error of this size, in its worst direction, turns either bend by more than 1°: |B⁻¹e|·tolerance. */
function shakes(problem: Problem, s: State, { t1, t2, b11, b12, b22 }: TangentSystem, tolerance: number): boolean {
  const det = b11 * b22 - b12 * b12;
  return [problem.d0, problem.d1].some((d) => {
    const e1 = vecDot(d, t1);
    const e2 = vecDot(d, t2);
    const size = Math.hypot(e1, e2);
    const swing = size > 0 ? Math.hypot(b22 * e1 - b12 * e2, b11 * e2 - b12 * e1) / (det * size) : 1 / s.S;
    return swing * tolerance > SHAKY_BEND_RAD;
  });
}

function angleSumSentence(turn: number, thetaMax: number): string {
  return `The ends turn through ${degrees(turn)}, more than two elbows of ${degrees(thetaMax)} can.`;
}

function degrees(rad: number): string {
  return `${(rad * DEG).toFixed(2)}°`;
}
