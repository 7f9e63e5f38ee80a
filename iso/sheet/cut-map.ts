/**
 * The cut map, for the saw: each piece a card with a scaled bar, its ends, the sum of its cut length, blanks for what is
 * done, and where it comes out of the stock; then marks of trimmed elbows, bends and turns. Cards fill pages.
 */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import type { PaperBox } from "../geometry/types";
import { spoolTurns, type Turn } from "../layout/turns";
import { buildModel } from "../run/build-model";
import { besideBlocks, rowsOf, stackedBlocks, type Block } from "./blocks";
import { barRoom, cutCards } from "./cut-card";
import { footOf, oneSize } from "./cut-list";
import { elbowCard, ELBOW_WIDTH } from "./elbow-card";
import { lineFrom, textAt } from "./items";
import { pageDraft, placePages, type PageDraft } from "./page-draft";
import { followingFrame } from "./page-frame";
import { bendsTable, fittingTurnsTable } from "./pipe-work-tables";
import type { SheetSetExtras } from "./set-types";
import { sheetFacts, type SheetFacts } from "./sheet-facts";
import { CUT_CAP, EDGE_LINE } from "./sheet-size";
import type { SheetInput, SheetPage } from "./sheet-types";
import { setTable, tableHeight } from "./table";
import { flowTables, TABLE_GAP } from "./table-flow";
import { placeTable } from "./table-placing";
import { baselineOf, linesHeight, PLAIN, wrapText } from "./text-setting";
import { issuedText } from "./title-fields";

const PAD = 2;
/** Between two cards, mm. */
const CARD_GAP = 1.6;

/** Pages of the cut map, at least one. Never throws on user data. */
export function composeCutMapPages(input: SheetInput, measure: MeasureText, extras: SheetSetExtras = {}): SheetPage[] {
  return placePages(cutMapDrafts(sheetFacts(input, buildModel(input.document, input.marks, input.takeOuts)), extras, 1, measure));
}

/** Pages of the cut map before they are numbered. @param first number of the first of them */
export function cutMapDrafts(facts: SheetFacts, extras: SheetSetExtras, first: number, measure: MeasureText): PageDraft[] {
  const frame = followingFrame(facts, measure, [{ label: "PAGES", value: "Cut map", maxLines: 1 }]);
  const room = { minX: frame.body.minX + PAD, minY: frame.body.minY + PAD, maxX: frame.body.maxX - PAD, maxY: frame.body.maxY - PAD };
  const head = headOf(facts, extras, room, measure);
  const under = { ...room, minY: room.minY + head.heightMm };
  const { pages, y } = stackedBlocks(blocksOf(facts, extras, room.maxX - room.minX, measure), under, CARD_GAP);
  const contents = withTables(pages, y, facts, under, first, measure);
  return contents.map((items) => pageDraft(facts.input.size, frame, [...head.items(room), ...items], "cut map"));
}

function blocksOf(facts: SheetFacts, extras: SheetSetExtras, widthMm: number, measure: MeasureText): readonly Block[] {
  if (facts.pieces.length === 0) return [saidBlock(facts.spool ? "This spool has no pipe to cut." : `No spool ${facts.input.spool} in this line yet.`)];
  const longest = Math.max(...facts.pieces.map((piece) => piece.cutLengthMm), 1);
  const at = { facts, extras, measure, widthMm, perMm: barRoom(widthMm) / longest };
  const turns = facts.spool ? spoolTurns(facts.model, facts.spool).filter(({ kind, radiusMm }) => kind === "trimmed" && radiusMm !== null) : [];
  return [...facts.pieces.flatMap((piece) => cutCards(piece, at)), ...elbowRows(turns, facts, widthMm, measure)];
}

function saidBlock(text: string): Block {
  return { heightMm: 20, items: (box) => [textAt([(box.minX + box.maxX) / 2, box.minY + 12], text, { layer: "label", anchor: "middle", capMm: 3.5 })] };
}

