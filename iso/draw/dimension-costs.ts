/**
 * What a candidate for a chain's dimensions costs: its lines and numbers against pipe, thin lines and the other chains' choices.
 * All in flat lists, since some hundred candidates are weighed on a sheet and few are kept. Long because what fills the lists and what reads them belong together.
 */
import type { PaperBox, PaperPoint } from "../geometry/types";
import { FOOT_STRIDE, PLACES, type ChainShape, type WordShape } from "./dimension-shape";
import { turnedInkAt, type InkMap } from "./ink-map";
import { BOX_STRIDE, type LabelField } from "./label-field";
import { PAPER_EPS } from "./sizes";
import * as size from "./sizes";

export interface DimensionSurroundings {
  readonly heavy: InkMap;
  readonly light: InkMap;
  readonly field: LabelField;
  readonly centre: PaperPoint;
  readonly extent: PaperBox;
}

/** A chain's dimensions on a side and at a distance. */
export interface Choice {
  readonly shape: ChainShape;
  readonly across: PaperPoint;
  readonly off: number;
  readonly cost: number;
  /** Lines and extension lines, four numbers each. */
  readonly lines: Float64Array;
  readonly extensions: Float64Array;
  /** Boxes of the numbers that found a place, and which place each number took; -1 where none was free. */
  readonly boxes: Float64Array;
  readonly places: Int32Array;
  /** Round its lines and numbers: least x and y, most x and y. */
  readonly reach: Float64Array;
}

/** Two dimension lines that cross; a dimension line across an extension line; either through a number. */
const LINES_CROSS = 26;
const EXTENSION_CROSSES = 6;
const LINE_THROUGH_NUMBER = 40;
const EXTENSION_THROUGH_NUMBER = 25;
/** A number keeps this much more from other chains' lines, mm. */
const NUMBER_CLEAR = 0.4;
const PLACE_PRICES = [0, 2, 2, 4, 9, 9, 11, 11] as const;
const PRICE_OF_HOMELESS = 200;
const NOWHERE = -1;

/** Weighs one candidate at a time in lists that are used again for the next. */
export class DimensionTrial {
  private lines = new Float64Array(64);
  private extensions = new Float64Array(64);
  private boxes = new Float64Array(16 * BOX_STRIDE);
  private places = new Int32Array(16);
  private readonly reach = new Float64Array(4);
  private readonly probe = new Float64Array(BOX_STRIDE);
  private readonly kept = new Float64Array(BOX_STRIDE);
  private readonly near: Choice[] = [];

  constructor(private readonly around: DimensionSurroundings) {}

  /** The candidate with each number on the cheapest free place of its line; null when that is no cheaper than `limit`. */
  weigh(shape: ChainShape, across: PaperPoint, off: number, others: readonly (Choice | null)[], base: number, limit: number): Choice | null {
    const { field } = this.around;
    this.lay(shape, across, off);
    this.near.length = 0;
    for (const other of others) if (other && !apart(other.reach, this.reach)) this.near.push(other);
    const lineCount = shape.off.length;
    const footCount = shape.feet.length / FOOT_STRIDE;
    let cost = this.lineCost(lineCount, footCount, base, limit);
    let held = 0;
    for (let i = 0; i < lineCount && cost < limit; i++) {
      const price = this.seat(shape.words[i]!, i, lineCount, footCount);
      cost += price;
      if (this.places[i] === NOWHERE) continue;
      this.boxes.set(this.kept, held * BOX_STRIDE);
      field.hold(this.kept, 0, 0);
      held++;
    }
    field.release(held);
    if (cost >= limit) return null;
    return {
      shape, across, off, cost, lines: this.lines.slice(0, lineCount * 4), extensions: this.extensions.slice(0, footCount * 4),
      boxes: this.boxes.slice(0, held * BOX_STRIDE), places: this.places.slice(0, lineCount), reach: this.reach.slice(),
    };
  }

  /** Lines, extension lines and the box round them, with room for numbers beside. */
  private lay({ lines, off: further, feet, words }: ChainShape, across: PaperPoint, off: number): void {
    if (words.length * 4 > this.lines.length || feet.length > this.extensions.length) this.grow(Math.max(words.length, feet.length / FOOT_STRIDE));
    let widest = 0;
    for (let i = 0; i < words.length; i++) {
      const by = off + further[i]!;
      widest = Math.max(widest, words[i]!.width);
      this.lines[i * 4] = lines[i * 4]! + across[0] * by;
      this.lines[i * 4 + 1] = lines[i * 4 + 1]! + across[1] * by;
      this.lines[i * 4 + 2] = lines[i * 4 + 2]! + across[0] * by;
      this.lines[i * 4 + 3] = lines[i * 4 + 3]! + across[1] * by;
    }
    for (let at = 0; at < feet.length; at += FOOT_STRIDE) {
      const far = off + feet[at + 3]!;
      this.extensions[at] = feet[at]! + across[0] * feet[at + 2]!;
      this.extensions[at + 1] = feet[at + 1]! + across[1] * feet[at + 2]!;
      this.extensions[at + 2] = feet[at]! + across[0] * far;
      this.extensions[at + 3] = feet[at + 1]! + across[1] * far;
    }
    const { reach } = this;
    reach[0] = reach[1] = Infinity;
    reach[2] = reach[3] = -Infinity;
    widen(reach, this.lines, words.length * 4);
    widen(reach, this.extensions, feet.length);
    const room = widest + 2 * size.DIMENSION_CAP;
    reach[0] -= room;
    reach[1] -= room;
    reach[2] += room;
    reach[3] += room;
  }

