/**
 * Symbols of fittings, flanges, valves and supports, in the plain shapes the open standards share (ISO 6412, ISO 14617, from
 * memory): strokes and outlines square to the pipe; only flange strokes follow an axis. Butt-welded elbows, tees and crosses
 * are the pipe's own line between weld dots.
 */
import type { PaperPoint } from "../geometry/types";
import type { Component } from "../run/model-types";
import { paperAddScaled as plus } from "../geometry/paper";
import type { DrawnEdge, PassInk } from "./drawn";
import type { DisplayItem, Ink, Ref } from "./drawing-types";
import { lineItem } from "./paths";
import type { Placed } from "./place";
import { partFrames, type PartFrame } from "./part-frames";
import type { Segment } from "./plane";
import type { Projection } from "./project";
import * as size from "./sizes";
import { outletItems, stubInItems } from "./symbol-branches";
import { capItems, endItems, instrumentEnd, instrumentHalf } from "./symbol-ends";
import { boltTurnItems, flangeItems } from "./symbol-flanges";
import { fittingRim, reducerItems, sleeveItems, unionItems } from "./symbol-inline";
import { valveCentre, valveHalf } from "./valve-symbol";

/** What one part shows on one of its legs; the legend draws its keys with the same. */
export function partItems(f: PartFrame, projection: Projection): DisplayItem[] {
  const { kind } = f.component;
  switch (kind) {
    case "flange-weld-neck": case "flange-slip-on": case "flange-socket-weld": case "flange-threaded": case "flange-lap-joint": case "flange-blind": case "stub-end":
      return f.component.boltTurn ? [...flangeItems(f), ...boltTurnItems(f)] : flangeItems(f);
    case "valve": return valveHalf(f);
    case "instrument": return instrumentHalf(f);
    case "reducer-concentric": case "reducer-eccentric": return reducerItems(f, projection);
    case "cap": case "socket-cap": return capItems(f);
    case "socket-elbow": case "socket-tee": case "socket-cross": return fittingRim(f);
    case "coupling": case "half-coupling": return sleeveItems(f);
    case "union": return unionItems(f);
    case "outlet": return outletItems(f);
    case "stub-in": return stubInItems(f);
    default: return [];
  }
}

/** A shoe under a level pipe, beside a riser. */
export function supportItems(ref: Ref, at: PaperPoint, along: PaperPoint, ink: Ink): DisplayItem[] {
  const down: PaperPoint = Math.abs(along[0]) < 0.3 ? [1, 0] : [0, 1];
  const foot = plus(at, down, 3.4);
  return [
    lineItem("symbol", ref, plus(at, along, 1.6), plus(foot, along, 1.6), 0.35, ink),
    lineItem("symbol", ref, plus(at, along, -1.6), plus(foot, along, -1.6), 0.35, ink),
    lineItem("symbol", ref, plus(foot, along, -3), plus(foot, along, 3), size.SYMBOL_WIDTH, ink),
  ];
}

/** Frames of the legs, and for a valve or instrument at the end of a run one more for its far half, which has no leg. */
function allFrames(placed: Placed, drawn: readonly DrawnEdge[]): readonly PartFrame[] {
  const frames = partFrames(placed, drawn);
  const count = new Map<string, number>();
  for (const { component } of frames) count.set(component.id, (count.get(component.id) ?? 0) + 1);
  const alone = (frame: PartFrame): boolean => (frame.component.kind === "valve" || frame.component.kind === "instrument") && count.get(frame.component.id) === 1;
  return frames.flatMap((frame) => (alone(frame) ? [frame, { ...frame, at: (out: number, side: number) => frame.at(-out, side) }] : [frame]));
}

export function symbolPass(placed: Placed, drawn: readonly DrawnEdge[]): PassInk {
  const items: DisplayItem[] = [];
  const onTop: DisplayItem[] = [];
  const framed = new Set<string>();
  for (const frame of allFrames(placed, drawn)) {
    items.push(...partItems(frame, placed.projection));
    // Painted after both halves so that the ball or disc stays on top; once per valve.
    if (frame.component.kind === "valve" && !framed.has(frame.component.id)) onTop.push(...valveCentre(frame, placed.projection));
    framed.add(frame.component.id);
  }
  items.push(...onTop, ...pointItems(placed, drawn, framed), ...endItems(placed, drawn));
  const heavy: Segment[] = items.flatMap((item) => outlineOf(item));
  return { items, heavy, light: [] };
}

/** Supports, and instruments that take no length: they stand at the point itself. */
function pointItems(placed: Placed, drawn: readonly DrawnEdge[], framed: ReadonlySet<string>): DisplayItem[] {
  const { sketch } = placed;
  return [...sketch.componentsAt].flatMap(([vertex, components]) => {
    const at = placed.paper.get(vertex);
    const d = drawn.find((one) => one.edge.from === vertex || one.edge.to === vertex);
    if (!at) return [];
    return components.flatMap((component: Component) => {
      const ref: Ref = { kind: "component", id: component.id };
      const ink = sketch.isOwn(component.id) ? "ink" : "grey";
      if (component.kind === "support") return supportItems(ref, at, d?.direction ?? [1, 0], ink);
      return component.kind === "instrument" && !framed.has(component.id) ? instrumentEnd(at, ref, ink) : [];
    });
  });
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
