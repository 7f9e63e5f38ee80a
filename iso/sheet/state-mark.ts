/**
 * The state of a revision on paper: across the page in a pale ink under everything else, and as a tag in the title strip
 * where word, shape and colour say it together. A sheet for fabrication or as built carries a stamp instead.
 */
import type { DisplayItem, Ink, MeasureText } from "../draw/drawing-types";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { boxOutline, lineFrom, polygonOf, textAt } from "./items";
import { EDGE_LINE } from "./sheet-size";
import { baselineOf, fitText, linesHeight } from "./text-setting";
import type { RevisionState, SheetInput } from "./sheet-types";

/** Words printed and shown for a state; a hold is shown beside them. */
export const STATE_WORDS: Readonly<Record<RevisionState, string>> = {
  draft: "DRAFT", "for-review": "FOR REVIEW", returned: "RETURNED", "for-fabrication": "FOR FABRICATION",
  superseded: "SUPERSEDED", void: "VOID", "as-built": "AS-BUILT",
};

/** Word across the page: HOLD above all that can still be held; nothing on a sheet that may be worked to. */
export function wordAcross(state: RevisionState, hold: boolean): string | null {
  if (state === "void" || state === "superseded") return STATE_WORDS[state];
  if (hold) return "HOLD";
  return state === "for-fabrication" || state === "as-built" ? null : STATE_WORDS[state];
}

const INKS: Readonly<Record<RevisionState, Ink>> = {
  draft: "alert", "for-review": "dye", returned: "alert", "for-fabrication": "ink", superseded: "alert", void: "alert", "as-built": "ink",
};

/** The word, as large as the box lets it be, along the box's rising diagonal. */
export function stateAcross(input: SheetInput["revision"], box: PaperBox, measure: MeasureText): DisplayItem[] {
  const word = wordAcross(input.state, input.hold);
  return word === null ? [] : acrossItems(word, box, measure);
}

/** Any word across a page that is not to be worked from. */
export function acrossItems(word: string, box: PaperBox, measure: MeasureText): DisplayItem[] {
  const width = box.maxX - box.minX;
  const height = box.maxY - box.minY;
  const slope = Math.atan2(height, width) * 0.72;
  const perCap = measure(word, 1, "bold");
  // The turned word's own box must stay within the room: width·cos + cap·sin, width·sin + cap·cos.
  const byWidth = (width * 0.94) / (perCap * Math.cos(slope) + Math.sin(slope));
  const byHeight = (height * 0.94) / (perCap * Math.sin(slope) + Math.cos(slope));
  const capMm = Math.min(byWidth, byHeight, height * 0.26);
  const middle = [(box.minX + box.maxX) / 2, (box.minY + box.maxY) / 2] as const;
  // Half a capital down, square to the turned baseline.
  const at = [middle[0] + (capMm / 2) * Math.sin(slope), middle[1] + (capMm / 2) * Math.cos(slope)] as const;
  return [textAt(at, word, { layer: "state", anchor: "middle", capMm, face: "bold", rotateRad: -slope, ink: "pale" })];
}

/** The tag: state word in its shape, under it who checked and when; HOLD beside it when held. */
export function stateTag(input: SheetInput["revision"], box: PaperBox, measure: MeasureText): DisplayItem[] {
  const tag = { ...box, maxX: input.hold ? box.minX + (box.maxX - box.minX) * 0.66 : box.maxX };
  const items = [...shapeOf(input.state, tag), ...tagText(input, tag, measure)];
  if (!input.hold) return items;
  const hold = { ...box, minX: tag.maxX + 1.2 };
  return [...items, ...holdOctagon(hold)];
}

function tagText(input: SheetInput["revision"], box: PaperBox, measure: MeasureText): DisplayItem[] {
  const middle = (box.minX + box.maxX) / 2;
  const room = box.maxX - box.minX - 7;
  const wanted = box.maxY - box.minY > 18 ? 5 : 4;
  const capMm = Math.max(2.5, Math.min(wanted, (room * wanted) / measure(STATE_WORDS[input.state], wanted, "bold")));
  const lines = fitText(stampLine(input), room, box.maxY - box.minY > 18 ? 2 : 1, { capMm: 2.5, face: "regular" }, measure).lines;
  const top = (box.minY + box.maxY - linesHeight(1, capMm) - linesHeight(lines.length)) / 2;
  return [
    textAt([middle, top + baselineOf(0, capMm)], STATE_WORDS[input.state], { layer: "state", anchor: "middle", capMm, face: "bold", ink: INKS[input.state] }),
    ...lines.map((line, index) => textAt([middle, top + linesHeight(1, capMm) + baselineOf(index)], line, { layer: "state", anchor: "middle" })),
  ];
}

