/**
 * What would make a refused closing work: the least change of each kind that a shop can make, found by trying. Each
 * number is rounded up to what a tape shows and tried again as rounded, so that the advice holds as it is printed.
 */
import type { UnitSystem } from "../run/document";
import { vecAddScaled, vecSub, vecUnit } from "../geometry/vec3";
import { formatAngleDeg, formatLength } from "../units/format";
import { INCH_MM } from "../units/length";
import type { ClosingInput, ClosingResult } from "./closing-types";
import { solveClosing } from "./solver";

/** Farthest an end is cut back or moved in the search, in bend radii. */
const FARTHEST_RADII = 12;
/** Growth of the first, coarse search, and halvings of the second. */
const GROWTH = 1.35;
const HALVINGS = 14;
/** Elbows smaller than this share of the bend radius are another job, not advice. */
const SMALLEST_RADIUS_SHARE = 0.3;
const RADIUS_STEPS = 40;

type Change = (amountMm: number) => ClosingInput;

/**
 * The nearest change that would work, in one sentence or two; null when none was found.
 * @param input in millimetres, axes unit vectors, as refused.
 */
export function closingAdvice(input: ClosingInput, refusal: ClosingResult, units: UnitSystem): string | null {
  if (refusal.reason === null || refusal.reason === "bad-input") return null;
  if (refusal.reason === "angle-sum") {
    const each = refusal.angleSumMin! / 2;
    return `Elbows that can be cut to ${formatAngleDeg(each)} or more each, or an end turned by ${formatAngleDeg(refusal.angleSumMin! - 2 * input.thetaMax)}, would do.`;
  }
  const parts = [bigger(input, refusal), room(input, units), smaller(input, units)].filter((p) => p !== null);
  if (parts.length === 0) return null;
  return `${capital(parts.join("; or "))} would work.`;
}

/** An elbow that reaches farther round, where that is all it needs and a 90 gives it. */
function bigger(input: ClosingInput, refusal: ClosingResult): string | null {
  if (refusal.reason !== "theta-max" || !refusal.nearest) return null;
  const need = Math.max(refusal.nearest.theta0, refusal.nearest.theta1);
  if (need > Math.PI / 2 || !works({ ...input, thetaMax: Math.PI / 2 })) return null;
  return `an elbow that can be cut to ${formatAngleDeg(need)} (from a 90)`;
}

/** Cutting ends back, or else moving end 1 away. */
function room(input: ClosingInput, units: UnitSystem): string | null {
  const back = (k0: number, k1: number): Change => (t) => ({
    ...input, p0: vecAddScaled(input.p0, input.d0, -t * k0), p1: vecAddScaled(input.p1, input.d1, -t * k1),
  });
  const cuts = [
    { words: "cutting both ends back by", sum: 2, least: leastMm(back(1, 1), input, units) },
    { words: "cutting end 0 back by", sum: 1, least: leastMm(back(1, 0), input, units) },
    { words: "cutting end 1 back by", sum: 1, least: leastMm(back(0, 1), input, units) },
  ].flatMap((c) => (c.least === null ? [] : [{ ...c, least: c.least }]));
  cuts.sort((x, y) => x.least * x.sum - y.least * y.sum);
  const best = cuts[0];
  if (best) return `${best.words} ${lengthWords(best.least, units)}`;
  const away = vecUnit(vecSub(input.p1, input.p0)) ?? input.d0;
  const least = leastMm((t) => ({ ...input, p1: vecAddScaled(input.p1, away, t) }), input, units);
  return least === null ? null : `moving end 1 ${lengthWords(least, units)} farther from end 0`;
}

/** Tighter elbows at both ends. */
function smaller(input: ClosingInput, units: UnitSystem): string | null {
  const with_ = (share: number): ClosingInput => ({ ...input, r0: input.r0 * share, r1: input.r1 * share });
  for (let i = 1; i <= RADIUS_STEPS; i += 1) {
    const share = 1 - (i / RADIUS_STEPS) * (1 - SMALLEST_RADIUS_SHARE);
    if (!works(with_(share))) continue;
    const step = stepMm(units);
    const least = Math.floor((Math.min(input.r0, input.r1) * share) / step) * step;
    return works(with_(least / Math.min(input.r0, input.r1))) ? `elbows with a bend radius of ${lengthWords(least, units)} or less` : null;
  }
  return null;
}

/** Least amount of a change that works, rounded up to the tape; null when none within reach does. */
function leastMm(change: Change, input: ClosingInput, units: UnitSystem): number | null {
  const step = stepMm(units);
  const reach = FARTHEST_RADII * Math.max(input.r0, input.r1);
  let low = 0;
  let high = step;
  while (!works(change(high))) {
    low = high;
    high *= GROWTH;
    if (high > reach) return null;
  }
  for (let i = 0; i < HALVINGS; i += 1) {
    const middle = (low + high) / 2;
    if (works(change(middle))) high = middle;
    else low = middle;
  }
  const rounded = Math.ceil(high / step) * step;
  return works(change(rounded)) ? rounded : null;
}

function works(input: ClosingInput): boolean {
  return solveClosing(input).status === "ok";
}

function stepMm(units: UnitSystem): number {
  return units === "metric" ? 1 : INCH_MM / 16;
}

function lengthWords(mm: number, units: UnitSystem): string {
  return units === "metric" ? `${formatLength(mm, units)} mm` : formatLength(mm, units);
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
