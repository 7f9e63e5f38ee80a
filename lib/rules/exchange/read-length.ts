/** Reads a length cell of a file into an entry of the line. Numbers take the unit chosen for the file; text may name its own. */
import { parseLength, type Entry, type UnitSystem } from "@/iso";
import type { Decimal } from "./csv-read";
import { withoutApostrophe } from "./csv-cells";
import { plainNumber, type ImportCell } from "./import-cell";

/** What a bare number of the file is in. Inches also read feet and inches as on a tape: 2'-6 1/2", 2-6 1/2. */
export type FileUnit = "in" | "ft" | "mm" | "cm" | "m";

export const FILE_UNITS: readonly { readonly value: FileUnit; readonly label: string }[] = [
  { value: "in", label: "feet and inches, or inches" }, { value: "ft", label: "feet" }, { value: "mm", label: "millimetres" },
  { value: "cm", label: "centimetres" }, { value: "m", label: "metres" },
];

const SUFFIX: Readonly<Record<FileUnit, string>> = { in: `"`, ft: "'", mm: "mm", cm: "cm", m: "m" };
/** The unit a line's own bare numbers are in. */
export const OWN_UNIT: Readonly<Record<UnitSystem, FileUnit>> = { imperial: "in", metric: "mm" };

export interface LengthReading {
  readonly unit: FileUnit;
  readonly decimal: Decimal;
  readonly units: UnitSystem;
}

export type ReadCell<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly message: string };

const MONTH = "(?:jan|feb|mar|apr|may|jun|jul|aug|sep|oct|nov|dec)[a-z]*";
const DATE_TEXT = new RegExp(`^(?:\\d{1,4}[-/. ]${MONTH}(?:[-/. ]\\d{2,4})?|${MONTH}[-/. ]\\d{1,4}|\\d{4}-\\d{1,2}-\\d{1,2}.*|\\d{1,2}[/.]\\d{1,2}[/.]\\d{2,4})$`, "i");
export const DATE_MESSAGE = `This is a date: a spreadsheet took a length such as 2-6 for one. Set the column to text and type it again, best as 2'-6".`;

/** @returns the entry in the line's own words and millimetres, or one sentence that says what to do. Never throws. */
export function readLength(cell: ImportCell, reading: LengthReading): ReadCell<Entry> {
  if (cell.kind === "date") return { ok: false, message: DATE_MESSAGE };
  if (cell.kind === "bad") return { ok: false, message: cell.why };
  if (cell.kind === "empty") return { ok: true, value: { text: "", mm: 0 } };
  if (cell.kind === "number") return entryOf(numberText(cell.value, reading), reading.units);
  const text = plainText(cell.text, reading);
  if (DATE_TEXT.test(text)) return { ok: false, message: DATE_MESSAGE };
  if (/^[+-]?(?:\d+\.?\d*|\.\d+)$/.test(text)) return entryOf(bareText(text, reading), reading.units);
  return foreignEntry(text, reading);
}

/** A number in the line's own unit stands bare; another unit is named with it. */
function bareText(text: string, { unit, units }: LengthReading): string {
  const plain = text.replace(/^\+/, "");
  return unit === OWN_UNIT[units] ? plain : `${plain}${SUFFIX[unit]}`;
}

function numberText(value: number, reading: LengthReading): string {
  return bareText(plainNumber(value), reading);
}

function entryOf(text: string, units: UnitSystem): ReadCell<Entry> {
  const length = parseLength(text, units);
  return length.ok ? { ok: true, value: { text, mm: length.mm } } : { ok: false, message: length.message };
}

/** Text that names its units or writes feet and inches: read in the file's system, kept so that the line reads it the same. */
function foreignEntry(text: string, { unit, units }: LengthReading): ReadCell<Entry> {
  const system: UnitSystem = unit === "in" || unit === "ft" ? "imperial" : "metric";
  const length = parseLength(text, system);
  if (!length.ok) return { ok: false, message: length.message };
  const here = parseLength(text, units);
  const kept = here.ok && here.mm === length.mm ? text : `${plainNumber(length.mm)}mm`;
  return { ok: true, value: { text: kept, mm: length.mm } };
}

/** One kind of space, no thousands marks, a point for decimals. */
function plainText(raw: string, { decimal, unit }: LengthReading): string {
  let text = withoutApostrophe(raw.trim()).replace(/(\d)[\u00a0\u202f](?=\d{3}(?!\d))/g, "$1").replace(/\s+/g, " ").trim();
  if (unit !== "in" && unit !== "ft") text = text.replace(/^([+-]?\d{1,3})((?: \d{3})+)(?!\d)/, (_, head: string, rest: string) => head + rest.replace(/ /g, ""));
  if (decimal === "comma") return text.replace(/(\d)\.(?=\d{3}(?!\d))/g, "$1").replace(/(\d),(?=\d)/g, "$1.");
  return text.replace(/^([+-]?\d{1,3})((?:,\d{3})+)(?!\d)/, (_, head: string, rest: string) => head + rest.replace(/,/g, ""));
}
