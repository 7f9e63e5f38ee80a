/** Pictures of the legend. Parts are drawn by the drawing's own symbol functions, made smaller, so that picture and symbol can't drift apart. */
import type { DisplayItem, Ink, LegendKey } from "../draw/drawing-types";
import type { PartFrame } from "../draw/part-frames";
import { circleSegments, hexagonSegments, itemMoved, stadiumSegments } from "../draw/paths";
import { PROJECTIONS } from "../draw/project";
import { partItems, supportItems } from "../draw/symbols";
import { drainItems, ventItems } from "../draw/symbol-ends";
import { valveCentre } from "../draw/valve-symbol";
import type { PaperPoint } from "../geometry/types";
import type { Component } from "../run/model-types";
import { lineFrom, pathOf, polygonOf, textAt } from "./items";
import { itemScaled } from "./item-scaled";
import { weldingSymbol } from "./welding-symbol";
import { TEXT_CAP } from "./sheet-size";

const ROOM = 10.5;
/** Welding symbols are as long as they are on a drawing. */
const WELDING_ROOM = 26;
const PART_SCALE = 0.62;
const THIN = { layer: "title" as const, widthMm: 0.25 };
const FILLED = { layer: "title" as const, stroke: null, fill: "ink" as const };

/** Width a picture takes with the space after it, mm. */
export function pictureRoom(key: LegendKey): number {
  return key === "typical-butt" || key === "typical-fillet" || key === "field-symbol" ? WELDING_ROOM : ROOM;
}

export function legendPicture(key: LegendKey, at: PaperPoint): DisplayItem[] {
  return markPicture(key, at) ?? partPicture(key).map((item) => itemMoved(itemScaled(item, PART_SCALE), at)).map((item) => ({ ...item, layer: "title" as const, ref: null }));
}

/** Marks and welds, at the size they have on the drawing or nearly; null for parts. */
function markPicture(key: LegendKey, [x, y]: PaperPoint): DisplayItem[] | null {
  const pipe = lineFrom([x - 4, y], [x + 4, y], 0.7, "title");
  const dot = pathOf(circleSegments([x, y], 1.5), FILLED);
  const letter = (text: string, ink: Ink = "ink") => textAt([x, y + TEXT_CAP / 2], text, { layer: "title", anchor: "middle", ink });
  switch (key) {
    case "shop-weld": return [pipe, dot];
    case "field-weld": case "field-fit-weld": return [pipe, dot, ...flag([x, y])].map((item) => itemMoved(item, [0, 1.3]));
    case "typical-butt": case "typical-fillet": case "field-symbol": return weldingSymbol(key === "typical-fillet" ? "fillet" : "groove", key === "field-symbol", [x, y]);
    case "material-item": return [pathOf(circleSegments([x, y], 3.3), THIN), letter("1")];
    case "weld-number": return [pathOf(hexagonSegments([x, y], 7.2), { ...THIN, stroke: "dye" }), letter("1", "dye")];
    case "cut-piece": return [pathOf(stadiumSegments([x, y], 8.2, 5.2), THIN), letter("P1")];
    case "spool": return [polygonOf([[x - 3, y - 3], [x + 3, y - 3], [x + 3, y + 3], [x - 3, y + 3]], { ...THIN, widthMm: 0.6 }), textAt([x, y + TEXT_CAP / 2], "A", { layer: "title", anchor: "middle", face: "bold" })];
    case "flow": return [pipe, polygonOf([[x - 2, y - 1.5], [x + 2.4, y], [x - 2, y + 1.5]], FILLED)];
    case "revision": return [polygonOf([[x, y - 3.5], [x + 3.7, y + 2.7], [x - 3.7, y + 2.7]], { ...THIN, stroke: "alert" }), textAt([x, y + 2], "A", { layer: "title", anchor: "middle", ink: "alert" })];
    case "reference-dimension": return [letter("( )")];
    case "unverified": return [letter("VIF")];
    case "slope": return [polygonOf([[x - 4, y + 1.2], [x + 4, y + 1.2], [x - 4, y - 1.2]], THIN)];
    case "offset": return [polygonOf([[x - 4, y + 2.4], [x + 4, y + 2.4], [x + 4, y - 2.4]], THIN), ...[-1.2, 0, 1.2].map((d) => lineFrom([x + 0.4 - d * 2.2 - 0.4, y + d + 0.6], [x + 4, y + d + 0.6], 0.18, "title"))];
    default: return null;
  }
}

