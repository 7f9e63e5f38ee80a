/**
 * Paper wrapped round a pipe. A template lies with its print outward and the cut end of the pipe up; seen so, x runs to the
 * right round the pipe and y down along it. Going right is going round right-handed about the axis that points out of the
 * cut end. Paper of thickness t bends about its middle, so its length is π·(OD + t) (common practice adds one or two
 * thicknesses; this is the exact one for paper that neither stretches nor slips).
 */
import { NEARLY_ALONG } from "../geometry/tolerances";
import type { PaperPoint, Vec3 } from "../geometry/types";
import { vecDot, vecLength, vecReject, vecRotate, vecSignedAngle, VEC_NORTH, VEC_UP } from "../geometry/vec3";

/** Thickness of ordinary 80 g/m² printing paper, mm (common practice; 0.004 in). */
export const PAPER_THICKNESS_MM = 0.1;
export const STATIONS = 16;

const TURN = 2 * Math.PI;
/** A pipe steeper than this has no top, so its PLANT N side is named instead: about 6° off plumb. */
const UPRIGHT = 0.995;
/** Lines nearer than this on paper print as one, mm. */
const SAME_LINE_MM = 0.4;
/** A side that looks along an axis within this angle bears its name, radians (2°). */
const NAMED_WITHIN = (2 * Math.PI) / 180;

/** Radius of the paper's middle, mm: an angle round the pipe times this is a length on the paper. */
export function wrapRadiusMm(odMm: number, paperMm: number): number {
  return (odMm + paperMm) / 2;
}

/** A line along the pipe, at x on the paper. */
export interface WrapLine {
  readonly xMm: number;
  /** Printed at its foot, such as "4"; "" for a line that is no station. */
  readonly number: string;
  /** Printed along it, such as "BACK"; "" = none. */
  readonly name: string;
  readonly kind: "station" | "quarter" | "top";
}

export interface WrapTurn {
  readonly odMm: number;
  readonly paperMm: number;
  /** Unit vector out of the cut end. */
  readonly axis: Vec3;
  /** Where station 0 looks, square to the axis. */
  readonly zero: Vec3;
  /** Names of the quarter lines 0, 4, 8 and 12. */
  readonly quarters: readonly [string, string, string, string];
}

/** The 16 stations, line 0 again at the end, and the top (PLANT N on an upright pipe), left to right. */
export function wrapLines({ odMm, paperMm, axis, zero, quarters }: WrapTurn): readonly WrapLine[] {
  const radius = wrapRadiusMm(odMm, paperMm);
  const lines: WrapLine[] = Array.from({ length: STATIONS + 1 }, (_, i): WrapLine => {
    const isQuarter = (i * 4) % STATIONS === 0;
    const own = isQuarter ? (quarters[((i * 4) / STATIONS) % 4] ?? "") : "";
    const looks = isQuarter ? sideName(vecRotate(zero, axis, (TURN * i) / STATIONS)) : "";
    return { xMm: (TURN * radius * i) / STATIONS, number: String(i), name: [own, looks].filter(Boolean).join(" / "), kind: isQuarter ? "quarter" : "station" };
  });
  const upright = Math.abs(vecDot(axis, VEC_UP)) > UPRIGHT;
  const side = vecReject(upright ? VEC_NORTH : VEC_UP, axis);
  if (vecLength(side) < NEARLY_ALONG) return lines;
  const turn = (vecSignedAngle(zero, side, axis) + TURN) % TURN;
  const xMm = turn * radius;
  const name = upright ? "PLANT N" : "TOP";
  if (lines.some((line) => line.name.includes(name))) return lines;
  const on = lines.filter((line) => Math.min(Math.abs(line.xMm - xMm), TURN * radius - Math.abs(line.xMm - xMm)) < SAME_LINE_MM);
  if (on.length > 0) return lines.map((line) => (on.includes(line) ? { ...line, name: [line.name, name].filter(Boolean).join(" / ") } : line));
  return [...lines, { xMm, number: "", name, kind: "top" as const }].sort((p, q) => p.xMm - q.xMm);
}

/** The side of a pipe that looks along an axis of the plant; "" when it looks between them. */
export function sideName(direction: Vec3): string {
  const least = Math.cos(NAMED_WITHIN);
  const names: readonly (readonly [Vec3, string])[] = [
    [VEC_UP, "TOP"], [[0, 0, -1], "BOTTOM"], [VEC_NORTH, "PLANT N"], [[0, -1, 0], "PLANT S"], [[1, 0, 0], "PLANT E"], [[-1, 0, 0], "PLANT W"],
  ];
  return names.find(([axis]) => vecDot(axis, direction) > least)?.[1] ?? "";
}

/** A curve round the pipe as chords on paper: `height` is mm along the pipe at the angle from station 0, and y its paper y. */
export function wrapCurve(radiusMm: number, y: (phi: number) => number, steps = 720): readonly PaperPoint[] {
  return Array.from({ length: steps + 1 }, (_, i): PaperPoint => [(TURN * radiusMm * i) / steps, y((TURN * i) / steps)]);
}
