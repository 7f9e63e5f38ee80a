/** One piece's card on the cut map: mark and cut length large, the bar with its ends, the sum, and blanks to write in. */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import { stadiumSegments } from "../draw/paths";
import type { PaperBox } from "../geometry/types";
import type { Piece } from "../run/model-types";
import { formatFeetInches } from "../units/format";
import type { Block } from "./blocks";
import { barItems, BAR_HEIGHT, barLength } from "./cut-bar";
import { cutText, endText, noteTexts, pipeText, stockText, sumTerms } from "./cut-words";
import { fitCap } from "./identity-block";
import { boxOutline, lineFrom, pathOf, textAt } from "./items";
import type { SheetSetExtras, WorkRecord } from "./set-types";
import type { SheetFacts } from "./sheet-facts";
import { CUT_CAP, EDGE_LINE, HEAD_CAP, RULE_LINE, TEXT_CAP } from "./sheet-size";
import { baselineOf, BOLD, fitText, linesHeight, PLAIN, wrapText } from "./text-setting";

const PAD = 1.4;
/** Column of mark and cut length. */
const LEFT = 74;
const MARK = 20;
const BLANK = { widthMm: 38, heightMm: 9.4 } as const;
/** Cards at least so wide have three blanks side by side, else two. */
const WIDE = 330;
/** Where the bar is so long, its texts are larger, mm. */
const WIDE_BAR = 150;
const FIGURE_CAP = 7;
/** Lines of one card; more go on in a card after it, so that none is taller than a page. */
const MOST_LINES = 14;

export interface CardFacts {
  readonly facts: SheetFacts;
  readonly extras: SheetSetExtras;
  readonly measure: MeasureText;
  readonly widthMm: number;
  /** Paper mm per mm of pipe. */
  readonly perMm: number;
}

/** Room the bars have at a card's width, mm. */
export function barRoom(widthMm: number): number {
  return widthMm - LEFT - blanksWidth(widthMm) - 4 * PAD;
}

const blanksWidth = (widthMm: number): number => (widthMm >= WIDE ? 3 : 2) * BLANK.widthMm;

/** A piece's card, and the cards its text goes on in where it has more lines than one holds. */
export function cutCards(piece: Piece, at: CardFacts): Block[] {
  const { facts, extras, measure, widthMm } = at;
  const room = barRoom(widthMm);
  const { units } = facts.input;
  const stock = stockText(piece, extras.stock?.[piece.key], units);
  const capMm = room >= WIDE_BAR ? HEAD_CAP : TEXT_CAP;
  const texts: readonly (readonly [string, "regular" | "bold"])[] = [
    ...sumLines(sumTerms(piece, units), room, capMm, measure).map((line) => [line, "regular"] as const), ...noteTexts(facts, piece).map((text) => [text, "bold"] as const), [stock, "regular"],
  ];
  const lines = texts.flatMap(([text, face]) => wrapText(text, room, { capMm, face }, measure).map((line) => ({ line, face, capMm })));
  const ends = endLabels(piece, at, room);
  const first = lines.slice(0, MOST_LINES);
  const head: Block = {
    heightMm: Math.max(leftHeight(piece, at), blanksHeight(widthMm), BAR_HEIGHT + 2 * PAD + 1.4 + linesHeight(ends.rows) + linesHeight(first.length, capMm)) + PAD,
    items: (box) => [
      boxOutline(box, { widthMm: EDGE_LINE }), ...leftItems(piece, at, box), ...barItems(piece, [box.minX + LEFT + PAD, box.minY + PAD + 1.2], Math.min(room, barLength(piece, at.perMm))),
      ...ends.items(box.minX + LEFT + PAD, box.minY + 2 * PAD + 1.2 + BAR_HEIGHT), ...lineItems(first, box.minX + LEFT + PAD, box.minY + 2 * PAD + 1.4 + BAR_HEIGHT + linesHeight(ends.rows)),
      ...blankItems(piece, at, { ...box, minX: box.maxX - blanksWidth(widthMm) }),
    ],
  };
  const rest = Array.from({ length: Math.ceil((lines.length - first.length) / MOST_LINES) }, (_, i) => moreCard(piece, lines.slice((i + 1) * MOST_LINES, (i + 2) * MOST_LINES)));
  return [head, ...rest];
}

