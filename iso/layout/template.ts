/** True-scale templates: what is printed to be cut out and wrapped round a pipe or an elbow. Millimetres, x right, y down. */
import { elbowMarks } from "../closing/elbow-marks";
import { STRAIGHT_RAD } from "../geometry/tolerances";
import type { PaperPoint, Vec3 } from "../geometry/types";
import { saddleReach, saddleCut, type SaddleInput } from "./saddle";
import { wrapCurve, wrapLines, wrapRadiusMm, type WrapLine } from "./wrap";

export interface Template {
  /** What it is for: "P3 AT WELD 4, MITRE CUT 22.50°". */
  readonly title: string;
  /** How to lay it on, and numbers that go with it. */
  readonly facts: readonly string[];
  readonly widthMm: number;
  readonly heightMm: number;
  /** The cut: a line across the whole width, or a closed outline. */
  readonly cut: readonly PaperPoint[];
  readonly isClosed: boolean;
  /** y at which the lines end and the foot with their numbers begins. */
  readonly baseY: number;
  readonly lines: readonly WrapLine[];
  /** x of slits to be cut between the stations; none on pipe. */
  readonly slits: readonly number[];
  /** y of lines across, such as the run's centre line on a hole's template. */
  readonly across: readonly { readonly y: number; readonly name: string }[];
  /** Printed on the side kept, on the side cut away and under the base line. */
  readonly keep: string;
  readonly waste: string;
  readonly base: string;
}

/** Paper above the highest point of the cut, for the names of the lines. */
export const HEAD_MM = 27;
const LOW_HEAD_MM = 14;
/** Paper under the base line: station numbers, and what to keep. */
export const FOOT_MM = 14;
/** Paper between the cut's lowest point and the base line, where the pipe has room for it. */
const SKIRT_MM = 30;
const LEAST_SKIRT_MM = 3;

interface PipeEnd {
  readonly title: string;
  readonly facts: readonly string[];
  readonly keep: string;
  readonly odMm: number;
  readonly paperMm: number;
  /** Unit vector out of the cut end, and where station 0 looks. */
  readonly axis: Vec3;
  readonly zero: Vec3;
}

/** Skirt of a template on a piece that leaves so much straight pipe under the cut. */
export function skirtMm(roomMm: number): number {
  return Math.max(LEAST_SKIRT_MM, Math.min(SKIRT_MM, roomMm));
}

/** A pipe end cut in a plane: set-back (OD/2)·tan α·(1 - cos φ) from the long point at the back. */
export function mitreTemplate(end: PipeEnd & { readonly cutAngleRad: number; readonly skirtMm: number }): Template {
  const { odMm, cutAngleRad } = end;
  const y = (phi: number) => HEAD_MM + (odMm / 2) * Math.tan(cutAngleRad) * (1 - Math.cos(phi));
  return pipeTemplate(end, y, HEAD_MM + odMm * Math.tan(cutAngleRad) + end.skirtMm, ["BACK", "SIDE", "THROAT", "SIDE"]);
}

/**
 * A branch's end cut to its run: the reach falls away from the ears.
 * @returns a sentence when the branch does not meet the run all round.
 */
export function saddleTemplate(end: PipeEnd & { readonly saddle: SaddleInput; readonly skirtMm: number }): Template | string {
  const cut = saddleCut(end.saddle);
  if (!cut.ok) return cut.message;
  const { shortestMm, longestMm } = cut.cut;
  const y = (phi: number) => HEAD_MM + saddleReach(end.saddle, phi) - shortestMm;
  return pipeTemplate(end, y, HEAD_MM + longestMm - shortestMm + end.skirtMm, isSquare(end.saddle) ? ["ALONG RUN", "EAR", "ALONG RUN", "EAR"] : ["ACUTE SIDE", "SIDE", "OBTUSE SIDE", "SIDE"]);
}

/** A branch this near square has ears and no acute side. */
function isSquare({ angleRad }: SaddleInput): boolean {
  return Math.PI / 2 - angleRad < STRAIGHT_RAD;
}

