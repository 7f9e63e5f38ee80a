/** One cell of a file that comes in, whatever it was kept as. Pure; the readers of files make these. */

export type ImportCell =
  | { readonly kind: "empty" }
  | { readonly kind: "text"; readonly text: string }
  | { readonly kind: "number"; readonly value: number }
  | { readonly kind: "date"; readonly text: string }
  /** Cannot be used: an error value, a formula that was never worked out. `why` says what to do. */
  | { readonly kind: "bad"; readonly text: string; readonly why: string };

/** A row of the file; `row` is its number as a spreadsheet shows it, from 1. */
export interface ImportRow {
  readonly row: number;
  readonly cells: readonly ImportCell[];
}

/** A table of the file: a CSV has one, a workbook one per sheet. */
export interface ImportTable {
  readonly name: string;
  readonly rows: readonly ImportRow[];
}

export const EMPTY_CELL: ImportCell = { kind: "empty" };

export function textCell(text: string): ImportCell {
  return text.trim() === "" ? EMPTY_CELL : { kind: "text", text };
}

/** What a reader of the file sees in the cell. */
export function cellShown(cell: ImportCell | undefined): string {
  if (!cell || cell.kind === "empty") return "";
  return cell.kind === "number" ? plainNumber(cell.value) : cell.text.trim();
}

/** A number without an exponent and without the dust of binary fractions. */
export function plainNumber(value: number): string {
  const text = String(Number(value.toPrecision(12)));
  return text.includes("e") ? value.toFixed(9).replace(/\.?0+$/, "") : text;
}

/** Largest file taken in, bytes; most rows of one import; most columns looked at. */
export const IMPORT_MAX_BYTES = 8 * 1024 * 1024;
export const IMPORT_MAX_ROWS = 5_000;
export const IMPORT_MAX_COLUMNS = 60;
/** Most bytes a workbook may unpack to: far above 5 000 rows of points, far under what would stop a phone. */
export const WORKBOOK_MAX_BYTES = 32 * 1024 * 1024;

/** Why a table is not taken in, as a sentence; null when it is. The head does not count as a row. */
export function tableRefusal(table: ImportTable, headRows: number): string | null {
  const rows = table.rows.length - headRows;
  if (rows <= 0) return "There is no row in it. Choose another file or sheet.";
  if (rows > IMPORT_MAX_ROWS) return `It has ${countWords(rows)} rows; one import reads ${countWords(IMPORT_MAX_ROWS)}. Split the file and bring in one part at a time.`;
  return null;
}

/** 5 000, with a space that does not break. */
export function countWords(count: number): string {
  return String(count).replace(/\B(?=(\d{3})+$)/g, "\u00a0");
}