/** Terms on as few lines as hold them, broken between terms; one wider than a line is left to be wrapped. */
function sumLines(terms: readonly string[], roomMm: number, capMm: number, measure: MeasureText): string[] {
  const lines: string[] = [];
  for (const term of terms) {
    const longer = lines.length === 0 ? term : `${lines.at(-1)} ${term}`;
    if (lines.length > 0 && measure(longer, capMm, "regular") <= roomMm) lines.splice(-1, 1, longer);
    else lines.push(term);
  }
  return lines;
}

type CardLine = { readonly line: string; readonly face: "regular" | "bold"; readonly capMm: number };

function lineItems(lines: readonly CardLine[], x: number, y: number): DisplayItem[] {
  return lines.map(({ line, face, capMm }, i) => textAt([x, y + baselineOf(i, capMm)], line, { face, capMm }));
}

function moreCard(piece: Piece, lines: readonly CardLine[]): Block {
  return {
    heightMm: linesHeight(lines.length, HEAD_CAP) + 2 * PAD,
    items: (box) => [boxOutline(box, { widthMm: EDGE_LINE }), textAt([box.minX + PAD, box.minY + PAD + baselineOf(0)], `${piece.mark}, continued`, { face: "bold" }), ...lineItems(lines, box.minX + LEFT + PAD, box.minY + PAD)],
  };
}

/** What is cut at either end, under the bar; on a second row where both do not fit side by side. */
function endLabels(piece: Piece, { facts, measure, perMm }: CardFacts, roomMm: number) {
  const [a, b] = piece.ends.map((end) => fitText(endText(facts, piece, end), roomMm, 1, PLAIN, measure).lines[0] ?? "") as [string, string];
  const [wa, wb] = [measure(a, TEXT_CAP, "regular"), measure(b, TEXT_CAP, "regular")];
  const right = Math.max(barLength(piece, perMm), wa + wb + 5);
  const rows = right <= roomMm ? 1 : 2;
  const items = (x: number, y: number): DisplayItem[] => [
    textAt([x, y + baselineOf(0)], a),
    rows === 1 ? textAt([x + right, y + baselineOf(0)], b, { anchor: "end" }) : textAt([x + roomMm, y + baselineOf(1)], b, { anchor: "end" }),
  ];
  return { rows, items };
}

function leftLines(piece: Piece, { facts, measure }: CardFacts) {
  const { units } = facts.input;
  const feet = formatFeetInches(piece.cutLengthMm);
  const second = units === "imperial" && feet.includes("'") && piece.cutLengthMm > 0 ? feet : null;
  return { second, pipe: wrapText(pipeText(facts, piece), LEFT - 2 * PAD, PLAIN, measure).slice(0, 3) };
}

function leftHeight(piece: Piece, at: CardFacts): number {
  const { second, pipe } = leftLines(piece, at);
  return PAD + FIGURE_CAP + 5 + (second ? linesHeight(1, CUT_CAP) : 0) + linesHeight(pipe.length);
}

