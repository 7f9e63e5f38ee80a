/** What the marks of an overlay mean, with a sample of each: a strip of boxes under the drawing, or a row of pictures on screen. */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { circleSegments, lineItem, pathItem, textItem } from "../draw/paths";
import * as size from "../draw/sizes";
import { addedPipe, goneItem, gonePipe, ringItem } from "./overlay-style";

interface LegendEntry {
  readonly widthMm: number;
  readonly words: string;
  /** Drawn from the left end of its middle line. */
  readonly sample: (at: PaperPoint) => readonly DisplayItem[];
}

const BAR = 16;
const dot = (at: PaperPoint): DisplayItem => pathItem("weld", null, circleSegments(at, size.WELD_DOT / 2), { fill: "ink" });
const right = ([x, y]: PaperPoint, by: number): PaperPoint => [x + by, y];
const words = (at: PaperPoint, text: string, bold = false): DisplayItem => textItem("label", null, [at[0], at[1] + size.TEXT_CAP / 2], text, { capMm: size.TEXT_CAP, face: bold ? "bold" : "regular", ink: bold ? "ink" : "dye" });

const ENTRIES: readonly LegendEntry[] = [
  { widthMm: BAR, words: "in both", sample: (at) => [lineItem("pipe", null, at, right(at, BAR), size.PIPE_WIDTH), dot(right(at, BAR / 2))] },
  { widthMm: BAR, words: "added, or moved to here", sample: (at) => [addedPipe(null, at, right(at, BAR)), { ...dot(right(at, BAR / 2)), fill: "dye" } as DisplayItem, ringItem(right(at, BAR / 2), null)] },
  { widthMm: BAR, words: "removed, or moved away", sample: (at) => [...gonePipe(null, at, right(at, BAR - 4)), goneItem(dot(right(at, BAR - 1.5)))] },
  { widthMm: 30, words: "changed dimension, what it was", sample: (at) => [words(at, `3'-2" [WAS 2'-6"]`)] },
  { widthMm: 23, words: "rows of the list", sample: (at) => [words(at, "MOVED 2, 5", true)] },
];

export const LEGEND_ROW = 6.4;
const GAP = 2;
const BETWEEN = 7;

/** The legend in a width, from its top left corner. */
export function overlayLegend(corner: PaperPoint, widthMm: number, measure: MeasureText): { readonly items: readonly DisplayItem[]; readonly heightMm: number } {
  const items: DisplayItem[] = [];
  let [x, row] = [0, 0];
  for (const { widthMm: sampleMm, words: meaning, sample } of ENTRIES) {
    const entryMm = sampleMm + GAP + measure(meaning, size.TEXT_CAP, "regular");
    if (x > 0 && x + entryMm > widthMm) [x, row] = [0, row + 1];
    const at: PaperPoint = [corner[0] + x, corner[1] + (row + 0.5) * LEGEND_ROW];
    items.push(...sample(at), textItem("label", null, [at[0] + sampleMm + GAP, at[1] + size.TEXT_CAP / 2], meaning, { capMm: size.TEXT_CAP }));
    x += entryMm + BETWEEN;
  }
  return { items, heightMm: (row + 1) * LEGEND_ROW };
}

/** The legend across the foot of a box. */
export function legendAtFoot(box: PaperBox, measure: MeasureText): { readonly items: readonly DisplayItem[]; readonly heightMm: number } {
  const widthMm = box.maxX - box.minX;
  const { heightMm } = overlayLegend([0, 0], widthMm, measure);
  return { heightMm, items: overlayLegend([box.minX, box.maxY - heightMm], widthMm, measure).items };
}
