/** What takes a branch off the run's pipe: outlets and half couplings on it or in it, stub-ins, reinforcing pads. */
import { paperAddScaled as plus } from "../geometry/paper";
import type { PaperPoint } from "../geometry/types";
import type { DisplayItem } from "./drawing-types";
import type { PartFrame } from "./part-frames";
import { lineItem, pathItem, polygonSegments } from "./paths";
import * as size from "./sizes";

/** Half length of the saddle line of a stub-in and of the bar of its pad. */
const SADDLE_HALF = 3.4;
const PAD_HALF = 4.4;
/** How far what is set into the run shows beyond its line. */
const SET_IN_BEYOND = 2;

const isSetIn = (f: PartFrame): boolean => (f.item?.kind === "outlet" || f.item?.kind === "stub-in") && f.item.set === "in";

/** The part reaches through the run's wall: a short end on the far side of its line. */
function setInEnd(f: PartFrame): DisplayItem[] {
  if (!isSetIn(f)) return [];
  const end = f.at(-SET_IN_BEYOND, 0);
  return [lineItem("symbol", f.ref, f.at(0, 0), end, size.PIPE_WIDTH, f.ink), lineItem("symbol", f.ref, plus(end, f.run, -1.3), plus(end, f.run, 1.3), 0.35, f.ink)];
}

/** A fitting that widens towards the run it sits on. */
export function outletItems(f: PartFrame): DisplayItem[] {
  const ends = f.item?.kind === "outlet" ? (f.item.ends ?? "butt") : "butt";
  const body = pathItem("symbol", f.ref, polygonSegments([f.at(f.inner, -2.4), f.at(f.outer, -1.2), f.at(f.outer, 1.2), f.at(f.inner, 2.4)]), { stroke: f.ink, fill: "paper", widthMm: size.SYMBOL_WIDTH });
  const rim = ends === "butt" ? [] : [lineItem("symbol", f.ref, f.at(f.outer, -2.1), f.at(f.outer, 2.1), size.SYMBOL_WIDTH, f.ink)];
  return [...setInEnd(f), body, ...rim];
}

/** The branch pipe itself: a saddle line along the run at its foot. */
export function stubInItems(f: PartFrame): DisplayItem[] {
  const foot = f.at(1.3, 0);
  return [...setInEnd(f), lineItem("symbol", f.ref, plus(foot, f.run, -SADDLE_HALF), plus(foot, f.run, SADDLE_HALF), 0.5, f.ink), ...padItems(f)];
}

function padItems(f: PartFrame): DisplayItem[] {
  if (f.item?.kind !== "stub-in" || f.item.padMm === undefined) return [];
  const along = (half: number, out: number): PaperPoint => plus(f.at(out, 0), f.run, half);
  const corners = [along(-PAD_HALF, 0.5), along(-PAD_HALF, 1.7), along(PAD_HALF, 1.7), along(PAD_HALF, 0.5)];
  return [pathItem("symbol", f.ref, polygonSegments(corners), { stroke: f.ink, fill: f.ink, widthMm: 0.2 })];
}
