/**
 * Slopes as people type them: 2%, 1:100, 1 in 100, 1/4 in/ft, 10 mm/m. A minus sign, or "down" or "falls", goes down.
 * A slope is the rise over the level run (common practice of drawings and levels).
 */
import { formatDecimal } from "./format";

export type ParsedSlope =
  | { readonly ok: true; readonly ratio: number; readonly understood: string }
  | { readonly ok: false; readonly message: string };

const EXAMPLE = "2%, 1:100, 1/4 in/ft or 10 mm/m, with down in front where it falls";
const LONGEST_TEXT = 30;
/** Steepest slope an offset takes, rise over run; steeper pipe is entered by its direction. */
const STEEPEST = 10;
const NUMBER = String.raw`(\d+(?:\.\d*)?|\.\d+|(?:\d+[ -])?\d+\/\d+)`;

/** Each way of writing, with the rise over run of its first number (and second, where it has one). */
const FORMS: readonly (readonly [RegExp, (rise: number, run: number) => number])[] = [
  [new RegExp(`^${NUMBER} ?(?:%|percent|pct)$`), (rise) => rise / 100],
  [new RegExp(`^${NUMBER} ?: ?${NUMBER}$`), (rise, run) => rise / run],
  [new RegExp(`^${NUMBER} in ${NUMBER}$`), (rise, run) => rise / run],
  [new RegExp(`^${NUMBER} ?(?:"|in(?:ch(?:es)?)?)? ?(?:\\/|per) ?(?:'|ft|foot)$`), (rise) => rise / 12],
  [new RegExp(`^${NUMBER} ?mm ?(?:\\/|per) ?m$`), (rise) => rise / 1000],
];

/**
 * Reads one slope.
 * @returns rise over level run (negative falls) and its echo, or one sentence saying what to type. Never throws.
 */
export function parseSlope(text: string): ParsedSlope {
  const typed = String(text).trim();
  let plain = normalised(typed);
  if (plain === "") return refusal(`Type a slope, ${EXAMPLE}.`);
  if (plain.length > LONGEST_TEXT) return refusal(`That is too long for a slope; type ${EXAMPLE}.`);
  if (/^(?:0|level|flat)$/.test(plain)) return { ok: true, ratio: 0, understood: "level" };
  const sign = /^(?:-|down|falls?|falling)/.test(plain) ? -1 : 1;
  plain = plain.replace(/^(?:-|\+|down|falls?|falling|up|rises?|rising)\s*/, "");
  for (const [form, ratioOf] of FORMS) {
    const found = form.exec(plain);
    if (found) return slopeOf(sign * ratioOf(numberOf(found[1]), numberOf(found[2])), typed);
  }
  return refusal(`"${typed.slice(0, LONGEST_TEXT)}" is not a slope; type ${EXAMPLE}.`);
}

/** A slope in a reader's words: "falls 2.083 %, 1:48"; "level" when there is none. */
export function slopeText(ratio: number): string {
  if (ratio === 0) return "level";
  const rise = Math.abs(ratio);
  const share = rise >= 1 ? `${formatDecimal(rise, 3)}:1` : `1:${formatDecimal(1 / rise, 2)}`;
  return `${ratio < 0 ? "falls" : "rises"} ${formatDecimal(rise * 100, 3)} %, ${share}`;
}

function slopeOf(ratio: number, typed: string): ParsedSlope {
  if (!Number.isFinite(ratio)) return refusal(`"${typed.slice(0, LONGEST_TEXT)}" divides by nothing; type ${EXAMPLE}.`);
  if (Math.abs(ratio) > STEEPEST) return refusal("That is steeper than 10:1; enter the pipe by its direction instead.");
  const plain = ratio === 0 ? 0 : ratio;
  return { ok: true, ratio: plain, understood: slopeText(plain) };
}

/** "1 1/2", "1/4", "0.25" as a number; NaN for nothing. */
function numberOf(text: string | undefined): number {
  if (text === undefined) return Number.NaN;
  const parts = /^(?:(\d+)[ -])?(\d+)\/(\d+)$/.exec(text);
  return parts ? Number(parts[1] ?? 0) + Number(parts[2]) / Number(parts[3]) : Number(text);
}

const FRACTIONS: Readonly<Record<string, string>> = { "\u00bd": "1/2", "\u00bc": "1/4", "\u00be": "3/4", "\u215b": "1/8", "\u215c": "3/8", "\u215d": "5/8", "\u215e": "7/8" };

function normalised(typed: string): string {
  return typed
    .replace(/[\u00bd\u00bc\u00be\u215b-\u215e]/g, (f) => ` ${FRACTIONS[f]}`)
    .replace(/[\u2010-\u2015\u2212]/g, "-")
    .replace(/[\u2032\u2019]/g, "'")
    .replace(/[\u2033\u201d]/g, '"')
    .replace(/\s+/g, " ")
    .trim()
    .toLowerCase();
}

function refusal(message: string): ParsedSlope {
  return { ok: false, message };
}
