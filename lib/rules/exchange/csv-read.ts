/** Reads a CSV file's bytes: which characters they are, what parts its columns, how it writes decimals. Pure. */
import Papa from "papaparse";
import { textCell, type ImportTable } from "./import-cell";

export type Encoding = "utf-8" | "utf-16le" | "utf-16be" | "windows-1252";

export interface DecodedText {
  readonly text: string;
  readonly encoding: Encoding;
}

export const ENCODING_WORDS: Readonly<Record<Encoding, string>> = {
  "utf-8": "UTF-8", "utf-16le": "UTF-16", "utf-16be": "UTF-16", "windows-1252": "Windows-1252",
};

/** Bytes looked at for the zeros that give UTF-16 away. */
const LOOKED_AT = 4_000;
/** Share of zero bytes on one side from which a text without a mark is UTF-16. */
const MOSTLY = 0.4;

/** The text of a file: by its mark, by the zeros of UTF-16, as UTF-8 where that reads whole, else as Windows-1252. */
export function decodeText(bytes: Uint8Array): DecodedText {
  const encoding = encodingOf(bytes);
  return { text: new TextDecoder(encoding).decode(bytes), encoding };
}

function encodingOf(bytes: Uint8Array): Encoding {
  const [a, b] = bytes;
  if (a === 0xff && b === 0xfe) return "utf-16le";
  if (a === 0xfe && b === 0xff) return "utf-16be";
  const head = bytes.subarray(0, LOOKED_AT);
  const zeros = [0, 1].map((side) => head.filter((byte, at) => at % 2 === side && byte === 0).length / Math.max(1, head.length / 2));
  if ((zeros[1] ?? 0) > MOSTLY) return "utf-16le";
  if ((zeros[0] ?? 0) > MOSTLY) return "utf-16be";
  try {
    new TextDecoder("utf-8", { fatal: true }).decode(bytes);
    return "utf-8";
  } catch {
    return "windows-1252";
  }
}

export type Separator = "," | ";" | "\t";
export type Decimal = "point" | "comma";

export const SEPARATOR_WORDS: Readonly<Record<Separator, string>> = { ",": "comma", ";": "semicolon", "\t": "tab" };

/** The separator most lines agree on: counted outside quotes, in the first lines. */
export function guessSeparator(text: string): Separator {
  const lines = text.replace(/"(?:[^"]|"")*"/g, "").split(/\r\n|\r|\n/, 12).filter((line) => line.trim() !== "");
  const score = (separator: Separator): number => {
    const counts = lines.map((line) => line.split(separator).length - 1);
    const least = Math.min(...counts);
    return least > 0 ? 1_000 + least : counts.filter((count) => count > 0).length;
  };
  const order: readonly Separator[] = ["\t", ";", ","];
  return order.reduce((best, each) => (score(each) > score(best) ? each : best), "\t");
}

/** Comma where numbers are seen with a decimal comma and none with a decimal point. */
export function guessDecimal(table: ImportTable, separator: Separator): Decimal {
  if (separator === ",") return "point";
  const texts = table.rows.flatMap((row) => row.cells.flatMap((cell) => (cell.kind === "text" ? [cell.text.trim()] : [])));
  const commas = texts.filter((text) => /^[+-]?[\d. ]*\d,\d+( ?(mm|cm|m))?$/.test(text)).length;
  const points = texts.filter((text) => /^[+-]?\d*\.\d{1,2}( ?(mm|cm|m))?$/.test(text)).length;
  return commas > points ? "comma" : "point";
}

/** The rows of a CSV text, numbered as a spreadsheet numbers them; empty rows are left out but counted. */
export function csvTable(text: string, separator: Separator, name: string): ImportTable {
  const { data } = Papa.parse<string[]>(text.replace(/^\ufeff/, ""), { delimiter: separator });
  const rows = data.map((cells, index) => ({ row: index + 1, cells: cells.map(textCell) }));
  return { name, rows: rows.filter(({ cells }) => cells.some((cell) => cell.kind !== "empty")) };
}
