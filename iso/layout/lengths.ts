/** Lengths with their unit, as the bench reads them off a tape. */
import type { UnitSystem } from "../run/document";
import { formatDecimal, formatFeetInches, formatInches, formatTerm } from "../units/format";

/** `3'-1 1/2"`, or `953 mm`. */
export function formatTapeLength(mm: number, units: UnitSystem): string {
  return units === "metric" ? `${formatDecimal(mm, 0)} mm` : formatFeetInches(mm);
}

/** A mark on a table or a surface, finer: `2 19/32 in`, or `66.4 mm`. */
export function formatMark(mm: number, units: UnitSystem): string {
  return units === "metric" ? `${formatTerm(mm, units)} mm` : `${formatInches(mm, 32)} in`;
}

/** A small difference: `3/16 in`, or `4.5 mm`. */
export function formatFraction(mm: number, units: UnitSystem): string {
  return units === "metric" ? `${formatDecimal(mm, 1)} mm` : `${formatInches(mm, 32)} in`;
}
