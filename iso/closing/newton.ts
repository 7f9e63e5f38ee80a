/** Newton's method for the pipe direction, damped so that it climbs f and never leaves the cone K = {S > 0}. */
import type { Vec3 } from "../geometry/types";
import { CLOSING_FOLD, CLOSING_NOISE, CLOSING_QUADRATIC } from "../geometry/tolerances";
import { potentialAt, stateAt, tangentSystem, type Problem, type State } from "./problem";

const MOST_STEPS = 60;
const MOST_HALVINGS = 25;
/** Halvings spent on steps that leave K before the edge is called a jam. */
const MOST_EXITS = 6;
/** Share of the promised climb that a step must bring (Armijo). */
const CLIMB_SHARE = 0.05;

/**
 * From a direction inside K to the answer.
 * @returns the state at the answer, or null when the start lies outside K or a step jams at the cone's edge.
 */
export function newtonClimb(problem: Problem, start: Vec3): State | null {
  let s = stateAt(problem, start[0], start[1], start[2]);
  const fold = CLOSING_FOLD * problem.scale;
  if (!(s.S > fold)) return null;
  for (let step = 0; step < MOST_STEPS; step += 1) {
    const size = problem.scale + s.T0 + s.T1;
    if (s.sizeF <= CLOSING_NOISE * size) return s;
    const next = climbed(problem, s, fold);
    if (next === null) return s.sizeF <= CLOSING_QUADRATIC * CLOSING_QUADRATIC * size ? s : null;
    s = next;
  }
  return null;
}

/** One damped step, or null when no fraction of it climbs. */
function climbed(problem: Problem, s: State, fold: number): State | null {
  const { t1, t2, b11, b12, b22, f1, f2 } = tangentSystem(problem, s);
  const det = b11 * b22 - b12 * b12;
  if (!(det > 0)) return null;
  const g1 = (b22 * f1 - b12 * f2) / det;
  const g2 = (b11 * f2 - b12 * f1) / det;
  const near = s.sizeF < CLOSING_QUADRATIC * (problem.scale + s.T0 + s.T1);
  const promised = f1 * g1 + f2 * g2;
  const before = near ? 0 : potentialAt(problem, s);
  for (let halving = 0, share = 1; halving < MOST_HALVINGS; halving += 1, share /= 2) {
    const trial = moved(problem, s, t1, t2, g1 * share, g2 * share);
    if (!(trial.S > fold)) {
      if (halving >= MOST_EXITS) return null;
      continue;
    }
    if (near ? trial.sizeF < s.sizeF : potentialAt(problem, trial) >= before + CLIMB_SHARE * share * promised) return trial;
    if (near && halving > 2) return null;
  }
  return null;
}

function moved(problem: Problem, s: State, t1: Vec3, t2: Vec3, g1: number, g2: number): State {
  const x = s.u[0] + g1 * t1[0] + g2 * t2[0];
  const y = s.u[1] + g1 * t1[1] + g2 * t2[1];
  const z = s.u[2] + g1 * t1[2] + g2 * t2[2];
  const size = Math.sqrt(x * x + y * y + z * z);
  return stateAt(problem, x / size, y / size, z / size);
}
