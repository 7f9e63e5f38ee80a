/** Reads where a row's point lies: offsets, a direction and a length, a slope, a position, or a move in one cell. */
import { parseDirection, parseSlope, type Entry, type Offset, type UnitSystem } from "@/iso";
import { withoutApostrophe } from "./csv-cells";
import { cellShown, plainNumber, type ImportCell } from "./import-cell";
import type { PointColumn } from "./point-columns";
import { DATE_MESSAGE, readLength, type LengthReading } from "./read-length";

/** Direction of the leg before, for a length without one. */
export interface StraightOn {
  readonly text: string;
  readonly e: number;
  readonly n: number;
  readonly u: number;
}

export interface OffsetReading extends LengthReading {
  readonly form: "offset" | "absolute";
  readonly straightOn: StraightOn | null;
  /** Whether the row is its run's first, which may stand where the run starts. */
  readonly first: boolean;
  readonly readers: { readonly move: (text: string, units: UnitSystem, straightOn: StraightOn | null) => Result<Offset> };
}

type Result<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly message: string };
type OffsetRead = { readonly ok: true; readonly value: Offset } | { readonly ok: false; readonly column: PointColumn; readonly message: string };
type Cells = (key: PointColumn) => ImportCell;

const fault = (column: PointColumn, message: string): OffsetRead => ({ ok: false, column, message });
const shown = (cells: Cells, key: PointColumn): string => withoutApostrophe(cellShown(cells(key)));

const FORMS: Readonly<Record<string, "offset" | "absolute" | "direction" | "slope">> = {
  offset: "offset", offsets: "offset", enu: "offset", relative: "offset", delta: "offset",
  absolute: "absolute", position: "absolute", coordinates: "absolute",
  direction: "direction", polar: "direction", slope: "slope", sloped: "slope",
};

/** @returns the offset, or the column at fault with one sentence that says what to do. Never throws. */
export function readOffset(cells: Cells, reading: OffsetReading): OffsetRead {
  const given = (key: PointColumn): boolean => cells(key).kind !== "empty";
  const [axes, along] = [given("east") || given("north") || given("up"), given("direction") || given("length") || given("slope")];
  const word = shown(cells, "form").toLowerCase();
  const named = FORMS[word];
  if (word !== "" && !named) return fault("form", "Write offset, absolute, direction or slope, or leave it empty.");
  if (given("move") && (axes || along)) return fault("move", "The row gives its move twice. Keep the move cell or the other columns.");
  if (given("move")) return moveOffset(cells, reading);
  if (named === "direction" || named === "slope" || (!named && along && !axes)) return alongOffset(cells, reading);
  if (!named && along && axes) return fault("direction", "The row gives offsets and a direction with a length. Keep one of them, or add a Form column that says which counts.");
  if (axes) return axesOffset(cells, reading, named === "absolute" || (!named && reading.form === "absolute") ? "absolute" : "enu");
  if (reading.first && !named) return axesOffset(cells, reading, "enu");
  return fault("east", "The row has no dimension. Give east, north and up, or a direction and a length; write 0 where it stays in place.");
}

function moveOffset(cells: Cells, reading: OffsetReading): OffsetRead {
  const cell = cells("move");
  if (cell.kind === "date") return fault("move", DATE_MESSAGE);
  const read = reading.readers.move(shown(cells, "move"), reading.units, reading.straightOn);
  return read.ok ? read : fault("move", read.message);
}

function axesOffset(cells: Cells, reading: OffsetReading, kind: "enu" | "absolute"): OffsetRead {
  const entries: Entry[] = [];
  for (const key of ["east", "north", "up"] as const) {
    if (kind === "absolute" && cells(key).kind === "empty") return fault(key, "A position needs east, north and up; write 0 where it is zero.");
    const read = readLength(cells(key), reading);
    if (!read.ok) return fault(key, read.message);
    entries.push(read.value);
  }
  const [e, n, u] = entries as [Entry, Entry, Entry];
  return { ok: true, value: { kind, e, n, u } };
}

function alongOffset(cells: Cells, reading: OffsetReading): OffsetRead {
  const direction = directionOf(cells, reading);
  if (!direction.ok) return fault("direction", direction.message);
  if (cells("length").kind === "empty") return fault("length", "The row has a direction and no length. Give the length.");
  const length = readLength(cells("length"), reading);
  if (!length.ok) return fault("length", length.message);
  if (cells("slope").kind === "empty") return { ok: true, value: { kind: "polar", direction: direction.value, length: length.value } };
  const slope = slopeOf(cells("slope"));
  if (!slope.ok) return fault("slope", slope.message);
  const { text, e, n, u } = direction.value;
  if (u !== 0) return fault("direction", `A slope goes with a level direction, such as E or N30E; ${text} climbs by itself.`);
  return { ok: true, value: { kind: "slope", direction: { text, e, n, u: 0 }, length: length.value, slope: slope.value } };
}

function directionOf(cells: Cells, reading: OffsetReading): Result<StraightOn> {
  const cell = cells("direction");
  if (cell.kind === "empty") return reading.straightOn ? { ok: true, value: reading.straightOn } : { ok: false, message: "There is no row before it to go straight on from. Give a direction, such as E or UN." };
  if (cell.kind === "date") return { ok: false, message: "This is a date: a spreadsheet took a direction such as 10/5 for one. Set the column to text and type it again." };
  const typed = shown(cells, "direction");
  const read = parseDirection(typed);
  if (!read.ok) return read;
  const scale = 1 / Math.hypot(read.e, read.n, read.u);
  return { ok: true, value: { text: typed.replace(/\u00b0/g, "").toUpperCase(), e: read.e * scale, n: read.n * scale, u: read.u * scale } };
}

/** A number is rise over run, as a spreadsheet keeps 2 %. */
function slopeOf(cell: ImportCell): Result<{ text: string; ratio: number }> {
  if (cell.kind === "date") return { ok: false, message: "This is a time or a date: a spreadsheet took a slope such as 1:100 for one. Type it as 1 in 100." };
  const text = cell.kind === "number" ? `${plainNumber(cell.value * 100)}%` : withoutApostrophe(cellShown(cell));
  const read = parseSlope(text);
  return read.ok ? { ok: true, value: { text, ratio: read.ratio } } : read;
}
