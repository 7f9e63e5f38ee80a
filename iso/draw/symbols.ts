/** Symbols of fittings, flanges, valves and supports: strokes and outlines square to the pipe; only flange strokes follow an axis. */
import type { PaperPoint } from "../geometry/types";
import type { Component } from "../run/model-types";
import { paperAddScaled } from "../geometry/paper";
import type { DrawnEdge, PassInk } from "./drawn";
import type { DisplayItem, Ink, Ref } from "./drawing-types";
import { lineItem, pathItem, polygonSegments } from "./paths";
import type { Placed } from "./place";
import { partFrames, type PartFrame } from "./part-frames";
import type { Segment } from "./plane";
import { project, type Projection } from "./project";
import * as size from "./sizes";
import { valveCentre, valveHalf } from "./valve-symbol";

const plus = paperAddScaled;

/** Strokes of a flange: the face, and behind it the hub. */
function flangeItems(f: PartFrame): DisplayItem[] {
  const stroke = (out: number, half: number, width: number): DisplayItem => {
    const at = f.at(out, 0);
    return lineItem("symbol", f.ref, plus(at, f.stroke, -half), plus(at, f.stroke, half), width, f.ink);
  };
  const face = stroke(f.inner + 0.35, size.FLANGE_STROKE_HALF, 0.7);
  switch (f.component.kind) {
    case "flange-blind": return [stroke(f.inner + 0.6, size.FLANGE_STROKE_HALF, 1.2)];
    case "flange-weld-neck": return [face, stroke(f.inner + 2, size.HUB_STROKE_HALF, size.SYMBOL_WIDTH)];
    case "flange-slip-on": return [face, stroke(f.inner + 1.5, size.FLANGE_STROKE_HALF - 0.5, 0.35)];
    default: return [face, stroke(f.inner + 1.5, size.HUB_STROKE_HALF, 0.35), stroke(f.inner + 2.4, size.HUB_STROKE_HALF, 0.35)];
  }
}

function reducerItems(f: PartFrame, projection: Projection): DisplayItem[] {
  const { inner, outer, component } = f;
  // Big end towards the working point: the point is the large end by definition.
  const brush = { stroke: f.ink, fill: "paper" as const, widthMm: size.SYMBOL_WIDTH };
  if (component.kind === "reducer-concentric" || !component.aside) {
    return [pathItem("symbol", f.ref, polygonSegments([f.at(inner, -2.7), f.at(outer, -1.2), f.at(outer, 1.2), f.at(inner, 2.7)]), brush)];
  }
  const aside = project(projection, component.aside);
  const side = f.at(0, 1);
  const origin = f.at(0, 0);
  const sign = (side[0] - origin[0]) * aside[0] + (side[1] - origin[1]) * aside[1] >= 0 ? 1 : -1;
  return [pathItem("symbol", f.ref, polygonSegments([f.at(inner, 1.7 * sign), f.at(outer, 1.7 * sign), f.at(outer, -1 * sign), f.at(inner, -3.5 * sign)]), brush)];
}

function socketStrokes(f: PartFrame): DisplayItem[] {
  return [lineItem("symbol", f.ref, f.at(f.outer, -2.5), f.at(f.outer, 2.5), size.SYMBOL_WIDTH, f.ink)];
}

function capItems(f: PartFrame): DisplayItem[] {
  const back = f.outer - (f.outer - f.inner) * 1.3;
  const segments = [
    { op: "M" as const, to: f.at(f.outer, -2.2) },
    { op: "C" as const, c1: f.at(back, -2.2), c2: f.at(back, 2.2), to: f.at(f.outer, 2.2) },
    { op: "Z" as const },
  ];
  return [pathItem("symbol", f.ref, segments, { stroke: f.ink, fill: "paper", widthMm: size.SYMBOL_WIDTH })];
}

function partItems(f: PartFrame, projection: Projection): DisplayItem[] {
  switch (f.component.kind) {
    case "flange-weld-neck": case "flange-slip-on": case "flange-socket-weld": case "flange-blind": return flangeItems(f);
    case "valve": return valveHalf(f);
    case "reducer-concentric": case "reducer-eccentric": return reducerItems(f, projection);
    case "cap": return capItems(f);
    case "socket-elbow": case "socket-tee": return socketStrokes(f);
    case "coupling": case "half-coupling": return [sleeve(f)];
    case "outlet": return [pathItem("symbol", f.ref, polygonSegments([f.at(f.inner, -2.4), f.at(f.outer, -1.2), f.at(f.outer, 1.2), f.at(f.inner, 2.4)]), { stroke: f.ink, fill: "paper", widthMm: size.SYMBOL_WIDTH })];
    default: return [];
  }
}

