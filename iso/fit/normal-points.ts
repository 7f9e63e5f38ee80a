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

/** Where the normal distribution reaches p (rational approximation of Acklam, relative error 1.2e-9; from memory). */
export function normalQuantile(p: number): number {
  const low = 0.02425;
  if (p > 0.5) return -normalQuantile(1 - p);
  if (p < low) {
    const q = Math.sqrt(-2 * Math.log(p));
    return (((((-7.784894002430293e-3 * q - 3.223964580411365e-1) * q - 2.400758277161838) * q - 2.549732539343734) * q + 4.374664141464968) * q + 2.938163982698783) /
      ((((7.784695709041462e-3 * q + 3.224671290700398e-1) * q + 2.445134137142996) * q + 3.754408661907416) * q + 1);
  }
  const q = p - 0.5;
  const r = q * q;
  return ((((((-3.969683028665376e1 * r + 2.209460984245205e2) * r - 2.759285104469687e2) * r + 1.38357751867269e2) * r - 3.066479806614716e1) * r + 2.506628277459239) * q) /
    (((((-5.447609879822406e1 * r + 1.615858368580409e2) * r - 1.556989798598866e2) * r + 6.680131188771972e1) * r - 1.328068155288572e1) * r + 1);
}
