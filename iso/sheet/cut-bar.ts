/** A cut piece as a bar seen from the side, its ends drawn as they are cut. Length to the map's scale, height is not. */
import type { DisplayItem, PathSegment } from "../draw/drawing-types";
import type { PaperPoint } from "../geometry/types";
import type { Piece, PieceEnd } from "../run/model-types";
import { lineFrom, pathOf, polygonOf } from "./items";

export const BAR_HEIGHT = 8;
/** Shorter bars could not show their ends, mm on paper. */
export const BAR_LEAST = 24;
/** How far a bevel runs in from the end, and the land it leaves on either side of the bore as seen, mm. */
const BEVEL = [1.8, 2.2] as const;
const SADDLE_DEPTH = 2.6;
const THREAD = 4.5;
/** A mitre is drawn at its own angle, but never so flat that it reads as square nor past what the bar holds, mm of slant. */
const SLANT = [1.2, 7] as const;
const WALL_LINE = 0.5;
const THIN_LINE = 0.2;

/** Paper length of a piece at a scale. @param perMm paper mm per mm of pipe */
export function barLength(piece: Piece, perMm: number): number {
  return Math.max(BAR_LEAST, piece.cutLengthMm * perMm);
}

/** The bar from `at`, its upper left corner, towards the right along flow. */
export function barItems(piece: Piece, [x, y]: PaperPoint, lengthMm: number): DisplayItem[] {
  const middle = y + BAR_HEIGHT / 2;
  const right = x + lengthMm;
  const start = endPoints(piece.ends[0]);
  const end = endPoints(piece.ends[1]);
  const outline: PathSegment[] = [
    ...start.map(({ op, points }): PathSegment => segment(op, points.map(([inward, down]) => [x + inward, y + down] as const))),
    ...mirrored(end).map(({ op, points }): PathSegment => segment(op, points.map(([inward, down]) => [right - inward, y + down] as const))),
    { op: "Z" },
  ];
  return [
    pathOf([{ op: "M", to: firstPoint(outline) }, ...outline.slice(1)], { layer: "table", fill: "paper", widthMm: WALL_LINE }),
    lineFrom([x + 3, middle], [right - 3, middle], THIN_LINE, "table", "ink", [5, 1.2]),
    ...bendTicks(piece, x, y, lengthMm),
    ...flowArrow([x + lengthMm / 2, middle]),
    ...(piece.ends[0].prep === "thread" ? threadTicks(x, y, 1) : []), ...(piece.ends[1].prep === "thread" ? threadTicks(right, y, -1) : []),
  ];
}

interface EndStep {
  readonly op: "L" | "C";
  readonly points: readonly PaperPoint[];
}

/** An end from the bar's foot up to its top: points as (inward, down). The long side of a mitre is on top. */
function endPoints({ prep, cutAngleDeg }: PieceEnd): readonly EndStep[] {
  const line = (...points: PaperPoint[]): EndStep[] => points.map((point) => ({ op: "L", points: [point] }));
  const h = BAR_HEIGHT;
  if (prep === "bevel") return line([BEVEL[0], h], [0, h - BEVEL[1]], [0, BEVEL[1]], [BEVEL[0], 0]);
  if (prep === "mitre") return line([Math.min(SLANT[1], Math.max(SLANT[0], h * Math.tan(((cutAngleDeg ?? 0) * Math.PI) / 180))), h], [0, 0]);
  if (prep === "saddle") return [...line([0, h]), { op: "C", points: [[SADDLE_DEPTH, h * 0.8], [SADDLE_DEPTH, h * 0.2], [0, 0]] }];
  return line([0, h], [0, 0]);
}

/** The same steps from top to foot. */
function mirrored(steps: readonly EndStep[]): readonly EndStep[] {
  if (!steps.some(({ op }) => op === "C")) return [...steps].reverse();
  return [{ op: "L", points: [[0, 0]] }, { op: "C", points: [[SADDLE_DEPTH, BAR_HEIGHT * 0.2], [SADDLE_DEPTH, BAR_HEIGHT * 0.8], [0, BAR_HEIGHT]] }];
}

function segment(op: "L" | "C", points: readonly PaperPoint[]): PathSegment {
  return op === "L" ? { op, to: points[0]! } : { op, c1: points[0]!, c2: points[1]!, to: points[2]! };
}

function firstPoint(outline: readonly PathSegment[]): PaperPoint {
  const [first] = outline;
  return first && "to" in first ? first.to : [0, 0];
}

function flowArrow([x, y]: PaperPoint): DisplayItem[] {
  return [polygonOf([[x - 2, y - 1.5], [x + 2.6, y], [x - 2, y + 1.5]], { layer: "table", stroke: null, fill: "ink" })];
}

function threadTicks(end: number, y: number, inward: 1 | -1): DisplayItem[] {
  return [1.2, 2.4, 3.6].map((d) => lineFrom([end + inward * d, y], [end + inward * Math.min(THREAD, d + 0.7), y + BAR_HEIGHT], THIN_LINE));
}

/** Where each bend begins and ends along the pipe. */
function bendTicks(piece: Piece, x: number, y: number, lengthMm: number): DisplayItem[] {
  const at = (mm: number) => x + (lengthMm * mm) / Math.max(1, piece.cutLengthMm);
  return (piece.bends ?? []).flatMap(({ startMm, developedMm }) => [startMm, startMm + developedMm].map((mm) => lineFrom([at(mm), y - 1.2], [at(mm), y + BAR_HEIGHT + 1.2], 0.35)));
}
