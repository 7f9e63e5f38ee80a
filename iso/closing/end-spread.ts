/** How far the numbers of a closing may be off, from what is known of its two ends: position and axis of both, together. */
import type { ClosingInput, ClosingSolution } from "./closing-types";
import { closingSensitivity } from "./sensitivity";
import { vecUnit } from "../geometry/vec3";
import type { Vec3 } from "../geometry/types";

/** Two standard deviations each: radians, the caller's unit for length. */
export interface ClosingSpread {
  readonly theta0: number;
  readonly theta1: number;
  readonly length: number;
  readonly roll: number;
}

const DEVIATIONS = 2;

/**
 * @param covariance twelve by twelve: end 0 position, end 0 axis, end 1 position, end 1 axis.
 * @returns null where a bend is absent, so that its plane has no meaning.
 */
export function closingSpread(input: ClosingInput, solution: ClosingSolution, covariance: readonly (readonly number[])[]): ClosingSpread | null {
  const rates = closingSensitivity(input, solution);
  const [d0, d1] = [vecUnit(input.d0), vecUnit(input.d1)];
  if (!rates || !d0 || !d1) return null;
  const spread = (rate: readonly number[]): number => {
    const row = [...rate.slice(6, 9), ...turnRates(rate.slice(9, 12), d0), ...rate.slice(0, 3), ...turnRates(rate.slice(3, 6), d1)];
    const variance = row.reduce((sum, a, i) => sum + row.reduce((part, b, j) => part + a * b * (covariance[i]?.[j] ?? 0), 0), 0);
    return DEVIATIONS * Math.sqrt(Math.max(variance, 0));
  };
  return { theta0: spread(rates.theta0), theta1: spread(rates.theta1), length: spread(rates.length), roll: spread(rates.roll) };
}

/** Rates per rotation about x, y, z as rates per change of the axis: a change δd is the rotation d × δd. */
function turnRates([wx, wy, wz]: readonly number[], [x, y, z]: Vec3): number[] {
  return [wy! * z - wz! * y, wz! * x - wx! * z, wx! * y - wy! * x];
}
