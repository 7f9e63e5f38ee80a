/** Slopes: drawn as if level, with a small right triangle above the line and the number that rules, as it was typed (ISO 6412, from memory). */
import type { PaperPoint } from "../geometry/types";
import type { Model } from "../run/model-types";
import type { DrawnEdge } from "./drawn";
import type { DisplayItem, MeasureText, Ref } from "./drawing-types";
import { turnedInk, type InkMap } from "./ink-map";
import type { LabelField } from "./label-field";
import { centredText, lineItem, pathItem, polygonSegments } from "./paths";
import type { Placed } from "./place";
import { readingAngle, type Segment, type TurnedBox } from "./plane";
import * as size from "./sizes";
import type { SketchEdge } from "./sketch";
import { slopeText } from "./words";

export interface SlopeInk {
  readonly items: readonly DisplayItem[];
  readonly light: readonly Segment[];
  readonly boxes: readonly TurnedBox[];
}

const TRIANGLE_LENGTH = 9;
const TRIANGLE_HEIGHT = 2.4;

export function slopePass(placed: Placed, drawn: readonly DrawnEdge[], field: LabelField, heavy: InkMap, light: InkMap, measure: MeasureText): SlopeInk {
  const { units } = placed.sketch.model.document.settings;
  const typed = typedSlopes(placed.sketch.model);
  const parts = drawn.filter((d) => isSlope(d.edge, typed)).map((d) => {
    const text = typed.get(d.edge.leg.id) ?? slopeText(d.edge.leg, units);
    const box = slopeBox(d, measure(text, size.TEXT_CAP, "regular"), field, heavy, light);
    if (!box) return { items: [], light: [], boxes: [] };
    field.add(box);
    return slopeInk(d, text, box);
  });
  return { items: parts.flatMap((p) => p.items), light: parts.flatMap((p) => p.light), boxes: parts.flatMap((p) => p.boxes) };
}

/** Drawn level though it rises or falls: by its own small angle, or because the detailer typed a slope. */
export function isSlope({ kind, leg, real, stub, neighbour }: SketchEdge, typed: ReadonlyMap<string, string>): boolean {
  if (stub || neighbour || real[2] !== 0) return false;
  return kind === "slope" || typed.has(leg.id) || (kind === "offset" && Math.abs(leg.to[2] - leg.from[2]) > size.LEVEL_MM);
}

/** Slopes as typed, by the id of the leg; which way it falls is the triangle's to say. */
export function typedSlopes(model: Model): ReadonlyMap<string, string> {
  const found = new Map<string, string>();
  for (const { points } of model.document.runs) {
    for (const { id, offset } of points) {
      if (offset.kind === "slope" && offset.slope.ratio !== 0) found.set(id, offset.slope.text.trim().replace(WAY_WORD, "").toUpperCase());
    }
  }
  return found;
}

const WAY_WORD = /^(?:-|\+|down|falls?|falling|up|rises?|rising)\s*/i;

/** A free place beside the leg for triangle and number together. */
function slopeBox(d: DrawnEdge, textWidth: number, field: LabelField, heavy: InkMap, light: InkMap): TurnedBox | null {
  const angle = readingAngle(d.direction);
  const up: PaperPoint = [Math.sin(angle), -Math.cos(angle)];
  const half = (TRIANGLE_HEIGHT + size.TEXT_CAP + 1) / 2;
  let best: TurnedBox | null = null;
  let bestCost = Infinity;
  for (const off of [half + 1.4, -(half + 1.4), half + 5, half + 16, -(half + 16), half + 30]) {
    for (const share of [0.5, 0.35, 0.65, 0.2, 0.8]) {
      const along = d.length * share;
      const centre: PaperPoint = [d.from[0] + d.direction[0] * along + up[0] * off, d.from[1] + d.direction[1] * along + up[1] * off];
      const box: TurnedBox = { centre, halfWidth: Math.max(textWidth, TRIANGLE_LENGTH) / 2, halfHeight: half, angle };
      if (field.overlapping(box)) continue;
      const cost = Math.abs(off) + Math.abs(share - 0.5) * 4 + turnedInk(heavy, box) * 6 + turnedInk(light, box);
      if (cost < bestCost) [best, bestCost] = [box, cost];
    }
  }
  return best;
}

/** Triangle pointing down the slope, number above it. */
function slopeInk(d: DrawnEdge, text: string, box: TurnedBox): SlopeInk {
  const ref: Ref = { kind: "leg", id: d.edge.id };
  const along: PaperPoint = [Math.cos(box.angle), Math.sin(box.angle)];
  const up: PaperPoint = [Math.sin(box.angle), -Math.cos(box.angle)];
  const at = (x: number, y: number): PaperPoint => [box.centre[0] + along[0] * x + up[0] * y, box.centre[1] + along[1] * x + up[1] * y];
  const falls = d.edge.leg.to[2] < d.edge.leg.from[2];
  const forward = d.direction[0] * along[0] + d.direction[1] * along[1] > 0;
  const low = falls === forward ? 1 : -1;
  const base = -box.halfHeight;
  const corners = [at((-TRIANGLE_LENGTH / 2) * low, base), at((TRIANGLE_LENGTH / 2) * low, base), at((-TRIANGLE_LENGTH / 2) * low, base + TRIANGLE_HEIGHT)] as const;
  const light = [{ from: corners[0], to: corners[1] }, { from: corners[1], to: corners[2] }, { from: corners[2], to: corners[0] }];
  return {
    items: [
      pathItem("box", ref, polygonSegments(corners), { stroke: "ink", widthMm: size.BOX_WIDTH }), lineItem("box", ref, corners[0], corners[1], size.BOX_WIDTH),
      centredText("dimension-text", ref, at(0, box.halfHeight - size.TEXT_CAP / 2), text, { capMm: size.TEXT_CAP, rotateRad: box.angle }),
    ],
    light, boxes: [box],
  };
}
