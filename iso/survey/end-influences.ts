/**
 * What each reading does to the surveyed ends. In an adjustment the marks move by N⁻¹·a/σ for one standard deviation of a
 * reading with weighted row a/σ; through the slopes of the ends that is a column of six numbers an end. The columns of
 * all readings together make up the ends' covariance, the part between two ends of one survey included.
 */
import { DATUM, type Adjustment, type Observation } from "./survey-types";
import { weightedRow } from "./observations";
import type { SurveyDocument } from "./survey-document";
import { endSlopes, type EndSlopes } from "./survey-ends";
import { readingName, sentence } from "./survey-words";

/** One reading, or the readings at one face, as what one standard deviation of it does: six numbers for each end asked for. */
export interface EndInfluence {
  readonly id: string;
  /** Reading it is; null for the readings at an end's own face. */
  readonly readingId: string | null;
  readonly name: string;
  /** One for each independent part: each reading of it, each axis. */
  readonly columns: readonly (readonly number[])[];
}

/**
 * Influences on the ends named, in their order: position E, N, U in mm, then axis E, N, U, for each end.
 * Empty when one of them is not placed.
 */
export function endInfluences(document: SurveyDocument, adjustment: Adjustment, endIds: readonly string[]): EndInfluence[] {
  const ends = endIds.map((id) => document.ends.find((end) => end.id === id));
  const slopes = ends.map((end) => (end ? endSlopes(end, document, adjustment) : null));
  if (slopes.some((each) => each === null)) return [];
  const known = slopes as EndSlopes[];
  const own = known.flatMap((each, at) => {
    if (each.own === 0 || !(each.sigma > 0)) return [];
    const first = each.marks.length * 3;
    const columns = Array.from({ length: each.own }, (_, k) => padded(each.slopes.getColumn(first + k).map((v) => v * each.sigma), at, known.length));
    return [{ id: `face:${ends[at]!.id}`, readingId: null, name: `Face of ${ends[at]!.name}, its direction`, columns }];
  });
  return [...readingInfluences(document, adjustment, known), ...own];
}

function readingInfluences(document: SurveyDocument, adjustment: Adjustment, ends: readonly EndSlopes[]): EndInfluence[] {
  const rows = adjustment.observations.map(({ observation }) => ({ observation, column: ends.flatMap((end) => throughEnd(end, marksMoved(observation, adjustment), adjustment.order)) }));
  return document.readings.flatMap((reading) => {
    const parts = rows.filter(({ observation }) => observation.readingId === reading.id);
    return parts.length === 0 ? [] : [{ id: `reading:${reading.id}`, readingId: reading.id, name: sentence(readingName(reading)), columns: parts.map(({ column }) => column) }];
  });
}

/** How every mark moves with one standard deviation of an observation. */
function marksMoved(observation: Observation, { order, covariance, coordinates }: Adjustment): number[] {
  const { partials } = weightedRow(observation, coordinates);
  const [to, from] = [order.indexOf(observation.to) * 3, observation.from === DATUM ? -1 : order.indexOf(observation.from) * 3];
  return covariance.map((row) => partials.reduce((sum, v, k) => sum + v * ((to < 0 ? 0 : row[to + k]!) - (from < 0 ? 0 : row[from + k]!)), 0));
}

function throughEnd({ marks, slopes }: EndSlopes, moved: readonly number[], order: readonly string[]): number[] {
  return Array.from({ length: 6 }, (_, i) => marks.reduce((sum, mark, m) => {
    const at = order.indexOf(mark) * 3;
    return at < 0 ? sum : sum + [0, 1, 2].reduce((part, k) => part + slopes.get(i, m * 3 + k) * moved[at + k]!, 0);
  }, 0));
}

function padded(column: readonly number[], at: number, ends: number): number[] {
  return Array.from({ length: ends * 6 }, (_, i) => column[i - at * 6] ?? 0);
}

/** Covariance between two ends of one survey, six by six: rows the first one's position and axis, columns the second's. */
export function endCrossCovariance(document: SurveyDocument, adjustment: Adjustment, first: string, second: string): number[][] | null {
  const influences = endInfluences(document, adjustment, [first, second]);
  if (influences.length === 0) return null;
  const columns = influences.flatMap((each) => each.columns);
  return Array.from({ length: 6 }, (_, i) => Array.from({ length: 6 }, (__, j) => columns.reduce((sum, column) => sum + column[i]! * column[6 + j]!, 0)));
}
