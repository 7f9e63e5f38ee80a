/** Who this sheet is: number, revision, sheet n of m, state tag, and the QR code to its status page. */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import type { PaperBox } from "../geometry/types";
import { lineFrom, textAt } from "./items";
import { qrItems } from "./qr-code";
import { EDGE_LINE, HEAD_CAP, NUMBER_CAP, TEXT_CAP } from "./sheet-size";
import type { SheetInput } from "./sheet-types";
import { stateTag } from "./state-mark";
import { baselineOf, fitText, linesHeight } from "./text-setting";

const PAD = 1.4;
/** Side of the QR code with its quiet zone, mm: modules of half a millimetre and more. */
export const QR_SIDE = 27;

export const IDENTITY_HEIGHT = QR_SIDE + 1;
/** With the tag above the number: strips of small and following pages. */
export const IDENTITY_NARROW = 97;
/** From this width on, number and tag stand side by side. */
const SIDE_BY_SIDE = 130;
export const STACKED_TAG = 14.2;

export interface SheetPlace {
  readonly sheet: number;
  readonly of: number;
}

/** Draws the block into a box at least IDENTITY_NARROW wide and IDENTITY_HEIGHT high. */
export function identityItems(input: SheetInput, place: SheetPlace, box: PaperBox, measure: MeasureText): DisplayItem[] {
  const left = { ...box, maxX: box.maxX - QR_SIDE };
  const code = codeItems(input, { ...box, minX: left.maxX, maxY: box.minY + QR_SIDE });
  if (box.maxX - box.minX < SIDE_BY_SIDE) return [...code, ...stacked(input, place, left, measure)];
  const middle = (left.minX + left.maxX) / 2 - 2;
  const tag = { minX: middle + PAD, minY: box.minY + 3, maxX: left.maxX - 0.4, maxY: box.maxY - 3 };
  return [...code, ...numberItems(input, place, { ...left, maxX: middle }, measure), ...stateTag(input.revision, tag, measure)];
}

function stacked(input: SheetInput, place: SheetPlace, box: PaperBox, measure: MeasureText): DisplayItem[] {
  const tag = { minX: box.minX + PAD, minY: box.minY + 1, maxX: box.maxX - 0.4, maxY: box.minY + 1 + STACKED_TAG };
  const room = box.maxX - box.minX - 2 * PAD;
  const number = fitCap(sheetNumberText(input), room, 4, measure);
  const second = fitText(`REV ${revisionText(input)}, SHEET ${place.sheet} OF ${place.of}`, room, 1, { capMm: HEAD_CAP, face: "bold" }, measure).lines[0] ?? "";
  const top = tag.maxY + 0.4;
  return [
    ...stateTag(input.revision, tag, measure),
    textAt([box.minX + PAD, top + baselineOf(0, 4)], number.text, { layer: "title", capMm: number.capMm, face: "bold" }),
    textAt([box.minX + PAD, top + linesHeight(1, 4) + baselineOf(0, HEAD_CAP)], second, { layer: "title", capMm: HEAD_CAP, face: "bold" }),
  ];
}

function numberItems(input: SheetInput, place: SheetPlace, box: PaperBox, measure: MeasureText): DisplayItem[] {
  const x = box.minX + PAD;
  const room = box.maxX - box.minX - 2 * PAD;
  const number = fitCap(sheetNumberText(input), room, NUMBER_CAP, measure);
  const half = box.minY + 0.4 + linesHeight(1) + linesHeight(1, NUMBER_CAP);
  const second = x + room * 0.42;
  const label = half + 0.3 + baselineOf(0);
  const value = half + 0.3 + linesHeight(1) + baselineOf(0, NUMBER_CAP);
  return [
    textAt([x, box.minY + 0.4 + baselineOf(0)], "SHEET NO.", { layer: "title" }),
    textAt([x, box.minY + 0.4 + linesHeight(1) + baselineOf(0, NUMBER_CAP)], number.text, { layer: "title", capMm: number.capMm, face: "bold" }),
    lineFrom([box.minX, half], [box.maxX, half], EDGE_LINE, "title"),
    textAt([x, label], "REV", { layer: "title" }),
    textAt([x, value], revisionText(input), { layer: "title", capMm: NUMBER_CAP, face: "bold" }),
    textAt([second, label], "SHEET", { layer: "title" }),
    textAt([second, value], `${place.sheet} of ${place.of}`, { layer: "title", capMm: 4, face: "bold" }),
  ];
}

/** A number as large as wanted where it fits; it may step down to the smallest lettering of the sheet, never under it. */
export function fitCap(text: string, roomMm: number, wantedMm: number, measure: MeasureText): { readonly text: string; readonly capMm: number } {
  const capMm = Math.max(TEXT_CAP, Math.min(wantedMm, (wantedMm * roomMm) / Math.max(1, measure(text, wantedMm, "bold"))));
  return { capMm, text: fitText(text, roomMm, 1, { capMm: capMm * 0.999, face: "bold" }, measure).lines[0] ?? "" };
}

function sheetNumberText(input: SheetInput): string {
  return input.revision.sheetNumber === "" ? "NOT NUMBERED" : input.revision.sheetNumber;
}

function revisionText(input: SheetInput): string {
  return input.revision.code === "" ? "-" : input.revision.code;
}

/** The code, or for a draft the words that say why there is none. */
function codeItems(input: SheetInput, box: PaperBox): DisplayItem[] {
  const inset = { minX: box.minX + 0.5, minY: box.minY + 0.5, maxX: box.maxX - 0.5, maxY: box.maxY - 0.5 };
  if (input.revision.statusUrl !== "") return qrItems(input.revision.statusUrl, inset);
  const middle = (box.minX + box.maxX) / 2;
  return ["NOT ISSUED,", "no status page"].map((text, index) =>
    textAt([middle, (box.minY + box.maxY) / 2 - linesHeight(1) + baselineOf(index)], text, { layer: "title", anchor: "middle" }));
}
