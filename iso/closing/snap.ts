/**
 * Snapping an exact closing to what a shop can cut.
 *
 * The exact answer has two bend angles, a pipe length and two rolls (the first bend about end 0's axis, the second against
 * the first). A shop cuts angles and lengths to steps, but can turn a fitting to any roll. So for each pair of angles within
 * two steps of the exact ones: refit the first roll, the length and the second roll; round the length both ways; refit the
 * two rolls; and keep the pair with the least |δp|² + (lever·sin ε)², δp being how far the built end misses the fixed one and
 * ε the angle between them. Rounding everything by itself keeps ε smaller and δp larger: both are offered, the joint decides.
 * Refits are Gauss-Newton steps on that sum of squares with the derivatives of the chain itself.
 */
import type { Vec3 } from "../geometry/types";
import { SNAP_REFIT } from "../geometry/tolerances";
import { vecAddScaled, vecAngle, vecCross, vecDot, vecLength, vecPerpendicular, vecRotate, vecScale, vecSub, vecUnit } from "../geometry/vec3";
import { solveClosing } from "./solver";
import type { ClosingInput } from "./closing-types";

/** What is built: first roll, first bend, pipe, second roll, second bend. Radians, and the caller's unit of length. */
export interface ClosingCut {
  /** Turn of the first bend's plane about end 0's axis, from a fixed reference square to it. */
  readonly phi0: number;
  readonly theta0: number;
  readonly length: number;
  readonly roll: number;
  readonly theta1: number;
}

/** How far a built piece misses the second end. Lengths in the caller's unit. */
export interface SnapMismatch {
  /** Along the end's axis; positive closes the gap. */
  readonly axial: number;
  /** Across it: the high-low at the joint. */
  readonly lateral: number;
  readonly angleDeg: number;
  /** Opening of the faces across the outside, OD·tan ε. */
  readonly opening: number;
  readonly gapMin: number;
  readonly gapMax: number;
  /** Straight distance by which the centre misses. */
  readonly position: number;
}

export interface SnapSteps {
  readonly angleDeg: number;
  readonly length: number;
}

export interface SnappedClosing {
  readonly exact: ClosingCut;
  /** Least overall mismatch. */
  readonly snapped: { readonly cut: ClosingCut; readonly mismatch: SnapMismatch };
  /** Each number rounded by itself: keeps the end squarer and lets it miss more. */
  readonly square: { readonly cut: ClosingCut; readonly mismatch: SnapMismatch };
  /** Combinations tried. */
  readonly candidates: number;
}

const REFITS = 40;
const STEPS_EACH_WAY = [-1, 0, 1, 2] as const;

/**
 * Snaps the closing of two ends to a shop's steps; null when there is no closing of two bends and a pipe to snap.
 * @param od outside diameter at the second end, in the input's unit; its half is the lever by which an angle counts as a length.
 */
export function snapClosing(input: ClosingInput, od: number, steps: SnapSteps): SnappedClosing | null {
  const answer = solveClosing(input).solutions[0];
  const chain = chainOf(input);
  if (!answer || !chain || answer.roll === null || !(steps.angleDeg > 0) || !(steps.length > 0)) return null;
  const toward = vecSub(answer.u, vecScale(chain.d0, vecDot(answer.u, chain.d0)));
  const phi0 = Math.atan2(vecDot(vecCross(chain.reference, toward), chain.d0), vecDot(chain.reference, toward));
  const exact: ClosingCut = { phi0, theta0: answer.theta0, length: answer.length, roll: answer.roll, theta1: answer.theta1 };
  const lever = od / 2;
  const step = (steps.angleDeg * Math.PI) / 180;
  const near = (angle: number) => STEPS_EACH_WAY.map((k) => (Math.floor(angle / step) + k) * step).filter((a) => a > 0 && a <= input.thetaMax + step / 2);
  const tried = near(exact.theta0).flatMap((theta0) =>
    near(exact.theta1).flatMap((theta1) => {
      const free = refit(chain, { ...exact, theta0, theta1 }, ["phi0", "length", "roll"], lever);
      const short = Math.floor(free.length / steps.length) * steps.length;
      return [short, short + steps.length].map((length) => refit(chain, { ...free, length }, ["phi0", "roll"], lever));
    }),
  );
  const best = tried.reduce((a, b) => (squares(chain, b, lever) < squares(chain, a, lever) ? b : a));
  const square: ClosingCut = {
    ...exact, theta0: Math.round(exact.theta0 / step) * step, theta1: Math.round(exact.theta1 / step) * step, length: Math.round(exact.length / steps.length) * steps.length,
  };
  const told = (cut: ClosingCut) => ({ cut, mismatch: mismatchOf(chain, cut, od, input.gap) });
  return { exact, snapped: told(best), square: told(square), candidates: tried.length };
}

interface Chain {
  readonly input: ClosingInput;
  readonly d0: Vec3;
  readonly d1: Vec3;
  /** Unit vector square to d0 from which phi0 counts. */
  readonly reference: Vec3;
}