  private grow(count: number): void {
    this.lines = new Float64Array(count * 8);
    this.extensions = new Float64Array(count * 8);
    this.boxes = new Float64Array(count * 2 * BOX_STRIDE);
    this.places = new Int32Array(count * 2);
  }

  /** Base and lines; nobody asks how much more than the limit it is. */
  private lineCost(lineCount: number, footCount: number, base: number, limit: number): number {
    const { heavy, light } = this.around;
    const { lines, extensions } = this;
    let cost = base;
    for (let i = 0; i < lineCount; i++) cost += onPipe(heavy.under(lines, i * 4), 18) + light.under(lines, i * 4) * 0.6;
    if (cost >= limit) return cost;
    for (let i = 0; i < footCount; i++) cost += onPipe(heavy.under(extensions, i * 4), 7) + light.under(extensions, i * 4) * 0.3;
    for (const other of this.near) {
      if (cost >= limit) return cost;
      for (let i = 0; i < lineCount; i++) {
        if (beyond(lines, i * 4, other.reach)) continue;
        cost += crossed(lines, i * 4, other.lines) * LINES_CROSS + crossed(lines, i * 4, other.extensions) * EXTENSION_CROSSES + boxesThrough(lines, i * 4, other.boxes) * LINE_THROUGH_NUMBER;
      }
      for (let i = 0; i < footCount; i++) {
        if (beyond(extensions, i * 4, other.reach)) continue;
        cost += crossed(extensions, i * 4, other.lines) * EXTENSION_CROSSES + boxesThrough(extensions, i * 4, other.boxes) * EXTENSION_THROUGH_NUMBER;
      }
    }
    return cost;
  }

  /** Finds the cheapest free place of a number and leaves its box in `kept`; answers its price. */
  private seat(word: WordShape, line: number, lineCount: number, footCount: number): number {
    const { probe, lines } = this;
    const x = (lines[line * 4]! + lines[line * 4 + 2]!) / 2;
    const y = (lines[line * 4 + 1]! + lines[line * 4 + 3]!) / 2;
    probe[2] = word.width / 2;
    probe[3] = size.DIMENSION_CAP / 2;
    probe[4] = word.cos;
    probe[5] = word.sin;
    probe[6] = Math.abs(word.cos) * probe[2] + Math.abs(word.sin) * probe[3];
    probe[7] = Math.abs(word.sin) * probe[2] + Math.abs(word.cos) * probe[3];
    let best = Infinity;
    this.places[line] = NOWHERE;
    for (let place = 0; place < PLACES; place++) {
      const price = PLACE_PRICES[place]!;
      if (price >= best) continue;
      probe[0] = x + word.places[place * 2]!;
      probe[1] = y + word.places[place * 2 + 1]!;
      if (this.around.field.meets(probe, 0)) continue;
      const cost = price + this.boxCost(line, lineCount, footCount);
      if (cost >= best) continue;
      best = cost;
      this.places[line] = place;
      this.kept.set(probe);
    }
    return best === Infinity ? PRICE_OF_HOMELESS : best;
  }

  /** Price of a number where the probe stands. */
  private boxCost(line: number, lineCount: number, footCount: number): number {
    const { probe, lines, extensions } = this;
    let cost = turnedInkAt(this.around.heavy, probe) * 8 + turnedInkAt(this.around.light, probe) * 1.5;
    const w = probe[6]! + Math.abs(probe[5]!) * NUMBER_CLEAR;
    const h = probe[7]! + Math.abs(probe[4]!) * NUMBER_CLEAR;
    const x = probe[0]!;
    const y = probe[1]!;
    probe[3] = size.DIMENSION_CAP / 2 + NUMBER_CLEAR;
    for (const { reach, lines: theirs, extensions: ends } of this.near) {
      if (reach[0]! > x + w || reach[2]! < x - w || reach[1]! > y + h || reach[3]! < y - h) continue;
      for (let i = 0; i < theirs.length; i += 4) if (runsThrough(theirs, i, probe, 0)) cost += 25;
      for (let i = 0; i < ends.length; i += 4) if (runsThrough(ends, i, probe, 0)) cost += 14;
    }
    probe[3] = size.DIMENSION_CAP / 2;
    for (let i = 0; i < footCount; i++) if (runsThrough(extensions, i * 4, probe, 0)) cost += 10;
    for (let i = 0; i < lineCount; i++) if (i !== line && runsThrough(lines, i * 4, probe, 0)) cost += 20;
    return cost;
  }
}

