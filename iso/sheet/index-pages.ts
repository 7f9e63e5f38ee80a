/** The sheet index: which sheets a set or a package holds, in what revision and state, and on which page each begins. */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import type { PaperBox } from "../geometry/types";
import { fitCap, IDENTITY_HEIGHT, IDENTITY_NARROW, QR_SIDE, STACKED_TAG, type SheetPlace } from "./identity-block";
import { boxOutline, textAt } from "./items";
import { pageDraft, placePages, type PageDraft } from "./page-draft";
import { paperOf, type PageFrame } from "./page-frame";
import { qrItems } from "./qr-code";
import type { PrintWish } from "./sheet-facts";
import { EDGE_LINE, HEAD_CAP, isSmallSheet } from "./sheet-size";
import type { RevisionState, SheetPage, SheetSize, TitleBlock } from "./sheet-types";
import { STATE_SMALL_WIDTH, stateSmall, STATE_WORDS } from "./state-mark";
import type { CellLine, Row, Table } from "./table";
import { flowTables } from "./table-flow";
import { baselineOf, fitText, linesHeight } from "./text-setting";
import { issuedText } from "./title-fields";
import { blockOutline, fieldItems, setFields } from "./title-strip";

export interface IndexEntry {
  /** "" = not numbered yet. */
  readonly sheetNumber: string;
  /** "" = none yet. */
  readonly code: string;
  readonly state: RevisionState;
  readonly hold?: boolean;
  readonly title: string;
  /** Pages it has, and the page of the file it begins on, from 1; 0 = each is a file of its own. */
  readonly pages: number;
  readonly firstPage: number;
}

export interface IndexInput {
  readonly entries: readonly IndexEntry[];
  readonly titleBlock: Pick<TitleBlock, "shopName" | "client" | "project" | "jobNumber" | "area">;
  readonly size: SheetSize;
  /** What it is the index of, large: "PACKAGE 0012". */
  readonly number: string;
  /** In words: "Rack east, for erection". */
  readonly title: string;
  /** ISO time, and by whom. */
  readonly madeAt: string;
  readonly madeBy: string;
  /** Absolute address shown as a QR code; absent or "" = none. */
  readonly statusUrl?: string;
  /** Which pages of how many the index takes; absent = it stands alone. */
  readonly place?: { readonly first: number; readonly of: number };
  readonly print?: PrintWish;
}

const PAD = 2;

/** Pages of an index, at least one. The number of pages does not depend on `place` nor on the entries' pages having few or many figures. */
export function composeIndexPages(input: IndexInput, measure: MeasureText): SheetPage[] {
  const frame = indexFrame(input, measure);
  const drafts = indexDrafts(indexTable(input.entries), input.size, frame, input.place?.first ?? 1, measure);
  return placePages(drafts, input.place?.first, input.place?.of);
}

/** The index's table on as many pages of a frame as it needs. @param first number of its first page */
export function indexDrafts(table: Table, size: SheetSize, frame: PageFrame, first: number, measure: MeasureText): PageDraft[] {
  const { body } = frame;
  const room = { minX: body.minX + PAD, minY: body.minY + PAD, maxX: body.maxX - PAD, maxY: body.maxY - PAD };
  return flowTables([{ table, width: "full", startRow: 0 }], room, first, measure).pages.map((items) => pageDraft(size, frame, items, "index"));
}

const NOT_TO_WORK_TO: ReadonlySet<RevisionState> = new Set(["draft", "returned", "superseded", "void"]);

/** One row a sheet. */
export function indexTable(entries: readonly IndexEntry[], title = "SHEET INDEX"): Table {
  const pages = entries.reduce((sum, entry) => sum + entry.pages, 0);
  return {
    title, lead: ["Before work: compare each revision with its sheet's status page, by the QR code on the sheet."],
    columns: [
      { head: "NO.", share: 0, minMm: 12, align: "end" }, { head: "SHEET", share: 0.6, minMm: 30 }, { head: "REV", share: 0, minMm: 12, align: "middle" },
      { head: "STATE", share: 0, minMm: 49 }, { head: "TITLE", share: 3, minMm: 70 }, { head: "PAGES", share: 0, minMm: 17, align: "end" }, { head: "ON PAGE", share: 0, minMm: 20, align: "end" },
    ],
    rows: entries.length === 0 ? [{ cells: ["", "", "", "", "No sheets in it.", "", ""] }] : entries.map(rowOf),
    foot: [`${entries.length} ${entries.length === 1 ? "entry" : "entries"}${pages === 0 ? "" : `, ${pages} ${pages === 1 ? "page" : "pages"} without this index`}.`],
  };
}