function chainOf(input: ClosingInput): Chain | null {
  const [d0, d1] = [vecUnit(input.d0), vecUnit(input.d1)];
  return d0 && d1 ? { input, d0, d1, reference: vecPerpendicular(d0) } : null;
}

interface Built {
  readonly position: Vec3;
  /** Where the piece points as it leaves the second bend. */
  readonly direction: Vec3;
}

/** Walks the piece from end 0: gap, tangent, bend, gap, pipe, gap, bend, tangent, gap. */
function build({ input, d0, reference }: Chain, cut: ClosingCut): Built {
  const start = vecAddScaled(input.p0, d0, input.a + input.gap);
  const toward = vecRotate(reference, d0, cut.phi0);
  const [bent, u, normal0] = bend(start, d0, toward, input.r0, cut.theta0);
  const second = vecAddScaled(bent, u, cut.length + 2 * input.gap);
  const normal1 = vecRotate(normal0, u, cut.roll);
  const [end, direction] = bend(second, u, vecCross(normal1, u), input.r1, cut.theta1);
  return { position: vecAddScaled(end, direction, input.b + input.gap), direction };
}

/** One bend: where it ends, which way it then points, and its axis. */
function bend(at: Vec3, along: Vec3, toward: Vec3, radius: number, angle: number): readonly [Vec3, Vec3, Vec3] {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const end = vecAddScaled(vecAddScaled(at, along, radius * s), toward, radius * (1 - c));
  const direction = vecAddScaled(vecScale(along, c), toward, s);
  return [end, direction, vecCross(along, toward)];
}

/** Residuals: the miss, and the sine of the angle error, with its axis, times the lever. */
function residuals(chain: Chain, cut: ClosingCut, lever: number): number[] {
  const built = build(chain, cut);
  const target = vecScale(chain.d1, -1);
  const miss = vecSub(built.position, chain.input.p1);
  return [...miss, ...vecScale(vecCross(target, built.direction), lever)];
}

function squares(chain: Chain, cut: ClosingCut, lever: number): number {
  return residuals(chain, cut, lever).reduce((sum, r) => sum + r * r, 0);
}

/** Gauss-Newton over the named numbers, derivatives by central differences; steps that do not help are halved. */
function refit(chain: Chain, from: ClosingCut, names: readonly (keyof ClosingCut)[], lever: number): ClosingCut {
  let cut = from;
  let value = squares(chain, cut, lever);
  const scale = (name: keyof ClosingCut) => (name === "length" ? Math.max(1, lever) : 1);
  for (let turn = 0; turn < REFITS; turn++) {
    const r = residuals(chain, cut, lever);
    const columns = names.map((name) => {
      const h = SNAP_REFIT * scale(name);
      const after = residuals(chain, { ...cut, [name]: cut[name] + h }, lever);
      const before = residuals(chain, { ...cut, [name]: cut[name] - h }, lever);
      return after.map((x, i) => (x - before[i]!) / (2 * h));
    });
    const step = leastSquares(columns, r);
    if (!step) return cut;
    let share = 1;
    let next = moved(cut, names, step, share);
    while (squares(chain, next, lever) > value && share > SNAP_REFIT) next = moved(cut, names, step, (share /= 2));
    const reached = squares(chain, next, lever);
    if (!(reached < value)) return cut;
    const gain = value - reached;
    cut = next;
    value = reached;
    if (gain <= value * Number.EPSILON) return cut;
  }
  return cut;
}

function moved(cut: ClosingCut, names: readonly (keyof ClosingCut)[], step: readonly number[], share: number): ClosingCut {
  return { ...cut, ...Object.fromEntries(names.map((name, i) => [name, cut[name] - share * step[i]!])) };
}

/** Solves the normal equations of at most three unknowns by elimination; null when they say nothing. */
function leastSquares(columns: readonly (readonly number[])[], r: readonly number[]): number[] | null {
  const dot = (a: readonly number[], b: readonly number[]) => a.reduce((sum, x, i) => sum + x * b[i]!, 0);
  const n = columns.length;
  const m = columns.map((a) => [...columns.map((b) => dot(a, b)), dot(a, r)]);
  for (let i = 0; i < n; i++) {
    const pivot = m[i]![i]!;
    if (!(Math.abs(pivot) > 0)) return null;
    for (let k = 0; k < n; k++) {
      if (k === i) continue;
      const factor = m[k]![i]! / pivot;
      for (let j = i; j <= n; j++) m[k]![j]! -= factor * m[i]![j]!;
    }
  }
  return m.map((row, i) => row[n]! / row[i]!);
}

function mismatchOf(chain: Chain, cut: ClosingCut, od: number, gap: number): SnapMismatch {
  const built = build(chain, cut);
  const target = vecScale(chain.d1, -1);
  const miss = vecSub(built.position, chain.input.p1);
  const axial = vecDot(miss, target);
  const angle = vecAngle(built.direction, target);
  const opening = od * Math.tan(angle);
  const middle = gap - axial;
  return {
    axial, lateral: vecLength(vecAddScaled(miss, target, -axial)), angleDeg: (angle * 180) / Math.PI, opening,
    gapMin: middle - opening / 2, gapMax: middle + opening / 2, position: vecLength(miss),
  };
}