function pipeTemplate(end: PipeEnd, y: (phi: number) => number, baseY: number, quarters: readonly [string, string, string, string]): Template {
  const radius = wrapRadiusMm(end.odMm, end.paperMm);
  return {
    title: end.title, facts: end.facts, widthMm: 2 * Math.PI * radius, heightMm: baseY + FOOT_MM, cut: wrapCurve(radius, y), isClosed: false, baseY,
    lines: wrapLines({ odMm: end.odMm, paperMm: end.paperMm, axis: end.axis, zero: end.zero, quarters }),
    slits: [], across: [], keep: end.keep, waste: "CUT AWAY", base: "BASE LINE: square round the pipe, both ends of the paper on it",
  };
}

/** The hole in the run, wrapped on the run with flow up or down as the facts say: x round the run, y along it. */
export function holeTemplate(hole: {
  readonly title: string;
  readonly facts: readonly string[];
  readonly saddle: SaddleInput;
  readonly paperMm: number;
}): Template | string {
  const cut = saddleCut(hole.saddle, HOLE_STEPS);
  if (!cut.ok) return cut.message;
  const scale = wrapRadiusMm(2 * hole.saddle.runRadiusMm, hole.paperMm) / hole.saddle.runRadiusMm;
  const across = cut.cut.hole.map(([, arc]) => arc * scale);
  const along = cut.cut.hole.map(([mm]) => mm);
  const [left, top] = [Math.min(...across, 0) - HOLE_MARGIN, Math.max(...along, 0) + HOLE_MARGIN + HOLE_HEAD];
  const widthMm = Math.max(...across, 0) + HOLE_MARGIN - left;
  const baseY = top - Math.min(...along, 0) + HOLE_MARGIN;
  return {
    title: hole.title, facts: hole.facts, widthMm, heightMm: baseY + HOLE_FOOT, cut: across.map((x, i): PaperPoint => [x - left, top - along[i]!]), isClosed: true, baseY,
    lines: [{ xMm: -left, number: "", name: "QUARTER LINE", kind: "quarter" }], slits: [],
    across: [{ y: top, name: "WORKING POINT" }],
    keep: "", waste: "HOLE", base: "Square round the run",
  };
}

const HOLE_STEPS = 720;
/** Paper round the hole, and more above it for the quarter line's name. */
const HOLE_MARGIN = 9;
const HOLE_HEAD = 5;
const HOLE_FOOT = 7;

/**
 * An elbow's cut: arcs (R + OD/2·cos φ)·θ from the uncut face along the surface, slit between the stations so that each
 * strip follows the bend (geometry of a torus; the strips are equally wide all along).
 * @param axis into the elbow from its uncut face; @param zero towards its back, there.
 */
export function elbowTemplate(elbow: PipeEnd & { readonly radiusMm: number; readonly angleRad: number; readonly face: string }): Template {
  const { odMm, paperMm, radiusMm, angleRad } = elbow;
  const { backMm, throatMm } = elbowMarks(radiusMm, odMm, angleRad);
  // Where the throat leaves room for the names of the lines, the paper above the cut is spared.
  const head = throatMm > HEAD_MM ? LOW_HEAD_MM : HEAD_MM;
  const y = (phi: number) => head + backMm - (radiusMm + (odMm / 2) * Math.cos(phi)) * angleRad;
  const end = pipeTemplate(elbow, y, head + backMm, ["BACK", "SIDE", "THROAT", "SIDE"]);
  const stations = end.lines.filter((line) => line.kind !== "top").map((line) => line.xMm);
  return {
    ...end, slits: stations.slice(1).map((x, i) => (x + stations[i]!) / 2), base: elbow.face,
    lines: wrapLines({ odMm, paperMm, axis: elbow.axis, zero: elbow.zero, quarters: ["BACK", "SIDE", "THROAT", "SIDE"] }),
  };
}
