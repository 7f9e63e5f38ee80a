/** Chance that every field joint stays within its limits, by counting evenly spread points of the error. */
import type { FitCondition } from "./fit-types";
import { NORMAL_DIMENSIONS, NORMAL_POINTS, normalPoints } from "./normal-points";
import type { SharedJoint } from "./share";
import { multiply } from "./twist";

export interface JointChance {
  readonly joint: string;
  readonly condition: FitCondition;
  readonly probability: number;
}

export interface Chances {
  readonly probability: number;
  readonly each: readonly JointChance[];
  /** Trim each point needs, mm, of those where nothing but the gap at the trimmed joint is in the way; sorted. */
  readonly trimNeeded: Float64Array;
  readonly points: number;
}

/** A joint made ready for counting: thirty-six numbers from six standard normal ones to its six mismatches, and its limits. */
interface Counter {
  readonly joint: SharedJoint;
  readonly map: Float64Array;
  /** Points past the limit of gap, high-low, opening, rotation. */
  readonly fails: Float64Array;
}

/** A constant of this file: the innermost loops read it millions of times. */
const SIX = NORMAL_DIMENSIONS;

const CONDITIONS: readonly FitCondition[] = ["gap", "hi-lo", "opening", "rotation"];

/**
 * @param factor lower factor of the error's covariance.
 * @param odMm outside diameter, for what a scribed cut takes beyond the gap.
 */
export function chancesOf(joints: readonly SharedJoint[], factor: readonly (readonly number[])[], odMm: number, count = NORMAL_POINTS): Chances {
  const counters: Counter[] = joints.map((joint) => ({ joint, map: Float64Array.from(multiply(joint.rows, factor).flat()), fails: new Float64Array(CONDITIONS.length) }));
  const points = normalPoints(count);
  const needed = new Float64Array(count);
  const x = new Float64Array(SIX);
  let good = 0;
  for (let n = 0; n < count; n++) {
    let fits = true;
    let trim = 0;
    for (const counter of counters) {
      apply(counter.map, points, n * SIX, x);
      if (!judge(counter, x)) fits = false;
      if (counter.joint.trimmed) trim = trimOf(counter.joint, x, odMm);
    }
    if (fits) needed[good++] = Math.max(trim, 0);
  }
  const each = counters.flatMap(({ joint, fails }) => CONDITIONS.flatMap((condition, k) => (applies(joint, condition) ? [{ joint: joint.name, condition, probability: 1 - fails[k]! / count }] : [])));
  return { probability: good / count, each, trimNeeded: needed.subarray(0, good).sort(), points: count };
}

function applies({ limits, trimmed }: SharedJoint, condition: FitCondition): boolean {
  if (condition === "gap") return !trimmed;
  if (condition === "rotation") return limits.holes !== null;
  return condition !== "hi-lo" || limits.holes === null;
}

function apply(map: Float64Array, points: Float64Array, at: number, into: Float64Array): void {
  for (let i = 0; i < SIX; i++) {
    const row = i * SIX;
    let sum = 0;
    for (let j = 0; j < SIX; j++) sum += map[row + j]! * points[at + j]!;
    into[i] = sum;
  }
}

/** Counts what is past its limit, and says whether nothing is; a trimmed joint is not judged by its gap. */
function judge({ joint: { limits, trimmed }, fails }: Counter, x: Float64Array): boolean {
  const shift = Math.sqrt(x[1]! * x[1]! + x[2]! * x[2]!);
  const tilt = Math.sqrt(x[3]! * x[3]! + x[4]! * x[4]!);
  const gap = !trimmed && Math.abs(x[0]!) > limits.gapMm;
  const across = limits.holes === null && shift > limits.hiLoMm;
  const open = tilt > limits.angleRad;
  const turned = limits.holes !== null && shift + Math.abs(x[5]!) * limits.holes.radiusMm > limits.holes.offsetMm;
  if (gap) fails[0]! += 1;
  if (across) fails[1]! += 1;
  if (open) fails[2]! += 1;
  if (turned) fails[3]! += 1;
  return !(gap || across || open || turned);
}

/** Length a field cut has to find: the gap's excess over what a weld takes, and half the opening of a scribed cut. */
function trimOf({ limits }: SharedJoint, x: Float64Array, odMm: number): number {
  return x[0]! + (odMm / 2) * Math.tan(Math.sqrt(x[3]! * x[3]! + x[4]! * x[4]!)) - limits.gapMm;
}