const PIPE = lineFrom([-8, 0], [8, 0], 0.7);
const THREAD = [lineFrom([-0.2, -1.9], [0.8, 1.9], 0.4), lineFrom([1.1, -1.9], [2.1, 1.9], 0.4)];

/** Pictures of parts about the origin, at the drawing's own size. */
function partPicture(key: LegendKey): DisplayItem[] {
  const part = (given: Partial<Component>, inner: number, outer: number, origin = 0, item: PartFrame["item"] = null): DisplayItem[] => partItems(frame(given, inner, outer, origin, 1, item), PROJECTIONS[1]);
  const both = (given: Partial<Component>, inner: number, outer: number): DisplayItem[] => ([1, -1] as const).flatMap((way) => partItems(frame(given, inner, outer, 0, way), PROJECTIONS[1]));
  const flange = (kind: Component["kind"]): DisplayItem[] => [lineFrom([-1.5, 0], [8, 0], 0.7), ...part({ kind }, 0, 4, -1.5)];
  switch (key) {
    case "weld-neck": return flange("flange-weld-neck");
    case "slip-on": return flange("flange-slip-on");
    case "socket-flange": return flange("flange-socket-weld");
    case "threaded-flange": return flange("flange-threaded");
    case "lap-joint": return [...flange("flange-lap-joint"), ...part({ kind: "stub-end" }, 0, 4, -1.5)];
    case "blind": return [lineFrom([-8, 0], [-1, 0], 0.7), ...part({ kind: "flange-blind" }, 0, 1.2, -0.8)];
    case "bolt-turn": return [lineFrom([-1.5, 1], [8, 1], 0.7), ...part({ kind: "flange-weld-neck", boltTurn: { turnDeg: 11.25, from: "E" } }, 0, 4, -1.5)].map((item) => itemMoved(item, [0, -1]));
    case "gate": case "globe": case "check": case "ball": case "butterfly": {
      const given = { kind: "valve" as const, valve: key };
      return [lineFrom([-8, 0], [-6, 0], 0.7), lineFrom([6, 0], [8, 0], 0.7), ...both(given, 0, 6), ...valveCentre(frame(given, 0, 6, 0, 1), PROJECTIONS[1])].map((item) => itemMoved(item, [0, 1.8]));
    }
    case "instrument": return [pathOf(circleSegments([0, 0], 5), { widthMm: 0.6 }), textAt([0, TEXT_CAP / PART_SCALE / 2], "PI", { anchor: "middle", capMm: TEXT_CAP / PART_SCALE, face: "bold" })];
    case "reducer": return [PIPE, ...part({ kind: "reducer-concentric" }, 0, 10, -5)];
    case "eccentric-reducer": return [PIPE, ...part({ kind: "reducer-eccentric", aside: [0, 0, -1] }, 0, 10, -5)];
    case "socket-end": return [PIPE, ...part({ kind: "socket-tee", ends: "socket" }, 0, 0)];
    case "threaded-end": return [PIPE, ...part({ kind: "socket-tee", ends: "threaded" }, 0, 0), ...THREAD];
    case "coupling": return [PIPE, ...both({ kind: "coupling" }, 0, 4)];
    case "union": return [PIPE, ...both({ kind: "union" }, 0, 5)];
    case "cap": return [lineFrom([-8, 0], [0, 0], 0.7), ...partItems(frame({ kind: "cap" }, 0, 3, 3, -1), PROJECTIONS[1])];
    case "socket-cap": return [lineFrom([-8, 0], [0, 0], 0.7), ...partItems(frame({ kind: "socket-cap" }, 0, 3, 3, -1), PROJECTIONS[1])];
    case "outlet": return branch({ kind: "outlet" }, 0, 7, null);
    case "stub-in": return branch({ kind: "stub-in" }, 0, 2, null);
    case "pad": return branch({ kind: "stub-in" }, 0, 2, { kind: "stub-in", branchNps: "2", padMm: 100 });
    case "set-in": return branch({ kind: "stub-in" }, 0, 2, { kind: "stub-in", branchNps: "2", set: "in" });
    case "support": return [PIPE, ...supportItems({ kind: "point", id: "" }, [0, 0], [1, 0], "ink")].map((item) => itemMoved(item, [0, -1.6]));
    case "vent": return [lineFrom([-8, 0], [-2, 0], 0.7), ...ventItems([-2, 0], [1, 0], { kind: "point", id: "" })];
    case "drain": return [lineFrom([-8, 0], [-2, 0], 0.7), ...drainItems([-2, 0], [1, 0], { kind: "point", id: "" })];
    case "goes-on": return [lineFrom([-8, 0], [-2, 0], 0.7), lineFrom([-0.5, 0], [8, 0], 0.6, "title", "grey", [2.4, 1.6])];
    case "mitre": return mitrePicture();
    case "bend": return bendPicture();
    case "break": return [PIPE, lineFrom([0, -6], [0, 5], 0.5), polygonOf([[0, -6], [-3.6, -4.7], [0, -3.4]], { fill: "paper" }), polygonOf([[0, -6], [3.6, -4.7], [0, -3.4]], { fill: "ink" })];
    case "threaded-joint": return [PIPE, ...THREAD];
    default: return [];
  }
}

