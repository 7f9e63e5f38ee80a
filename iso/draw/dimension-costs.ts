/** What a candidate for a chain's dimensions costs: its lines and numbers against pipe, thin lines and the other chains' choices. */
import type { PaperBox, PaperPoint } from "../geometry/types";
import type { DimensionSet, DimensionText } from "./dimension-lines";
import { turnedInk, type InkMap } from "./ink-map";
import type { LabelField } from "./label-field";
import { segmentInBox, segmentsCross, type TurnedBox } from "./plane";

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
  for (const line of set.extensions) cost += onPipe(around.heavy.along(line.from, line.to), 7) + around.light.along(line.from, line.to) * 0.3;
  for (const other of others) {
    if (cost >= limit) return cost;
    for (const line of set.lines) {
      for (const their of other.set.lines) if (segmentsCross(line, their)) cost += LINES_CROSS;
      for (const their of other.set.extensions) if (segmentsCross(line, their)) cost += EXTENSION_CROSSES;
      for (const box of other.boxes) if (segmentInBox(line.from, line.to, box) > 0) cost += 40;
    }
    for (const line of set.extensions) {
      for (const their of other.set.lines) if (segmentsCross(line, their)) cost += EXTENSION_CROSSES;
      for (const box of other.boxes) if (segmentInBox(line.from, line.to, box) > 0) cost += 25;
    }
  }
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
  for (const other of others) {
    for (const line of other.set.lines) if (segmentInBox(line.from, line.to, wider) > 0) cost += 25;
    for (const line of other.set.extensions) if (segmentInBox(line.from, line.to, wider) > 0) cost += 14;
  }
  for (const line of set.extensions) if (segmentInBox(line.from, line.to, box) > 0) cost += 10;
  for (const line of set.lines) if (line.from !== text.from && segmentInBox(line.from, line.to, box) > 0) cost += 20;
  return cost;
}
