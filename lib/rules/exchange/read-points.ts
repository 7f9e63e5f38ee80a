/**
 * Rows of a file to points of a line. Every row is read by itself as far as it can be; a row that is not understood is
 * named with its column, its value and what to do, and gives no point. Pure: the readers of the editor's cells are handed in.
 */
import { pointSchema, type Offset, type Point, type Provenance, type UnitSystem } from "@/iso";
import { withoutApostrophe } from "./csv-cells";
import { parseDetail, withLeaves, type Leaf } from "./detail-cell";
import { cellShown, EMPTY_CELL, type ImportCell, type ImportRow } from "./import-cell";
import { readOffset, type StraightOn } from "./read-offset";
import type { ColumnMatch, PointColumn } from "./point-columns";
import { readLength, type LengthReading, type ReadCell } from "./read-length";

type Read<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly message: string };

/** The editor's own readers, so that a file and the grid understand the same words. */
export interface PointReaders {
  readonly move: (text: string, units: UnitSystem, straightOn: StraightOn | null) => Read<Offset>;
  readonly item: (text: string, units: UnitSystem) => Read<{ readonly item: Point["item"]; readonly place: "field" | "field-fit" | null }>;
  readonly joint: (text: string, nearSide: "in" | "out") => Read<Point["places"]>;
  readonly source: (text: string) => Read<Provenance["kind"]>;
  readonly straightOn: (offset: Offset) => StraightOn | null;
}

export interface ReadOptions extends LengthReading {
  readonly match: ColumnMatch;
  readonly heads: readonly string[];
  /** What east, north and up are where the row does not say. */
  readonly form: "offset" | "absolute";
  readonly source: Provenance["kind"];
  readonly by: string;
  readonly at: string;
  readonly readers: PointReaders;
}

/** A row that gives a point. Names are the file's own; ids come when it is put into a line. */
export interface GoodRow {
  readonly row: number;
  readonly run: string;
  readonly runName: string;
  readonly from: string;
  readonly label: string;
  readonly point: Omit<Point, "id">;
  /** Changes of the run itself, from its first row. */
  readonly runChanges: readonly (readonly [string, Leaf | undefined])[];
}

export interface RowFault {
  readonly row: number;
  readonly column: string;
  readonly value: string;
  readonly message: string;
}

export interface PointsRead {
  readonly good: readonly GoodRow[];
  readonly faults: readonly RowFault[];
  /** Rows that give no point: each stands once, however many faults it has. */
  readonly badRows: readonly number[];
}

/** @returns points of the rows that read, faults of those that do not, in the order of the file. Never throws. */
export function readPoints(rows: readonly ImportRow[], options: ReadOptions): PointsRead {
  const good: GoodRow[] = [];
  const faults: RowFault[] = [];
  const onward = new Map<string, StraightOn>();
  const started = new Set<string>();
  for (const row of rows) {
    const read = new RowReader(row, options);
    const run = read.text("run");
    const point = read.point(started.has(run) ? (onward.get(run) ?? null) : null, !started.has(run), started.size > 0 && !started.has(run));
    started.add(run);
    faults.push(...read.faults);
    if (!point) continue;
    const next = options.readers.straightOn(point.point.offset);
    if (next) onward.set(run, next);
    good.push(point);
  }
  return { good, faults, badRows: [...new Set(faults.map((fault) => fault.row))] };
}

const NOTE_LIMIT = 2_000;
const TEXT_LIMIT = 120;

/** Reads one row's cells by what they mean and gathers what is wrong with them. */
class RowReader {
  readonly faults: RowFault[] = [];

  constructor(private readonly row: ImportRow, private readonly options: ReadOptions) {}

  private cell(key: PointColumn): ImportCell {
    return this.row.cells[this.options.match.indexOf(key)] ?? EMPTY_CELL;
  }

  text(key: PointColumn): string {
    return withoutApostrophe(cellShown(this.cell(key)));
  }

  private fault(key: PointColumn, message: string): null {
    const column = this.options.heads[this.options.match.indexOf(key)]?.trim() || columnName(this.options.match.indexOf(key));
    this.faults.push({ row: this.row.row, column, value: cellShown(this.cell(key)), message });
    return null;
  }

  /** The value of a reading, or null with its fault noted. */
  private taken<T>(key: PointColumn, read: Read<T>): T | null {
    return read.ok ? read.value : this.fault(key, read.message);
  }

