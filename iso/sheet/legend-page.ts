/** The legend page: the symbols and marks this spool uses, the lines, states and end cuts as they are drawn, and what the letters stand for. */
import type { DisplayItem, LegendKey, MeasureText } from "../draw/drawing-types";
import { itemMoved } from "../draw/paths";
import { NEIGHBOUR_DASH } from "../draw/pipe";
import type { PaperPoint } from "../geometry/types";
import { buildModel } from "../run/build-model";
import type { Piece, PieceEnd } from "../run/model-types";
import { besideBlocks, rowsOf, stackedBlocks, type Block } from "./blocks";
import { barItems, BAR_HEIGHT } from "./cut-bar";
import { likelyLegend } from "./isometric-sheets";
import { itemScaled } from "./item-scaled";
import { lineFrom, pathOf, polygonOf, textAt } from "./items";
import { LEGEND_WORDS } from "./legend";
import { legendPicture, pictureRoom } from "./legend-pictures";
import { ABBREVIATIONS, END_CUTS, WELD_TYPES } from "./legend-words";
import { pageDraft, placePages, type PageDraft } from "./page-draft";
import { followingFrame } from "./page-frame";
import { sheetFacts, type SheetFacts } from "./sheet-facts";
import { EDGE_LINE, HEAD_CAP, TEXT_CAP } from "./sheet-size";
import type { RevisionState, SheetInput, SheetPage } from "./sheet-types";
import { STATE_WORDS, stateTag } from "./state-mark";
import { setTable, tableHeight, type Table } from "./table";
import { TABLE_GAP } from "./table-flow";
import { placeTable } from "./table-placing";
import { baselineOf, linesHeight, PLAIN, wrapText } from "./text-setting";

const PAD = 2;
/** Least width of a word with its meaning, mm. */
const PAIR_LEAST = 118;
const ROW = 12.6;
const CELL_LEAST = 76;
/** Pictures stand larger here than in the strip under a drawing. */
const SCALE = 1.35;

/** Pages of the legend, at least one. Never throws on user data. */
export function composeLegendPages(input: SheetInput, measure: MeasureText): SheetPage[] {
  return placePages(legendDrafts(sheetFacts(input, buildModel(input.document, input.marks, input.takeOuts)), measure));
}

/** Pages of the legend before they are numbered. */
export function legendDrafts(facts: SheetFacts, measure: MeasureText): PageDraft[] {
  const { size } = facts.input;
  const frame = followingFrame(facts, measure, [{ label: "PAGES", value: "Legend", maxLines: 1 }]);
  const { body } = frame;
  const room = { minX: body.minX + PAD, minY: body.minY + PAD, maxX: body.maxX - PAD, maxY: body.maxY - PAD };
  const across = Math.max(1, Math.floor((room.maxX - room.minX) / CELL_LEAST));
  const cellMm = (room.maxX - room.minX) / across;
  const pairs = Math.max(1, Math.floor((room.maxX - room.minX) / PAIR_LEAST));
  const words = (title: string, rows: Parameters<typeof wordTable>[1]) => tableBlock(wordTable(title, rows, pairs), room.maxX - room.minX, measure);
  const blocks = [...pictures(facts, across, cellMm, measure), words("JOINTS ON THIS SPOOL", jointRows(facts)), ...states(facts, across, measure), words("ABBREVIATIONS", ABBREVIATIONS)];
  return stackedBlocks(blocks, room, 0).pages.map((items) => pageDraft(size, frame, items, "legend"));
}

function tableBlock(table: Table, widthMm: number, measure: MeasureText): Block {
  const set = setTable(table, widthMm, measure);
  const heightMm = tableHeight(set);
  return { heightMm: heightMm + TABLE_GAP, items: (box) => [...placeTable(set, [box.minX, box.minY + TABLE_GAP], heightMm + EDGE_LINE, 0).items] };
}

