/**
 * The weld map: the isometric with weld numbers and pieces only, and the log of every weld. On large paper a short log
 * stands under its isometric; else it follows on pages of its own.
 */
import { drawSheets } from "../draw/draw-sheets";
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import { itemMoved } from "../draw/paths";
import type { PaperBox } from "../geometry/types";
import { buildModel } from "../run/build-model";
import { textAt } from "./items";
import { isometricSheets, type DrawRoom } from "./isometric-sheets";
import { pageDraft, placePages, type PageDraft } from "./page-draft";
import { followingFrame } from "./page-frame";
import type { SheetSetExtras } from "./set-types";
import { sheetFacts, type SheetFacts } from "./sheet-facts";
import { CUT_CAP, EDGE_LINE, isSmallSheet } from "./sheet-size";
import type { SheetInput, SheetPage } from "./sheet-types";
import { setTable, tableHeight, type Table } from "./table";
import { flowTables } from "./table-flow";
import { placeTable } from "./table-placing";
import { baselineOf, fitText, PLAIN } from "./text-setting";
import { weldLogTable } from "./weld-log";

const PAD = 2;
/** A log under the isometric takes at most this share of a page. */
const LOG_SHARE = 0.45;

/** Pages of the weld map, at least one. Never throws on user data. */
export function composeWeldMapPages(input: SheetInput, measure: MeasureText, extras: SheetSetExtras = {}): SheetPage[] {
  return placePages(weldMapDrafts(sheetFacts(input, buildModel(input.document, input.marks, input.takeOuts)), extras, 1, measure));
}

/** Pages of the weld map before they are numbered. @param first number of the first of them */
export function weldMapDrafts(facts: SheetFacts, extras: SheetSetExtras, first: number, measure: MeasureText): PageDraft[] {
  const { size } = facts.input;
  const frame = followingFrame(facts, measure, [{ label: "PAGES", value: "Weld map", maxLines: 1 }]);
  const head = headItems(frame.body, measure);
  const body = { ...frame.body, minY: frame.body.minY + HEAD };
  const draw: DrawRoom = (here, later) =>
    drawSheets(facts.model, { ...here, later, measure, view: facts.input.document.view, spool: facts.input.spool, show: { items: false, welds: true, pieces: true, dimensions: false } });
  const log = weldLogTable(facts, extras);
  const under = log && !isSmallSheet(size) ? underLog(log, body, measure) : null;
  const together = under && isometricSheets(facts, { ...body, maxY: under.top }, body, draw, measure);
  if (together?.length === 1) return [pageDraft(size, frame, [...head, ...together[0]!, ...under!.items], "weld map")];
  const isometrics = isometricSheets(facts, body, body, draw, measure);
  const room = { minX: body.minX + PAD, minY: frame.body.minY + PAD, maxX: body.maxX - PAD, maxY: body.maxY - PAD };
  const logs = log ? flowTables([{ table: log, width: "full", startRow: 0 }], room, first + isometrics.length, measure).pages : [[noWelds(body)]];
  return [...isometrics.map((items) => pageDraft(size, frame, [...head, ...items], "weld map")), ...logs.map((items) => pageDraft(size, frame, items, "weld log"))];
}

/** Room of the title, mm. */
const HEAD = 9;

function headItems(body: PaperBox, measure: MeasureText): DisplayItem[] {
  const room = body.maxX - body.minX - 2 * PAD;
  const title = "WELD MAP";
  const told = fitText(HEAD_WORDS, room - measure(title, CUT_CAP, "bold") - 8, 1, PLAIN, measure).lines[0] ?? "";
  return [
    textAt([body.minX + PAD, body.minY + PAD + baselineOf(0, CUT_CAP)], title, { capMm: CUT_CAP, face: "bold" }),
    textAt([body.maxX - PAD, body.minY + PAD + baselineOf(0, CUT_CAP)], told, { anchor: "end" }),
  ];
}

const HEAD_WORDS = "Numbered along flow. One number, one joint, for ever: a deleted weld stays listed as VOID, one between 5 and 6 is 5A.";

function noWelds(body: PaperBox): DisplayItem {
  return textAt([(body.minX + body.maxX) / 2, (body.minY + body.maxY) / 2], "This spool has no weld.", { layer: "label", anchor: "middle", capMm: 3.5 });
}

/** The log standing on the strip, where it is short enough. */
function underLog(log: Table, body: PaperBox, measure: MeasureText): { readonly items: readonly DisplayItem[]; readonly top: number } | null {
  const set = setTable(log, body.maxX - body.minX - 2 * PAD, measure);
  const heightMm = tableHeight(set);
  if (heightMm > (body.maxY - body.minY) * LOG_SHARE) return null;
  const top = body.maxY - heightMm - PAD;
  const placed = placeTable(set, [0, 0], heightMm + EDGE_LINE, 0);
  return { items: placed.items.map((item) => itemMoved(item, [body.minX + PAD, top])), top: top - PAD };
}
