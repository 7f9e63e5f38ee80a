/** Writes a Move cell: the stored offset as the text it reads back from, its echo, and the direction it goes on in. */
import { formatLength, formatTerm, parseDirection, parseSlope } from "@/iso";
import type { Entry, Offset, UnitSystem } from "@/iso";

export type Axis = "E" | "W" | "N" | "S" | "U" | "D";

/** Direction of the leg before, for a length typed without a direction; null at a run's first point. */
export interface StraightOn {
  readonly text: string;
  readonly e: number;
  readonly n: number;
  readonly u: number;
  /** A sloped leg goes on in its slope. */
  readonly slope?: Extract<Offset, { kind: "slope" }>["slope"];
}

const AXIS_NAMES: Readonly<Record<Axis, string>> = {
  E: "east", W: "west", N: "north", S: "south", U: "up", D: "down",
};
const POSITIVE: readonly Axis[] = ["E", "N", "U"];
const NEGATIVE: readonly Axis[] = ["W", "S", "D"];

/** West 2-0 is east -2-0: an entry's text reads along its positive axis. */
export function negated(text: string): string {
  return text.startsWith("-") ? text.slice(1).trim() : `-${text}`;
}

type Triple = Extract<Offset, { kind: "enu" | "absolute" }>;

export function echoTriple(value: Triple, units: UnitSystem): string {
  const words = tripleLengths(value).flatMap((entry, slot) => {
    if (entry.mm === 0 && value.kind === "enu") return [];
    const axis = (entry.mm < 0 ? NEGATIVE : POSITIVE)[slot] ?? "E";
    return [`${formatLength(Math.abs(entry.mm), units)} ${AXIS_NAMES[axis]}`];
  });
  const listed = words.length > 0 ? words.join(", ") : "same place";
  return value.kind === "absolute" ? `at ${listed} of the datum` : listed;
}

function tripleLengths(value: Triple): readonly [Entry, Entry, Entry] {
  return [value.e, value.n, value.u];
}

/** The text a Move cell shows for a stored offset: what was typed, put together again. */
export function moveText(offset: Offset): string {
  if (offset.kind === "polar") return `${offset.direction.text.toLowerCase()} ${offset.length.text}`.trim();
  if (offset.kind === "slope") return `${offset.direction.text.toLowerCase()} ${offset.length.text} @ ${offset.slope.text}`;
  if (offset.kind === "absolute") {
    const words = tripleLengths(offset).map((entry, slot) => axisText(entry, slot));
    return `@ ${words.join(" ")}`;
  }
  return tripleLengths(offset)
    .flatMap((entry, slot) => (entry.mm === 0 ? [] : [axisText(entry, slot)]))
    .join(" ");
}

function axisText({ text, mm }: Entry, slot: number): string {
  if (mm >= 0) return `${POSITIVE[slot] ?? "E"} ${text === "" ? "0" : text}`;
  return `${NEGATIVE[slot] ?? "W"} ${text.startsWith("-") ? negated(text) : text}`;
}

/** The echo of a stored offset, in the line's units. */
export function moveEcho(offset: Offset, units: UnitSystem): string {
  if (offset.kind === "slope") return slopeEcho(offset, units);
  if (offset.kind !== "polar") return moveText(offset) === "" ? "" : echoTriple(offset, units);
  const direction = parseDirection(offset.direction.text);
  const words = direction.ok ? direction.understood : offset.direction.text;
  return `${formatLength(offset.length.mm, units)} ${words}`;
}

/** "10'-0" east, falls 1:100, 1 3/16" lower": the length is level, the slope as typed, what it comes to. */
export function slopeEcho({ direction, length, slope }: Extract<Offset, { kind: "slope" }>, units: UnitSystem): string {
  const named = parseDirection(direction.text);
  const level = `${formatLength(length.mm, units)} ${named.ok ? named.understood : direction.text} level`;
  if (slope.ratio === 0) return level;
  const read = parseSlope(slope.text);
  const rise = formatTerm(Math.abs(slope.ratio * length.mm), units);
  return `${level}, ${read.ok ? read.understood : slope.text}: ${rise} ${units === "metric" ? "mm" : "in"} ${slope.ratio < 0 ? "lower" : "higher"}`;
}

/** The direction a bare length on the next row continues in, or null when this offset has none. */
export function straightOnOf(offset: Offset): StraightOn | null {
  if (offset.kind === "polar") return offset.direction;
  if (offset.kind === "slope") return { ...offset.direction, slope: offset.slope };
  if (offset.kind === "absolute") return null;
  const [e, n, u] = [offset.e.mm, offset.n.mm, offset.u.mm];
  const length = Math.hypot(e, n, u);
  if (length === 0) return null;
  const single = [e, n, u].filter((value) => value !== 0).length === 1;
  if (!single) return null;
  const slot = [e, n, u].findIndex((value) => value !== 0);
  const axis = (([e, n, u][slot] ?? 0) < 0 ? NEGATIVE : POSITIVE)[slot] ?? "E";
  return { text: axis, e: e / length, n: n / length, u: u / length };
}