/** Mark in its stadium, the cut length boxed, under it the same in feet and inches and what pipe it is. */
function leftItems(piece: Piece, at: CardFacts, box: PaperBox): DisplayItem[] {
  const { facts, measure } = at;
  const mark = fitCap(piece.mark, MARK - 5, 5, measure);
  const figure = piece.cutLengthMm > 0 ? cutText(piece.cutLengthMm, facts.input.units) : "DOES NOT FIT";
  const cut = fitCap(figure, LEFT - MARK - 3 * PAD - 3, FIGURE_CAP, measure);
  const { second, pipe } = leftLines(piece, at);
  const field = { minX: box.minX + MARK + 2 * PAD, minY: box.minY + PAD, maxX: box.minX + LEFT - PAD, maxY: box.minY + PAD + FIGURE_CAP + 4 };
  const middle = (field.minY + field.maxY) / 2;
  const centre = [box.minX + PAD + MARK / 2, middle] as const;
  const under = field.maxY + 0.8 + (second ? linesHeight(1, CUT_CAP) : 0);
  return [
    pathOf(stadiumSegments(centre, MARK, 9.4), { widthMm: EDGE_LINE }), textAt([centre[0], middle + mark.capMm / 2], mark.text, { anchor: "middle", face: "bold", capMm: mark.capMm }),
    boxOutline(field, { widthMm: EDGE_LINE * 2 }),
    textAt([(field.minX + field.maxX) / 2, middle + cut.capMm / 2], cut.text, { anchor: "middle", face: "bold", capMm: cut.capMm, ink: piece.cutLengthMm > 0 ? "ink" : "alert" }),
    ...(second ? [textAt([(field.minX + field.maxX) / 2, field.maxY + 0.8 + baselineOf(0, CUT_CAP)], `(${second})`, { anchor: "middle", capMm: CUT_CAP })] : []),
    ...pipe.map((line, i) => textAt([box.minX + PAD, under + baselineOf(i)], line)),
  ];
}

const BLANKS = ["HEAT NO.", "READING 1", "READING 2", "CUT BY", "DATE", "CHECKED BY"] as const;

function blanksHeight(widthMm: number): number {
  return Math.ceil(BLANKS.length / (widthMm >= WIDE ? 3 : 2)) * BLANK.heightMm - PAD;
}

/** Blanks for what is done at the saw, filled from the record where it has an entry. */
function blankItems(piece: Piece, { extras, measure, widthMm }: CardFacts, box: PaperBox): DisplayItem[] {
  const columns = widthMm >= WIDE ? 3 : 2;
  const rows = Math.ceil(BLANKS.length / columns);
  const heightMm = (box.maxY - box.minY) / rows;
  const values = recorded(piece, extras);
  return BLANKS.flatMap((label, i) => {
    const [column, row] = columns === 3 ? [i % 3, Math.floor(i / 3)] : [i % 2, Math.floor(i / 2)];
    const cell = { minX: box.minX + column * BLANK.widthMm, minY: box.minY + row * heightMm, maxX: box.minX + (column + 1) * BLANK.widthMm, maxY: box.minY + (row + 1) * heightMm };
    const value = values[label];
    const lines = value ? fitText(value, BLANK.widthMm - 2 * PAD, 1, { ...BOLD, capMm: HEAD_CAP }, measure).lines : [];
    return [
      lineFrom([cell.minX, cell.minY], [cell.minX, cell.maxY], column === 0 ? EDGE_LINE : RULE_LINE), ...(row > 0 ? [lineFrom([cell.minX, cell.minY], [cell.maxX, cell.minY], RULE_LINE)] : []),
      textAt([cell.minX + PAD, cell.minY + baselineOf(0)], label),
      ...lines.map((line) => textAt([cell.minX + PAD, cell.maxY - 1.1], line, { face: "bold", capMm: HEAD_CAP })),
    ];
  });
}

function recorded(piece: Piece, { work }: SheetSetExtras): Readonly<Partial<Record<(typeof BLANKS)[number], string>>> {
  const cut = work?.entries.filter((entry: WorkRecord) => entry.kind === "cut" && entry.key === piece.key).at(-1);
  if (!cut) return {};
  return { "HEAT NO.": cut.values.heat ?? "", "READING 1": cut.values.length ?? "", "CUT BY": cut.by, DATE: cut.at.slice(0, 10) };
}
