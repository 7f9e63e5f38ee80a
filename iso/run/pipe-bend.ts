/**
 * Bends of the pipe itself: the pipe runs on uncut. Each tangent point lies R·tan(θ/2) from the corner, and the centre line
 * between the tangent points is R·θ long, so a bend takes 2·R·tan(θ/2) - R·θ off the corner-to-corner sum (geometry of a
 * tangent arc). Spring-back and the stretch of the outside are the bender's (common practice).
 */
import { FOLD_RAD } from "../geometry/tolerances";
import { formatAngleDeg, formatTerm } from "../units/format";
import { sentenceStart, type BuildContext } from "./build-context";
import type { Fitting, PlacedPoint } from "./build-types";
import type { Item } from "./document";
import { endSide, fittingOf } from "./fit-common";
import { nominalMm } from "./words";

/** Smallest radius bent without a second thought, in nominal sizes (common practice). */
const USUAL_RADIUS = 3;

export interface Bend {
  readonly point: PlacedPoint;
  readonly angleRad: number;
  readonly radiusMm: number;
  /** From the corner to where the bend begins and ends, mm. */
  readonly tangentMm: number;
  /** Centre line of the bent part, mm. */
  readonly developedMm: number;
}

/** The bend a point makes in its pipe; null where it makes none. */
export function bendOf(p: PlacedPoint): Bend | null {
  const { item } = p.point;
  if (item.kind !== "bend" || p.turnRad === 0) return null;
  const angleRad = Math.min(p.turnRad, Math.PI - FOLD_RAD);
  return { point: p, angleRad, radiusMm: item.radiusMm, tangentMm: item.radiusMm * Math.tan(angleRad / 2), developedMm: item.radiusMm * angleRad };
}

/** A bend point: the pipe runs through; what is said about it. */
export function fitBend(p: PlacedPoint, item: Extract<Item, { kind: "bend" }>, ctx: BuildContext): Fitting {
  const where = { pointId: p.point.id, runId: p.runId };
  if (!p.arriving || !p.leaving) {
    ctx.report("elbow-at-end", "warning", `${sentenceStart(p.label)} is a bend at the end of a run: give the next point, so that it knows where it turns.`, where);
    return fittingOf({ in: endSide(), out: endSide() });
  }
  if (p.turnRad === 0) {
    ctx.report("elbow-straight", "stop", `${sentenceStart(p.label)} names a bend but the line runs straight on: correct the offsets or take the bend out.`, where);
  } else if (item.radiusMm === 0) {
    ctx.report("bend-radius", "stop", `${sentenceStart(p.label)}: give the bend's centre-line radius.`, where);
  } else if (item.radiusMm < USUAL_RADIUS * nominalMm(p.pipeIn.nps)) {
    const unit = ctx.units === "metric" ? "mm" : "in";
    ctx.report("bend-tight", "warning", `${sentenceStart(p.label)} bends ${formatAngleDeg(p.turnRad)} to a radius of ${formatTerm(item.radiusMm, ctx.units)} ${unit}, under three nominal sizes (common practice): ask the bender and the engineer.`, where);
  }
  return fittingOf({});
}
