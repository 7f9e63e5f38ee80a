/**
 * Where tables go on the pages: full-width ones one under another, half-width ones each into the column that has more
 * room left, both running on to further pages with their heads repeated.
 */
import type { DisplayItem, MeasureText } from "../draw/drawing-types";
import type { PaperBox, PaperPoint } from "../geometry/types";
import { setTable, tableHeight, tableStartHeight, type Table } from "./table";
import { continuedItem, placeTable } from "./table-placing";

export interface FlowTable {
  readonly table: Table;
  readonly width: "full" | "half";
  /** First row to place; rows before it stand elsewhere. */
  readonly startRow: number;
}

/** Between two tables, mm. */
export const TABLE_GAP = 3;

interface Columns {
  readonly y: number[];
}

export interface Flowed {
  /** Display items per page; no page when there is no table. */
  readonly pages: readonly (readonly DisplayItem[])[];
  /** Sheet on which each table, by its title, begins or goes on. */
  readonly sheetOf: ReadonlyMap<string, number>;
}

/** Lays tables out on as many pages as they need; the first of them is the sheet of the given number. */
export function flowTables(tables: readonly FlowTable[], room: PaperBox, firstSheet: number, measure: MeasureText): Flowed {
  const pages: DisplayItem[][] = [];
  const sheetOf = new Map<string, number>();
  let columns: Columns = { y: [room.maxY, room.maxY] };
  const newPage = () => {
    pages.push([]);
    columns = { y: [room.minY, room.minY] };
  };
  for (const entry of tables) {
    const widthMm = entry.width === "full" ? room.maxX - room.minX : (room.maxX - room.minX - TABLE_GAP) / 2;
    const set = setTable(entry.table, widthMm, measure);
    let row: number | null = entry.startRow;
    let from: { readonly page: number; readonly at: PaperPoint } | null = null;
    while (row !== null) {
      if (pages.length === 0) newPage();
      if (entry.width === "full") columns.y.fill(Math.max(...columns.y));
      const column = entry.width === "full" ? 0 : bestColumn(columns, room, tableHeight(set));
      const y = columns.y[column]!;
      const fresh = y === room.minY;
      if (!fresh && y + tableStartHeight(set, row) > room.maxY) {
        newPage();
        continue;
      }
      const placed = placeTable(set, [room.minX + column * (widthMm + TABLE_GAP), y], room.maxY - y, row);
      const page = pages.length - 1;
      pages[page]!.push(...placed.items);
      if (!sheetOf.has(entry.table.title)) sheetOf.set(entry.table.title, firstSheet + page);
      if (from) pages[from.page]!.push(continuedItem(from.at, from.page === page ? "in the next column" : `on sheet ${firstSheet + page}`));
      from = placed.continuedAt && { page, at: placed.continuedAt };
      const next = y + placed.heightMm + TABLE_GAP;
      if (entry.width === "full") columns.y.fill(next);
      else columns.y[column] = next;
      row = placed.nextRow;
    }
  }
  return { pages, sheetOf };
}

/** The left column when the table fits there after what stands in it, else the one with more room. */
function bestColumn(columns: Columns, room: PaperBox, heightMm: number): number {
  const [left, right] = columns.y as [number, number];
  if (left <= right && left + heightMm <= room.maxY) return 0;
  return right < left ? 1 : 0;
}

export interface StackedTable {
  readonly items: readonly DisplayItem[];
  readonly heightMm: number;
  readonly nextRow: number | null;
  readonly continuedAt: PaperPoint | null;
}

/**
 * Places one table in a room of a first page.
 * @returns what was placed and the row to go on with elsewhere, or null items when not even its first row fits.
 */
export function placeInRoom(table: Table, room: PaperBox, measure: MeasureText): StackedTable {
  const set = setTable(table, room.maxX - room.minX, measure);
  const heightMm = room.maxY - room.minY;
  if (tableStartHeight(set) > heightMm) return { items: [], heightMm: 0, nextRow: 0, continuedAt: null };
  return placeTable(set, [room.minX, room.minY], heightMm, 0);
}
