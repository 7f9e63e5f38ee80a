/** Caps, vents, drains, dashes of pipe that goes on, instruments. */
import { paperAddScaled as plus } from "../geometry/paper";
import type { PaperPoint } from "../geometry/types";
import type { DrawnEdge } from "./drawn";
import type { DisplayItem, Ink, Ref } from "./drawing-types";
import type { PartFrame } from "./part-frames";
import { circleSegments, lineItem, pathItem, polygonSegments } from "./paths";
import type { Placed } from "./place";
import * as size from "./sizes";

/** A bowl where it is butt-welded, a square cup where it takes a socket or a thread. */
export function capItems(f: PartFrame): DisplayItem[] {
  const brush = { stroke: f.ink, fill: "paper" as const, widthMm: size.SYMBOL_WIDTH };
  if (f.component.kind === "socket-cap") {
    return [pathItem("symbol", f.ref, polygonSegments([f.at(f.outer, -2), f.at(f.inner, -2), f.at(f.inner, 2), f.at(f.outer, 2)]), brush)];
  }
  const back = f.outer - (f.outer - f.inner) * 1.3;
  const segments = [
    { op: "M" as const, to: f.at(f.outer, -2.2) },
    { op: "C" as const, c1: f.at(back, -2.2), c2: f.at(back, 2.2), to: f.at(f.outer, 2.2) },
    { op: "Z" as const },
  ];
  return [pathItem("symbol", f.ref, segments, brush)];
}

/** Half of an instrument's body in the line: a box open towards its middle, with a slanting line that no valve has. */
export function instrumentHalf(f: PartFrame): DisplayItem[] {
  const h = 2.6;
  return [
    pathItem("symbol", f.ref, polygonSegments([f.at(f.inner, -h), f.at(f.outer, -h), f.at(f.outer, h), f.at(f.inner, h)], false), { stroke: f.ink, fill: "paper", widthMm: size.SYMBOL_WIDTH }),
    lineItem("symbol", f.ref, f.at(f.inner, 0), f.at(f.outer, h), 0.35, f.ink),
  ];
}

/** An instrument that takes no length: its well or its nipple ends in a small ring. */
export function instrumentEnd(at: PaperPoint, ref: Ref, ink: Ink): DisplayItem[] {
  return [pathItem("symbol", ref, circleSegments(at, 1.5), { stroke: ink, fill: "paper", widthMm: size.SYMBOL_WIDTH })];
}

/** What stands at the open ends: dashes where pipe goes on, an arrow out of a vent, a funnel under a drain. */
export function endItems(placed: Placed, drawn: readonly DrawnEdge[]): DisplayItem[] {
  return placed.sketch.model.document.runs.flatMap((run) => run.points).flatMap((point) => {
    const edges = drawn.filter((d) => d.edge.from === point.id || d.edge.to === point.id);
    const [d] = edges;
    const goes = point.item.kind === "end" ? point.item.goes : "open";
    if (goes === "open" || !d || edges.length > 1 || !placed.sketch.isHome(point.id)) return [];
    const [at, sign] = d.edge.to === point.id ? [d.to, 1] : [d.from, -1];
    const out: PaperPoint = [d.direction[0] * sign, d.direction[1] * sign];
    const ref: Ref = { kind: "point", id: point.id };
    if (goes === "vent") return ventItems(at, out, ref);
    if (goes === "drain") return drainItems(at, out, ref);
    return [lineItem("symbol", ref, plus(at, out, 1.2), plus(at, out, 7), 0.5, "grey", [1.8, 1.2])];
  });
}

/** A thin shaft with an open head that points away. */
export function ventItems(at: PaperPoint, out: PaperPoint, ref: Ref): DisplayItem[] {
  const side: PaperPoint = [-out[1], out[0]];
  const tip = plus(at, out, 6);
  const wing = (k: number): PaperPoint => plus(plus(tip, out, -2.2), side, k);
  return [
    lineItem("symbol", ref, plus(at, side, -1.4), plus(at, side, 1.4), size.SYMBOL_WIDTH),
    lineItem("symbol", ref, plus(at, out, 1.4), tip, 0.35),
    pathItem("symbol", ref, polygonSegments([wing(1.2), tip, wing(-1.2)], false), { stroke: "ink", widthMm: 0.35 }),
  ];
}

/** An open funnel below the pipe's end. */
export function drainItems(at: PaperPoint, out: PaperPoint, ref: Ref): DisplayItem[] {
  const side: PaperPoint = [-out[1], out[0]];
  const p = (k: number, s: number): PaperPoint => plus(plus(at, out, k), side, s);
  return [
    lineItem("symbol", ref, p(0, -1.4), p(0, 1.4), size.SYMBOL_WIDTH),
    pathItem("symbol", ref, polygonSegments([p(1.6, -2.6), p(4.4, -0.6), p(6.2, -0.6)], false), { stroke: "ink", widthMm: 0.35 }),
    pathItem("symbol", ref, polygonSegments([p(1.6, 2.6), p(4.4, 0.6), p(6.2, 0.6)], false), { stroke: "ink", widthMm: 0.35 }),
  ];
}
