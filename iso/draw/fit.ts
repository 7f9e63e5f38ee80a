/** Fit: the largest stretch whose pipe leaves its margins free, and where the drawing stands in its room. */
import type { PaperBox } from "../geometry/types";
import { placeAll, type PlacePlan } from "./place";
import { paperBoxAround } from "./plane";
import type { Projection } from "./project";
import type { ExtraRows } from "./separate";
import * as size from "./sizes";

const STEPS = 7;

/** Bisects the stretch s between 0 and STRETCH_MOST. */
export function fitStretch(plan: PlacePlan, projection: Projection, widthMm: number, heightMm: number, extra: ExtraRows): number {
  const fits = (stretch: number): boolean => {
    const box = paperBoxAround([...placeAll(plan, projection, stretch, extra).paper.values()]);
    return !Number.isFinite(box.minX) || (box.maxX - box.minX <= widthMm && box.maxY - box.minY <= heightMm);
  };
  if (fits(size.STRETCH_MOST)) return size.STRETCH_MOST;
  if (!fits(0)) return 0;
  let low = 0;
  let high = size.STRETCH_MOST;
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
