/**
 * Lengths as people type them: 2' 6 1/2", 2-6 1/2, 6-1/2, 30.5", 775, 775mm. Everything becomes millimetres, or one
 * plain sentence that says what to type instead. How the dashes read is common practice on the shop floor: a dash before
 * a fraction joins it to whole inches, any other dash parts feet from inches.
 */
import type { UnitSystem } from "../run/document";
import { MAX_LENGTH_MM } from "../run/scalar-schemas";
import { HALF_STEP_SLACK } from "../geometry/tolerances";
import { formatDecimal, formatFeetInches, formatLength } from "./format";

/** Millimetres in an inch, by definition (international yard and pound agreement, 1959). */
export const INCH_MM = 25.4;
/** Millimetres in a foot. */
export const FOOT_MM = 304.8;

/** Millimetres from inches, rounded once (inches times 127 is exact for every tape fraction). */
export function inchesMm(inches: number): number {
  return (inches * 127) / 5;
}

export type ParsedLength =
  | { readonly ok: true; readonly mm: number; readonly understood: string }
  | { readonly ok: false; readonly message: string };

const FRACTIONS: Readonly<Record<string, string>> = {
  "½": "1/2", "¼": "1/4", "¾": "3/4", "⅛": "1/8", "⅜": "3/8", "⅝": "5/8", "⅞": "7/8",
};
const LONGEST_TEXT = 60;
const TAPE_DENOMINATORS = new Set([2, 4, 8, 16, 32, 64]);
const EXAMPLES: Readonly<Record<UnitSystem, string>> = {
  imperial: `for example 2' 6 1/2", 2-6 1/2, 30.5 or 775mm`,
  metric: `for example 775, 77.5cm, 0.775m or 30 1/2"`,
};

/** Something a person can mend, in one sentence; never leaves this file. */
class Refusal extends Error {}

/**
 * Reads one length in the line's unit system; a bare number is inches on an imperial line, millimetres on a metric one.
 * @returns millimetres, with the entry echoed as it was understood, or one sentence saying what to type. Never throws.
 */
export function parseLength(text: string, units: UnitSystem): ParsedLength {
  try {
    const mm = lengthOf(String(text), units);
    return { ok: true, mm, understood: understoodLength(mm, units) };
  } catch (error) {
    if (error instanceof Refusal) return { ok: false, message: error.message };
    throw error;
  }
}

function lengthOf(raw: string, units: UnitSystem): number {
  const text = normalised(raw);
  if (text === "") throw new Refusal(`Type a length, ${EXAMPLES[units]}.`);
  if (text.length > LONGEST_TEXT) throw new Refusal(`That is too long for a length; type it ${EXAMPLES[units]}.`);
  const sign = text.startsWith("-") ? -1 : 1;
  const mm = sign * magnitudeMm(text.replace(/^[+-]\s*/, ""), units, raw.trim());
  if (!Number.isFinite(mm) || Math.abs(mm) > MAX_LENGTH_MM) {
    throw new Refusal(`That is longer than a line may be (${units === "metric" ? "1 000 000 mm" : "3280 ft"}); check for a slip.`);
  }
  return mm === 0 ? 0 : mm;
}

