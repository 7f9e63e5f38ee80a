/**
 * Adjustment of a survey network by least squares.
 *
 * The weighted squares are minimised from starting places found here (best-places). The normal matrix N at the minimum
 * then says what the readings decide. A network no reading ties to the datum can shift or turn as a whole: those of the
 * six rigid motions that N does not feel are its datum defect, and inner constraints (N + c·DDᵀ over exactly those) give
 * every mark the least variance a frame can give. What is singular after that is a mark that hangs loose.
 * Residuals are judged one by one by w = v/(σ·√r), r the redundancy number (Baarda 1968; Mikhail and Ackermann,
 * Observations and Least Squares, 1976; both from memory).
 */
import { EigenvalueDecomposition, Matrix, SingularValueDecomposition } from "ml-matrix";
import { SURVEY_RANK, SURVEY_STEP_MM, SURVEY_UNCONTROLLED } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { bestPlaces } from "./best-places";
import { chiSquareLimit, NON_CENTRALITY } from "./chi-square";
import { frameFree } from "./free-frame";
import { movedBy, normalEquations } from "./minimise";
import { misclosureOf, predictObservation, weightedRow, weightedSquares, type Places } from "./observations";
import { DATUM, type Adjustment, type ObservationResult, type SurveyNetwork } from "./survey-types";

/** Last undamped steps, which square the error each time. */
const LAST_STEPS = 4;
/** Share of a mark in a free motion from which it counts as loose. */
const LOOSE_SHARE = 1e-3;

/** Adjusts a network. Never throws on readings; an empty network answers with no observations. */
export function adjustNetwork(network: SurveyNetwork): Adjustment {
  const free = network.marks.filter((mark) => !network.fixed.has(mark));
  const found = bestPlaces(network).places;
  const framed = (places: Places) => frameFree(network, places, rigidDefect(network, free, places).motions.columns);
  // Framed twice: the last steps move every mark a little, and a motion of the whole changes no residual.
  return judged(network, free, framed(settle(network, free, framed(found))));
}

interface Inverse {
  /** Cofactors, 3 rows per free mark. */
  readonly cofactors: Matrix;
  readonly rank: number;
  readonly loose: readonly string[];
  readonly datumDefect: number;
}

function settle(network: SurveyNetwork, free: readonly string[], start: Places): Places {
  let places = start;
  for (let step = 0; step < LAST_STEPS && free.length > 0; step += 1) {
    const { cofactors } = inverseAt(network, free, places);
    const move = cofactors.mmul(normalEquations(network.observations, free, places).right).to1DArray();
    const next = movedBy(places, free, move);
    if (!(weightedSquares(network, next) <= weightedSquares(network, places) * (1 + SURVEY_RANK) + SURVEY_RANK)) break;
    places = next;
    if (Math.max(...move.map(Math.abs)) < SURVEY_STEP_MM) break;
  }
  return places;
}

function inverseAt(network: SurveyNetwork, free: readonly string[], places: Places): Inverse {
  const { matrix } = normalEquations(network.observations, free, places);
  const { motions } = rigidDefect(network, free, places);
  const scale = Math.max(matrix.trace() / Math.max(matrix.rows, 1), Number.MIN_VALUE);
  const held = matrix.clone();
  const constraint = motions.columns > 0 ? motions.mmul(motions.transpose()) : null;
  if (constraint) held.add(constraint.clone().mul(scale));
  const { realEigenvalues: values, eigenvectorMatrix: vectors } = new EigenvalueDecomposition(held, { assumeSymmetric: true });
  const least = Math.max(...values) * SURVEY_RANK;
  const cofactors = Matrix.zeros(held.rows, held.rows);
  const moves = free.map(() => 0);
  let rank = 0;
  values.forEach((value, k) => {
    const vector = vectors.getColumnVector(k);
    if (value <= least) return free.forEach((_, at) => (moves[at] = Math.max(moves[at]!, Math.hypot(vector.get(at * 3, 0), vector.get(at * 3 + 1, 0), vector.get(at * 3 + 2, 0)))));
    rank += 1;
    cofactors.add(vector.mmul(vector.transpose()).mul(1 / value));
  });
  if (constraint) cofactors.sub(constraint.mul(1 / scale));
  return { cofactors, rank: rank - motions.columns, loose: free.filter((_, at) => moves[at]! > LOOSE_SHARE), datumDefect: motions.columns };
}

