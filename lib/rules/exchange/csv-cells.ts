/**
 * Cells of a CSV file on their way out. A spreadsheet runs what begins with = + - @ or a control character as a formula,
 * so such text gets an apostrophe in front (common practice); a number is a number and stays as it is.
 */
import Papa from "papaparse";

export type Cell = string | number | null;

const RUNS_AS_FORMULA = /^[=+\-@\t\r]/;

/** The text of a cell, safe to open in a spreadsheet. */
export function csvCell(value: Cell): string {
  if (value === null) return "";
  if (typeof value === "number") return Number.isFinite(value) ? String(value) : "";
  return RUNS_AS_FORMULA.test(value) ? `'${value}` : value;
}

/** The text without the apostrophe `csvCell` put before it. */
export function withoutApostrophe(text: string): string {
  return text.startsWith("'") && RUNS_AS_FORMULA.test(text.slice(1)) ? text.slice(1) : text;
}

/** Marks the file as UTF-8 for spreadsheets that would guess otherwise. */
const BYTE_ORDER_MARK = "\ufeff";

/** A whole CSV file: comma, CRLF, quoted where needed (RFC 4180), UTF-8 with its mark in front. */
export function csvFile(rows: readonly (readonly Cell[])[]): string {
  return `${BYTE_ORDER_MARK}${Papa.unparse(rows.map((row) => row.map(csvCell)), { newline: "\r\n" })}\r\n`;
}
