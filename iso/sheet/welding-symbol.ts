/**
 * A welding symbol as AWS A2.4 builds it: arrow, reference line, the weld below the line (arrow side), the all-around circle
 * and the field flag at the junction, and in the tail where the procedure is to be found. Bevel, gap and size are left to
 * the procedure: none is invented here.
 */
import type { DisplayItem } from "../draw/drawing-types";
import { circleSegments } from "../draw/paths";
import type { PaperPoint } from "../geometry/types";
import { lineFrom, pathOf, polygonOf, textAt } from "./items";
import { TEXT_CAP } from "./sheet-size";

const LINE = 0.25;

/** @param at middle of the symbol, about 21 mm wide and 7 high */
export function weldingSymbol(weld: "groove" | "fillet", isField: boolean, [x, y]: PaperPoint): DisplayItem[] {
  const p = (dx: number, dy: number): PaperPoint => [x + dx, y + dy];
  const junction = p(-6, -0.6);
  const end = p(3.4, -0.6);
  const line = (a: PaperPoint, b: PaperPoint): DisplayItem => lineFrom(a, b, LINE, "title");
  const groove = [line(p(-1.4, -0.6), p(-2.7, 1.5)), line(p(-1.4, -0.6), p(-0.1, 1.5))];
  const fillet = [polygonOf([p(-2.6, -0.6), p(-2.6, 1.5), p(-0.5, -0.6)], { layer: "title", widthMm: LINE })];
  return [
    line(junction, p(-10, 2.9)), polygonOf([p(-10, 2.9), p(-8.9, 1.5), p(-8.4, 2.2)], { layer: "title", stroke: null, fill: "ink" }),
    line(junction, end), line(end, p(4.6, -2.2)), line(end, p(4.6, 1)),
    pathOf(circleSegments(junction, 0.9), { layer: "title", widthMm: LINE }),
    ...(weld === "groove" ? groove : fillet),
    ...(isField ? [line(junction, [junction[0], junction[1] - 3]), polygonOf([[junction[0], junction[1] - 3], [junction[0] + 2.2, junction[1] - 2.3], [junction[0], junction[1] - 1.6]], { layer: "title", stroke: null, fill: "ink" })] : []),
    textAt(p(4.9, -0.6 + TEXT_CAP / 2), "WPS", { layer: "title" }),
  ];
}
