/**
 * Tables: set once for a width (cells wrapped, row heights known), then placed as often as needed, so that a long table
 * flows over pages with its head repeated. A cell's text always lies inside its cell.
 */
import type { DisplayItem, Face, Ink, MeasureText } from "../draw/drawing-types";
import type { PaperPoint } from "../geometry/types";
import { boxOutline, lineFrom, textAt } from "./items";
import { EDGE_LINE, HEAD_CAP, RULE_LINE, TEXT_CAP } from "./sheet-size";
import { baselineOf, linesHeight, wrapText } from "./text-setting";

export interface Column {
  readonly head: string;
  /** Share of the table's width; every column also gets at least minMm. */
  readonly share: number;
  readonly minMm: number;
  readonly align?: "start" | "middle" | "end";
  /** A column whose cells are boxed heavily, as the one number a reader must find. */
  readonly boxed?: boolean;
}

export interface CellLine {
  readonly text: string;
  readonly face?: Face;
  readonly capMm?: number;
  readonly ink?: Ink;
}

/** One cell: lines that each wrap by themselves. A plain string is one line. */
export type Cell = string | readonly CellLine[];

export interface Row {
  readonly cells: readonly Cell[];
  /** Struck out: a mark that is void but stays listed. */
  readonly struck?: boolean;
  /** No rule under it: the next row continues this one's text. */
  readonly open?: boolean;
}

export interface Table {
  readonly title: string;
  /** Cautions and explanations under the title, repeated with it. */
  readonly lead: readonly string[];
  /** No columns' heads are printed when all are "". */
  readonly columns: readonly Column[];
  readonly rows: readonly Row[];
  /** Under the rows, repeated with every part of the table. */
  readonly foot: readonly string[];
}

interface SetCell {
  readonly lines: readonly Required<CellLine>[];
  readonly heightMm: number;
}

interface SetRow {
  readonly cells: readonly SetCell[];
  readonly heightMm: number;
  readonly struck: boolean;
  readonly open: boolean;
}

export interface SetTable {
  readonly title: string;
  readonly widthMm: number;
  readonly columns: readonly Column[];
  /** Left edges of the columns and the right edge of the last, from the table's left. */
  readonly edges: readonly number[];
  readonly lead: readonly string[];
  readonly heads: readonly SetCell[] | null;
  readonly headHeightMm: number;
  readonly rows: readonly SetRow[];
  readonly foot: readonly string[];
}

const PAD_X = 1.2;
const PAD_Y = 0.45;
const TITLE_HEIGHT = linesHeight(1, HEAD_CAP) + 0.8;

/** Room for text in a column of this width, mm. */
const innerWidth = (widthMm: number): number => widthMm - 2 * PAD_X;

/** Wraps a table's cells for a width, mm. */
export function setTable(table: Table, widthMm: number, measure: MeasureText): SetTable {
  const edges = columnEdges(table.columns, widthMm);
  const widthOf = (index: number) => innerWidth(edges[index + 1]! - edges[index]!);
  const setCells = (cells: readonly Cell[], face: Face) => cells.map((cell, index) => setCell(cell, widthOf(index), face, measure));
  const hasHeads = table.columns.some((column) => column.head !== "");
  const heads = hasHeads ? setCells(table.columns.map((column) => column.head), "bold") : null;
  const lead = table.lead.flatMap((text) => wrapText(text, innerWidth(widthMm), { capMm: TEXT_CAP, face: "regular" }, measure));
  const headHeightMm = TITLE_HEIGHT + blockHeight(lead.length) + (heads ? rowHeight(heads) : 0);
  const rows = table.rows.map((row): SetRow => {
    const cells = setCells(row.cells, "regular");
    return { cells, heightMm: rowHeight(cells), struck: row.struck ?? false, open: row.open ?? false };
  });
  const foot = table.foot.flatMap((text) => wrapText(text, innerWidth(widthMm), { capMm: TEXT_CAP, face: "regular" }, measure));
  return { title: table.title, widthMm, columns: table.columns, edges, lead, heads, headHeightMm, rows, foot };
}

function columnEdges(columns: readonly Column[], widthMm: number): number[] {
  const least = columns.reduce((sum, column) => sum + column.minMm, 0);
  const shares = columns.reduce((sum, column) => sum + column.share, 0);
  const spare = Math.max(0, widthMm - least);
  const squeeze = least > widthMm ? widthMm / least : 1;
  const edges = [0];
  for (const column of columns) {
    edges.push(edges.at(-1)! + column.minMm * squeeze + (shares > 0 ? (spare * column.share) / shares : spare / columns.length));
  }
  return edges;
}

function setCell(cell: Cell, widthMm: number, face: Face, measure: MeasureText): SetCell {
  const given = typeof cell === "string" ? [{ text: cell }] : cell;
  const lines = given.flatMap((line) => {
    const style = { face: line.face ?? face, capMm: line.capMm ?? TEXT_CAP, ink: line.ink ?? ("ink" as const) };
    return wrapText(line.text, widthMm, style, measure).map((text) => ({ text, ...style }));
  });
  return { lines, heightMm: lines.reduce((sum, line) => sum + linesHeight(1, line.capMm), 0) };
}

const rowHeight = (cells: readonly SetCell[]): number =>
  Math.max(linesHeight(1), ...cells.map((cell) => cell.heightMm)) + 2 * PAD_Y;

/** Height of explanation lines with their padding; none takes none. */
const blockHeight = (lines: number): number => (lines === 0 ? 0 : linesHeight(lines) + 2 * PAD_Y);

