/** Limits of the tests of an adjustment, at a risk of 0.1 % of calling a good survey bad. */

/** |w| over which a reading is called off: two-sided normal, 0.1 % (Baarda 1968, from memory). */
export const OUTLIER_LIMIT = 3.29;

/** Non-centrality for a risk of 0.1 % and a power of 80 %: 3.29 + 0.84 (Baarda 1968, from memory). */
export const NON_CENTRALITY = 4.13;

/** Standard normal point of 99.9 %, one-sided. */
const POINT_999 = 3.0902;

/** 99.9 % point of chi-square for a redundancy of one or more (Wilson and Hilferty 1931, from memory; within 2 %). */
export function chiSquareLimit(redundancy: number): number {
  const part = 2 / (9 * redundancy);
  return redundancy * (1 - part + POINT_999 * Math.sqrt(part)) ** 3;
}
