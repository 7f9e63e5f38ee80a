/** Fit: the largest stretch whose pipe leaves its margins free, and where the drawing stands in its room. */
import type { PaperBox } from "../geometry/types";
import { layoutAt, layoutBox, type ExtraRows, type PlacePlan } from "./place";
import type { Projection } from "./project";
import * as size from "./sizes";

/** Room the pipe itself may take, mm. */
export interface PipeRoom {
  readonly widthMm: number;
  readonly heightMm: number;
}

const STEPS = 4;
/** Near enough to the largest stretch that fits: the paper is used to within these shares, and a step stays inside its bracket by the last. */
const USED = 0.97;
const INSIDE = 0.08;

/** The largest stretch s between 0 and STRETCH_MOST, nearly; null when the pipe stands out of the room even at 0. */
export function fitStretch(plan: PlacePlan, projection: Projection, room: PipeRoom, extra: ExtraRows): number | null {
  if (plan.ids.length === 0) return size.STRETCH_MOST;
  /** Share of the room the pipe takes; over 1 it stands out of it. */
  const used = (stretch: number): number => {
    const box = layoutBox(plan, layoutAt(plan, projection, stretch, extra));
    return Math.max((box.maxX - box.minX) / Math.max(1, room.widthMm), (box.maxY - box.minY) / Math.max(1, room.heightMm));
  };
  let low = 0;
  let usedLow = used(low);
  if (usedLow > 1) return null;
  let high: number = size.STRETCH_MOST;
  let usedHigh = used(high);
  if (usedHigh <= 1) return high;
  // A leg's wished length grows evenly with the stretch, so a straight line between the two ends is a good guess.
  for (let step = 0; step < STEPS && usedLow < USED; step++) {
    const share = (1 - usedLow) / (usedHigh - usedLow);
    const middle = low + (high - low) * Math.min(1 - INSIDE, Math.max(INSIDE, share));
    const now = used(middle);
    if (now <= 1) [low, usedLow] = [middle, now];
    else [high, usedHigh] = [middle, now];
  }
  return low;
}

/** The room in the coordinates the passes drew in, so that what they drew stands in its middle. */
export function roomAround(box: PaperBox, widthMm: number, heightMm: number): PaperBox {
  const [x, y] = Number.isFinite(box.minX) ? [(box.minX + box.maxX) / 2, (box.minY + box.maxY) / 2] : [0, 0];
  return { minX: x - widthMm / 2, minY: y - heightMm / 2, maxX: x + widthMm / 2, maxY: y + heightMm / 2 };
}
