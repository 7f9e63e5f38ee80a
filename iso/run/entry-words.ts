/** Typed numbers, directions and slopes turned round or mirrored: the value exactly, the words as a detailer would have typed them. */
import { AXIS_COMPONENT, SAME_POINT_MM } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { parseDirection } from "../units/direction";
import { formatDecimal, formatLength, formatTerm } from "../units/format";
import { parseLength } from "../units/length";
import type { AxisName, Entry, Offset, UnitSystem } from "./document";

/** Which way each axis (east, north, up) goes afterwards: 1 as before, -1 opposite. */
export type AxisSigns = readonly [1 | -1, 1 | -1, 1 | -1];

export const TURNED_ROUND: AxisSigns = [-1, -1, -1];

const OPPOSITE: Readonly<Record<AxisName, AxisName>> = { E: "W", W: "E", N: "S", S: "N", U: "D", D: "U" };
const AXIS_INDEX: Readonly<Record<AxisName, 0 | 1 | 2>> = { E: 0, W: 0, N: 1, S: 1, U: 2, D: 2 };
const WORD_LETTERS: Readonly<Record<string, AxisName>> = { EAST: "E", WEST: "W", NORTH: "N", SOUTH: "S", UP: "U", DOWN: "D", DN: "D" };

/** The axis a named axis becomes. */
export function axisSigned(axis: AxisName, signs: AxisSigns): AxisName {
  return signs[AXIS_INDEX[axis]] === 1 ? axis : OPPOSITE[axis];
}

/** An entry for a computed length: a tape reading where it says exactly the same, else millimetres. */
export function exactEntry(mm: number, units: UnitSystem): Entry {
  const text = [formatLength(mm, units), formatTerm(mm, units)].find((t) => readsAs(t, mm, units));
  return { text: text ?? `${formatDecimal(mm, 4)}mm`, mm };
}

/** Entries east, north, up of a vector, mm. */
export function exactEntries(v: Vec3, units: UnitSystem): { e: Entry; n: Entry; u: Entry } {
  return { e: exactEntry(v[0], units), n: exactEntry(v[1], units), u: exactEntry(v[2], units) };
}

/** The opposite of a typed length; its words keep the way they were typed. */
export function entryNegate(entry: Entry, units: UnitSystem): Entry {
  if (entry.mm === 0) return entry;
  const mm = -entry.mm;
  const typed = entry.text.trim();
  if (typed === "") return { text: entry.text, mm };
  const text = typed.startsWith("-") ? typed.slice(1).trim() : `-${typed}`;
  return readsAs(text, mm, units) ? { text, mm } : exactEntry(mm, units);
}

function entrySigned(entry: Entry, sign: 1 | -1, units: UnitSystem): Entry {
  return sign === 1 ? entry : entryNegate(entry, units);
}

function readsAs(text: string, mm: number, units: UnitSystem): boolean {
  const read = parseLength(text, units);
  return read.ok && Math.abs(read.mm - mm) < SAME_POINT_MM;
}

/** An offset with each axis going the way `signs` says. */
export function offsetSigned(offset: Offset, signs: AxisSigns, units: UnitSystem): Offset {
  switch (offset.kind) {
    case "enu":
    case "absolute":
      return { kind: offset.kind, e: entrySigned(offset.e, signs[0], units), n: entrySigned(offset.n, signs[1], units), u: entrySigned(offset.u, signs[2], units) };
    case "polar": {
      const { e, n, u } = offset.direction;
      const way: Vec3 = [signed(e, signs[0]), signed(n, signs[1]), signed(u, signs[2])];
      return { ...offset, direction: { text: directionText(offset.direction.text, way, signs), e: way[0], n: way[1], u: way[2] } };
    }
    case "slope": {
      const { e, n, text } = offset.direction;
      const way: Vec3 = [signed(e, signs[0]), signed(n, signs[1]), 0];
      return { ...offset, direction: { text: directionText(text, way, signs), e: way[0], n: way[1], u: 0 }, slope: slopeSigned(offset.slope, signs[2]) };
    }
  }
}

function signed(value: number, sign: 1 | -1): number {
  return sign === -1 && value !== 0 ? -value : value;
}

function slopeSigned(slope: { text: string; ratio: number }, sign: 1 | -1): { text: string; ratio: number } {
  if (sign === 1 || slope.ratio === 0) return slope;
  const typed = slope.text.trim();
  const text = typed === "" ? "" : typed.startsWith("-") ? typed.slice(1).trim() : `-${typed.replace(/^\+\s*/, "")}`;
  return { text, ratio: -slope.ratio };
}

/** Typed words of a direction changed letter by letter where that reads as the new direction, else azimuth/elevation. */
function directionText(typed: string, way: Vec3, signs: AxisSigns): string {
  if (typed.trim() === "") return typed;
  const swapped = typed.toUpperCase().replace(/EAST|WEST|NORTH|SOUTH|DOWN|DN|UP|[EWNSUD]/g, (word) => axisSigned(WORD_LETTERS[word] ?? (word as AxisName), signs));
  if (saysDirection(swapped, way)) return swapped;
  const level = Math.hypot(way[0], way[1]);
  const azimuth = level < AXIS_COMPONENT ? 0 : ((Math.atan2(way[0], way[1]) * 180) / Math.PI + 360) % 360;
  const elevation = (Math.atan2(way[2], level) * 180) / Math.PI;
  return `${azimuthText(azimuth)}/${formatDecimal(elevation, 4)}`;
}

/** Whole degrees in three figures, as surveyors write them. */
function azimuthText(degrees: number): string {
  const [whole = "", rest] = formatDecimal(degrees, 4).split(".");
  return whole.padStart(3, "0") + (rest === undefined ? "" : `.${rest}`);
}

function saysDirection(text: string, way: Vec3): boolean {
  const read = parseDirection(text);
  const size = Math.hypot(...way);
  return read.ok && size > 0 && [read.e, read.n, read.u].every((c, i) => Math.abs(c - (way[i] ?? 0) / size) < AXIS_COMPONENT);
}