function pictures(facts: SheetFacts, across: number, cellMm: number, measure: MeasureText): Block[] {
  const symbols = likelyLegend(facts).map((key) => symbolCell(key, cellMm, measure));
  const ends = END_CUTS.map(([name, text]) => endCell(name, text, cellMm, measure));
  return [...section("SYMBOLS AND MARKS ON THIS SPOOL", symbols, across), ...section("LINES", lineCells(cellMm, measure), across), ...section("ENDS OF CUT PIECES", ends, across)];
}

function states(facts: SheetFacts, across: number, measure: MeasureText): Block[] {
  return section("STATES OF A REVISION", (Object.keys(STATE_WORDS) as RevisionState[]).map((state) => stateCell(facts, state, measure)), across);
}

/** Cells in rows under a title that stays with the first of them. */
function section(title: string, cells: readonly Block[], across: number): Block[] {
  const [first, ...rows] = rowsOf(cells, across).map((some) => besideBlocks(some, across, 0));
  return first ? [under(titleBlock(title), first), ...rows] : [];
}

function under(a: Block, b: Block): Block {
  return { heightMm: a.heightMm + b.heightMm, items: (box) => [...a.items({ ...box, maxY: box.minY + a.heightMm }), ...b.items({ ...box, minY: box.minY + a.heightMm })] };
}

function titleBlock(title: string): Block {
  return { heightMm: linesHeight(1, HEAD_CAP) + 1.6, items: (box) => [textAt([box.minX, box.minY + 1 + baselineOf(0, HEAD_CAP)], title, { capMm: HEAD_CAP, face: "bold" })] };
}

/** A picture about the middle of its room, and its words beside it on two lines at most. */
function cell(picture: (at: PaperPoint) => readonly DisplayItem[], roomMm: number, words: string, cellMm: number, measure: MeasureText): Block {
  const lines = wrapText(words, cellMm - roomMm - 3, PLAIN, measure).slice(0, 3);
  return {
    heightMm: Math.max(ROW, linesHeight(lines.length) + 1),
    items: (box) => {
      const middle = (box.minY + box.maxY) / 2;
      const top = middle - linesHeight(lines.length) / 2;
      return [...picture([box.minX + roomMm / 2, middle]), ...lines.map((line, i) => textAt([box.minX + roomMm + 1, top + baselineOf(i) - 0.1 * TEXT_CAP], line))];
    },
  };
}

function symbolCell(key: LegendKey, cellMm: number, measure: MeasureText): Block {
  const picture = ([x, y]: PaperPoint) => legendPicture(key, [0, 0]).map((item) => itemMoved(itemScaled(item, SCALE), [x, y]));
  return cell(picture, Math.max(18, pictureRoom(key) * SCALE + 2), LEGEND_WORDS[key], cellMm, measure);
}

const LINE_ROOM = 26;

function lineCells(cellMm: number, measure: MeasureText): Block[] {
  const plain = (widthMm: number, dash?: readonly number[], ink: "ink" | "grey" | "dye" = "ink") => ([x, y]: PaperPoint): DisplayItem[] => [lineFrom([x - 11, y], [x + 11, y], widthMm, "table", ink, dash)];
  const rows: readonly (readonly [(at: PaperPoint) => readonly DisplayItem[], string])[] = [
    [plain(0.7), "pipe of this spool, one line whatever its size"], [plain(0.7, NEIGHBOUR_DASH, "grey"), "pipe outside this spool"],
    [dimensionPicture, "dimension, to centre lines and contact faces"], [plain(0.2), "leader, from a mark to what it marks"],
    [plain(0.25, [6, 1.2, 1, 1.2]), "centre line on bench pages"], [plain(0.25, [2, 1.2], "dye"), "diagonal, or what is cut away"],
    [crossingPicture, "the rear pipe breaks where two cross"], [hatchPicture, "plane of an offset: level or upright"],
  ];
  return rows.map(([picture, words]) => cell(picture, LINE_ROOM, words, cellMm, measure));
}