function rowOf(entry: IndexEntry, index: number): Row {
  const { sheetNumber, code, title, pages, firstPage } = entry;
  return {
    cells: [
      String(index + 1), [{ text: sheetNumber || "not numbered", face: "bold" }], [{ text: code || "-", face: "bold" }], [stateLine(entry)], title,
      pages > 0 ? String(pages) : "-", [{ text: firstPage > 0 ? String(firstPage) : "-", face: "bold" }],
    ],
  };
}

function stateLine({ state, hold }: IndexEntry): CellLine {
  const ink = hold || NOT_TO_WORK_TO.has(state) ? "alert" : "ink";
  return { text: `${STATE_WORDS[state]}${hold ? ", HOLD" : ""}`, face: "bold", ink, mark: { widthMm: STATE_SMALL_WIDTH, items: (at) => stateSmall(state, hold ?? false, at) } };
}

/** The low strip of an index: whose it is and what it is of. */
export function indexFrame(input: Omit<IndexInput, "entries">, measure: MeasureText, word = "SHEET INDEX"): PageFrame {
  const paper = paperOf(input.size, input.print, measure);
  const { inner } = paper;
  const set = setFields(fieldsOf(input), inner.maxX - inner.minX - IDENTITY_NARROW, isSmallSheet(input.size) ? 2 : 3, 0, IDENTITY_HEIGHT, measure);
  const strip = { ...inner, minY: inner.maxY - set.heightMm };
  const fields = { ...strip, maxX: strip.maxX - IDENTITY_NARROW };
  const identity = { ...strip, minX: fields.maxX };
  return {
    body: { ...inner, maxY: strip.minY }, side: null, logoBox: null, cut: set.cut, under: [],
    over: (place) => [...paper.items, blockOutline(fields), blockOutline(identity), ...fieldItems(set, fields, 0), ...identityOf(input, place, identity, measure, word)],
  };
}

function fieldsOf({ titleBlock, title, madeAt, madeBy }: Omit<IndexInput, "entries">) {
  const field = (label: string, value: string, maxLines = 2) => ({ label, value: value.trim() === "" ? "-" : value, maxLines });
  return [
    field("SHOP", titleBlock.shopName), field("CLIENT", titleBlock.client), field("PROJECT", titleBlock.project), field("JOB NO.", titleBlock.jobNumber, 1),
    field("AREA", titleBlock.area), field("TITLE", title, 3), field("MADE", issuedText(madeAt)), field("BY", madeBy, 1),
  ];
}

/** Where a sheet's own index block stands: what it is, its number, and which page of how many. */
function identityOf(input: Omit<IndexInput, "entries">, { sheet, of }: SheetPlace, box: PaperBox, measure: MeasureText, word: string): DisplayItem[] {
  const hasCode = (input.statusUrl ?? "") !== "";
  const left = hasCode ? { ...box, maxX: box.maxX - QR_SIDE } : box;
  const tag = { minX: left.minX + 1.4, minY: left.minY + 1, maxX: left.maxX - 1.4, maxY: left.minY + 1 + STACKED_TAG };
  const number = fitCap(input.number, left.maxX - left.minX - 2.8, 4, measure);
  const second = fitText(`SHEET ${sheet} OF ${of}`, left.maxX - left.minX - 2.8, 1, { capMm: HEAD_CAP, face: "bold" }, measure).lines[0] ?? "";
  const top = tag.maxY + 0.4;
  return [
    boxOutline(tag, { layer: "title", widthMm: EDGE_LINE }),
    textAt([(tag.minX + tag.maxX) / 2, (tag.minY + tag.maxY) / 2 + 2], word, { layer: "title", anchor: "middle", capMm: 4, face: "bold" }),
    textAt([left.minX + 1.4, top + baselineOf(0, 4)], number.text, { layer: "title", capMm: number.capMm, face: "bold" }),
    textAt([left.minX + 1.4, top + linesHeight(1, 4) + baselineOf(0, HEAD_CAP)], second, { layer: "title", capMm: HEAD_CAP, face: "bold" }),
    ...(hasCode ? qrItems(input.statusUrl!, { minX: left.maxX + 0.5, minY: box.minY + 0.5, maxX: box.maxX - 0.5, maxY: box.minY + QR_SIDE - 0.5 }) : []),
  ];
}
