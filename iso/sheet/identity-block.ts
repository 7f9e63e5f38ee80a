/** Who this sheet is: number, revision, sheet n of m, state tag, and the QR code to its status page. */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import type { PaperBox } from "../geometry/types";
import { lineFrom, textAt } from "./items";
import { qrItems } from "./qr-code";
import { EDGE_LINE, NUMBER_CAP, TEXT_CAP } from "./sheet-size";
import type { SheetInput } from "./sheet-types";
import { stateTag, TAG_HEIGHT } from "./state-mark";
import { baselineOf, fitText, linesHeight } from "./text-setting";

const PAD = 1.4;
/** Side of the QR code with its quiet zone, mm: modules of half a millimetre and more. */
const QR_SIDE = 27;

export const IDENTITY_WIDTH = 72;
export const IDENTITY_HEIGHT = QR_SIDE + TAG_HEIGHT + 3;
/** On a following page tag and number stand beside the code. */
export const IDENTITY_WIDE_WIDTH = 104;
export const IDENTITY_WIDE_HEIGHT = QR_SIDE;

export interface SheetPlace {
  readonly sheet: number;
  readonly of: number;
}

/** Of a first page: number beside the code, the state tag under both. */
export function identityItems(input: SheetInput, place: SheetPlace, box: PaperBox, measure: MeasureText): DisplayItem[] {
  const tag = { minX: box.minX + PAD, minY: box.maxY - TAG_HEIGHT - PAD, maxX: box.maxX - PAD, maxY: box.maxY - PAD };
  const top = { ...box, maxY: tag.minY - 1 };
  return [
    ...codeItems(input, { ...top, minX: box.maxX - QR_SIDE }),
    ...numberItems(input, place, { ...top, maxX: box.maxX - QR_SIDE }, measure),
    ...stateTag(input.revision, tag, measure),
  ];
}

/** Of a following page, lower and wider. */
export function identityWideItems(input: SheetInput, place: SheetPlace, box: PaperBox, measure: MeasureText): DisplayItem[] {
  const left = { ...box, maxX: box.maxX - QR_SIDE };
  const tag = { minX: left.minX + PAD, minY: left.minY + PAD, maxX: left.maxX - PAD, maxY: left.minY + PAD + TAG_HEIGHT };
  const y = tag.maxY + 1 + baselineOf(0, 3);
  const room = left.maxX - left.minX - 2 * PAD;
  const words = `${sheetNumberText(input)}   REV ${revisionText(input)}   SHEET ${place.sheet} OF ${place.of}`;
  const line = fitText(words, room, 1, { capMm: 3, face: "bold" }, measure).lines[0] ?? "";
  return [
    ...codeItems(input, { ...box, minX: box.maxX - QR_SIDE }),
    ...stateTag(input.revision, tag, measure),
    textAt([left.minX + PAD, y], line, { layer: "title", capMm: 3, face: "bold" }),
  ];
}

/** "not yet numbered" before the first submission. */
function sheetNumberText(input: SheetInput): string {
  return input.revision.sheetNumber === "" ? "NOT NUMBERED" : input.revision.sheetNumber;
}

function revisionText(input: SheetInput): string {
  return input.revision.code === "" ? "-" : input.revision.code;
}

function codeItems(input: SheetInput, box: PaperBox): DisplayItem[] {
  const side = Math.min(QR_SIDE, box.maxX - box.minX);
  const square = { minX: box.maxX - side, minY: box.minY, maxX: box.maxX, maxY: box.minY + side };
  const inset = { minX: square.minX + 0.4, minY: square.minY + 0.4, maxX: square.maxX - 0.4, maxY: square.maxY - 0.4 };
  if (input.revision.statusUrl !== "") return qrItems(input.revision.statusUrl, inset);
  const middle = (square.minX + square.maxX) / 2;
  return ["NOT ISSUED", "no status page"].map((text, index) =>
    textAt([middle, square.minY + side / 2 - linesHeight(1) + baselineOf(index)], text, { layer: "title", anchor: "middle" }));
}

function numberItems(input: SheetInput, place: SheetPlace, box: PaperBox, measure: MeasureText): DisplayItem[] {
  const room = box.maxX - box.minX - 2 * PAD;
  const number = sheetNumberText(input);
  // The number may step down to the smallest lettering of the sheet, never under it.
  const capMm = Math.max(TEXT_CAP, Math.min(NUMBER_CAP, (NUMBER_CAP * room) / Math.max(1, measure(number, NUMBER_CAP, "bold"))));
  const shown = fitText(number, room, 1, { capMm, face: "bold" }, measure).lines[0] ?? "";
  const x = box.minX + PAD;
  const secondTop = box.minY + 0.4 + linesHeight(1) + linesHeight(1, NUMBER_CAP);
  return [
    textAt([x, box.minY + 0.4 + baselineOf(0)], "SHEET NO.", { layer: "title" }),
    textAt([x, box.minY + 0.4 + linesHeight(1) + baselineOf(0, NUMBER_CAP) - (NUMBER_CAP - capMm) / 2], shown, { layer: "title", capMm, face: "bold" }),
    lineFrom([box.minX, secondTop], [box.maxX, secondTop], EDGE_LINE, "title"),
    textAt([x, secondTop + 0.3 + baselineOf(0)], "REV", { layer: "title" }),
    textAt([x, secondTop + 0.3 + linesHeight(1) + baselineOf(0, NUMBER_CAP)], revisionText(input), { layer: "title", capMm: NUMBER_CAP, face: "bold" }),
    textAt([x + room * 0.42, secondTop + 0.3 + baselineOf(0)], "SHEET", { layer: "title" }),
    textAt([x + room * 0.42, secondTop + 0.3 + linesHeight(1) + baselineOf(0, NUMBER_CAP)], `${place.sheet} of ${place.of}`, { layer: "title", capMm: 3.5, face: "bold" }),
  ];
}