/** Half a sleeve, open towards the working point. */
function sleeve(f: PartFrame): DisplayItem {
  const h = 2.2;
  return pathItem("symbol", f.ref, polygonSegments([f.at(f.inner, -h), f.at(f.outer, -h), f.at(f.outer, h), f.at(f.inner, h)], false), { stroke: f.ink, fill: "paper", widthMm: size.SYMBOL_WIDTH });
}

/** A shoe under a level pipe, beside a riser. */
function supportItems(component: Component, at: PaperPoint, d: DrawnEdge | undefined, ink: Ink): DisplayItem[] {
  const riser = d ? Math.abs(d.direction[0]) < 0.3 : false;
  const down: PaperPoint = riser ? [1, 0] : [0, 1];
  const along: PaperPoint = d?.direction ?? [1, 0];
  const ref: Ref = { kind: "component", id: component.id };
  const foot = plus(at, down, 3.4);
  return [
    lineItem("symbol", ref, plus(at, along, 1.6), plus(foot, along, 1.6), 0.35, ink),
    lineItem("symbol", ref, plus(at, along, -1.6), plus(foot, along, -1.6), 0.35, ink),
    lineItem("symbol", ref, plus(foot, along, -3), plus(foot, along, 3), size.SYMBOL_WIDTH, ink),
  ];
}

/** Dashes beyond an open end that goes on outside the line. */
function continuations(placed: Placed, drawn: readonly DrawnEdge[]): DisplayItem[] {
  return placed.sketch.model.document.runs.flatMap((run) => run.points).flatMap((point) => {
    const edges = drawn.filter((d) => d.edge.from === point.id || d.edge.to === point.id);
    const [d] = edges;
    if (point.item.kind !== "end" || point.item.goes === "open" || !d || edges.length > 1) return [];
    const [at, sign] = d.edge.to === point.id ? [d.to, 1] : [d.from, -1];
    return [lineItem("symbol", { kind: "point" as const, id: point.id }, plus(at, d.direction, 1.2 * sign), plus(at, d.direction, 7 * sign), 0.5, "grey", [1.8, 1.2])];
  });
}

export function symbolPass(placed: Placed, drawn: readonly DrawnEdge[]): PassInk {
  const items: DisplayItem[] = [];
  const heavy: Segment[] = [];
  const centred = new Set<string>();
  const onTop: DisplayItem[] = [];
  const frames = partFrames(placed, drawn);
  for (const frame of frames) {
    items.push(...partItems(frame, placed.projection));
    // A valve at the end of a run: its far half has no leg to stand on.
    const alone = frame.component.kind === "valve" && frames.every((other) => other === frame || other.component !== frame.component);
    if (alone) items.push(...valveHalf({ ...frame, at: (out, side) => frame.at(-out, side) }));
    if (frame.component.kind !== "valve" || centred.has(frame.component.id)) continue;
    centred.add(frame.component.id);
    // Painted after both halves so that the ball or disc stays on top.
    onTop.push(...valveCentre(frame, placed.projection));
  }
  items.push(...onTop);
  const { spool } = placed.sketch;
  for (const [pointId, components] of placed.sketch.componentsAt) {
    const at = placed.paper.get(pointId);
    for (const component of components) {
      if (component.kind !== "support" || !at) continue;
      items.push(...supportItems(component, at, drawn.find((d) => d.edge.from === pointId || d.edge.to === pointId), spool !== null && component.spool !== spool ? "grey" : "ink"));
    }
  }
  items.push(...continuations(placed, drawn));
  for (const item of items) heavy.push(...outlineOf(item));
  return { items, heavy, light: [] };
}

/** Straight outline of an item, for keeping clear of it. */
export function outlineOf(item: DisplayItem): readonly Segment[] {
  if (item.type === "line") return [{ from: item.from, to: item.to }];
  if (item.type === "text") return [];
  const segments: Segment[] = [];
  let first: PaperPoint | null = null;
  let last: PaperPoint | null = null;
  for (const s of item.segments) {
    const to = s.op === "Z" ? first : s.to;
    if (s.op === "M") first = s.to;
    else if (last && to) segments.push({ from: last, to });
    last = to;
  }
  return segments;
}
