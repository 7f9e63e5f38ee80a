/**
 * Points spread evenly under the six-dimensional bell: Sobol's sequence (Sobol 1967; direction numbers of Joe and Kuo 2008,
 * from memory), mapped by the inverse of the normal distribution. Always the same points, so the same input always has the
 * same probability. Counts are powers of two, where the sequence is most even.
 */

export const NORMAL_DIMENSIONS = 6;
export const NORMAL_POINTS = 8192;
/** For comparisons, which share their points: the differences settle long before the values do. */
export const FEWER_POINTS = 2048;

/** Degree, coefficients and first direction numbers of each dimension after the first. */
const DIRECTIONS: readonly (readonly [number, number, readonly number[]])[] = [
  [1, 0, [1]], [2, 1, [1, 3]], [3, 1, [1, 3, 1]], [3, 2, [1, 1, 1]], [4, 1, [1, 1, 3, 3]],
];
const BITS = 30;

const known = new Map<number, Float64Array>();

/** Six numbers a point, one after the other. @param count a power of two. */
export function normalPoints(count = NORMAL_POINTS): Float64Array {
  const found = known.get(count);
  if (found) return found;
  const points = new Float64Array(count * NORMAL_DIMENSIONS);
  for (let k = 0; k < NORMAL_DIMENSIONS; k++) {
    const directions = directionsOf(k);
    let bits = 0;
    for (let n = 0; n < count; n++) {
      // Half a step in, so that no point lies on the edge, where the bell has no end.
      points[n * NORMAL_DIMENSIONS + k] = normalQuantile(bits / 2 ** BITS + 0.5 / count);
      bits ^= directions[Math.clz32(~n & (n + 1)) ^ 31]!;
    }
  }
  known.set(count, points);
  return points;
}

function directionsOf(dimension: number): number[] {
  const row = DIRECTIONS[dimension - 1];
  if (!row) return Array.from({ length: BITS }, (_, j) => 2 ** (BITS - 1 - j));
  const [degree, coefficients, first] = row;
  const v = first.map((m, j) => m * 2 ** (BITS - 1 - j));
  for (let j = degree; j < BITS; j++) {
    let next = v[j - degree]! ^ (v[j - degree]! >>> degree);
    for (let k = 1; k < degree; k++) if ((coefficients >> (degree - 1 - k)) & 1) next ^= v[j - k]!;
    v.push(next);
  }
  return v;
}

/** Where the normal distribution reaches p (rational approximation of Acklam, relative error 0.0000000012; from memory). */
export function normalQuantile(p: number): number {
  const low = 0.02425;
  if (p > 0.5) return -normalQuantile(1 - p);
  if (p < low) {
    const q = Math.sqrt(-2 * Math.log(p));
    return (((((-0.007784894002430293 * q - 0.3223964580411365) * q - 2.400758277161838) * q - 2.549732539343734) * q + 4.374664141464968) * q + 2.938163982698783) /
      ((((0.007784695709041462 * q + 0.3224671290700398) * q + 2.445134137142996) * q + 3.754408661907416) * q + 1);
  }
  const q = p - 0.5;
  const r = q * q;
  return ((((((-39.69683028665376 * r + 220.9460984245205) * r - 275.9285104469687) * r + 138.357751867269) * r - 30.66479806614716) * r + 2.506628277459239) * q) /
    (((((-54.47609879822406 * r + 161.5858368580409) * r - 155.6989798598866) * r + 66.80131188771972) * r - 13.28068155288572) * r + 1);
}
