/** Labels of a lay-out picture: each takes the nearest spot round its point where it covers no other label and crosses least. */
import type { DisplayItem, Face, MeasureText } from "../draw/drawing-types";
import { lineItem, pathItem, polygonSegments, textItem } from "../draw/paths";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { clipSegment } from "./clip";

export interface SpotLabel {
  /** Point it speaks of. */
  readonly at: PaperPoint;
  readonly text: string;
  readonly face?: Face;
}

export type Stroke = readonly [PaperPoint, PaperPoint];

const CAP = 2.5;
const PAD = 0.6;
const REACHES = [2.5, 5, 8, 12, 17, 23] as const;
const WAYS = 16;
/** A spot this far off is joined to its point by a leader. */
const LEADER_FROM = 6;
const CROSSING_COST = 25;

/** Texts and leaders; a label that finds no spot in the room takes the one that covers least. */
export function spotLabels(labels: readonly SpotLabel[], strokes: readonly Stroke[], room: PaperBox, measure: MeasureText): DisplayItem[] {
  const taken: PaperBox[] = [];
  const items: DisplayItem[] = [];
  const lines: Stroke[] = [...strokes];
  for (const label of labels) {
    const face = label.face ?? "regular";
    const spot = bestSpot(label, measure(label.text, CAP, face), lines, taken, room);
    taken.push(spot.box);
    if (spot.reach >= LEADER_FROM) {
      const to = nearestOf(spot.box, label.at);
      items.push(lineItem("leader", null, label.at, to, 0.18));
      lines.push([label.at, to]);
    }
    // Where nothing free was left, the lines stop short of the letters.
    const letters = { minX: spot.box.minX + PAD / 2, minY: spot.box.minY + PAD / 2, maxX: spot.box.maxX - PAD / 2, maxY: spot.box.maxY - PAD / 2 };
    if (strokes.some(([from, to]) => clipSegment(from, to, letters) !== null)) items.push(pathItem("halo", null, polygonSegments(cornersOf(letters)), { fill: "paper" }));
    items.push(textItem("label", null, [spot.box.minX + PAD, spot.box.maxY - PAD - 0.3 * CAP], label.text, { capMm: CAP, face }));
  }
  return items;
}

interface Spot {
  readonly box: PaperBox;
  readonly reach: number;
  readonly cost: number;
}

function bestSpot({ at }: SpotLabel, width: number, strokes: readonly Stroke[], taken: readonly PaperBox[], room: PaperBox): Spot {
  const [w, h] = [width + 2 * PAD, CAP * 1.3 + 2 * PAD];
  let best: Spot | null = null;
  for (const reach of REACHES) {
    for (let i = 0; i < WAYS; i++) {
      const turn = (2 * Math.PI * i) / WAYS;
      const [cx, cy] = [at[0] + (reach + w / 2) * Math.cos(turn), at[1] + (reach + h / 2) * Math.sin(turn)];
      const box = shiftedInto({ minX: cx - w / 2, minY: cy - h / 2, maxX: cx + w / 2, maxY: cy + h / 2 }, room);
      const cost = costOf(box, at, strokes, taken) + reach;
      if (!best || cost < best.cost) best = { box, reach: Math.hypot(...gapTo(box, at)), cost };
    }
  }
  return best!;
}

const OVERLAP_COST = 1000;
/** A leader through another label reads as if that were struck out. */
const STRUCK_COST = 400;
const ON_POINT_COST = 40;

function costOf(box: PaperBox, at: PaperPoint, strokes: readonly Stroke[], taken: readonly PaperBox[]): number {
  const covers = taken.filter((other) => box.minX < other.maxX && other.minX < box.maxX && box.minY < other.maxY && other.minY < box.maxY).length;
  const crosses = strokes.filter(([from, to]) => clipSegment(from, to, box) !== null).length;
  const onPoint = at[0] > box.minX && at[0] < box.maxX && at[1] > box.minY && at[1] < box.maxY;
  const gap = Math.hypot(...gapTo(box, at));
  const strikes = gap < LEADER_FROM ? 0 : taken.filter((other) => clipSegment(at, nearestOf(box, at), other) !== null).length;
  return covers * OVERLAP_COST + strikes * STRUCK_COST + crosses * CROSSING_COST + (onPoint ? ON_POINT_COST : 0) + gap;
}

function cornersOf({ minX, minY, maxX, maxY }: PaperBox): PaperPoint[] {
  return [[minX, minY], [maxX, minY], [maxX, maxY], [minX, maxY]];
}

function gapTo(box: PaperBox, at: PaperPoint): PaperPoint {
  const near = nearestOf(box, at);
  return [near[0] - at[0], near[1] - at[1]];
}

function nearestOf(box: PaperBox, at: PaperPoint): PaperPoint {
  return [Math.min(Math.max(at[0], box.minX), box.maxX), Math.min(Math.max(at[1], box.minY), box.maxY)];
}

function shiftedInto(box: PaperBox, room: PaperBox): PaperBox {
  const dx = Math.max(0, room.minX - box.minX) - Math.max(0, box.maxX - room.maxX);
  const dy = Math.max(0, room.minY - box.minY) - Math.max(0, box.maxY - room.maxY);
  return { minX: box.minX + dx, minY: box.minY + dy, maxX: box.maxX + dx, maxY: box.maxY + dy };
}
