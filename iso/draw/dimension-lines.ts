/** Chosen dimensions on paper: lines, extension lines, arrows and numbers. */
import type { PaperPoint } from "../geometry/types";
import type { DimensionSet, DimensionText } from "./dimension-shape";
import type { DisplayItem, Ref } from "./drawing-types";
import { centredBox, centredText, circleSegments, lineItem, pathItem, polygonSegments } from "./paths";
import type { Segment, TurnedBox } from "./plane";
import * as size from "./sizes";

export function textBox(text: DimensionText, at: PaperPoint): TurnedBox {
  return centredBox(at, text.width, text.capMm, text.angle);
}

/** Lines, extension lines and arrows of a chosen set. */
export function dimensionItems(set: DimensionSet): readonly DisplayItem[] {
  const items: DisplayItem[] = [];
  for (const { from, to } of set.extensions) items.push(lineItem("dimension", null, from, to, size.EXTENSION_WIDTH));
  set.lines.forEach((line, i) => {
    const text = set.texts[i];
    const ref = text?.ref ?? null;
    items.push(lineItem("dimension", ref, line.from, line.to, size.DIMENSION_WIDTH), ...dimensionEnds(line, ref));
  });
  return items;
}

export function numberItem(text: DimensionText, at: PaperPoint): DisplayItem {
  return centredText("dimension-text", text.ref, at, text.text, { capMm: text.capMm, rotateRad: text.angle });
}

function dimensionEnds(line: Segment, ref: Ref | null): readonly DisplayItem[] {
  const way: PaperPoint = [line.to[0] - line.from[0], line.to[1] - line.from[1]];
  const span = Math.sqrt(way[0] * way[0] + way[1] * way[1]);
  if (span < size.DOT_SPAN) return [line.from, line.to].map((at) => pathItem("dimension", ref, circleSegments(at, 0.6), { fill: "ink" }));
  const u: PaperPoint = [way[0] / span, way[1] / span];
  const arrow = (tip: PaperPoint, sign: 1 | -1): DisplayItem => {
    const back: PaperPoint = [tip[0] + u[0] * size.ARROW_LENGTH * sign, tip[1] + u[1] * size.ARROW_LENGTH * sign];
    const side: PaperPoint = [-u[1] * size.ARROW_HALF, u[0] * size.ARROW_HALF];
    return pathItem("dimension", ref, polygonSegments([tip, [back[0] + side[0], back[1] + side[1]], [back[0] - side[0], back[1] - side[1]]]), { fill: "ink" });
  };
  return [arrow(line.from, 1), arrow(line.to, -1)];
}
