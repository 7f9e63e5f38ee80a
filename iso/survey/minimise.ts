/**
 * Least squares from given starting places: Levenberg and Marquardt's damped Gauss-Newton steps (Marquardt 1963, from
 * memory). Damping keeps a step finite where readings leave marks free, so that no datum is needed here.
 */
import { CholeskyDecomposition, Matrix } from "ml-matrix";
import { SURVEY_STEP_MM } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { weightedRow, weightedSquares, type Places } from "./observations";
import type { Observation } from "./survey-types";

const FIRST_DAMPING = 1e-3;
const LEAST_DAMPING = 1e-12;
const MOST_DAMPING = 1e12;

export interface Minimum {
  readonly places: Map<string, Vec3>;
  readonly squares: number;
}

interface Normal {
  readonly matrix: Matrix;
  readonly right: Matrix;
}

/**
 * The local minimum of the weighted squares that the start leads to.
 * @param free marks that may move; all others stay where `start` has them.
 */
export function minimiseSquares(observations: readonly Observation[], free: readonly string[], start: Places, rounds: number): Minimum {
  let places = new Map(start);
  let squares = weightedSquares({ observations }, places);
  let damping = FIRST_DAMPING;
  for (let round = 0; round < rounds && free.length > 0; round += 1) {
    const normal = normalEquations(observations, free, places);
    let moved = 0;
    let taken = false;
    while (damping < MOST_DAMPING && !taken) {
      const step = dampedStep(normal, damping);
      const next = step && movedBy(places, free, step);
      const after = next ? weightedSquares({ observations }, next) : Number.POSITIVE_INFINITY;
      if (next && step && after <= squares) {
        moved = step.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
        [places, squares, taken] = [next, after, true];
        damping = Math.max(damping / 10, LEAST_DAMPING);
      } else damping *= 10;
    }
    if (!taken || moved < SURVEY_STEP_MM) break;
  }
  return { places, squares };
}

/** AᵀPA and AᵀPl for the free marks. */
export function normalEquations(observations: readonly Observation[], free: readonly string[], places: Places): Normal {
  const index = new Map(free.map((mark, at) => [mark, at * 3]));
  const matrix = Matrix.zeros(free.length * 3, free.length * 3);
  const right = Matrix.zeros(free.length * 3, 1);
  for (const observation of observations) {
    const { misclosure, partials } = weightedRow(observation, places);
    const ends = [{ at: index.get(observation.to), sign: 1 }, { at: index.get(observation.from), sign: -1 }];
    for (const one of ends) {
      if (one.at === undefined) continue;
      for (let i = 0; i < 3; i += 1) {
        const p = one.sign * partials[i]!;
        right.set(one.at + i, 0, right.get(one.at + i, 0) + p * misclosure);
        for (const two of ends) {
          if (two.at === undefined) continue;
          for (let j = 0; j < 3; j += 1) matrix.set(one.at + i, two.at + j, matrix.get(one.at + i, two.at + j) + p * two.sign * partials[j]!);
        }
      }
    }
  }
  return { matrix, right };
}

function dampedStep({ matrix, right }: Normal, damping: number): number[] | null {
  const damped = matrix.clone();
  const mean = matrix.trace() / matrix.rows;
  if (!(mean > 0)) return null;
  for (let i = 0; i < damped.rows; i += 1) damped.set(i, i, damped.get(i, i) + damping * mean);
  const factors = new CholeskyDecomposition(damped);
  return factors.isPositiveDefinite() ? factors.solve(right).to1DArray() : null;
}

export function movedBy(places: Places, free: readonly string[], step: readonly number[]): Map<string, Vec3> {
  const next = new Map(places);
  free.forEach((mark, at) => {
    const [e, n, u] = places.get(mark) ?? [0, 0, 0];
    next.set(mark, [e + step[at * 3]!, n + step[at * 3 + 1]!, u + step[at * 3 + 2]!]);
  });
  return next;
}
