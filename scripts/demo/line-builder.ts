/** A short way to write the demo shop's run documents: each row is a move, an item and what a detailer would add. */
import {
  parseDirection,
  parseLength,
  type Entry,
  type Item,
  type LineSettings,
  type Offset,
  type Point,
  type Run,
  type RunDocument,
  type UnitSystem,
} from "@/iso";

type Row = { move?: string; item?: Item; more?: Partial<Pick<Point, "places" | "note" | "provenance" | "trimMm">> };
export type DemoRun = { id: string; name?: string; from?: string; rows: readonly Row[] };

const ZERO: Entry = { text: "0", mm: 0 };

function entry(text: string, units: UnitSystem): Entry {
  const parsed = parseLength(text, units);
  if (!parsed.ok) throw new Error(`Demo length ${text}: ${parsed.message}`);
  return { text, mm: parsed.mm };
}

/** "E 3-0" along a direction; "E 1-8, N 1-4, U 1-0" as offsets; "@ 10-0, 20-0, 5-6" absolute; nothing = no offset. */
function offsetOf(move: string | undefined, units: UnitSystem): Offset {
  if (move === undefined) return { kind: "enu", e: ZERO, n: ZERO, u: ZERO };
  if (move.startsWith("@")) {
    const [e, n, u] = move.slice(1).split(",").map((part) => entry(part.trim(), units));
    return { kind: "absolute", e: e ?? ZERO, n: n ?? ZERO, u: u ?? ZERO };
  }
  const parts = move.split(",").map((part) => part.trim());
  if (parts.length === 1) return polar(parts[0] ?? "", units);
  const axes: Record<"e" | "n" | "u", Entry> = { e: ZERO, n: ZERO, u: ZERO };
  for (const part of parts) {
    const length = entry(part.slice(2), units);
    const letter = part.charAt(0);
    const axis = ({ E: "e", W: "e", N: "n", S: "n", U: "u", D: "u" } as const)[letter];
    if (axis === undefined) throw new Error(`Demo move ${move}`);
    axes[axis] = "WSD".includes(letter) ? { text: `-${length.text}`, mm: -length.mm } : length;
  }
  return { kind: "enu", ...axes };
}

function polar(part: string, units: UnitSystem): Offset {
  const [text = "", ...rest] = part.split(" ");
  const direction = parseDirection(text);
  if (!direction.ok) throw new Error(`Demo direction ${part}: ${direction.message}`);
  return {
    kind: "polar",
    direction: { text, e: direction.e, n: direction.n, u: direction.u },
    length: entry(rest.join(" "), units),
  };
}

function runOf(run: DemoRun, units: UnitSystem): Run {
  return {
    id: run.id,
    name: run.name ?? "",
    from: run.from ?? null,
    pipe: null,
    points: run.rows.map((row, index) => ({
      id: `${run.id}-${index + 1}`,
      offset: offsetOf(row.move, units),
      item: row.item ?? { kind: "none" },
      places: row.more?.places ?? {},
      trimMm: row.more?.trimMm ?? null,
      provenance: row.more?.provenance ?? { kind: "from-drawing", toleranceMm: null, by: null, at: null, second: null },
      note: row.more?.note ?? "",
    })),
  };
}

/** A whole document. */
export function demoDocument(
  number: string,
  title: string,
  settings: LineSettings,
  runs: readonly DemoRun[],
  notes: readonly string[] = [],
): RunDocument {
  return {
    version: 1,
    number,
    title,
    settings,
    view: null,
    runs: runs.map((run) => runOf(run, settings.units)),
    notes: [...notes],
  };
}
