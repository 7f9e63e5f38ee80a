/** The verdict in one line, and what to measure better. */
import type { UnitSystem } from "../run/settings-schema";
import { formatDecimal, formatInches } from "../units/format";
import type { FitContribution, FitFlag, FitTrim } from "./fit-types";

/** A chance as a fitter says it: `about 83 times in 100`. */
export function chanceWords(probability: number): string {
  const times = Math.round(probability * 100);
  if (probability < LEAST) return "hardly ever, under 1 time in 100";
  if (probability > 1 - LEAST) return "more than 99 times in 100";
  return `about ${Math.min(Math.max(times, 1), 99)} times in 100`;
}

const LEAST = 0.005;

/** A chance as a bare number of a hundred. */
export function chanceNumber(probability: number): string {
  if (probability < LEAST) return "under 1";
  if (probability > 1 - LEAST) return "over 99";
  return String(Math.min(Math.max(Math.round(probability * 100), 1), 99));
}

/** A trim or a ±: `3/8 in`, `10 mm`; finer lengths in hundredths of a millimetre or thousandths of an inch. */
export function trimWords(mm: number, units: UnitSystem): string {
  return units === "metric" ? `${formatDecimal(mm, 0)} mm` : `${formatInches(mm)} in`;
}

export function verdictWords(probability: number, target: number, trims: readonly FitTrim[], units: UnitSystem): string {
  const fits = `Fits without trim ${chanceWords(probability)}`;
  if (probability >= target) return `${fits}; no trim is needed for ${chanceNumber(target)}.`;
  const best = trims[0];
  if (!best) return `${fits}. No pipe of it can be left long to trim.`;
  const left = best.trimMm > 0 ? `leave ${trimWords(best.trimMm, units)} at ${best.joint}` : `fit ${best.joint} in the field`;
  if (best.reached) return `${fits}; ${left} and it is ${chanceNumber(best.probability)}.`;
  if (best.probability <= probability) return `${fits}. Trim alone does not make it surer: high-low or the angle at a joint decides.`;
  return `${fits}; ${left} and it is ${chanceNumber(best.probability)}. Trim alone does not bring it to ${chanceNumber(target)}: high-low or the angle at a joint decides.`;
}

/** A gain under this, of 1, is not worth another walk. */
const WORTH = 0.01;

/** The reading, or the end, whose halved tolerance helps most; else the shop's own work; "" when nothing does. */
export function adviceWords(contributions: readonly FitContribution[], probability: number): string {
  const most = (kinds: readonly FitContribution["kind"][]) => contributions.filter(({ kind }) => kinds.includes(kind)).reduce<FitContribution | null>((best, each) => (best === null || each.halved > best.halved ? each : best), null);
  const measured = most(["reading", "end"]);
  const shop = most(["shop"]);
  const gain = (each: FitContribution | null) => (each ? each.halved - probability : 0);
  const words: string[] = [];
  if (measured && gain(measured) >= WORTH) words.push(`Measure ${named(measured)} better: with half its tolerance the chance is ${chanceNumber(measured.halved)} in 100.`);
  if (shop && gain(shop) >= WORTH && gain(shop) > gain(measured)) words.push(`The shop's own work counts for more: ${shop.name.toLowerCase()} held to half its tolerance makes it ${chanceNumber(shop.halved)} in 100.`);
  if (words.length === 0 && probability < 1 - WORTH && contributions[0]) words.push(`No single reading or tolerance helps much by itself; ${named(contributions[0])} is the largest part of it.`);
  return words.join(" ");
}

/** Inside a sentence, the first letter of a name that is no mark goes small. */
function named({ name }: FitContribution): string {
  return /^[A-Z][a-z]/.test(name) ? name.charAt(0).toLowerCase() + name.slice(1) : name;
}

export const FLAG_WORDS: Readonly<Record<FitFlag, string>> = {
  fold: "No figure for this one: there is so little pipe between the bends that the survey's own error could close it another way, or not at all. Measure again, or leave room for a longer pipe.",
  "near-fold": "No figure for this one: what the survey may be off by turns a bend by more than 1°, so the angles are a guess. Measure the ends better, or leave room for a longer pipe.",
  "too-loose": "No figure for this one: an axis is known too loosely for it. Measure the direction of the ends with more than a compass.",
  "no-errors": "Nothing is said to be off: give the ends a tolerance, or close between surveyed ends.",
  "bad-input": "These ends and tolerances cannot be worked out.",
};