function dimensionPicture([x, y]: PaperPoint): DisplayItem[] {
  const arrow = (at: number, way: 1 | -1) => polygonOf([[at, y + 1], [at + way * 2.6, y + 0.4], [at + way * 2.6, y + 1.6]], { stroke: null, fill: "ink" });
  return [lineFrom([x - 11, y + 1], [x + 11, y + 1], 0.3), arrow(x - 11, 1), arrow(x + 11, -1), ...[-11, 11].map((d) => lineFrom([x + d, y - 2], [x + d, y + 2.6], 0.22)), textAt([x, y - 0.4], `1'-6"`, { anchor: "middle" })];
}

function crossingPicture([x, y]: PaperPoint): DisplayItem[] {
  return [lineFrom([x - 9, y - 3], [x + 9, y + 3], 0.7), lineFrom([x - 9, y + 3], [x - 2.4, y + 0.8], 0.7), lineFrom([x + 2.4, y - 0.8], [x + 9, y - 3], 0.7)];
}

function hatchPicture([x, y]: PaperPoint): DisplayItem[] {
  const strokes = [1, 2, 3, 4, 5, 6].map((i) => lineFrom([x - 8 + i * 2.2, y + 4], [x - 8 + i * 2.2, y + 4 - i * 1.1], 0.18));
  return [lineFrom([x - 8, y + 4], [x + 8, y - 4], 0.7), pathOf([{ op: "M", to: [x - 8, y + 4] }, { op: "L", to: [x + 8, y + 4] }, { op: "L", to: [x + 8, y - 4] }], { widthMm: 0.25 }), ...strokes];
}

/** An end as the cut map draws it, the other end square. */
function endCell(name: string, words: string, cellMm: number, measure: MeasureText): Block {
  const end: PieceEnd = { prep: name.toLowerCase() as PieceEnd["prep"], jointKey: null, ...(name === "MITRE" ? { cutAngleDeg: 22.5 } : {}) };
  const piece = { ends: [end, { prep: "square", jointKey: null }], cutLengthMm: 1 } as unknown as Piece;
  return cell(([x, y]) => barItems(piece, [x - 10, y - BAR_HEIGHT / 2], 20), LINE_ROOM, `${name}: ${words}`, cellMm, measure);
}

function stateCell({ input }: SheetFacts, state: RevisionState, measure: MeasureText): Block {
  const revision: SheetInput["revision"] = { ...input.revision, state, hold: false };
  return { heightMm: 17, items: (box) => stateTag(revision, { minX: box.minX + 1, minY: box.minY + 1.4, maxX: Math.min(box.maxX - 4, box.minX + 66), maxY: box.minY + 15.6 }, measure) };
}

/** Words and what they mean, so many pairs side by side, read down. */
function wordTable(title: string, rows: readonly (readonly [string, string])[], pairs: number): Table {
  const down = Math.ceil(rows.length / pairs);
  const across = Math.min(pairs, Math.ceil(rows.length / Math.max(1, down)));
  return {
    title, lead: [], columns: Array.from({ length: across }, () => [{ head: "", share: 0, minMm: 36 }, { head: "", share: 1, minMm: 40 }]).flat(),
    rows: Array.from({ length: down }, (_, row) => ({
      cells: Array.from({ length: across }, (_, column) => rows[column * down + row] ?? ["", ""]).flatMap(([left, right]) => [[{ text: left, face: "bold" as const }], right]),
    })),
    foot: [],
  };
}

/** Joints of the kinds this spool has. */
function jointRows({ model, input }: SheetFacts): (readonly [string, string])[] {
  const kinds = new Set(model.joints.filter((joint) => joint.spool === input.spool).map(({ kind }) => kind));
  return (Object.keys(WELD_TYPES) as (keyof typeof WELD_TYPES)[]).filter((kind) => kinds.size === 0 || kinds.has(kind)).map((kind) => [kind, WELD_TYPES[kind]] as const);
}
