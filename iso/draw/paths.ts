/** Builders of display items: lines, closed shapes, circles as four cubics, text. */
import type { PaperPoint } from "../geometry/types";
import type { DisplayItem, Face, Ink, Layer, LineItem, PathItem, PathSegment, Ref, TextItem } from "./drawing-types";
import type { TurnedBox } from "./plane";

/** Control length of a cubic quarter circle (4/3·tan 22.5°). */
export const QUARTER_CUBIC = 0.5522847498;

export function lineItem(layer: Layer, ref: Ref | null, from: PaperPoint, to: PaperPoint, widthMm: number, ink: Ink = "ink", dash?: readonly number[]): LineItem {
  return dash ? { type: "line", layer, ref, from, to, widthMm, ink, dash } : { type: "line", layer, ref, from, to, widthMm, ink };
}

export interface Brush {
  readonly stroke?: Ink | null;
  readonly fill?: Ink | null;
  readonly widthMm?: number;
  readonly dash?: readonly number[];
}

export function pathItem(layer: Layer, ref: Ref | null, segments: readonly PathSegment[], brush: Brush): PathItem {
  const base = { type: "path" as const, layer, ref, segments, stroke: brush.stroke ?? null, widthMm: brush.widthMm ?? 0.25, fill: brush.fill ?? null };
  return brush.dash ? { ...base, dash: brush.dash } : base;
}

export function polygonSegments(points: readonly PaperPoint[], closed = true): readonly PathSegment[] {
  const segments: PathSegment[] = points.map((to, i) => ({ op: i === 0 ? "M" : "L", to }));
  if (closed) segments.push({ op: "Z" });
  return segments;
}

export function circleSegments([x, y]: PaperPoint, r: number): readonly PathSegment[] {
  const k = r * QUARTER_CUBIC;
  return [
    { op: "M", to: [x + r, y] },
    { op: "C", c1: [x + r, y + k], c2: [x + k, y + r], to: [x, y + r] },
    { op: "C", c1: [x - k, y + r], c2: [x - r, y + k], to: [x - r, y] },
    { op: "C", c1: [x - r, y - k], c2: [x - k, y - r], to: [x, y - r] },
    { op: "C", c1: [x + k, y - r], c2: [x + r, y - k], to: [x + r, y] },
    { op: "Z" },
  ];
}

/** Hexagon with two corners left and right, `across` from corner to corner. */
export function hexagonSegments([x, y]: PaperPoint, across: number): readonly PathSegment[] {
  const r = across / 2;
  const h = r * Math.sin(Math.PI / 3);
  return polygonSegments([[x - r, y], [x - r / 2, y - h], [x + r / 2, y - h], [x + r, y], [x + r / 2, y + h], [x - r / 2, y + h]]);
}

/** A long box with round ends. */
export function stadiumSegments([x, y]: PaperPoint, width: number, height: number): readonly PathSegment[] {
  const r = height / 2;
  const k = r * QUARTER_CUBIC;
  const l = x - width / 2 + r;
  const m = x + width / 2 - r;
  return [
    { op: "M", to: [l, y - r] },
    { op: "L", to: [m, y - r] },
    { op: "C", c1: [m + k, y - r], c2: [m + r, y - k], to: [m + r, y] },
    { op: "C", c1: [m + r, y + k], c2: [m + k, y + r], to: [m, y + r] },
    { op: "L", to: [l, y + r] },
    { op: "C", c1: [l - k, y + r], c2: [l - r, y + k], to: [l - r, y] },
    { op: "C", c1: [l - r, y - k], c2: [l - k, y - r], to: [l, y - r] },
    { op: "Z" },
  ];
}

export interface TextOptions {
  readonly capMm: number;
  readonly face?: Face;
  readonly rotateRad?: number;
  readonly ink?: Ink;
  readonly anchor?: TextItem["anchor"];
}

export function textItem(layer: Layer, ref: Ref | null, at: PaperPoint, text: string, options: TextOptions): TextItem {
  return {
    type: "text", layer, ref, at, anchor: options.anchor ?? "start", text, capMm: options.capMm,
    face: options.face ?? "regular", rotateRad: options.rotateRad ?? 0, ink: options.ink ?? "ink",
  };
}

/** Text with its capitals centred on a point, turned with a line. */
export function centredText(layer: Layer, ref: Ref | null, centre: PaperPoint, text: string, options: TextOptions): TextItem {
  const turn = options.rotateRad ?? 0;
  const drop = options.capMm / 2;
  return {
    type: "text", layer, ref, at: [centre[0] - Math.sin(turn) * drop, centre[1] + Math.cos(turn) * drop], anchor: "middle", text, capMm: options.capMm,
    face: options.face ?? "regular", rotateRad: turn, ink: options.ink ?? "ink",
  };
}

/** Box of a centred text: its advance and capital height. */
export function centredBox(centre: PaperPoint, width: number, capMm: number, angle: number): TurnedBox {
  return { centre, halfWidth: width / 2, halfHeight: capMm / 2, angle };
}

/** Moves an item; passes draw where they stand and the fit moves all at once. */
export function itemMoved(item: DisplayItem, by: PaperPoint): DisplayItem {
  if (item.type === "line") return { ...item, from: moved(item.from, by), to: moved(item.to, by) };
  if (item.type === "text") return { ...item, at: moved(item.at, by) };
  const segments: PathSegment[] = [];
  for (const s of item.segments) segments.push(s.op === "Z" ? s : s.op === "C" ? { op: "C", c1: moved(s.c1, by), c2: moved(s.c2, by), to: moved(s.to, by) } : { op: s.op, to: moved(s.to, by) });
  return { ...item, segments };
}

const moved = (p: PaperPoint, by: PaperPoint): PaperPoint => [p[0] + by[0], p[1] + by[1]];
