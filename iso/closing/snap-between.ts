/** Snapping as the editor asks it: millimetres in, three ways to cut the piece out, each with how it then misses in words. */
import type { UnitSystem } from "../run/document";
import { formatAngleDeg, formatDecimal, formatInches, formatTerm } from "../units/format";
import { solverInput, type CloseBetweenInput } from "./close-between";
import { snapClosing, type ClosingCut, type SnapMismatch, type SnapSteps } from "./snap";

export interface SnapChoice {
  readonly way: "exact" | "snapped" | "square";
  readonly angle0: string;
  readonly angle1: string;
  readonly pipe: string;
  readonly roll: string;
  /** How far the first elbow is turned from its exact roll, about end 0's axis; "" = not at all. */
  readonly firstRoll: string;
  /** null for the exact piece, which misses nothing. */
  readonly mismatch: SnapMismatch | null;
  /** What the joint at end 1 then shows, one sentence. */
  readonly words: string;
}

const DEG = 180 / Math.PI;

/**
 * The piece exact, snapped with the least overall miss, and with each number rounded by itself, which keeps the end squarer
 * and lets it miss more. @param steps degrees and millimetres. @returns null where there are not two bends and a pipe.
 */
export function snapBetween(input: CloseBetweenInput, steps: SnapSteps): readonly SnapChoice[] | null {
  const snapped = snapClosing(solverInput(input), input.odMm, steps);
  if (!snapped) return null;
  const choice = (way: SnapChoice["way"], cut: ClosingCut, mismatch: SnapMismatch | null): SnapChoice => ({
    way, angle0: formatAngleDeg(cut.theta0), angle1: formatAngleDeg(cut.theta1), pipe: lengthText(cut.length, input.units), roll: formatAngleDeg(halfTurn(cut.roll)),
    firstRoll: rollText(halfTurn(cut.phi0 - snapped.exact.phi0), input), mismatch, words: mismatch ? mismatchWords(mismatch, input) : "Meets the end: no mismatch beyond how well it is cut.",
  });
  return [choice("exact", snapped.exact, null), choice("snapped", snapped.snapped.cut, snapped.snapped.mismatch), choice("square", snapped.square.cut, snapped.square.mismatch)];
}

/** The same turn between a half turn either way. */
function halfTurn(rad: number): number {
  return Math.atan2(Math.sin(rad), Math.cos(rad));
}

function lengthText(mm: number, units: UnitSystem): string {
  return units === "metric" ? `${formatTerm(mm, units)} mm` : `${formatInches(mm, 64)} in`;
}

/** Differences are finer than a tape: thousandths of an inch, hundredths of a millimetre. */
function smallText(mm: number, units: UnitSystem): string {
  return units === "metric" ? `${formatDecimal(Math.abs(mm), 2)} mm` : `${formatDecimal(Math.abs(mm) / MM_PER_INCH, 3)} in`;
}

const MM_PER_INCH = 25.4;

function rollText(rad: number, { odMm, units }: CloseBetweenInput): string {
  const arc = smallText((rad * odMm) / 2, units);
  return /^0 /.test(arc) ? "" : `${formatDecimal(Math.abs(rad * DEG), 2)}° ${rad > 0 ? "counter-clockwise" : "clockwise"}, seen from the gap; arc ${arc}`;
}

function mismatchWords({ axial, lateral, angleDeg, opening, gapMin, gapMax }: SnapMismatch, { units, rootGapMm }: CloseBetweenInput): string {
  const gap = /^0 /.test(smallText(axial, units)) ? "gap as set" : `gap ${smallText(axial, units)} ${axial > 0 ? "tighter" : "wider"}`;
  const face = `faces open ${smallText(opening, units)} across the OD (${formatDecimal(angleDeg, 3)}°)`;
  const range = gapMin < 0 && rootGapMm >= 0 ? "; the faces touch on one side" : `; gap from ${smallText(gapMin, units)} to ${smallText(gapMax, units)}`;
  return `At end 1: ${gap}, high-low ${smallText(lateral, units)}, ${face}${range}.`;
}
