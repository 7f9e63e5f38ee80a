/**
 * Reads the Move cell: one line of text that says where a point lies from the point before it.
 *   e 3-1 1/2 · e3-1.5        a direction and a length
 *   un 3-0 · 045/30 3-0       an oblique direction and a length
 *   E 2-0 N 1-0 U 3           several axes at once
 *   2-0, 1-0, 3               east, north, up by position
 *   3-0                       straight on from the leg before
 *   e 10-0 @ 1:100            a level length and its slope: %, 1:n, in/ft, mm/m; "@ -2%" or "@ down 2%" falls
 *   @ 10-0, 0, 8-0            a position on the line's own axes
 * Lengths in millimetres; a bare number is in the line's own unit.
 */
import { formatLength, parseDirection, parseLength, parseSlope } from "@/iso";
import type { Entry, Offset, UnitSystem } from "@/iso";
import { refused, understood, type EntryResult } from "./entry-result";
import { echoTriple, negated, slopeEcho, type Axis, type StraightOn } from "./move-text";

const AXIS_WORDS: Readonly<Record<string, Axis>> = {
  east: "E", west: "W", north: "N", south: "S", up: "U", down: "D",
};
/** Position in e, n, u and sign of each named axis. */
const AXES: Readonly<Record<Axis, { readonly slot: 0 | 1 | 2; readonly sign: 1 | -1 }>> = {
  E: { slot: 0, sign: 1 }, W: { slot: 0, sign: -1 },
  N: { slot: 1, sign: 1 }, S: { slot: 1, sign: -1 },
  U: { slot: 2, sign: 1 }, D: { slot: 2, sign: -1 },
};

/** A turned direction such as N30E or 045/30 stands as one word, so that its digits are not taken for a length. */
const ONE_WORD_DIRECTION = /^([ENUWSD]\d+(?:\.\d+)?[ENUWSD]|\d{3}(?:\.\d+)?\/[+-]?\d+(?:\.\d+)?)(?:\s+(.*))?$/i;
const DIRECTION_RUN = /[ENUWSD]+/gi;

const EMPTY: Entry = { text: "", mm: 0 };
export const ZERO_OFFSET: Offset = { kind: "enu", e: EMPTY, n: EMPTY, u: EMPTY };

export const MOVE_HINT = "Type a direction and a length, such as e 3-1 1/2.";

/**
 * Reads a Move cell.
 * @param straightOn direction used when only a length is typed; null where there is none.
 * @returns the offset with its echo, or one sentence that says what to type. Never throws.
 */
export function parseMove(text: string, units: UnitSystem, straightOn: StraightOn | null = null): EntryResult<Offset> {
  const plain = plainWords(text);
  if (plain === "" || /^0+$/.test(plain)) return understood(ZERO_OFFSET, "");
  if (plain.startsWith("@")) return parseAbsolute(plain.slice(1).trim(), units);
  const sloped = /^(.*?)\s*@\s*(.*)$/.exec(plain);
  if (sloped) return parseSloped(sloped[1] ?? "", rawSlope(text), units, straightOn);
  const oneWord = ONE_WORD_DIRECTION.exec(plain);
  if (oneWord) return parsePolar(oneWord[1] ?? "", (oneWord[2] ?? "").trim(), units);
  if (/[,;]/.test(plain)) return parseTriple(plain, units, "enu");
  if (!/^[ENUWSD]/i.test(plain)) return parseStraightOn(plain, units, straightOn);
  return parseNamedAxes(plain, units);
}

/** The slope as typed: whole words such as "down" are its own. */
function rawSlope(text: string): string {
  return text.slice(text.indexOf("@") + 1).trim();
}

/** A level leg with its slope: the length is measured level, the rise follows from it. */
function parseSloped(moveText: string, slopeText: string, units: UnitSystem, straightOn: StraightOn | null): EntryResult<Offset> {
  const level = parseMove(moveText, units, straightOn);
  if (!level.ok) return level;
  if (moveText === "" || (level.value.kind !== "polar" && level.value.kind !== "slope")) return refused("A slope goes with one level direction and its length, such as e 10-0 @ 1:100.");
  const { direction, length } = level.value;
  if (Math.abs(direction.u) > LEVEL) return refused("A slope is taken from a level direction: e, n30e and the like.");
  const slope = parseSlope(slopeText);
  if (!slope.ok) return refused(slope.message);
  const value: Offset = { kind: "slope", direction: { text: direction.text, e: direction.e, n: direction.n, u: 0 }, length, slope: { text: slopeText, ratio: slope.ratio } };
  return understood(value, slopeEcho(value, units));
}

/** A unit direction with less of it upright than this is level. */
const LEVEL = 1e-9;