/** Height of the whole table in one piece, mm. */
export function tableHeight(table: SetTable): number {
  return table.headHeightMm + table.rows.reduce((sum, row) => sum + row.heightMm, 0) + blockHeight(table.foot.length);
}

/** A part of a table with fewer rows than this is not worth its head. */
const FEWEST_ROWS = 3;

/** Height of the head and the first few rows from startRow on: what must fit for a start to make sense. */
export function tableStartHeight(table: SetTable, startRow = 0): number {
  const first = table.rows.slice(startRow, startRow + FEWEST_ROWS);
  return table.headHeightMm + first.reduce((sum, row) => sum + row.heightMm, 0) + blockHeight(table.foot.length);
}

export interface PlacedTable {
  readonly items: readonly DisplayItem[];
  readonly heightMm: number;
  /** First row that did not fit; null when the table is finished. */
  readonly nextRow: number | null;
}

/**
 * Places a table's rows from startRow on, as many as the room allows; at least one, so that flowing always ends (a row
 * taller than a page is split by whoever builds it into open rows).
 */
export function placeTable(table: SetTable, at: PaperPoint, roomMm: number, startRow: number): PlacedTable {
  const last = lastRowThatFits(table, roomMm, startRow);
  const done = last === table.rows.length;
  const items: DisplayItem[] = [...placeHead(table, at, startRow > 0)];
  let y = at[1] + table.headHeightMm;
  for (const row of table.rows.slice(startRow, last)) {
    items.push(...placeRow(table, row, [at[0], y]));
    y += row.heightMm;
  }
  if (table.foot.length > 0) {
    items.push(...placeLines(table.foot, [at[0], y], "caution"));
    y += blockHeight(table.foot.length);
  }
  const box = { minX: at[0], minY: at[1], maxX: at[0] + table.widthMm, maxY: y };
  return { items: [...items, boxOutline(box, { widthMm: EDGE_LINE })], heightMm: y - at[1], nextRow: done ? null : last };
}

/** One past the last row to place; never leaves one row alone for the next part. */
function lastRowThatFits(table: SetTable, roomMm: number, startRow: number): number {
  let used = table.headHeightMm + blockHeight(table.foot.length);
  let row = startRow;
  while (row < table.rows.length && (row === startRow || used + table.rows[row]!.heightMm <= roomMm)) {
    used += table.rows[row]!.heightMm;
    row += 1;
  }
  return row === table.rows.length - 1 && row - startRow > FEWEST_ROWS ? row - 1 : row;
}

function placeLines(lines: readonly string[], at: PaperPoint, layer: "caution" | "table"): DisplayItem[] {
  return lines.map((text, index) => textAt([at[0] + PAD_X, at[1] + PAD_Y + baselineOf(index)], text, { layer }));
}

function placeHead(table: SetTable, at: PaperPoint, continued: boolean): DisplayItem[] {
  const [x, y] = at;
  const title = continued ? `${table.title} (CONTINUED)` : table.title;
  const items: DisplayItem[] = [textAt([x + PAD_X, y + 0.4 + baselineOf(0, HEAD_CAP)], title, { capMm: HEAD_CAP, face: "bold" })];
  items.push(...placeLines(table.lead, [x, y + TITLE_HEIGHT], "caution"));
  const top = y + TITLE_HEIGHT + blockHeight(table.lead.length);
  items.push(lineFrom([x, top], [x + table.widthMm, top], EDGE_LINE));
  if (table.heads) {
    items.push(...placeCells(table, table.heads, [x, top]), lineFrom([x, y + table.headHeightMm], [x + table.widthMm, y + table.headHeightMm], EDGE_LINE));
    items.push(...columnRules(table, at[0], top, y + table.headHeightMm));
  }
  return items;
}

function placeRow(table: SetTable, row: SetRow, at: PaperPoint): DisplayItem[] {
  const [x, y] = at;
  const bottom = y + row.heightMm;
  const items = [...placeCells(table, row.cells, at), ...columnRules(table, x, y, bottom)];
  if (!row.open) items.push(lineFrom([x, bottom], [x + table.widthMm, bottom], RULE_LINE));
  if (row.struck) items.push(lineFrom([x + PAD_X, y + row.heightMm / 2], [x + table.edges.at(-2)! - PAD_X, y + row.heightMm / 2], EDGE_LINE));
  table.columns.forEach((column, index) => {
    if (!column.boxed) return;
    const box = { minX: x + table.edges[index]!, minY: y, maxX: x + table.edges[index + 1]!, maxY: bottom };
    items.push(boxOutline(box, { widthMm: EDGE_LINE * 1.6 }));
  });
  return items;
}

function columnRules(table: SetTable, x: number, top: number, bottom: number): DisplayItem[] {
  return table.edges.slice(1, -1).map((edge) => lineFrom([x + edge, top], [x + edge, bottom], RULE_LINE));
}

function placeCells(table: SetTable, cells: readonly SetCell[], [x, y]: PaperPoint): DisplayItem[] {
  return cells.flatMap((cell, index) => {
    const left = x + table.edges[index]!;
    const right = x + table.edges[index + 1]!;
    const anchor = table.columns[index]?.align ?? "start";
    const place = anchor === "start" ? left + PAD_X : anchor === "end" ? right - PAD_X : (left + right) / 2;
    let top = y + PAD_Y;
    return cell.lines.map((line) => {
      const item = textAt([place, top + baselineOf(0, line.capMm)], line.text, { anchor, face: line.face, capMm: line.capMm, ink: line.ink });
      top += linesHeight(1, line.capMm);
      return item;
    });
  });
}