  /** @param branch whether this row starts a run that is not the file's first. */
  point(straightOn: StraightOn | null, first: boolean, branch: boolean): GoodRow | null {
    for (const key of this.options.match) {
      const cell = key ? this.cell(key) : EMPTY_CELL;
      if (key && cell.kind === "bad") this.fault(key, cell.why);
    }
    const offset = this.offset(straightOn, first);
    const item = this.read("item", (text) => this.options.readers.item(text, this.options.units));
    const joint = this.read("joint", (text) => this.options.readers.joint(text, first && !branch ? "out" : "in"));
    const provenance = this.provenance();
    const note = this.limited("note", NOTE_LIMIT);
    const [run, runName, from, label] = [this.limited("run", TEXT_LIMIT), this.limited("runName", TEXT_LIMIT), this.text("from"), this.text("point")];
    const detail = this.read("detail", parsedDetail);
    if (branch && from === "" && this.faults.length === 0) this.fault(this.options.match.includes("from") ? "from" : "run", `Run "${run}" is a branch: name the point it leaves from in its first row.`);
    if (this.faults.length > 0 || !offset || !provenance) return null;
    const places = joint ?? (item?.place ? { in: item.place } : {});
    const plain = { offset, item: item?.item ?? { kind: "none" as const }, places, trimMm: null, provenance, note: note ?? "" };
    const point = this.withDetail(plain, detail ?? []);
    return point ? { row: this.row.row, run: run ?? "", runName: runName ?? "", from, label, point, runChanges: runPart(detail ?? []) } : null;
  }

  /** Null for an empty cell and for one with a fault. */
  private read<T>(key: PointColumn, reader: (text: string) => Read<T>): T | null {
    const text = this.text(key);
    if (text === "" || this.cell(key).kind === "bad") return null;
    return this.taken(key, reader(text));
  }

  private limited(key: PointColumn, most: number): string | null {
    const text = this.text(key);
    return text.length > most ? this.fault(key, `It has ${text.length} characters; shorten it to ${most}.`) : text;
  }

  private offset(straightOn: StraightOn | null, first: boolean): Offset | null {
    const cells = (key: PointColumn): ImportCell => this.cell(key);
    const read = readOffset(cells, { ...this.options, straightOn, first });
    if (read.ok) return read.value;
    if (this.cell(read.column).kind === "bad") return null;
    const column = this.options.match.includes(read.column) ? read.column : (this.options.match.find((key) => key !== null && DIMENSIONS.includes(key)) ?? read.column);
    return this.fault(column, read.message);
  }

  private provenance(): Provenance | null {
    const kind = this.read("source", this.options.readers.source) ?? this.options.source;
    const [tolerance, second] = [this.length("tolerance"), this.length("second")];
    if (tolerance && tolerance.mm < 0) this.fault("tolerance", "A tolerance is not under zero.");
    return {
      kind, toleranceMm: tolerance?.mm ?? null, by: this.limited("by", TEXT_LIMIT) || (this.options.match.includes("by") ? null : this.options.by),
      at: this.text("date").slice(0, 40) || (this.options.match.includes("date") ? null : this.options.at), second,
    };
  }

  private length(key: PointColumn): { text: string; mm: number } | null {
    const cell = this.cell(key);
    return cell.kind === "empty" || cell.kind === "bad" ? null : this.taken(key, readLength(cell, this.options));
  }

  private withDetail(plain: Omit<Point, "id">, changes: readonly (readonly [string, Leaf | undefined])[]): Omit<Point, "id"> | null {
    const own = changes.filter(([path]) => !path.startsWith("run.") && path !== "id");
    if (own.length === 0) return plain;
    const base = own.some(([path]) => path === "item.kind") ? { ...plain, item: {} } : plain;
    const parsed = pointSchema.safeParse({ id: "p", ...withLeaves(base as never, own) });
    if (!parsed.success) return this.fault("detail", `${parsed.error.issues[0]?.path.join(".") ?? "It"} does not fit the item. Leave the cell as it was written, or empty it.`);
    return Object.fromEntries(Object.entries(parsed.data).filter(([key]) => key !== "id")) as Omit<Point, "id">;
  }
}

const DIMENSIONS: readonly PointColumn[] = ["east", "north", "up", "direction", "length", "move"];

function parsedDetail(text: string): ReadCell<readonly (readonly [string, Leaf | undefined])[]> {
  const read = parseDetail(text);
  return read.ok ? { ok: true, value: read.changes } : read;
}

function runPart(changes: readonly (readonly [string, Leaf | undefined])[]): readonly (readonly [string, Leaf | undefined])[] {
  return changes.filter(([path]) => path.startsWith("run.")).map(([path, value]) => [path.slice("run.".length), value] as const);
}

/** A, B, ... as a spreadsheet names columns. */
export function columnName(index: number): string {
  return index < 26 ? String.fromCharCode(65 + Math.max(0, index)) : columnName(Math.floor(index / 26) - 1) + columnName(index % 26);
}
