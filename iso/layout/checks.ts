/**
 * What is measured on the finished spool, and what the answer to a measurement is. Tolerances as PFI ES-3: ±1/8 in (3 mm) to
 * NPS 10, ±3/16 in (5 mm) NPS 12 to 24. A flange face may be out of square 1/16 in per foot, 1 mm in 200 (ASME B31.3
 * 335.1.1, from memory). A diagonal across a corner moves by less than its legs do, so it gets the same tolerance.
 */
import { INCH_MM } from "../units/length";
import type { UnitSystem } from "../run/document";
import type { Model, Spool } from "../run/model-types";
import { formatFraction, formatTapeLength } from "./lengths";
import { spoolEnds, type SpoolEnd } from "./spool-ends";
import { spoolTurns, type Turn } from "./turns";

export interface CheckRow {
  /** Stable for one sheet: "ends:1-2:e". */
  readonly key: string;
  /** "C1". */
  readonly mark: string;
  readonly group: string;
  /** "E", "STRAIGHT", "DIAGONAL", "SQUARE". */
  readonly what: string;
  /** How to take it. */
  readonly how: string;
  readonly wantedMm: number;
  readonly toleranceMm: number;
  readonly kind: "length" | "diagonal" | "square";
  /** An end that may be cut shorter takes a length that is too long; null = none. */
  readonly trimAt: string | null;
}

const FACE_SLOPE = 1 / 192;
const LARGE_NPS_MM = 10 * INCH_MM;
/** Least length of a direction worth a row of its own: a tape shows no less. */
const ROW_LEAST_MM = INCH_MM / 32;

/** PFI ES-3's linear tolerance by nominal size, mm. */
export function linearToleranceMm(nominalInches: number, units: UnitSystem): number {
  const isLarge = nominalInches * INCH_MM > LARGE_NPS_MM;
  if (units === "metric") return isLarge ? 5 : 3;
  return isLarge ? (3 * INCH_MM) / 16 : INCH_MM / 8;
}

/** All checks of a spool, in the order they are taken. @param nominalInches of its largest pipe. */
export function spoolChecks(model: Model, spool: Spool, nominalInches: number): readonly CheckRow[] {
  const { units } = model.document.settings;
  const toleranceMm = linearToleranceMm(nominalInches, units);
  const ends = spoolEnds(model, spool);
  const rows: Omit<CheckRow, "mark">[] = [
    ...ends.slice(1).flatMap((end) => pairRows(ends[0]!, end, toleranceMm)),
    ...spoolTurns(model, spool).flatMap((turn) => cornerRow(turn, units, toleranceMm)),
    ...ends.filter((end) => end.kind === "flange" || end.kind === "plain").map((end) => squareRow(end, units)),
  ];
  return rows.map((row, i) => ({ ...row, mark: `C${i + 1}` }));
}

function pairRows(a: SpoolEnd, b: SpoolEnd, toleranceMm: number): Omit<CheckRow, "mark">[] {
  const group = `END ${a.number} TO END ${b.number}`;
  const offset = b.position.map((x, i) => x - a.position[i]!);
  const trimmed = [a, b].find((end) => end.trimMm > 0) ?? [b, a].find((end) => end.kind === "plain");
  const names = [["E", "W"], ["N", "S"], ["UP", "DOWN"]] as const;
  const along = names.map(([plus, minus], i) => {
    const isAlong = trimmed !== undefined && Math.abs(trimmed.direction[i]!) > 1 - FACE_SLOPE;
    return {
      key: `ends:${a.number}-${b.number}:${plus.toLowerCase()}`, group, what: offset[i]! < -ROW_LEAST_MM ? minus : plus, how: "face centre to face centre, along the plant's direction",
      wantedMm: Math.abs(offset[i]!), toleranceMm, kind: "length" as const, trimAt: isAlong ? endText(trimmed) : null,
    };
  });
  return [...along, { key: `ends:${a.number}-${b.number}:straight`, group, what: "STRAIGHT", how: "tape from face centre to face centre", wantedMm: Math.hypot(...offset), toleranceMm, kind: "diagonal", trimAt: null }];
}

function endText(end: SpoolEnd): string {
  return `end ${end.number} (${end.name})`;
}

/** Round lengths to mark from the fitting's ends, longest first, mm. */
const LEGS_IMPERIAL = [36, 24, 18, 12, 9, 6, 4, 3, 2].map((inches) => inches * INCH_MM);
const LEGS_METRIC = [1000, 600, 500, 300, 200, 150, 100, 75, 50];

/** A mark each way on the side quarter lines: their diagonal is that of the centre lines, since a side line runs beside them. */
function cornerRow(turn: Turn, units: UnitSystem, toleranceMm: number): Omit<CheckRow, "mark">[] {
  const mark = (units === "metric" ? LEGS_METRIC : LEGS_IMPERIAL).find((mm) => mm <= turn.plainMm);
  if (mark === undefined) return [];
  return [{
    key: `corner:${turn.component.pointId}`, group: turn.name, what: "DIAGONAL", how: `marks ${formatTapeLength(mark, units)} from both ends of the fitting, on the side quarter lines`,
    wantedMm: 2 * (turn.takeOutMm + mark) * Math.cos(turn.angleRad / 2), toleranceMm, kind: "diagonal", trimAt: null,
  }];
}

function squareRow(end: SpoolEnd, units: UnitSystem): Omit<CheckRow, "mark"> {
  const toleranceMm = end.odMm * FACE_SLOPE;
  return {
    key: `square:${end.number}`, group: `END ${end.number}`, what: "SQUARE", how: `gap under a square across the pipe's OD, two ways (1/16 in per ft, 1 mm in 200)`,
    wantedMm: 0, toleranceMm: units === "metric" ? Math.max(toleranceMm, 0.5) : Math.max(toleranceMm, INCH_MM / 64), kind: "square", trimAt: null,
  };
}

export interface CheckAnswer {
  readonly verdict: "go" | "trim" | "stop";
  readonly words: string;
}

/** The answer to one measurement, in the shop's words. @param actualMm as measured, finite. */
export function checkAnswer(row: CheckRow, actualMm: number, units: UnitSystem): CheckAnswer {
  const off = actualMm - row.wantedMm;
  const said = (mm: number) => formatFraction(Math.abs(mm), units);
  // A reading is as fine as the tape: half of 1/32 in, or half a millimetre, is not held against it.
  if (Math.abs(off) <= row.toleranceMm + (units === "metric" ? 0.5 : INCH_MM / 64)) return { verdict: "go", words: `go: within ${said(row.toleranceMm)}` };
  if (row.kind === "square") return { verdict: "stop", words: `stop: ${said(off)} out of square, more than ${said(row.toleranceMm)}. Do not pull the face up with its bolts.` };
  if (off > 0 && row.trimAt) return { verdict: "trim", words: `trim ${said(off)} at ${row.trimAt}` };
  const way = off > 0 ? "long" : "short";
  if (row.kind === "diagonal" && row.key.startsWith("corner:")) return { verdict: "stop", words: `stop: ${said(off)} ${way}; the corner is too ${off > 0 ? "open" : "closed"}. Correct it before welding out.` };
  return { verdict: "stop", words: `stop: ${said(off)} ${way}. Find the cause; do not pull, jack or heat to fit.` };
}

