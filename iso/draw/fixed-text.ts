/** Text that belongs to a line: tried at a few places along it, else left to the label pass. */
import type { PaperPoint } from "../geometry/types";
import type { DisplayItem, MeasureText, Ref } from "./drawing-types";
import { turnedInk, type InkMap } from "./ink-map";
import type { LabelField } from "./label-field";
import { centredBox, centredText } from "./paths";
import { readingAngle, type Segment, type TurnedBox } from "./plane";
import * as size from "./sizes";

export interface LineText {
  readonly ref: Ref | null;
  readonly text: string;
  readonly line: Segment;
  /** Distance of the text's middle from the line. */
  readonly off: number;
  /** Try the side away from this point first; null = above. */
  readonly awayFrom: PaperPoint | null;
  /** Capital height, mm; absent = that of words. */
  readonly capMm?: number;
}

export interface PlacedText {
  readonly items: readonly DisplayItem[];
  readonly box: TurnedBox | null;
  readonly text: LineText;
}

/** Places one text beside its line and registers its box; box null when no place is free. */
export function placeLineText(text: LineText, field: LabelField, heavy: InkMap, light: InkMap, measure: MeasureText): PlacedText {
  const { line } = text;
  const way: PaperPoint = [line.to[0] - line.from[0], line.to[1] - line.from[1]];
  const span = Math.hypot(way[0], way[1]);
  const angle = readingAngle(way);
  const cap = text.capMm ?? size.TEXT_CAP;
  const width = measure(text.text, cap, "regular");
  const up: PaperPoint = [Math.sin(angle), -Math.cos(angle)];
  const along: PaperPoint = [Math.cos(angle), Math.sin(angle)];
  const middle: PaperPoint = [(line.from[0] + line.to[0]) / 2, (line.from[1] + line.to[1]) / 2];
  const outward = text.awayFrom ? Math.sign((middle[0] - text.awayFrom[0]) * up[0] + (middle[1] - text.awayFrom[1]) * up[1]) || 1 : 1;
  const slack = Math.max(0, (span - width) / 2 - 1);
  let best: TurnedBox | null = null;
  let bestCost = Infinity;
  for (const side of [outward, -outward]) {
    for (const k of [0, 0.5, -0.5, 1, -1]) {
      const centre: PaperPoint = [middle[0] + along[0] * slack * k + up[0] * text.off * side, middle[1] + along[1] * slack * k + up[1] * text.off * side];
      const box = centredBox(centre, width, cap, angle);
      if (field.overlapping(box)) continue;
      const cost = (side === outward ? 0 : 6) + Math.abs(k) * 2 + turnedInk(heavy, box) * 6 + turnedInk(light, box) * 1.2;
      if (cost < bestCost) [best, bestCost] = [box, cost];
    }
  }
  if (!best) return { items: [], box: null, text };
  field.add(best);
  return { items: [centredText("dimension-text", text.ref, best.centre, text.text, { capMm: cap, rotateRad: angle })], box: best, text };
}