/** Rigid motions no observation feels, orthonormal columns; none when a mark is fixed or tied to the datum that way. */
function rigidDefect(network: SurveyNetwork, free: readonly string[], places: Places): { readonly motions: Matrix } {
  const none = { motions: Matrix.zeros(free.length * 3, 0) };
  if (network.fixed.size > 0 || free.length === 0) return none;
  const motions = rigidMotions(free, places);
  if (motions.columns === 0) return none;
  const { matrix } = normalEquations(network.observations, free, places);
  const felt = motions.transpose().mmul(matrix).mmul(motions);
  const { realEigenvalues: values, eigenvectorMatrix: vectors } = new EigenvalueDecomposition(felt, { assumeSymmetric: true });
  const least = Math.max(matrix.trace() / matrix.rows, 0) * SURVEY_RANK;
  const unfelt = values.flatMap((value, k) => (value <= least ? [k] : []));
  return unfelt.length === 0 ? none : { motions: motions.mmul(vectors.subMatrixColumn(unfelt)) };
}

/** Orthonormal basis of the six shifts and turns of the marks; fewer when the marks lie on a line or in one spot. */
function rigidMotions(free: readonly string[], places: Places): Matrix {
  const middle = [0, 1, 2].map((axis) => free.reduce((sum, mark) => sum + places.get(mark)![axis]!, 0) / free.length);
  const size = Math.max(...free.map((mark) => Math.hypot(...places.get(mark)!.map((v, axis) => v - middle[axis]!))), 1);
  const rows = free.flatMap((mark) => {
    const [e, n, u] = places.get(mark)!.map((v, axis) => (v - middle[axis]!) / size) as unknown as Vec3;
    return [[1, 0, 0, 0, u, -n], [0, 1, 0, -u, 0, e], [0, 0, 1, n, -e, 0]];
  });
  const parts = new SingularValueDecomposition(new Matrix(rows), { autoTranspose: true });
  const kept = parts.diagonal.flatMap((value, k) => (value > Math.sqrt(SURVEY_RANK) ? [k] : []));
  return parts.leftSingularVectors.subMatrixColumn(kept);
}

function judged(network: SurveyNetwork, free: readonly string[], places: Places): Adjustment {
  const inverse = inverseAt(network, free, places);
  const redundancy = network.observations.length - inverse.rank;
  const squares = weightedSquares(network, places);
  return {
    coordinates: places, order: free,
    covariance: inverse.cofactors.to2DArray(),
    observations: resultsOf(network, free, places, inverse.cofactors),
    redundancy, weightedSquares: squares,
    fits: redundancy <= 0 || squares <= chiSquareLimit(redundancy),
    datumDefect: inverse.datumDefect, loose: inverse.loose,
  };
}

function resultsOf(network: SurveyNetwork, free: readonly string[], places: Places, cofactors: Matrix): ObservationResult[] {
  const index = new Map(free.map((mark, at) => [mark, at * 3]));
  return network.observations.map((observation) => {
    const { partials } = weightedRow(observation, places);
    const terms = [...spread(index.get(observation.to), partials, 1), ...(observation.from === DATUM ? [] : spread(index.get(observation.from), partials, -1))];
    const leverage = terms.reduce((sum, [i, a]) => sum + terms.reduce((inner, [j, b]) => inner + a * b * cofactors.get(i, j), 0), 0);
    const redundancy = Math.min(Math.max(1 - leverage, 0), 1);
    const residual = 0 - misclosureOf(observation, predictObservation(observation, places).value);
    if (redundancy < SURVEY_UNCONTROLLED) return { observation, residual, redundancy: 0, standardised: 0, likelyError: 0, smallestFound: null };
    return {
      observation, residual, redundancy,
      standardised: residual / (observation.sigma * Math.sqrt(redundancy)),
      likelyError: 0 - residual / redundancy,
      smallestFound: (NON_CENTRALITY * observation.sigma) / Math.sqrt(redundancy),
    };
  });
}

function spread(at: number | undefined, partials: Vec3, sign: number): [number, number][] {
  return at === undefined ? [] : partials.map((value, axis) => [at + axis, sign * value]);
}
