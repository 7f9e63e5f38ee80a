/**
 * Points spread evenly under the six-dimensional bell: an additive recurrence over the powers of the generalised golden
 * ratio (a low-discrepancy sequence after Richtmyer and Weyl; constants x⁷ = x + 1), mapped by the inverse of the normal
 * distribution. Always the same points, so the same input always has the same probability.
 */

export const NORMAL_DIMENSIONS = 6;
export const NORMAL_POINTS = 8192;
/** For comparisons, which share their points: the differences settle long before the values do. */
export const FEWER_POINTS = 2048;

const known = new Map<number, Float64Array>();

/** Six numbers a point, one after the other. */
export function normalPoints(count = NORMAL_POINTS): Float64Array {
  const found = known.get(count);
  if (found) return found;
  const ratio = goldenRatio();
  const steps = Array.from({ length: NORMAL_DIMENSIONS }, (_, k) => ratio ** -(k + 1));
  const points = new Float64Array(count * NORMAL_DIMENSIONS);
  for (let n = 0; n < count; n++) for (let k = 0; k < NORMAL_DIMENSIONS; k++) {
    const even = (0.5 + (n + 1) * steps[k]!) % 1;
    points[n * NORMAL_DIMENSIONS + k] = normalQuantile(Math.min(Math.max(even, SMALLEST), 1 - SMALLEST));
  }
  known.set(count, points);
  return points;
}

const SMALLEST = 1e-9;

/** Positive root of x⁷ = x + 1. */
function goldenRatio(): number {
  let x = 1;
  for (let k = 0; k < 60; k++) x = (1 + x) ** (1 / (NORMAL_DIMENSIONS + 1));
  return x;
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
