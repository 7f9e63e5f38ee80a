/** A chosen file to tables of cells, in the browser. */
import { csvTable, decodeText, guessDecimal, guessSeparator, type Decimal, type Encoding, type Separator } from "@/lib/rules/exchange/csv-read";
import { IMPORT_MAX_BYTES, type ImportTable } from "@/lib/rules/exchange/import-cell";
import type { WorkbookRead } from "./xlsx-read";

export type FileRead =
  | { readonly ok: true; readonly kind: "csv"; readonly name: string; readonly text: string; readonly encoding: Encoding; readonly separator: Separator }
  | { readonly ok: true; readonly kind: "xlsx"; readonly name: string; readonly tables: readonly ImportTable[] }
  | { readonly ok: false; readonly message: string };

/** After this long a workbook is given up on, ms. */
const PATIENCE_MS = 30_000;
const GIVEN_UP = "Reading this workbook takes too long. Copy the points into a workbook of their own, or save the sheet as CSV.";

/** @returns what is in the file, or one sentence. Never throws. */
export async function readImportFile(file: File): Promise<FileRead> {
  if (file.size > IMPORT_MAX_BYTES) return { ok: false, message: `This file has ${Math.ceil(file.size / 1024 / 1024)} MB; a file of points has at most ${IMPORT_MAX_BYTES / 1024 / 1024} MB.` };
  const bytes = new Uint8Array(await file.arrayBuffer());
  const [a, b, c, d] = bytes;
  if (a === 0x50 && b === 0x4b) {
    const read = await readBeside(bytes);
    return read.ok ? { ...read, kind: "xlsx", name: file.name } : read;
  }
  if (a === 0xd0 && b === 0xcf && c === 0x11 && d === 0xe0) return { ok: false, message: "This is a workbook of the old XLS kind, or one with a password. Save it as XLSX or CSV without a password." };
  const { text, encoding } = decodeText(bytes);
  if (text.includes("\u0000")) return { ok: false, message: "This is neither a CSV nor an XLSX file. Save the points as one of them." };
  return { ok: true, kind: "csv", name: file.name, text, encoding, separator: guessSeparator(text) };
}

/** In a worker that is ended when it takes too long; on the page where the browser has none. */
async function readBeside(bytes: Uint8Array): Promise<WorkbookRead> {
  const worker = startWorker();
  if (!worker) return (await import("./xlsx-read")).readWorkbook(bytes);
  return new Promise((resolve) => {
    const done = (read: WorkbookRead): void => {
      clearTimeout(timer);
      worker.terminate();
      resolve(read);
    };
    const timer = setTimeout(() => done({ ok: false, message: GIVEN_UP }), PATIENCE_MS);
    worker.onmessage = (event: MessageEvent<WorkbookRead>) => done(event.data);
    worker.onerror = () => done({ ok: false, message: "The workbook could not be read here. Save the sheet as CSV and choose that." });
    worker.postMessage(bytes);
  });
}

function startWorker(): Worker | null {
  if (typeof Worker === "undefined") return null;
  try {
    return new Worker(new URL("./xlsx-worker.ts", import.meta.url), { type: "module", name: "workbook" });
  } catch {
    return null;
  }
}

export interface TableChoice {
  readonly separator: Separator;
  readonly sheet: string;
}

/** The tables of a file as it is read now. */
export function tablesOf(file: Extract<FileRead, { ok: true }>, separator: Separator): readonly ImportTable[] {
  return file.kind === "xlsx" ? file.tables : [csvTable(file.text, separator, file.name)];
}

/** A workbook keeps numbers as numbers; only text of a CSV has a decimal sign to guess. */
export function decimalOf(file: Extract<FileRead, { ok: true }>, table: ImportTable, separator: Separator): Decimal {
  return file.kind === "xlsx" ? "point" : guessDecimal(table, separator);
}