function mitrePicture(): DisplayItem[] {
  const points: readonly PaperPoint[] = [[-7, 4], [-3, 4], [2, 0.4], [3.6, -5]];
  const line = points.slice(1).map((to, i) => lineFrom(points[i] ?? to, to, 0.9));
  return [...line, lineFrom([-3.9, 1.6], [-2.1, 6.4], 0.5), lineFrom([0, -1.4], [4, 2.2], 0.5)];
}

function bendPicture(): DisplayItem[] {
  const curve = pathOf([{ op: "M", to: [-7, 4] }, { op: "L", to: [-4, 4] }, { op: "C", c1: [0.4, 4], c2: [4, 0.4], to: [4, -4] }, { op: "L", to: [4, -6] }], { widthMm: 0.9 });
  return [curve, lineFrom([-4, 2], [-4, 6], 0.45), lineFrom([2, -4], [6, -4], 0.45)];
}

/** A branch that stands up from a level run. */
function branch(given: Partial<Component>, inner: number, outer: number, item: PartFrame["item"]): DisplayItem[] {
  const f = frame(given, inner, outer, 0, 1, item);
  const upright: PartFrame = { ...f, at: (out, side) => [side, -out], stroke: [1, 0], run: [1, 0] };
  return [PIPE, lineFrom([0, -outer], [0, -7.5], 0.7), ...partItems(upright, PROJECTIONS[1])].map((item) => itemMoved(item, [0, 2.6]));
}

/** A part on level pipe with its working point at (origin, 0), drawn towards the right or the left. */
function frame(given: Partial<Component>, inner: number, outer: number, origin: number, way: 1 | -1, item: PartFrame["item"] = null): PartFrame {
  const component = { kind: "elbow", valve: null, ends: null, aside: null, boltTurn: null, ...given } as Component;
  return {
    component, item, inner, outer, ink: "ink", ref: { kind: "component", id: "" }, stroke: [0, 1], run: [0, 1],
    at: (out, side) => [origin + out * way, side], drawn: { direction: [1, 0] } as unknown as PartFrame["drawn"],
  };
}

function flag([x, y]: PaperPoint): DisplayItem[] {
  const pole = lineFrom([x, y], [x, y - 4.4], 0.3, "title");
  return [pole, polygonOf([[x, y - 4.4], [x + 2.6, y - 3.4], [x, y - 2.4]], FILLED)];
}
