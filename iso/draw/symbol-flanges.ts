/** Flanges: one long stroke for the face, and behind it what tells how the flange sits on the pipe. Strokes, no fills: a filled hub reads as a flow arrow. */
import { paperAddScaled as plus } from "../geometry/paper";
import type { DisplayItem } from "./drawing-types";
import type { PartFrame } from "./part-frames";
import { circleSegments, lineItem, pathItem, polygonSegments } from "./paths";
import * as size from "./sizes";

/** A stroke across the pipe at a distance out, between two distances beside it. */
export function crossStroke(f: PartFrame, out: number, from: number, to: number, width: number): DisplayItem {
  const at = f.at(out, 0);
  return lineItem("symbol", f.ref, plus(at, f.stroke, from), plus(at, f.stroke, to), width, f.ink);
}

const across = (f: PartFrame, out: number, half: number, width: number): DisplayItem => crossStroke(f, out, -half, half, width);

/** A cup open away from the working point: a socket. */
export function socketCup(f: PartFrame, bottom: number, rim: number, half: number): DisplayItem {
  return pathItem("symbol", f.ref, polygonSegments([f.at(rim, -half), f.at(bottom, -half), f.at(bottom, half), f.at(rim, half)], false), { stroke: f.ink, widthMm: 0.35 });
}

/** The loose ring of a lap joint stands clear of the pipe, so that it reads as free to turn. */
function lapRing(f: PartFrame): DisplayItem[] {
  const out = f.inner + 1.7;
  return [crossStroke(f, out, -size.FLANGE_STROKE_HALF, -1.2, 0.7), crossStroke(f, out, 1.2, size.FLANGE_STROKE_HALF, 0.7)];
}

export function flangeItems(f: PartFrame): DisplayItem[] {
  const face = across(f, f.inner + 0.35, size.FLANGE_STROKE_HALF, 0.7);
  switch (f.component.kind) {
    case "flange-blind": return [across(f, f.inner + 0.6, size.FLANGE_STROKE_HALF, 1.2)];
    case "flange-slip-on": return [face, across(f, f.inner + 1.5, size.FLANGE_STROKE_HALF - 0.5, 0.35)];
    case "flange-socket-weld": return [face, socketCup(f, f.inner + 1.4, f.inner + 3.1, size.HUB_STROKE_HALF)];
    case "flange-threaded": return [face, across(f, f.inner + 1.5, 2.7, 0.35)];
    case "flange-lap-joint": return lapRing(f);
    case "stub-end": return [across(f, f.inner + 0.35, 2.3, 0.5)];
    default: return [face, across(f, f.inner + 2, size.HUB_STROKE_HALF, size.SYMBOL_WIDTH)];
  }
}

/** Bolt holes that do not straddle: an open hole on a short arm at the flange's rim; the words stand in a label. */
export function boltTurnItems(f: PartFrame): DisplayItem[] {
  const rim = plus(f.at(f.inner + 0.35, 0), f.stroke, size.FLANGE_STROKE_HALF);
  return [
    lineItem("symbol", f.ref, rim, plus(rim, f.stroke, 0.9), 0.35, f.ink),
    pathItem("symbol", f.ref, circleSegments(plus(rim, f.stroke, 1.7), 0.8), { stroke: f.ink, fill: "paper", widthMm: 0.35 }),
  ];
}