/** Turns whole words (east, up) into letters and smooths white space. */
function plainWords(text: string): string {
  return text
    .trim()
    .replace(/\b(north|south|east|west|up|down)\b/gi, (word) => AXIS_WORDS[word.toLowerCase()] ?? word)
    .replace(/\s+/g, " ");
}

function parseNamedAxes(text: string, units: UnitSystem): EntryResult<Offset> {
  const parts = splitByDirection(text);
  const first = parts[0];
  if (!first) return refused(MOVE_HINT);
  if (parts.length === 1) return parsePolar(first.direction, first.length, units);
  return parseAxes(parts, units, "enu");
}

interface Part {
  readonly direction: string;
  readonly length: string;
}

function splitByDirection(text: string): Part[] {
  const starts = [...text.matchAll(DIRECTION_RUN)];
  return starts.map((match, i) => {
    const from = match.index + match[0].length;
    const to = starts[i + 1]?.index ?? text.length;
    return { direction: match[0].toUpperCase(), length: text.slice(from, to).trim() };
  });
}

function parsePolar(directionText: string, lengthText: string, units: UnitSystem): EntryResult<Offset> {
  const direction = parseDirection(directionText);
  if (!direction.ok) return refused(direction.message);
  if (lengthText === "") return refused(`Type a length after the direction, such as ${directionText.toLowerCase()} ${units === "imperial" ? "3-1 1/2" : "775"}.`);
  const length = parseLength(lengthText, units);
  if (!length.ok) return refused(length.message);
  const scale = 1 / Math.hypot(direction.e, direction.n, direction.u);
  const named = { text: directionText.toUpperCase(), e: direction.e * scale, n: direction.n * scale, u: direction.u * scale };
  const value: Offset = { kind: "polar", direction: named, length: { text: lengthText, mm: length.mm } };
  return understood(value, `${formatLength(length.mm, units)} ${direction.understood}`);
}

function parseStraightOn(text: string, units: UnitSystem, straightOn: StraightOn | null): EntryResult<Offset> {
  const length = parseLength(text, units);
  if (!length.ok) return refused(`${length.message} ${MOVE_HINT}`);
  if (!straightOn) return refused("Start with a direction: e, w, n, s, u or d, such as e 3-1 1/2.");
  const { slope, text: words, e, n, u } = straightOn;
  const value: Offset = slope
    ? { kind: "slope", direction: { text: words, e, n, u: 0 }, length: { text, mm: length.mm }, slope }
    : { kind: "polar", direction: { text: words, e, n, u }, length: { text, mm: length.mm } };
  return understood(value, `${formatLength(length.mm, units)} straight on`);
}

function parseAbsolute(text: string, units: UnitSystem): EntryResult<Offset> {
  if (/^[ENUWSD]/i.test(text)) {
    const parts = splitByDirection(text);
    if (parts.length !== 3) return refused("A position needs all three: @ east, north, up, such as @ 10-0, 0, 8-0.");
    return parseAxes(parts, units, "absolute");
  }
  return parseTriple(text, units, "absolute");
}

function parseTriple(text: string, units: UnitSystem, kind: "enu" | "absolute"): EntryResult<Offset> {
  const words = text.split(/[,;]/).map((word) => word.trim());
  if (words.length !== 3) return refused("Type three lengths with commas between them: east, north, up.");
  const entries: Entry[] = [];
  for (const word of words) {
    const length = word === "" ? { ok: true as const, mm: 0 } : parseLength(word, units);
    if (!length.ok) return refused(length.message);
    entries.push({ text: word, mm: length.mm });
  }
  const value = { kind, e: entries[0] ?? EMPTY, n: entries[1] ?? EMPTY, u: entries[2] ?? EMPTY };
  return understood(value, echoTriple(value, units));
}

function parseAxes(parts: readonly Part[], units: UnitSystem, kind: "enu" | "absolute"): EntryResult<Offset> {
  const entries: Entry[] = [EMPTY, EMPTY, EMPTY];
  const seen = new Set<number>();
  for (const part of parts) {
    const axis = AXES[part.direction as Axis];
    if (!axis) return refused(`Several axes at once take single letters, such as E 2-0 N 1-0; ${part.direction} is a direction of its own.`);
    if (seen.has(axis.slot)) return refused(`${part.direction} is given on an axis that already has a length.`);
    seen.add(axis.slot);
    const length = parseLength(part.length, units);
    if (!length.ok) return refused(length.message);
    entries[axis.slot] = { text: axis.sign < 0 ? negated(part.length) : part.length, mm: axis.sign * length.mm };
  }
  const value = { kind, e: entries[0] ?? EMPTY, n: entries[1] ?? EMPTY, u: entries[2] ?? EMPTY };
  return understood(value, echoTriple(value, units));
}
