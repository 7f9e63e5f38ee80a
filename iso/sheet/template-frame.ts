/** The slim frame of a template's page: a low strip with what the paper is for, a proof bar and who the sheet is; the rest is paper to cut out. */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import type { PaperBox } from "../geometry/types";
import { INCH_MM } from "../units/length";
import { IDENTITY_HEIGHT, IDENTITY_NARROW, identityItems, type SheetPlace } from "./identity-block";
import { boxOutline, lineFrom, textAt } from "./items";
import { paperOf } from "./page-frame";
import type { SheetFacts } from "./sheet-facts";
import { EDGE_LINE, HEAD_CAP, TEXT_CAP } from "./sheet-size";
import { stateAcross } from "./state-mark";
import { baselineOf, fitText, linesHeight, wrapText } from "./text-setting";
import { blockOutline } from "./title-strip";

export interface TemplateFrame {
  /** Room for the tile and its labels. */
  readonly body: PaperBox;
  readonly under: readonly DisplayItem[];
  readonly over: (strip: StripContent, place: SheetPlace) => DisplayItem[];
}

export interface StripContent {
  readonly title: string;
  readonly facts: readonly string[];
  readonly rows: number;
  readonly columns: number;
  readonly row: number;
  readonly column: number;
}

const PAD = 1.6;
/** Room of the picture of tiles at the right of the strip. */
const MAP = 27;
/** Room of the proof bar with its figures. */
const BAR_HEIGHT = 9.6;
const PROOF = "Print at 100 %, never fitted to the page. Check the bar by tape first.";

/** The strip is as high as the longest of the texts it will carry. */
export function templateFrame(facts: SheetFacts, contents: readonly { readonly facts: readonly string[] }[], measure: MeasureText): TemplateFrame {
  const paper = paperOf(facts.input.size, facts.print, measure);
  const { inner } = paper;
  const textWidth = inner.maxX - inner.minX - IDENTITY_NARROW - MAP - 2 * PAD;
  const lines = Math.max(1, ...contents.map((content) => factLines(content.facts, textWidth, measure).length));
  const heightMm = Math.max(IDENTITY_HEIGHT, 0.6 + linesHeight(1, HEAD_CAP) + linesHeight(lines + proofLines(textWidth, measure).length) + BAR_HEIGHT);
  const strip = { ...inner, minY: inner.maxY - heightMm };
  const text = { ...strip, maxX: strip.maxX - IDENTITY_NARROW };
  return {
    body: { ...inner, maxY: strip.minY },
    under: stateAcross(facts.input.revision, { ...inner, maxY: strip.minY }, measure),
    over: (content, place) => [
      ...paper.items, blockOutline(text), blockOutline({ ...strip, minX: text.maxX }),
      ...stripItems(content, text, measure), ...identityItems(facts.input, place, { ...strip, minX: text.maxX }, measure),
    ],
  };
}

function factLines(facts: readonly string[], widthMm: number, measure: MeasureText): string[] {
  return facts.flatMap((fact) => wrapText(fact, widthMm, { capMm: TEXT_CAP, face: "regular" }, measure));
}

function proofLines(widthMm: number, measure: MeasureText): string[] {
  return wrapText(PROOF, widthMm, { capMm: TEXT_CAP, face: "bold" }, measure);
}

function stripItems(content: StripContent, box: PaperBox, measure: MeasureText): DisplayItem[] {
  const x = box.minX + PAD;
  const widthMm = box.maxX - box.minX - MAP - 2 * PAD;
  const title = fitText(content.title, widthMm, 1, { capMm: HEAD_CAP, face: "bold" }, measure).lines[0] ?? "";
  const top = box.minY + 0.4;
  const under = top + linesHeight(1, HEAD_CAP);
  const lines = factLines(content.facts, widthMm, measure);
  const proof = proofLines(widthMm, measure);
  return [
    textAt([x, top + baselineOf(0, HEAD_CAP)], title, { layer: "title", capMm: HEAD_CAP, face: "bold" }),
    ...lines.map((line, i) => textAt([x, under + baselineOf(i)], line, { layer: "title" })),
    ...proof.map((line, i) => textAt([x, under + linesHeight(lines.length) + baselineOf(i)], line, { layer: "caution", face: "bold" })),
    ...proofBar(x, box.maxY - BAR_HEIGHT + 1),
    ...tileMap(content, { minX: box.maxX - MAP, minY: box.minY + 1, maxX: box.maxX - PAD, maxY: box.maxY - 1 }),
  ];
}

/** A bar of two rulers: 4 inches on its upper edge, 100 millimetres on its lower. */
export function proofBar(x: number, y: number): DisplayItem[] {
  const inches = [0, 1, 2, 3, 4].map((n) => lineFrom([x + n * INCH_MM, y - 1.4], [x + n * INCH_MM, y + 1.2], 0.25, "title"));
  const tens = Array.from({ length: 11 }, (_, n) => lineFrom([x + n * 10, y + 1.2], [x + n * 10, y + (n % 5 === 0 ? 3.8 : 2.8)], 0.25, "title"));
  return [
    lineFrom([x, y], [x + 4 * INCH_MM, y], 0.35, "title"), lineFrom([x, y + 1.2], [x + 100, y + 1.2], 0.35, "title"),
    ...inches, ...tens,
    textAt([x + 4 * INCH_MM + 1.5, y + 1.2], "4 in", { layer: "title" }),
    textAt([x + 4 * INCH_MM + 1.5, y + 5.6], "100 mm", { layer: "title" }),
  ];
}

/** Which tile this is, as a filled box among the others. */
function tileMap({ rows, columns, row, column }: StripContent, box: PaperBox): DisplayItem[] {
  const foot = linesHeight(2) + 0.6;
  const room = { ...box, maxY: box.maxY - foot };
  const side = Math.min((room.maxX - room.minX) / columns, (room.maxY - room.minY) / rows, 9);
  const left = (room.minX + room.maxX - side * columns) / 2;
  const cells = Array.from({ length: rows * columns }, (_, i) => {
    const [r, c] = [Math.floor(i / columns), i % columns];
    const cell = { minX: left + c * side, minY: room.minY + r * side, maxX: left + (c + 1) * side, maxY: room.minY + (r + 1) * side };
    return boxOutline(cell, { layer: "title", widthMm: EDGE_LINE, fill: r + 1 === row && c + 1 === column ? "grey" : null });
  });
  const middle = (box.minX + box.maxX) / 2;
  const words = rows * columns === 1 ? ["ONE PAGE", "holds it all"] : [`ROW ${row} OF ${rows}`, `COL ${column} OF ${columns}`];
  return [...cells, ...words.map((text, i) => textAt([middle, room.maxY + 0.6 + baselineOf(i)], text, { layer: "title", anchor: "middle", face: i === 0 ? "bold" : "regular" }))];
}
