/** Small lengths as a fit tells and takes them. */
import { formatDecimal, formatInches, INCH_MM, parseLength, type UnitSystem } from "@/iso";

/** A length for an entry, its unit beside it so that it means the same whatever the units: a fraction of an inch where that says exactly the same. */
export function tapeEntryText(mm: number, units: UnitSystem): string {
  if (units === "metric") return `${formatDecimal(mm, 3)} mm`;
  const tape = `${formatInches(mm, 64)} in`;
  const read = parseLength(tape, units);
  return read.ok && Math.abs(read.mm - mm) < EXACT_MM ? tape : `${formatDecimal(mm / INCH_MM, 5)} in`;
}

const EXACT_MM = 0.0005;

/** A ± finer than a tape: hundredths of an inch, tenths of a millimetre. */
export function withinText(mm: number, units: UnitSystem): string {
  return units === "metric" ? `${formatDecimal(mm, 1)} mm` : `${(mm / INCH_MM).toFixed(2)} in`;
}

/** A limit: a fraction of an inch where that says it, else thousandths. */
export function limitText(mm: number, units: UnitSystem): string {
  if (units === "metric") return `${formatDecimal(mm, 2)} mm`;
  const text = tapeEntryText(mm, units);
  return text.includes(".") ? `${(mm / INCH_MM).toFixed(3)} in` : text;
}
