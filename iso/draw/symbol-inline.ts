/** Reducers, couplings, unions and the rims of socket-weld and threaded fittings. */
import type { DisplayItem } from "./drawing-types";
import type { PartFrame } from "./part-frames";
import { lineItem, pathItem, polygonSegments } from "./paths";
import { project, type Projection } from "./project";
import * as size from "./sizes";

const CENTRE_DASH: readonly number[] = [1.6, 0.6, 0.4, 0.6];

/** Big end towards the working point: the point is the large end by definition. */
export function reducerItems(f: PartFrame, projection: Projection): DisplayItem[] {
  const { inner, outer, component } = f;
  const brush = { stroke: f.ink, fill: "paper" as const, widthMm: size.SYMBOL_WIDTH };
  if (component.kind === "reducer-concentric" || !component.aside) {
    return [pathItem("symbol", f.ref, polygonSegments([f.at(inner, -2.7), f.at(outer, -1.2), f.at(outer, 1.2), f.at(inner, 2.7)]), brush)];
  }
  const aside = project(projection, component.aside);
  const side = f.at(0, 1);
  const origin = f.at(0, 0);
  const sign = (side[0] - origin[0]) * aside[0] + (side[1] - origin[1]) * aside[1] >= 0 ? 1 : -1;
  const at = (out: number, beside: number) => f.at(out, beside * sign);
  // The flat side is straight and heavy; the centre line steps from the middle of the large end to that of the small one.
  const middle = (inner + outer) / 2;
  return [
    pathItem("symbol", f.ref, polygonSegments([at(inner, 1.9), at(outer, 1.9), at(outer, -0.9), at(inner, -3.5)]), brush),
    lineItem("symbol", f.ref, at(inner, 1.9), at(outer, 1.9), 0.9, f.ink),
    pathItem("symbol", f.ref, polygonSegments([at(inner, -0.8), at(middle, -0.8), at(middle, 0.5), at(outer, 0.5)], false), { stroke: f.ink, widthMm: 0.2, dash: CENTRE_DASH }),
  ];
}

/** Half a sleeve, open towards the working point; a half coupling is closed there. */
export function sleeveItems(f: PartFrame): DisplayItem[] {
  const h = 2.2;
  return [pathItem("symbol", f.ref, polygonSegments([f.at(f.inner, -h), f.at(f.outer, -h), f.at(f.outer, h), f.at(f.inner, h)], f.component.kind === "half-coupling"), { stroke: f.ink, fill: "paper", widthMm: size.SYMBOL_WIDTH })];
}

/** Half a union: a low sleeve and, at its nut, a tall stroke. */
export function unionItems(f: PartFrame): DisplayItem[] {
  const h = 1.7;
  return [
    pathItem("symbol", f.ref, polygonSegments([f.at(f.inner, -h), f.at(f.outer, -h), f.at(f.outer, h), f.at(f.inner, h)], false), { stroke: f.ink, fill: "paper", widthMm: size.SYMBOL_WIDTH }),
    lineItem("symbol", f.ref, f.at(f.inner + 1, -3.3), f.at(f.inner + 1, 3.3), 0.7, f.ink),
  ];
}

/** Rim of a socket: a heavy stroke across, under the weld's dot; of a thread: a shorter light one, under the joint's leaning ticks. */
export function fittingRim(f: PartFrame): DisplayItem[] {
  if (f.component.ends === "threaded") return [lineItem("symbol", f.ref, f.at(f.outer - 1, -2.2), f.at(f.outer - 1, 2.2), 0.35, f.ink)];
  return [lineItem("symbol", f.ref, f.at(f.outer, -2.5), f.at(f.outer, 2.5), size.SYMBOL_WIDTH, f.ink)];
}
