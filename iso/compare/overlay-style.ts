/**
 * How an overlay tells what is in both revisions from what came and went, in black and white: what came is heavy, its welds
 * ringed; what went is thin, dashed and crossed, its welds hollow. Color only in addition.
 */
import type { PaperPoint } from "../geometry/types";
import type { DisplayItem, Ref } from "../draw/drawing-types";
import { circleSegments, lineItem, pathItem } from "../draw/paths";
import * as size from "../draw/sizes";

export const ADDED_PIPE = 1.5;
const ADDED_FACTOR = 1.8;
export const GONE_PIPE = 0.4;
const GONE_LINE = 0.3;
const GONE_DASH: readonly number[] = [1.7, 1.2];
/** One cross on so much removed pipe, and its reach to each side, mm. */
const CROSS_EVERY = 8;
const CROSS = 1.3;
const RING = size.WELD_DOT / 2 + 1.1;
const RING_LINE = 0.45;

export function addedItem(item: DisplayItem): DisplayItem {
  if (item.type === "text") return { ...item, ink: "dye" };
  if (item.type === "line") return { ...item, widthMm: item.widthMm * ADDED_FACTOR, ink: "dye" };
  return { ...item, widthMm: item.widthMm * ADDED_FACTOR, stroke: item.stroke === "ink" ? "dye" : item.stroke, fill: item.fill === "ink" ? "dye" : item.fill };
}

export function goneItem(item: DisplayItem): DisplayItem {
  if (item.type === "text") return { ...item, ink: "grey" };
  if (item.type === "line") return { ...item, widthMm: Math.min(item.widthMm, GONE_LINE), ink: "grey", dash: GONE_DASH };
  // Hollow, so that a filled mark of before is never taken for one of now.
  return item.layer === "weld" ? { ...item, widthMm: GONE_LINE, stroke: "grey", fill: null } : { ...item, widthMm: GONE_LINE, stroke: "grey", fill: null, dash: GONE_DASH };
}

export const ringItem = (at: PaperPoint, ref: Ref | null): DisplayItem => pathItem("weld", ref, circleSegments(at, RING), { stroke: "dye", widthMm: RING_LINE });

export const addedPipe = (ref: Ref | null, from: PaperPoint, to: PaperPoint): DisplayItem => lineItem("pipe", ref, from, to, ADDED_PIPE, "dye");

/** Thin, dashed, with crosses along it. */
export function gonePipe(ref: Ref | null, from: PaperPoint, to: PaperPoint): readonly DisplayItem[] {
  const way: PaperPoint = [to[0] - from[0], to[1] - from[1]];
  const count = Math.max(1, Math.round(Math.hypot(way[0], way[1]) / CROSS_EVERY));
  const crosses = Array.from({ length: count }, (_, i) => {
    const k = (i + 0.5) / count;
    return crossAt([from[0] + way[0] * k, from[1] + way[1] * k], ref);
  });
  return [lineItem("pipe", ref, from, to, GONE_PIPE, "grey", GONE_DASH), ...crosses.flat()];
}

const crossAt = ([x, y]: PaperPoint, ref: Ref | null): readonly DisplayItem[] =>
  [1, -1].map((sign) => lineItem("pipe", ref, [x - CROSS, y - CROSS * sign], [x + CROSS, y + CROSS * sign], GONE_LINE, "grey"));
