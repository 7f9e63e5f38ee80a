/** Tables, set for a width: cells wrapped, columns and row heights known. Placing them is table-placing.ts's work. */
import type { DisplayItem, Face, Ink, MeasureText } from "../draw/drawing-types";
import type { PaperPoint } from "../geometry/types";
import { HEAD_CAP, TEXT_CAP } from "./sheet-size";
import { fitText, linesHeight, wrapText } from "./text-setting";

export interface Column {
  readonly head: string;
  /** Share of the width left over; every column also gets at least minMm. Columns with a share give way first when all is too wide. */
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
  /** A picture before the words, drawn about the middle of their first line from its left end. */
  readonly mark?: CellMark;
}

export interface CellMark {
  readonly widthMm: number;
  readonly items: (at: PaperPoint) => readonly DisplayItem[];
}

/** One cell: lines that each wrap by themselves. A plain string is one line. */
export type Cell = string | readonly CellLine[];

export interface Row {
  readonly cells: readonly Cell[];
  /** Struck out: a mark that is void but stays listed. */
  readonly struck?: boolean;
  /** No rule under it: the next row continues this one's text. */
  readonly open?: boolean;
  /** Room to write in by hand, mm. */
  readonly leastMm?: number;
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

export interface SetLine {
  readonly text: string;
  readonly face: Face;
  readonly capMm: number;
  readonly ink: Ink;
  /** Room kept on the left, and what stands in it; null on lines without. */
  readonly indentMm: number;
  readonly mark: CellMark | null;
}

export interface SetCell {
  readonly lines: readonly SetLine[];
  readonly heightMm: number;
}

export interface SetRow {
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

/** Inside a cell, mm. */
export const CELL_PAD_X = 1.2;
export const CELL_PAD_Y = 0.45;
/** Lines of one cell, so that no row is taller than a page; longer texts belong among the notes, which flow by the line. */
const MOST_LINES = 12;
export const TITLE_HEIGHT = linesHeight(1, HEAD_CAP) + 0.8;

/** Room for text in a column of this width, mm. */
const innerWidth = (widthMm: number): number => widthMm - 2 * CELL_PAD_X;

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
    return { cells, heightMm: Math.max(rowHeight(cells), row.leastMm ?? 0), struck: row.struck ?? false, open: row.open ?? false };
  });
  const foot = table.foot.flatMap((text) => wrapText(text, innerWidth(widthMm), { capMm: TEXT_CAP, face: "regular" }, measure));
  return { title: table.title, widthMm, columns: table.columns, edges, lead, heads, headHeightMm, rows, foot };
}

/** Columns with a share shrink to no less than this part of their least width before the others shrink too. */
const MOST_SQUEEZE = 0.6;

function columnEdges(columns: readonly Column[], widthMm: number): number[] {
  const sumOf = (some: readonly Column[]) => some.reduce((sum, column) => sum + column.minMm, 0);
  const least = sumOf(columns);
  const shares = columns.reduce((sum, column) => sum + column.share, 0);
  const spare = Math.max(0, widthMm - least);
  const yielding = sumOf(columns.filter((column) => column.share > 0));
  const part = least > widthMm ? 1 - (least - widthMm) / yielding : 1;
  const squeeze = (column: Column) => (part < MOST_SQUEEZE ? widthMm / least : column.share > 0 ? part : 1);
  const edges = [0];
  for (const column of columns) {
    edges.push(edges.at(-1)! + column.minMm * squeeze(column) + (shares > 0 ? (spare * column.share) / shares : spare / columns.length));
  }
  return edges;
}

function setCell(cell: Cell, widthMm: number, face: Face, measure: MeasureText): SetCell {
  const given = typeof cell === "string" ? [{ text: cell }] : cell;
  const lines = given.flatMap((line) => {
    const style = { face: line.face ?? face, capMm: line.capMm ?? TEXT_CAP, ink: line.ink ?? ("ink" as const) };
    const indentMm = line.mark?.widthMm ?? 0;
    return fitText(line.text, widthMm - indentMm, MOST_LINES, style, measure).lines.map((text, i) => ({ text, ...style, indentMm, mark: i === 0 ? (line.mark ?? null) : null }));
  });
  return { lines, heightMm: lines.reduce((sum, line) => sum + linesHeight(1, line.capMm), 0) };
}

const rowHeight = (cells: readonly SetCell[]): number =>
  Math.max(linesHeight(1), ...cells.map((cell) => cell.heightMm)) + 2 * CELL_PAD_Y;

/** Height of explanation lines with their padding; none takes none. */
export const blockHeight = (lines: number): number => (lines === 0 ? 0 : linesHeight(lines) + 2 * CELL_PAD_Y);

/** Height of the whole table in one piece, mm. */
export function tableHeight(table: SetTable): number {
  return table.headHeightMm + table.rows.reduce((sum, row) => sum + row.heightMm, 0) + blockHeight(table.foot.length);
}

/** A part of a table with fewer rows than this is not worth its head. */
export const FEWEST_ROWS = 3;

/** Room for the line that says where a table goes on, mm. */
export const CONTINUED_HEIGHT = blockHeight(1);

/** Height of the head and the first few rows from startRow on: what must fit for a start to make sense. */
export function tableStartHeight(table: SetTable, startRow = 0): number {
  const first = table.rows.slice(startRow, startRow + FEWEST_ROWS);
  const more = startRow + FEWEST_ROWS < table.rows.length ? CONTINUED_HEIGHT : 0;
  return table.headHeightMm + first.reduce((sum, row) => sum + row.heightMm, 0) + blockHeight(table.foot.length) + more;
}
