/** Placing a set table: as many rows as a room allows, head and foot repeated with every part. */
import type { DisplayItem } from "../draw/drawing-types";
import type { PaperPoint } from "../geometry/types";
import { boxOutline, lineFrom, textAt } from "./items";
import { EDGE_LINE, HEAD_CAP, RULE_LINE } from "./sheet-size";
import { blockHeight, CELL_PAD_X, CELL_PAD_Y, CONTINUED_HEIGHT, FEWEST_ROWS, TITLE_HEIGHT, type SetCell, type SetRow, type SetTable } from "./table";
import { baselineOf, linesHeight } from "./text-setting";

export interface PlacedTable {
  readonly items: readonly DisplayItem[];
  readonly heightMm: number;
  /** First row that did not fit; null when the table is finished. */
  readonly nextRow: number | null;
  /** Top left of the line kept free for where it goes on; null when the table is finished. */
  readonly continuedAt: PaperPoint | null;
}

/** The line under a part of a table that goes on elsewhere. */
export function continuedItem([x, y]: PaperPoint, where: string): DisplayItem {
  return textAt([x + CELL_PAD_X, y + CELL_PAD_Y + baselineOf(0)], `Continued ${where}`, { face: "bold" });
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
  const continuedAt: PaperPoint | null = done ? null : [at[0], y];
  if (!done) y += CONTINUED_HEIGHT;
  const box = { minX: at[0], minY: at[1], maxX: at[0] + table.widthMm, maxY: y };
  return { items: [...items, boxOutline(box, { widthMm: EDGE_LINE })], heightMm: y - at[1], nextRow: done ? null : last, continuedAt };
}

/** One past the last row to place; never leaves one row alone for the next part. */
function lastRowThatFits(table: SetTable, roomMm: number, startRow: number): number {
  let used = table.headHeightMm + blockHeight(table.foot.length);
  if (used + table.rows.slice(startRow).reduce((sum, one) => sum + one.heightMm, 0) <= roomMm) return table.rows.length;
  used += CONTINUED_HEIGHT;
  let row = startRow;
  while (row < table.rows.length && (row === startRow || used + table.rows[row]!.heightMm <= roomMm)) {
    used += table.rows[row]!.heightMm;
    row += 1;
  }
  return row === table.rows.length - 1 && row - startRow > FEWEST_ROWS ? row - 1 : row;
}

function placeLines(lines: readonly string[], at: PaperPoint, layer: "caution" | "table"): DisplayItem[] {
  return lines.map((text, index) => textAt([at[0] + CELL_PAD_X, at[1] + CELL_PAD_Y + baselineOf(index)], text, { layer }));
}

function placeHead(table: SetTable, at: PaperPoint, continued: boolean): DisplayItem[] {
  const [x, y] = at;
  const title = continued ? `${table.title} (CONTINUED)` : table.title;
  const items: DisplayItem[] = [textAt([x + CELL_PAD_X, y + 0.4 + baselineOf(0, HEAD_CAP)], title, { capMm: HEAD_CAP, face: "bold" })];
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
  if (row.struck) items.push(lineFrom([x + CELL_PAD_X, y + row.heightMm / 2], [x + table.edges.at(-2)! - CELL_PAD_X, y + row.heightMm / 2], EDGE_LINE));
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
    const place = anchor === "start" ? left + CELL_PAD_X : anchor === "end" ? right - CELL_PAD_X : (left + right) / 2;
    let top = y + CELL_PAD_Y;
    return cell.lines.flatMap((line) => {
      const baseline = top + baselineOf(0, line.capMm);
      const item = textAt([place + line.indentMm, baseline], line.text, { anchor, face: line.face, capMm: line.capMm, ink: line.ink });
      top += linesHeight(1, line.capMm);
      return line.mark === null ? [item] : [...line.mark.items([place, baseline - line.capMm / 2]), item];
    });
  });
}
