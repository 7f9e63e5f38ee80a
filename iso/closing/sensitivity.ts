/**
 * Error in, error out: how the answer of a closing moves when an end is off by a little. Position errors of both ends and
 * small rotations of their axes go through the linearised closure B·δu = ...; the signs below were checked against finite
 * differences and against the numbers of an independent derivation.
 */
import type { Vec3 } from "../geometry/types";
import { vecAdd, vecAddScaled, vecCross, vecDot, vecReject, vecScale, vecSub, vecUnit } from "../geometry/vec3";
import type { ClosingInput, ClosingSolution } from "./closing-types";
import { problemOf, stateAt, tangentSystem, type Problem, type State, type TangentSystem } from "./problem";

/** Twelve rates each: position of end 1 (x, y, z), rotation of end 1 (about x, y, z), then the same of end 0. */
export interface ClosingSensitivity {
  readonly theta0: readonly number[];
  readonly theta1: readonly number[];
  readonly length: readonly number[];
  readonly roll: readonly number[];
}

interface Errors {
  readonly p0: Vec3;
  readonly p1: Vec3;
  readonly d0: Vec3;
  readonly d1: Vec3;
}

const NONE: Vec3 = [0, 0, 0];
const AXES: readonly Vec3[] = [[1, 0, 0], [0, 1, 0], [0, 0, 1]];

/**
 * Rates of change of a solved closing, per unit of length and per radian.
 * @returns null where a bend is absent (its plane, and so the roll, is undefined) or the input is bad.
 */
export function closingSensitivity(input: ClosingInput, solution: ClosingSolution): ClosingSensitivity | null {
  const problem = problemOf(input);
  if (typeof problem === "string" || solution.roll === null) return null;
  const s = stateAt(problem, ...solution.u);
  const system = tangentSystem(problem, s);
  const { d0, d1 } = problem;
  const errors: Errors[] = [
    ...AXES.map((p1) => ({ p0: NONE, p1, d0: NONE, d1: NONE })),
    ...AXES.map((w) => ({ p0: NONE, p1: NONE, d0: NONE, d1: vecCross(w, d1) })),
    ...AXES.map((p0) => ({ p0, p1: NONE, d0: NONE, d1: NONE })),
    ...AXES.map((w) => ({ p0: NONE, p1: NONE, d0: vecCross(w, d0), d1: NONE })),
  ];
  const rates = errors.map((e) => rateOf(input, problem, s, system, e));
  const column = (i: 0 | 1 | 2 | 3) => rates.map((r) => r[i]);
  return { theta0: column(0), theta1: column(1), length: column(2), roll: column(3) };
}

/** Rates of θ0, θ1, L and roll for one error of the ends. */
function rateOf(input: ClosingInput, problem: Problem, s: State, system: TangentSystem, error: Errors): readonly [number, number, number, number] {
  const { d0, d1, r0, r1 } = problem;
  const { u, c0, s0, c1, s1, T0, T1 } = s;
  const e0 = vecUnit(vecReject(d0, u)) ?? NONE;
  const e1 = vecUnit(vecReject(vecScale(d1, -1), u)) ?? NONE;
  const along0 = vecDot(error.d0, u);
  const along1 = vecDot(error.d1, u);
  const ends = vecSub(
    vecAddScaled(error.p1, error.d1, input.b + input.gap),
    vecAddScaled(error.p0, error.d0, input.a + input.gap),
  );
  const at1 = vecAddScaled(vecScale(vecReject(error.d1, u), T1), e1, (-r1 / (1 + c1)) * along1);
  const at0 = vecAddScaled(vecScale(vecReject(error.d0, u), -T0), e0, (r0 / (1 + c0)) * along0);
  const du = solved(system, vecAdd(vecReject(ends, u), vecAdd(at1, at0)));
  const theta0 = -vecDot(e0, du) - along0 / s0;
  const theta1 = -vecDot(e1, du) + along1 / s1;
  const length = vecDot(u, ends) - (r0 * (1 - c0) * along0) / s0 + (r1 * (1 - c1) * along1) / s1 - r0 * theta0 - r1 * theta1;
  const q0 = vecCross(u, e0);
  const q1 = vecCross(u, e1);
  const roll =
    (c0 / s0) * vecDot(q0, du) - vecDot(q0, error.d0) / s0 - (c1 / s1) * vecDot(q1, du) - vecDot(q1, error.d1) / s1;
  return [theta0, theta1, length, roll];
}

/** δu from B·δu = right side, in the tangent plane. */
function solved({ t1, t2, b11, b12, b22 }: TangentSystem, right: Vec3): Vec3 {
  const x = vecDot(right, t1);
  const y = vecDot(right, t2);
  const det = b11 * b22 - b12 * b12;
  return vecAddScaled(vecScale(t1, (b22 * x - b12 * y) / det), t2, (b11 * y - b12 * x) / det);
}
