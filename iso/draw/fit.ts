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

const STEPS = 6;

/** Bisects the stretch s between 0 and STRETCH_MOST; null when the pipe stands out of the room even at 0. */
export function fitStretch(plan: PlacePlan, projection: Projection, room: PipeRoom, extra: ExtraRows): number | null {
  if (plan.ids.length === 0) return size.STRETCH_MOST;
  const fits = (stretch: number): boolean => {
    const box = layoutBox(plan, layoutAt(plan, projection, stretch, extra));
    return box.maxX - box.minX <= room.widthMm && box.maxY - box.minY <= room.heightMm;
  };
  if (fits(size.STRETCH_MOST)) return size.STRETCH_MOST;
  if (!fits(0)) return null;
  let low = 0;
  let high: number = size.STRETCH_MOST;
  for (let step = 0; step < STEPS; step++) {
    const middle = (low + high) / 2;
    if (fits(middle)) low = middle;
    else high = middle;
  }
  return low;
}

/** The room in the coordinates the passes drew in, so that what they drew stands in its middle. */
export function roomAround(box: PaperBox, widthMm: number, heightMm: number): PaperBox {
  const [x, y] = Number.isFinite(box.minX) ? [(box.minX + box.maxX) / 2, (box.minY + box.maxY) / 2] : [0, 0];
  return { minX: x - widthMm / 2, minY: y - heightMm / 2, maxX: x + widthMm / 2, maxY: y + heightMm / 2 };
}
