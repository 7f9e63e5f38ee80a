/**
 * Reads a workbook in the browser, so that no server ever unpacks a stranger's zip. The parts are unpacked first within a
 * limit, each into a buffer of its stated size, and packed anew without compression; the reader sees only that copy.
 */
import { unzipSync, zipSync } from "fflate";
import type { CellValue, Workbook } from "exceljs";
import { EMPTY_CELL, IMPORT_MAX_COLUMNS, IMPORT_MAX_ROWS, textCell, WORKBOOK_MAX_BYTES, type ImportCell, type ImportTable } from "@/lib/rules/exchange/import-cell";

export type WorkbookRead = { readonly ok: true; readonly tables: readonly ImportTable[] } | { readonly ok: false; readonly message: string };

const NOT_A_WORKBOOK = "This is no XLSX workbook, or it is damaged. Open it in the spreadsheet program and save it again as XLSX or CSV.";
/** Parts of a workbook, most: a few sheets, styles, strings; a thousand is no list of points. */
const MOST_PARTS = 1_000;

/** Pictures and the like are not looked at. */
const WANTED_PART = /\.(xml|rels)$/i;

/** @returns the sheets with something on them, or one sentence. Never throws. */
export async function readWorkbook(bytes: Uint8Array): Promise<WorkbookRead> {
  const packed = repacked(bytes);
  if (!packed.ok) return packed;
  try {
    const { default: ExcelJS } = await import("exceljs");
    const book = new ExcelJS.Workbook();
    await book.xlsx.load(packed.bytes.buffer as ArrayBuffer, { ignoreNodes: ["dataValidations", "conditionalFormatting", "extLst", "drawing", "legacyDrawing", "picture", "tableParts", "hyperlinks"] });
    const tables = sheetTables(book);
    return tables.length > 0 ? { ok: true, tables } : { ok: false, message: "There is nothing on the sheets of this workbook." };
  } catch {
    return { ok: false, message: NOT_A_WORKBOOK };
  }
}

class TooLarge extends Error {}

/** The workbook unpacked within the limit and packed again plainly. */
function repacked(bytes: Uint8Array): { readonly ok: true; readonly bytes: Uint8Array } | { readonly ok: false; readonly message: string } {
  let [size, parts] = [0, 0];
  try {
    const files = unzipSync(bytes, {
      filter: ({ name, originalSize }) => {
        if (!WANTED_PART.test(name)) return false;
        size += originalSize;
        parts += 1;
        if (size > WORKBOOK_MAX_BYTES || parts > MOST_PARTS) throw new TooLarge();
        return true;
      },
    });
    return { ok: true, bytes: zipSync(files, { level: 0 }).slice() };
  } catch (error) {
    if (error instanceof TooLarge) return { ok: false, message: `This workbook unpacks to more than ${WORKBOOK_MAX_BYTES / 1024 / 1024} MB, far beyond a list of points. Copy the points into a workbook of their own.` };
    return { ok: false, message: NOT_A_WORKBOOK };
  }
}

function sheetTables(book: Workbook): ImportTable[] {
  return book.worksheets.map((sheet): ImportTable => {
    const rows: ImportTable["rows"][number][] = [];
    sheet.eachRow((row, number) => {
      // One row beyond the limit is kept, so that the limit is seen to be passed.
      if (rows.length > IMPORT_MAX_ROWS + 1) return;
      const width = Math.min(row.cellCount, IMPORT_MAX_COLUMNS);
      const cells = Array.from({ length: width }, (_, index) => importCell(row.getCell(index + 1).value));
      if (cells.some((cell) => cell.kind !== "empty")) rows.push({ row: number, cells });
    });
    return { name: sheet.name, rows };
  }).filter(({ rows }) => rows.length > 0);
}

/** A cell's value; a formula counts by the value it had when the file was saved. */
export function importCell(value: CellValue | undefined): ImportCell {
  if (value === null || value === undefined) return EMPTY_CELL;
  if (typeof value === "number") return { kind: "number", value };
  if (typeof value === "string") return textCell(value);
  if (typeof value === "boolean") return textCell(value ? "true" : "false");
  if (value instanceof Date) return { kind: "date", text: Number.isNaN(value.getTime()) ? "date" : value.toISOString().slice(0, 10) };
  if ("error" in value) return { kind: "bad", text: value.error, why: `The spreadsheet shows ${value.error} here. Mend the formula, or type the value.` };
  if ("richText" in value) return textCell(value.richText.map(({ text }) => text).join(""));
  if ("formula" in value || "sharedFormula" in value) return formulaCell(value.result as CellValue | undefined);
  return "text" in value ? importCell(value.text as CellValue) : EMPTY_CELL;
}

function formulaCell(result: CellValue | undefined): ImportCell {
  if (result !== null && result !== undefined) return importCell(result);
  return { kind: "bad", text: "formula", why: "The formula was saved without its value. Open the file in the spreadsheet program, let it work out, and save it again." };
}
