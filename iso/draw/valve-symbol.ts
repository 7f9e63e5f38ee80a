/** Valves: body by halves, one on each side of the centre, then stem, disc, ball or flow mark on top. */
import { paperAddScaled as plus } from "../geometry/paper";
import type { PaperPoint } from "../geometry/types";
import type { DisplayItem } from "./drawing-types";
import type { PartFrame } from "./part-frames";
import { circleSegments, lineItem, pathItem, polygonSegments } from "./paths";
import { paperDirection } from "./plane";
import { project, type Projection } from "./project";
import * as size from "./sizes";
import { socketCup } from "./symbol-flanges";

/** Half of a valve's body: a triangle whose point is the valve's centre and whose base lies with the flange strokes; drawn once per side. */
export function valveHalf(f: PartFrame): DisplayItem[] {
  const h = size.VALVE_HALF_HEIGHT;
  const centre = f.at(f.inner, 0);
  const [low, high] = [plus(f.at(f.outer, 0), f.stroke, -h), plus(f.at(f.outer, 0), f.stroke, h)];
  if (f.component.valve === "butterfly") {
    return [lineItem("symbol", f.ref, low, high, size.SYMBOL_WIDTH, f.ink), lineItem("symbol", f.ref, centre, f.outer > 0 ? high : low, size.SYMBOL_WIDTH, f.ink), ...bodyEnd(f)];
  }
  return [pathItem("symbol", f.ref, polygonSegments([centre, low, high]), { stroke: f.ink, fill: "paper", widthMm: size.SYMBOL_WIDTH }), ...bodyEnd(f)];
}

/** How the body is joined: a socket's cup at its end; flanges, weld dots and the ticks of a thread are drawn as joints. */
function bodyEnd(f: PartFrame): DisplayItem[] {
  return f.component.ends === "socket" ? [socketCup(f, f.outer + 0.2, f.outer + 2.2, 2.7)] : [];
}

/** What stands at a valve's centre: stem and wheel, the disc of a globe, the ball, the flow of a check. */
export function valveCentre(f: PartFrame, projection: Projection): DisplayItem[] {
  const { component, ref, ink } = f;
  const centre = f.at(0, 0);
  const items: DisplayItem[] = [];
  if (component.valve === "globe") items.push(pathItem("symbol", ref, circleSegments(centre, 1.3), { fill: ink }));
  if (component.valve === "ball") items.push(pathItem("symbol", ref, circleSegments(centre, 1.7), { stroke: ink, fill: "paper", widthMm: size.SYMBOL_WIDTH }));
  if (component.valve === "butterfly") items.push(pathItem("symbol", ref, circleSegments(centre, 0.9), { fill: ink }));
  if (component.valve === "check") return [...items, ...checkFlow(f)];
  const stem = paperDirection(project(projection, component.aside ?? [0, 0, 1]));
  const top = plus(centre, stem, 6);
  const base = component.valve === "globe" ? 1.3 : component.valve === "ball" ? 1.7 : 0;
  const wheel = Math.abs(stem[0] * f.drawn.direction[1] - stem[1] * f.drawn.direction[0]) > 0.3 ? f.drawn.direction : ([-stem[1], stem[0]] as PaperPoint);
  return [
    ...items,
    lineItem("symbol", ref, plus(centre, stem, base), top, 0.4, ink),
    lineItem("symbol", ref, plus(top, wheel, -2.2), plus(top, wheel, 2.2), size.SYMBOL_WIDTH, ink),
  ];
}

/** A check valve: a dot in the half the flow comes from, and beside the body an arrow the way it passes. */
function checkFlow(f: PartFrame): DisplayItem[] {
  const { direction } = f.drawn;
  const across: PaperPoint = direction[0] >= 0 ? [direction[1], -direction[0]] : [-direction[1], direction[0]];
  const centre = plus(f.at(0, 0), across, size.VALVE_HALF_HEIGHT + 1.6);
  const tip = plus(centre, direction, 4);
  const wing = (side: number): PaperPoint => plus(plus(tip, direction, -2.2), across, side);
  return [
    pathItem("symbol", f.ref, circleSegments(plus(f.at(0, 0), direction, -4), 1), { fill: f.ink }),
    lineItem("symbol", f.ref, plus(centre, direction, -4), tip, 0.35, f.ink),
    pathItem("symbol", f.ref, polygonSegments([tip, wing(0.8), wing(-0.8)], false), { stroke: f.ink, widthMm: 0.35 }),
  ];
}
