/** Findings about one piece of pipe: it does not fit, its bends leave no straight, its threads meet, or it is a short pup. */
import { ZERO_LENGTH_MM } from "../geometry/tolerances";
import { formatInches, formatTerm } from "../units/format";
import { sentenceStart, type BuildContext } from "./build-context";
import type { PieceDraft, Side, Stretch } from "./build-types";
import { reachOf } from "./fit-common";
import { bendOf } from "./pipe-bend";

/** Least pipe between two weld toes whatever the size, mm (common practice; no code sets it). */
const SHORTEST_PUP_MM = 50;

/** Shortest pipe between two weld toes before a warning, mm: the line's, else 1.5 OD (common practice). */
export function leastPupMm(odMm: number, ctx: BuildContext): number {
  return ctx.settings.minimumPupMm ?? Math.max(1.5 * odMm, SHORTEST_PUP_MM);
}

export function checkPiece(s: Stretch, piece: PieceDraft, total: number, ctx: BuildContext): void {
  const where = { pointId: s.to.point.id, runId: s.to.runId };
  if (total <= ZERO_LENGTH_MM) return; // said already, leg by leg
  const unit = ctx.units === "metric" ? "mm" : "in";
  const finished = piece.cutLengthMm - piece.terms.filter((t) => t.kind === "trim").reduce((sum, t) => sum + t.valueMm, 0);
  const free = finished - makeUpMm(s.start) - makeUpMm(s.end);
  if (free <= 0) {
    const say = free < 0 ? `overlap by ${formatTerm(-free, ctx.units)} ${unit}` : "leave no length for the pipe";
    ctx.report("negative-length", "stop", `Between ${s.from.label} and ${s.to.label} the fittings and gaps ${say}: lengthen the leg, or choose shorter fittings.`, where);
    return;
  }
  if (checkTangents(s, ctx)) return;
  const least = leastPupMm(piece.odMm, ctx);
  const between = finished - throatMm(s.start, piece) - throatMm(s.end, piece);
  if (isWelded(s.start) && isWelded(s.end) && between < least) {
    const [is, want] = ctx.units === "metric" ? [formatTerm(between, "metric"), formatTerm(least, "metric")] : [formatInches(between), formatInches(least)];
    ctx.report("short-pup", "warning", `The pipe between ${s.from.label} and ${s.to.label} is a short pup of ${is} ${unit}, under ${want} ${unit} between welds: lengthen the leg, or weld the fittings together.`, where);
  }
}

function isWelded(side: Side): boolean {
  return side.weld !== null && side.weld.kind !== "threaded";
}

/** What of the pipe is inside a threaded fitting, mm. */
function makeUpMm(side: Side): number {
  return side.gap?.kind === "make-up" ? -side.gap.mm : 0;
}

/** How much shorter a mitred end is on its short side than along the centre line, mm. */
function throatMm(side: Side, piece: PieceDraft): number {
  return side.weld?.cutRad === undefined ? 0 : (piece.odMm / 2) * Math.tan(side.weld.cutRad);
}

/** Straights left between the bends of a piece; a finding and true when one is used up. */
function checkTangents(s: Stretch, ctx: BuildContext): boolean {
  const bends = s.passed.map(bendOf);
  if (bends.every((bend) => bend === null)) return false;
  const unit = ctx.units === "metric" ? "mm" : "in";
  let short = false;
  s.legs.forEach((leg, i) => {
    const before = i === 0 ? reachOf(s.start.terms) + (s.start.gap?.mm ?? 0) : (bends[i - 1]?.tangentMm ?? 0);
    const after = i === s.legs.length - 1 ? reachOf(s.end.terms) + (s.end.gap?.mm ?? 0) : (bends[i]?.tangentMm ?? 0);
    const left = leg.lengthMm - before - after;
    if (left >= -ZERO_LENGTH_MM) return;
    short = true;
    const at = s.passed[i] ?? s.to;
    ctx.report("bend-tangent", "stop", `${sentenceStart(at.label)}: the straight before it is ${formatTerm(-left, ctx.units)} ${unit} too short for the bends and fittings at its ends. Lengthen the leg, or bend to a smaller radius.`, { pointId: at.point.id, runId: at.runId });
  });
  return short;
}
