/**
 * Points of a line as rows of a file that reads back to the same line. The plain columns are for people; what they cannot
 * say goes into the Detail cell, found by reading each row back and comparing.
 */
import { formatFeetInches, parseLength, parseSlope, type Entry, type Offset, type Point, type Run, type RunDocument, type UnitSystem } from "@/iso";
import { csvCell, type Cell } from "./csv-cells";
import { detailText, leafChanges, leavesOf } from "./detail-cell";
import { plainNumber, textCell } from "./import-cell";
import { POINT_COLUMNS, type ColumnMatch, type PointColumn } from "./point-columns";
import { readPoints, type PointReaders, type ReadOptions } from "./read-points";
import { OWN_UNIT } from "./read-length";

/** The editor's own writers of cells. */
export interface PointWriters {
  readonly item: (item: Point["item"], place: "field" | "field-fit" | null, units: UnitSystem) => string;
  readonly joint: (places: Point["places"], nearSide: "in" | "out") => string;
}

/** Columns written; a move in one cell is only read. */
const WRITTEN = POINT_COLUMNS.filter(({ key }) => key !== "move");
const MATCH: ColumnMatch = WRITTEN.map(({ key }) => key);

/** Head and one row a point, in the order of the runs. */
export function pointRows(document: RunDocument, writers: PointWriters, readers: PointReaders): readonly (readonly Cell[])[] {
  const options: ReadOptions = {
    match: MATCH, heads: MATCH.map(String), form: "offset", source: "from-drawing", by: "", at: "", readers,
    unit: OWN_UNIT[document.settings.units], decimal: "point", units: document.settings.units,
  };
  const rows = document.runs.flatMap((run) =>
    run.points.map((point, index) => pointRow(document.settings.units, { run, point, index }, writers, options)));
  return [WRITTEN.map(({ head }) => head), ...rows];
}

interface Place {
  readonly run: Run;
  readonly point: Point;
  readonly index: number;
}

function pointRow(units: UnitSystem, place: Place, writers: PointWriters, options: ReadOptions): readonly Cell[] {
  const { run, point, index } = place;
  const joint = point.places.in === "field" || point.places.in === "field-fit" ? point.places.in : null;
  const cells: Partial<Record<PointColumn, Cell>> = {
    run: run.id, point: point.id, ...(index === 0 ? { runName: run.name, from: run.from ?? "" } : {}), ...offsetCells(point.offset, units),
    item: writers.item(point.item, point.item.kind === "joint" ? joint : null, units),
    // Named from its other side, so that the weld is always said in full.
    joint: writers.joint(point.places, point.places.in === undefined ? "in" : "out"),
    source: point.provenance.kind.replace("-", " "), by: point.provenance.by ?? "", date: point.provenance.at ?? "",
    tolerance: point.provenance.toleranceMm === null ? null : lengthCell({ text: "", mm: point.provenance.toleranceMm }, units),
    second: point.provenance.second === null ? null : lengthCell(point.provenance.second, units), note: point.note,
  };
  const row = (detail: string): Cell[] => MATCH.map((key) => (key === "detail" ? detail : (cells[key!] ?? null)));
  return row(detailOf(place, row(""), options));
}

/** What reading the row back would lose. */
function detailOf({ run, point, index }: Place, row: readonly Cell[], options: ReadOptions): string {
  const read = readPoints([{ row: 1, cells: row.map((cell) => textCell(csvCell(cell))) }], options).good[0];
  const base = leavesOf(read ? read.point : {});
  const changes = leafChanges(base, leavesOf(withoutId(point))).filter(([path]) => !(read && TYPED.test(path)));
  const kindSet = changes.some(([path]) => path === "item.kind");
  const whole = kindSet ? [...changes.filter(([path]) => !path.startsWith("item.")), ...leafChanges(new Map(), leavesOf(point.item, "item"))] : changes;
  const ofRun = index === 0 ? leafChanges(new Map(), leavesOf({ to: run.to, pipe: run.pipe ?? undefined }, "run")) : [];
  return detailText([...whole, ...ofRun]);
}

/** How a length was typed: the number behind it is what counts. */
const TYPED = /^(offset\.(e|n|u|length|slope)|provenance\.second)\.text$/;

function withoutId(point: Point): Omit<Point, "id"> {
  return Object.fromEntries(Object.entries(point).filter(([key]) => key !== "id")) as Omit<Point, "id">;
}

function offsetCells(offset: Offset, units: UnitSystem): Partial<Record<PointColumn, Cell>> {
  if (offset.kind === "enu" || offset.kind === "absolute") {
    const form = offset.kind === "enu" ? "offset" : "absolute";
    return { form, east: lengthCell(offset.e, units), north: lengthCell(offset.n, units), up: lengthCell(offset.u, units) };
  }
  const along = { direction: directionCell(offset.direction.text), length: lengthCell(offset.length, units) };
  if (offset.kind === "polar") return { form: "direction", ...along };
  return { form: "slope", ...along, slope: slopeCell(offset.slope) };
}

/** 005/10 would become a date; 005°/10° does not. */
function directionCell(text: string): Cell {
  return text.replace(/^(\d+(?:\.\d+)?)\/(-?\d+(?:\.\d+)?)$/, "$1\u00b0/$2\u00b0");
}

/** 1:100 reads as a time of day in a spreadsheet; "1 in 100" does not. */
function slopeCell({ text, ratio }: { readonly text: string; readonly ratio: number }): Cell {
  const plain = text.replace(/\s*:\s*/, " in ").replace(/^-/, "down ");
  const read = parseSlope(plain);
  return read.ok && read.ratio === ratio ? plain : `${ratio < 0 ? "down " : ""}${plainNumber(Math.abs(ratio) * 100)}%`;
}

/** A number where the line's own unit makes one; else as typed, unless a spreadsheet would take it for something else. */
export function lengthCell({ text, mm }: Entry, units: UnitSystem): Cell {
  if (mm === 0) return 0;
  const typed = text.trim();
  const same = (candidate: string): boolean => {
    const read = parseLength(candidate, units);
    return read.ok && read.mm === mm;
  };
  if (/^-?\d+(\.\d+)?$/.test(typed) && same(typed) && String(Number(typed)) === typed) return Number(typed);
  const tape = units === "imperial" ? formatFeetInches(mm) : "";
  if (LOOKS_LIKE_DATE.test(typed) && tape !== "" && same(tape)) return tape;
  if (typed !== "" && !LOOKS_LIKE_DATE.test(typed) && same(typed)) return typed;
  return `${mm}mm`;
}

/** 2-6, 6-1/2 and 1/2 would become dates. */
const LOOKS_LIKE_DATE = /^[-+]?\d+\s*[-/]\s*\d+(\s*[-/]\s*\d+)?$/;