/** Trimmed elbows side by side, as many as the width takes. */
function elbowRows(turns: readonly Turn[], facts: SheetFacts, widthMm: number, measure: MeasureText): Block[] {
  const across = Math.max(1, Math.floor((widthMm + CARD_GAP) / (ELBOW_WIDTH + CARD_GAP)));
  const each = (widthMm - (across - 1) * CARD_GAP) / across;
  const cards = turns.map((turn) => elbowCard(turn, facts.input.units, each, measure));
  return rowsOf(cards, across).map((some) => besideBlocks(some, across, CARD_GAP));
}

/** Bends and turns: under the last cards where there is room, else on pages of their own. */
function withTables(pages: readonly (readonly DisplayItem[])[], y: number, facts: SheetFacts, room: PaperBox, first: number, measure: MeasureText): readonly (readonly DisplayItem[])[] {
  const tables = [bendsTable(facts), fittingTurnsTable(facts)].filter((table) => table !== null);
  const sets = tables.map((table) => setTable(table, room.maxX - room.minX, measure));
  const heightMm = sets.reduce((sum, set) => sum + tableHeight(set) + TABLE_GAP, 0);
  if (y + heightMm > room.maxY) {
    const flowed = flowTables(tables.map((table) => ({ table, width: "full", startRow: 0 })), room, first + pages.length, measure);
    return [...pages, ...flowed.pages];
  }
  let top = y + CARD_GAP;
  const items = sets.flatMap((set) => {
    const placed = placeTable(set, [room.minX, top], tableHeight(set) + EDGE_LINE, 0);
    top += placed.heightMm + TABLE_GAP;
    return placed.items;
  });
  return [...pages.slice(0, -1), [...(pages.at(-1) ?? []), ...items]];
}

const CAUTION = "VERIFY BY TAPE, TWO READINGS, BEFORE CUTTING.";
const LEAD = "Take-outs are nominal: measure the fitting in hand. Bevel, land and gap as the WPS says. Confirm heat number or PMI. Bars are to one scale along the pipe, the shortest drawn longer; the arrow is flow.";

/** Title and caution, the same on every page. */
function headOf(facts: SheetFacts, extras: SheetSetExtras, room: PaperBox, measure: MeasureText): Block {
  const title = ["CUT MAP", oneSize(facts), facts.input.units === "metric" ? "MILLIMETRES" : "INCHES"].filter((part) => part !== null).join(", ");
  const read = extras.work && extras.work.entries.some(({ kind }) => kind === "cut") ? ` Cuts as recorded ${issuedText(extras.work.readAt)}.` : "";
  const lead = wrapText([LEAD, ...footOf(facts)].join(" ") + read, room.maxX - room.minX, PLAIN, measure);
  const oneLine = measure(title, CUT_CAP, "bold") + measure(CAUTION, CUT_CAP, "bold") + 8 <= room.maxX - room.minX;
  const heads = oneLine ? 1 : 2;
  const heightMm = linesHeight(heads, CUT_CAP) + linesHeight(lead.length) + 1.6;
  return {
    heightMm: heightMm + CARD_GAP,
    items: (box) => [
      textAt([box.minX, box.minY + baselineOf(0, CUT_CAP)], title, { capMm: CUT_CAP, face: "bold" }),
      textAt(oneLine ? [box.maxX, box.minY + baselineOf(0, CUT_CAP)] : [box.minX, box.minY + baselineOf(1, CUT_CAP)], CAUTION, { layer: "caution", anchor: oneLine ? "end" : "start", capMm: CUT_CAP, face: "bold", ink: "alert" }),
      ...lead.map((line, i) => textAt([box.minX, box.minY + linesHeight(heads, CUT_CAP) + baselineOf(i)], line, { layer: "caution" })),
      lineFrom([box.minX, box.minY + heightMm], [box.maxX, box.minY + heightMm], EDGE_LINE),
    ],
  };
}
