/** Boxes of display items, for bounds and for tests of overlap. */
import type { PaperBox, PaperPoint } from "../geometry/types";
import type { DisplayItem, MeasureText, TextItem } from "./drawing-types";
import { boxReach, type TurnedBox } from "./plane";

/** Turned box of a text: its advance by its capital height. */
export function textTurnedBox(item: TextItem, measure: MeasureText): TurnedBox {
  const width = measure(item.text, item.capMm, item.face);
  const shift = item.anchor === "middle" ? 0 : item.anchor === "start" ? width / 2 : -width / 2;
  const c = Math.cos(item.rotateRad);
  const s = Math.sin(item.rotateRad);
  const centre: PaperPoint = [item.at[0] + c * shift + (s * item.capMm) / 2, item.at[1] + s * shift - (c * item.capMm) / 2];
  return { centre, halfWidth: width / 2, halfHeight: item.capMm / 2, angle: item.rotateRad };
}

/** What is really inked; a zero box at the origin when nothing is. */
export function inkBounds(items: readonly DisplayItem[], measure: MeasureText): PaperBox {
  let minX = Infinity;
  let minY = Infinity;
  let maxX = -Infinity;
  let maxY = -Infinity;
  const take = (x: number, y: number, w: number, h: number): void => {
    if (x - w < minX) minX = x - w;
    if (x + w > maxX) maxX = x + w;
    if (y - h < minY) minY = y - h;
    if (y + h > maxY) maxY = y + h;
  };
  for (const item of items) {
    if (item.type === "line") {
      take(item.from[0], item.from[1], 0, 0);
      take(item.to[0], item.to[1], 0, 0);
    } else if (item.type === "text") {
      const box = textTurnedBox(item, measure);
      const [w, h] = boxReach(box);
      take(box.centre[0], box.centre[1], w, h);
    } else for (const s of item.segments) if (s.op !== "Z") take(s.to[0], s.to[1], 0, 0);
  }
  return minX > maxX ? { minX: 0, minY: 0, maxX: 0, maxY: 0 } : { minX, minY, maxX, maxY };
}
