/** Constructors of display items, so that composing reads as a list of what stands where. Paper millimetres, y down. */
import type { Face, Ink, Layer, LineItem, PathItem, PathSegment, TextItem } from "../draw/drawing-types";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { TEXT_CAP } from "./sheet-size";

export interface TextStyle {
  readonly layer?: Layer;
  readonly anchor?: TextItem["anchor"];
  readonly capMm?: number;
  readonly face?: Face;
  readonly rotateRad?: number;
  readonly ink?: Ink;
}

export function textAt(at: PaperPoint, text: string, style: TextStyle = {}): TextItem {
  return {
    type: "text", layer: style.layer ?? "table", ref: null, at, text,
    anchor: style.anchor ?? "start", capMm: style.capMm ?? TEXT_CAP, face: style.face ?? "regular",
    rotateRad: style.rotateRad ?? 0, ink: style.ink ?? "ink",
  };
}

export function lineFrom(from: PaperPoint, to: PaperPoint, widthMm: number, layer: Layer = "table", ink: Ink = "ink", dash?: readonly number[]): LineItem {
  return { type: "line", layer, ref: null, from, to, widthMm, ink, ...(dash ? { dash } : {}) };
}

export interface PathStyle {
  readonly layer?: Layer;
  readonly stroke?: Ink | null;
  readonly widthMm?: number;
  readonly fill?: Ink | null;
  readonly dash?: readonly number[];
}

export function pathOf(segments: readonly PathSegment[], style: PathStyle = {}): PathItem {
  return {
    type: "path", layer: style.layer ?? "table", ref: null, segments, stroke: style.stroke === undefined ? "ink" : style.stroke,
    widthMm: style.widthMm ?? 0.25, fill: style.fill ?? null, ...(style.dash ? { dash: style.dash } : {}),
  };
}

/** A closed polygon through the points. */
export function polygonOf(points: readonly PaperPoint[], style: PathStyle = {}): PathItem {
  const segments: PathSegment[] = points.map((to, index) => ({ op: index === 0 ? "M" : "L", to }));
  return pathOf([...segments, { op: "Z" }], style);
}

export function boxOutline(box: PaperBox, style: PathStyle = {}): PathItem {
  return polygonOf([[box.minX, box.minY], [box.maxX, box.minY], [box.maxX, box.maxY], [box.minX, box.maxY]], style);
}
