/** A trimmed elbow on the cut map: its picture, what is kept, and the arcs from the kept face to the cut. */
import { elbowMarks } from "../closing/elbow-marks";
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import type { PaperBox } from "../geometry/types";
import { formatMark } from "../layout/lengths";
import { fittingShape, shapeItems } from "../layout/turn-picture";
import type { Turn } from "../layout/turns";
import type { UnitSystem } from "../run/document";
import { formatAngleDeg } from "../units/format";
import type { Block } from "./blocks";
import { boxOutline, lineFrom, textAt } from "./items";
import { CUT_CAP, EDGE_LINE, HEAD_CAP, RULE_LINE } from "./sheet-size";
import { baselineOf, fitText, linesHeight, PLAIN, wrapText } from "./text-setting";

/** Least width of a card, mm. */
export const ELBOW_WIDTH = 118;
const PICTURE = 54;
const LEAST_HEIGHT = 44;
const PAD = 1.4;
const CAUTION = "Trimmed fitting: confirm it is permitted (engineer). From the kept face along the surface; cut square to the arc.";

/** Marks: throat (R - OD/2)·θ, both sides R·θ, back (R + OD/2)·θ; take-out R·tan(θ/2) (common practice). */
export function elbowCard(turn: Turn, units: UnitSystem, widthMm: number, measure: MeasureText): Block {
  const marks = elbowMarks(turn.radiusMm ?? 0, turn.odMm, turn.angleRad);
  const textMm = widthMm - PICTURE - 3 * PAD;
  const caution = wrapText(CAUTION, textMm, PLAIN, measure);
  const figures: readonly (readonly [string, string])[] = [
    ["KEEP", formatAngleDeg(turn.angleRad)], ["THROAT", formatMark(marks.throatMm, units)], ["SIDES", formatMark(marks.sideMm, units)], ["BACK", formatMark(marks.backMm, units)], ["TAKE-OUT", formatMark(marks.takeOutMm, units)],
  ];
  const title = fitText(`TRIMMED ${turn.name}`, textMm, 2, { capMm: HEAD_CAP, face: "bold" }, measure).lines;
  const heightMm = Math.max(LEAST_HEIGHT, linesHeight(title.length, HEAD_CAP) + figures.length * linesHeight(1, CUT_CAP) + linesHeight(caution.length) + 2 * PAD + 1);
  const items = (box: PaperBox): DisplayItem[] => {
    const x = box.minX + PICTURE + 2 * PAD;
    const under = box.minY + PAD + linesHeight(title.length, HEAD_CAP);
    const foot = under + figures.length * linesHeight(1, CUT_CAP) + 1;
    return [
      boxOutline(box, { widthMm: EDGE_LINE }), lineFrom([box.minX + PICTURE + PAD, box.minY], [box.minX + PICTURE + PAD, box.maxY], RULE_LINE),
      ...shapeItems(fittingShape(turn, units), { minX: box.minX + 1, minY: box.minY + 1, maxX: box.minX + PICTURE, maxY: box.maxY - 1 }, measure),
      ...title.map((line, i) => textAt([x, box.minY + PAD + baselineOf(i, HEAD_CAP)], line, { capMm: HEAD_CAP, face: "bold" })),
      ...figures.flatMap(([label, value], i) => [
        textAt([x, under + baselineOf(i, CUT_CAP)], label), textAt([x + 24, under + baselineOf(i, CUT_CAP)], value, { capMm: CUT_CAP, face: "bold" }),
      ]),
      ...caution.map((line, i) => textAt([x, foot + baselineOf(i)], line, { layer: "caution" })),
    ];
  };
  return { heightMm, items };
}