/** Lower case, plain quotes, dashes and fractions, one space where there were several. */
function normalised(raw: string): string {
  return raw
    .replace(/(\d?)\s*([½¼¾⅛⅜⅝⅞])/g, (_, digit: string, f: string) => (digit ? `${digit} ` : "") + FRACTIONS[f])
    .replace(/\u2044|\u2215/g, "/")
    .replace(/[\u2010-\u2015\u2212]/g, "-")
    .replace(/''|[\u2033\u201c\u201d]/g, '"')
    .replace(/[\u2032\u2018\u2019\u00b4`]/g, "'")
    .replace(/\s+/g, " ")
    .trim()
    .toLowerCase()
    .replace(/(feet|foot|ft)(?![a-z])\.?/g, "'")
    .replace(/(inches|inch|in)(?![a-z])\.?/g, '"');
}

const NUMBER = String.raw`(?:\d+(?:\.\d*)?|\.\d+)`;
const METRIC = new RegExp(`^(${NUMBER}) ?(mm|cm|m)$`);
const FEET_MARKED = new RegExp(`^(${NUMBER}) ?'(?:[ -]*(\\S.*?))?$`);
const FEET_DASH = /^(\d+) ?- ?(\d+(?:\.\d*)?(?:[ -]+\d+\/\d+)?) ?"?$/;
const WHOLE_AND_FRACTION = /^(\d+)(?: | ?- ?)(\d+)\/(\d+)$/;
const FRACTION = /^(\d+)\/(\d+)$/;
const PLAIN = new RegExp(`^${NUMBER}$`);

/** Millimetres of an entry without its sign. The order of the cases is the meaning: units first, then dashes. */
function magnitudeMm(text: string, units: UnitSystem, typed: string): number {
  if (text.includes(",")) throw new Refusal(`A comma can mean thousands or a decimal; type ${typed.replace(/,/g, "")} or use a point.`);
  const metric = METRIC.exec(text);
  if (metric) return Number(metric[1]) * { mm: 1, cm: 10, m: 1000 }[metric[2] as "mm" | "cm" | "m"];
  const feet = FEET_MARKED.exec(text);
  if (feet) return feetMm(feet[1]!, feet[2], typed);
  const inches = text.endsWith('"') ? inchesOf(text.slice(0, -1).trim()) : null;
  if (inches !== null) return inchesMm(inches);
  const dash = FEET_DASH.exec(text);
  if (dash) {
    if (units === "metric" && !text.endsWith('"')) {
      throw new Refusal(`On a metric line ${typed} is not clear; type ${dash[1]}' ${dash[2]}" for feet and inches, or millimetres.`);
    }
    return feetMm(dash[1]!, dash[2], typed);
  }
  if (PLAIN.test(text)) return units === "metric" ? Number(text) : inchesMm(Number(text));
  const bare = inchesOf(text);
  if (bare === null) throw new Refusal(`${shown(typed)} is not a length; type it ${EXAMPLES[units]}.`);
  if (units === "metric") throw new Refusal(`On a metric line a fraction needs its unit; type ${typed}" for inches, or ${formatDecimal(bare, 4)} for millimetres.`);
  return inchesMm(bare);
}

function feetMm(feet: string, rest: string | undefined, typed: string): number {
  if (rest === undefined) return inchesMm(Number(feet) * 12);
  const inches = inchesOf(rest.replace(/ ?"$/, ""));
  if (inches === null) throw new Refusal(`${shown(typed)} is not feet and inches; type it like 2' 6 1/2".`);
  if (feet.includes(".")) throw new Refusal(`Use whole feet before inches, or feet alone: ${shown(typed)} has both a point and inches.`);
  if (inches >= 12) {
    const total = inchesMm(Number(feet) * 12 + inches);
    const plain = formatDecimal(inches, 4);
    throw new Refusal(`${plain} inches after feet makes another foot; type ${formatFeetInches(total)} if that is meant, or ${formatDecimal(total / INCH_MM, 4)}" in inches.`);
  }
  return inchesMm(Number(feet) * 12 + inches);
}

/** Inches from `37`, `30.5`, `37 1/2`, `37-1/2` or `1/2`; null when it is none of these. */
function inchesOf(text: string): number | null {
  if (PLAIN.test(text)) return Number(text);
  const mixed = WHOLE_AND_FRACTION.exec(text);
  if (mixed) return Number(mixed[1]) + fractionOf(mixed[2]!, mixed[3]!, true);
  const alone = FRACTION.exec(text);
  return alone ? fractionOf(alone[1]!, alone[2]!, false) : null;
}

function fractionOf(top: string, bottom: string, proper: boolean): number {
  if (!TAPE_DENOMINATORS.has(Number(bottom))) {
    throw new Refusal(`A tape has no ${top}/${bottom}; use halves, quarters, eighths, 16ths, 32nds or 64ths, or a decimal.`);
  }
  if (proper && Number(top) >= Number(bottom)) throw new Refusal(`${top}/${bottom} is a whole inch or more; carry it over into the whole inches.`);
  return Number(top) / Number(bottom);
}

/** The echo: the reader's form, and the exact number beside it where a tape's 1/16 (or a whole mm) does not show it. */
function understoodLength(mm: number, units: UnitSystem): string {
  if (units === "metric") return `${formatDecimal(mm, 2)} mm`;
  const sixteenths = (mm / INCH_MM) * 16;
  const onTape = Math.abs(sixteenths - Math.round(sixteenths)) < HALF_STEP_SLACK * 16;
  return onTape ? formatLength(mm, units) : `${formatLength(mm, units)} (${formatDecimal(mm / INCH_MM, 4)}")`;
}

function shown(typed: string): string {
  return `"${typed.length > 24 ? `${typed.slice(0, 24)}...` : typed}"`;
}
