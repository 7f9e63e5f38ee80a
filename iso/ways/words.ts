/** Words of a way: lengths as a tape shows them, its title, its cautions. */
import { CLOSING_STANDARD_ANGLE } from "../geometry/tolerances";
import type { UnitSystem } from "../run/document";
import { formatAngleDeg, formatInches, formatLength, formatTerm } from "../units/format";
import type { WayStraight, WayTurn } from "./ways-types";

/** Radians. A turn this near 90° is a whole 90. */
export const RIGHT_ANGLE_WITHIN = CLOSING_STANDARD_ANGLE;

/** A length on a tape: `33 3/16 in`, `849 mm`. */
export function tapeWords(mm: number, units: UnitSystem): string {
  return units === "metric" ? `${formatLength(mm, units)} mm` : `${formatInches(mm)} in`;
}

/** A length to a 1/64 in or a tenth of a millimetre. */
export function fineWords(mm: number, units: UnitSystem): string {
  return `${formatTerm(mm, units)} ${units === "metric" ? "mm" : "in"}`;
}

/** `LR 90, LR 45`, with the reducer named where there is one; `Pipe alone` without turns. */
export function wayTitle(turns: readonly WayTurn[], straights: readonly WayStraight[]): string {
  const names = straights.flatMap((straight, j) => {
    const turn = turns[j];
    return [...(straight.reducer ? [`reducer ${straight.reducer.largeNps} x ${straight.reducer.smallNps}`] : []), ...(turn ? [turn.fitting.name] : [])];
  });
  return names.length === 0 ? "Pipe alone" : names.join(", ");
}

/** What is to be said of the fittings of a way. */
export function fittingCautions(turns: readonly WayTurn[], straights: readonly WayStraight[]): string[] {
  const trimmed = turns.filter((t) => t.fitting.make === "elbow" && !t.fitting.whole);
  const untabled = turns.filter((t) => t.fitting.make === "elbow" && t.fitting.whole && !t.fitting.tabulated);
  const cautions: string[] = [];
  if (trimmed.length > 0) {
    cautions.push(`Trimmed ${trimmed.length > 1 ? "elbows" : "elbow"}, ${trimmed.map((t) => formatAngleDeg(t.angleRad)).join(" and ")}: confirm with the engineer that trimming is permitted.`);
  }
  if (untabled.length > 0) {
    const names = [...new Set(untabled.map((t) => t.fitting.name))].join(", ");
    cautions.push(`${names}: no table here gives its take-out, R·tan(θ/2) stands for it; measure the fitting. On the sheet it stands as a 90 cut to the angle, so confirm with the engineer where the shop cuts it.`);
  }
  if (turns.some((t) => t.unverified) || straights.some((s) => s.reducer?.unverified)) {
    cautions.push("A take-out here is from memory and not confirmed by the shop: measure the fitting.");
  }
  return cautions;
}
