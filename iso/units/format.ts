/** Numbers as a reader sees them. The only place where the core rounds; ties go away from zero, as on a hand sketch. */
import type { UnitSystem } from "../run/document";
import { HALF_STEP_SLACK } from "../geometry/tolerances";

const MM_PER_INCH = 25.4;
const POUNDS_PER_KG = 1 / 0.45359237;

/** Whole number of steps nearest to a value that is not negative; a value within float noise of a half rounds up. */
function stepsOf(value: number): number {
  return Math.floor(value + 0.5 + HALF_STEP_SLACK);
}

/** A decimal with at most so many digits, no trailing zeros, never "-0": 30.5, 775, 0.0625. Grouping: none. */
export function formatDecimal(value: number, digits: number): string {
  if (!Number.isFinite(value)) return "?";
  const steps = stepsOf(Math.abs(value) * 10 ** digits);
  const text = (steps / 10 ** digits).toFixed(digits);
  const short = text.includes(".") ? text.replace(/\.?0+$/, "") : text;
  return value < 0 && steps > 0 ? `-${short}` : short;
}

/** Sixteenths, 32nds or 64ths as a mixed number in lowest terms: 37 1/2, 3/8, 0. */
function formatSteps(steps: number, perInch: number): string {
  const whole = Math.floor(steps / perInch);
  let top = steps % perInch;
  let bottom = perInch;
  while (top > 0 && top % 2 === 0) {
    top /= 2;
    bottom /= 2;
  }
  if (top === 0) return String(whole);
  return whole > 0 ? `${whole} ${top}/${bottom}` : `${top}/${bottom}`;
}

/**
 * Inches from millimetres, rounded to 1/16 (or another power of two), without an inch mark: `37 1/2`, `-3/8`, `0`.
 * @returns "?" when the number is not finite.
 */
export function formatInches(mm: number, perInch: 16 | 32 | 64 = 16): string {
  if (!Number.isFinite(mm)) return "?";
  const steps = stepsOf((Math.abs(mm) / MM_PER_INCH) * perInch);
  return (mm < 0 && steps > 0 ? "-" : "") + formatSteps(steps, perInch);
}

/** Feet and inches from millimetres, rounded to 1/16: `3'-1 1/2"`, `3'-0"`, `2'-0 1/2"`, under a foot `6 1/2"`, `-2'-6"`. */
export function formatFeetInches(mm: number): string {
  if (!Number.isFinite(mm)) return "?";
  const steps = stepsOf((Math.abs(mm) / MM_PER_INCH) * 16);
  const feet = Math.floor(steps / 192);
  const sign = mm < 0 && steps > 0 ? "-" : "";
  const inches = formatSteps(steps % 192, 16);
  if (feet === 0) return `${sign}${inches}"`;
  return `${sign}${feet}'-${inches.includes("/") && !inches.includes(" ") ? "0 " : ""}${inches}"`;
}

/** A length for a drawing: imperial `3'-1 1/2"` to 1/16, metric whole millimetres `953` (the unit stands in the title block). */
export function formatLength(mm: number, units: UnitSystem): string {
  return units === "metric" ? formatDecimal(mm, 0) : formatFeetInches(mm);
}

/** A term of the cut arithmetic, finer than the rounded cut length: inches to 1/64 `3 55/64`, or millimetres to 0.1 `98.4`. No unit mark. */
export function formatTerm(mm: number, units: UnitSystem): string {
  return units === "metric" ? formatDecimal(mm, 1) : formatInches(mm, 64);
}

/** An angle in degrees from radians: `46.75°`, always with the digits asked for. */
export function formatAngleDeg(rad: number, digits = 2): string {
  if (!Number.isFinite(rad)) return "?";
  const degrees = (rad * 180) / Math.PI;
  const steps = stepsOf(Math.abs(degrees) * 10 ** digits);
  return `${degrees < 0 && steps > 0 ? "-" : ""}${(steps / 10 ** digits).toFixed(digits)}°`;
}

/** A weight: pounds on an imperial line, kilograms on a metric one; one decimal under 10. `212 lb`, `4.5 kg`. */
export function formatWeight(kg: number, units: UnitSystem): string {
  const value = units === "metric" ? kg : kg * POUNDS_PER_KG;
  return `${formatDecimal(value, Math.abs(value) < 10 ? 1 : 0)} ${units === "metric" ? "kg" : "lb"}`;
}