function widen(reach: Float64Array, list: Float64Array, length: number): void {
  for (let i = 0; i < length; i += 2) {
    const x = list[i]!;
    const y = list[i + 1]!;
    if (x < reach[0]!) reach[0] = x;
    if (y < reach[1]!) reach[1] = y;
    if (x > reach[2]!) reach[2] = x;
    if (y > reach[3]!) reach[3] = y;
  }
}

const apart = (a: Float64Array, b: Float64Array): boolean => a[0]! > b[2]! || b[0]! > a[2]! || a[1]! > b[3]! || b[1]! > a[3]!;

/** True when a line stays on one side of a box round another choice: most do, and need no more arithmetic. */
function beyond(list: Float64Array, at: number, box: Float64Array): boolean {
  const ax = list[at]!;
  const ay = list[at + 1]!;
  const bx = list[at + 2]!;
  const by = list[at + 3]!;
  return (ax < box[0]! && bx < box[0]!) || (ax > box[2]! && bx > box[2]!) || (ay < box[1]! && by < box[1]!) || (ay > box[3]! && by > box[3]!);
}

/** How many lines of another list cross a line: touching ends and parallels do not. */
function crossed(list: Float64Array, at: number, others: Float64Array): number {
  const fx = list[at]!;
  const fy = list[at + 1]!;
  const wx = list[at + 2]! - fx;
  const wy = list[at + 3]! - fy;
  const minX = Math.min(0, wx);
  const maxX = Math.max(0, wx);
  const minY = Math.min(0, wy);
  const maxY = Math.max(0, wy);
  let count = 0;
  for (let i = 0; i < others.length; i += 4) {
    const px = others[i]! - fx;
    const qx = others[i + 2]! - fx;
    if ((px > maxX && qx > maxX) || (px < minX && qx < minX)) continue;
    const py = others[i + 1]! - fy;
    const qy = others[i + 3]! - fy;
    if ((py > maxY && qy > maxY) || (py < minY && qy < minY)) continue;
    if ((wx * py - wy * px) * (wx * qy - wy * qx) >= 0) continue;
    const ux = qx - px;
    const uy = qy - py;
    if ((uy * px - ux * py) * (ux * (wy - py) - uy * (wx - px)) < 0) count++;
  }
  return count;
}

function boxesThrough(list: Float64Array, at: number, boxes: Float64Array): number {
  let count = 0;
  for (let i = 0; i < boxes.length; i += BOX_STRIDE) if (runsThrough(list, at, boxes, i)) count++;
  return count;
}

/** True when a line of a list runs through a box of another. */
function runsThrough(list: Float64Array, at: number, boxes: Float64Array, box: number): boolean {
  const ax = list[at]! - boxes[box]!;
  const ay = list[at + 1]! - boxes[box + 1]!;
  const bx = list[at + 2]! - boxes[box]!;
  const by = list[at + 3]! - boxes[box + 1]!;
  const w = boxes[box + 2]!;
  const h = boxes[box + 3]!;
  const reach = w + h;
  if ((ax > reach && bx > reach) || (ax < -reach && bx < -reach) || (ay > reach && by > reach) || (ay < -reach && by < -reach)) return false;
  const c = boxes[box + 4]!;
  const s = boxes[box + 5]!;
  const x = ax * c + ay * s;
  const y = ay * c - ax * s;
  const wx = bx * c + by * s - x;
  const wy = by * c - bx * s - y;
  let low = 0;
  let high = 1;
  if (Math.abs(wx) < PAPER_EPS) {
    if (Math.abs(x) >= w) return false;
  } else {
    const t = (-w - x) / wx;
    const u = (w - x) / wx;
    low = Math.max(low, Math.min(t, u));
    high = Math.min(high, Math.max(t, u));
  }
  if (Math.abs(wy) < PAPER_EPS) {
    if (Math.abs(y) >= h) return false;
  } else {
    const t = (-h - y) / wy;
    const u = (h - y) / wy;
    low = Math.max(low, Math.min(t, u));
    high = Math.min(high, Math.max(t, u));
  }
  return high > low;
}

/** Crossing a pipe costs a lump, lying along one costs by its length. */
function onPipe(cells: number, lump: number): number {
  return cells === 0 ? 0 : lump + cells * 2;
}
