/** Boxes of display items, for bounds and for tests of overlap. */
import type { PaperBox, PaperPoint } from "../geometry/types";
import type { DisplayItem, MeasureText, TextItem } from "./drawing-types";
import { boxCorners, type TurnedBox } from "./plane";

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
  const take = ([x, y]: PaperPoint): void => {
    if (x < minX) minX = x;
    if (x > maxX) maxX = x;
    if (y < minY) minY = y;
    if (y > maxY) maxY = y;
  };
  for (const item of items) {
    if (item.type === "line") {
      take(item.from);
      take(item.to);
    } else if (item.type === "text") boxCorners(textTurnedBox(item, measure)).forEach(take);
    else for (const s of item.segments) if (s.op !== "Z") take(s.to);
  }
  return minX > maxX ? { minX: 0, minY: 0, maxX: 0, maxY: 0 } : { minX, minY, maxX, maxY };
}