/** Who stands for the state: the checker on a signed sheet, else what the print is good for. */
function stampLine(input: SheetInput["revision"]): string {
  const date = input.issuedAt.slice(0, 10);
  if (input.state === "for-fabrication" || input.state === "as-built") return input.checkedBy ? `${input.checkedBy}, ${date}` : date;
  return "Not for fabrication";
}

function shapeOf(state: RevisionState, box: PaperBox): DisplayItem[] {
  const ink = INKS[state];
  const style = { layer: "state" as const, stroke: ink, widthMm: 0.7 };
  const { minX, minY, maxX, maxY } = box;
  const middleY = (minY + maxY) / 2;
  if (state === "draft") return [boxOutline(box, { ...style, dash: [2.4, 1.4] })];
  if (state === "for-review") return [polygonOf([[minX, minY], [maxX - 3, minY], [maxX, middleY], [maxX - 3, maxY], [minX, maxY]], style)];
  if (state === "returned") return [polygonOf([[minX + 3, minY], [maxX, minY], [maxX, maxY], [minX + 3, maxY], [minX, middleY]], style)];
  if (state === "superseded" || state === "void") return struckBox(box, ink);
  const inner = { minX: minX + 1, minY: minY + 1, maxX: maxX - 1, maxY: maxY - 1 };
  return [boxOutline(box, style), boxOutline(inner, { ...style, widthMm: EDGE_LINE })];
}

/** A box with its corners struck: what was dead before anybody reads the word. */
function struckBox(box: PaperBox, ink: Ink): DisplayItem[] {
  const { minX, minY, maxX, maxY } = box;
  const cut = 3.4;
  const strike = (x: number, y: number, dx: number, dy: number) => lineFrom([x + dx * cut, y], [x, y + dy * cut], 0.7, "state", ink);
  return [
    boxOutline(box, { layer: "state", stroke: ink, widthMm: 0.7 }),
    strike(minX, minY, 1, 1), strike(maxX, minY, -1, 1), strike(minX, maxY, 1, -1), strike(maxX, maxY, -1, -1),
  ];
}

function octagon({ minX, minY, maxX, maxY }: PaperBox, widthMm: number): DisplayItem {
  const cut = (maxY - minY) * 0.29;
  const points = [
    [minX + cut, minY], [maxX - cut, minY], [maxX, minY + cut], [maxX, maxY - cut],
    [maxX - cut, maxY], [minX + cut, maxY], [minX, maxY - cut], [minX, minY + cut],
  ] as const;
  return polygonOf(points, { layer: "state", stroke: "alert", widthMm });
}

function holdOctagon(box: PaperBox): DisplayItem[] {
  const { minX, minY, maxX, maxY } = box;
  return [
    octagon(box, 1),
    textAt([(minX + maxX) / 2, (minY + maxY) / 2 + 1.75], "HOLD", { layer: "state", anchor: "middle", capMm: 3.5, face: "bold", ink: "alert" }),
  ];
}

const SMALL = { widthMm: 5, heightMm: 2.8 } as const;

/** A small shape with the space after it, mm. */
export const STATE_SMALL_WIDTH = SMALL.widthMm + 1.6;

/** The tag's shape, small, for a line of a list: state and hold by shape and colour beside the word. @param at middle of its left end */
export function stateSmall(state: RevisionState, hold: boolean, [x, y]: PaperPoint): DisplayItem[] {
  const box = { minX: x, minY: y - SMALL.heightMm / 2, maxX: x + SMALL.widthMm, maxY: y + SMALL.heightMm / 2 };
  const { minX, minY, maxX, maxY } = box;
  if (hold) return [octagon(box, 0.5)];
  const style = { layer: "state" as const, stroke: INKS[state], widthMm: 0.4 };
  if (state === "draft") return [boxOutline(box, { ...style, dash: [0.9, 0.7] })];
  if (state === "for-review") return [polygonOf([[minX, minY], [maxX - 1.6, minY], [maxX, y], [maxX - 1.6, maxY], [minX, maxY]], style)];
  if (state === "returned") return [polygonOf([[minX + 1.6, minY], [maxX, minY], [maxX, maxY], [minX + 1.6, maxY], [minX, y]], style)];
  if (state === "superseded" || state === "void") {
    return [boxOutline(box, style), lineFrom([minX, minY], [maxX, maxY], 0.4, "state", INKS[state]), lineFrom([minX, maxY], [maxX, minY], 0.4, "state", INKS[state])];
  }
  return [boxOutline(box, style), boxOutline({ minX: minX + 0.8, minY: minY + 0.8, maxX: maxX - 0.8, maxY: maxY - 0.8 }, { ...style, widthMm: 0.25 })];
}
