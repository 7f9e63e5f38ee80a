/** What a candidate for a chain's dimensions costs: its lines and numbers against pipe, thin lines and the other chains' choices. */
import type { PaperBox, PaperPoint } from "../geometry/types";
import type { DimensionSet, DimensionText } from "./dimension-lines";
import { turnedInk, type InkMap } from "./ink-map";
import type { LabelField } from "./label-field";
import { boxReach, segmentInBox, segmentsCross, type Segment, type TurnedBox } from "./plane";

export interface Choice {
  readonly set: DimensionSet;
  readonly places: readonly (PaperPoint | null)[];
  readonly boxes: readonly TurnedBox[];
  readonly cost: number;
  /** Round its lines and numbers. */
  readonly reach: PaperBox;
}

export interface DimensionSurroundings {
  readonly heavy: InkMap;
  readonly light: InkMap;
  readonly field: LabelField;
  readonly centre: PaperPoint;
  readonly extent: PaperBox;
}

/** Two dimension lines that cross; a dimension line across an extension line. */
const LINES_CROSS = 26;
const EXTENSION_CROSSES = 6;

/** @param limit nobody asks how much more than this it is */
export function lineCost(set: DimensionSet, around: DimensionSurroundings, others: readonly Choice[], limit: number): number {
  let cost = 0;
  for (const line of set.lines) cost += onPipe(around.heavy.along(line.from, line.to), 18) + around.light.along(line.from, line.to) * 0.6;
  if (cost >= limit) return cost;
  for (const line of set.extensions) cost += onPipe(around.heavy.along(line.from, line.to), 7) + around.light.along(line.from, line.to) * 0.3;
  for (const other of others) {
    if (cost >= limit) return cost;
    for (const line of set.lines) if (reaches(line, other.reach)) cost += lineAmong(line, other, LINES_CROSS, EXTENSION_CROSSES, 40);
    for (const line of set.extensions) if (reaches(line, other.reach)) cost += lineAmong(line, other, EXTENSION_CROSSES, 0, 25);
  }
  return cost;
}

/** Whether a line comes within a box round another choice: most do not, and need no more arithmetic. */
function reaches({ from, to }: Segment, box: PaperBox): boolean {
  return !((from[0] < box.minX && to[0] < box.minX) || (from[0] > box.maxX && to[0] > box.maxX) || (from[1] < box.minY && to[1] < box.minY) || (from[1] > box.maxY && to[1] > box.maxY));
}

/** What a line costs among another choice's lines, extension lines and numbers. */
function lineAmong(line: Segment, other: Choice, acrossLine: number, acrossExtension: number, throughNumber: number): number {
  let cost = 0;
  for (const their of other.set.lines) if (segmentsCross(line, their)) cost += acrossLine;
  if (acrossExtension > 0) for (const their of other.set.extensions) if (segmentsCross(line, their)) cost += acrossExtension;
  for (const box of other.boxes) if (segmentInBox(line.from, line.to, box) > 0) cost += throughNumber;
  return cost;
}

/** Crossing a pipe costs a lump, lying along one costs by its length. */
function onPipe(cells: number, lump: number): number {
  return cells === 0 ? 0 : lump + cells * 2;
}

/** Price of a number in a place. */
export function boxCost(box: TurnedBox, text: DimensionText, set: DimensionSet, around: DimensionSurroundings, others: readonly Choice[]): number {
  let cost = turnedInk(around.heavy, box) * 8 + turnedInk(around.light, box) * 1.5;
  const wider = { ...box, halfHeight: box.halfHeight + 0.4 };
  const [w, h] = boxReach(wider);
  const [x, y] = box.centre;
  for (const other of others) {
    if (other.reach.minX > x + w || other.reach.maxX < x - w || other.reach.minY > y + h || other.reach.maxY < y - h) continue;
    for (const line of other.set.lines) if (segmentInBox(line.from, line.to, wider) > 0) cost += 25;
    for (const line of other.set.extensions) if (segmentInBox(line.from, line.to, wider) > 0) cost += 14;
  }
  for (const line of set.extensions) if (segmentInBox(line.from, line.to, box) > 0) cost += 10;
  for (const line of set.lines) if (line.from !== text.from && segmentInBox(line.from, line.to, box) > 0) cost += 20;
  return cost;
}
