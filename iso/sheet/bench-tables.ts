/** Tables of a spool's bench pages: what to check, ends, and the numbers of each turn. Cautions stand where the work is done. */
import { elbowMarks } from "../closing/elbow-marks";
import { INCH_MM } from "../units/length";
import type { UnitSystem } from "../run/document";
import { spoolChecks, type CheckRow } from "../layout/checks";
import { formatFraction, formatMark, formatTapeLength } from "../layout/lengths";
import { mitreCut } from "../layout/mitre";
import { spoolEnds } from "../layout/spool-ends";
import type { Turn } from "../layout/turns";
import { formatAngleDeg, formatLength } from "../units/format";
import { npsInches, sizeText, type SheetFacts } from "./sheet-facts";
import type { Row, Table } from "./table";

/** What is measured on the finished spool of a sheet: the rows of its bench page and of its form on screen. */
export function benchChecks(facts: SheetFacts): readonly CheckRow[] {
  if (!facts.spool) return [];
  const sizes = [...facts.pieces, ...facts.components].map((part) => npsInches(part.nps));
  return spoolChecks(facts.model, facts.spool, Math.max(0, ...sizes));
}

/** Ends by number, so that the checks can name them. */
export function endsTable(facts: SheetFacts): Table | null {
  const ends = facts.spool ? spoolEnds(facts.model, facts.spool) : [];
  if (ends.length === 0) return null;
  const { units } = facts.input;
  return {
    title: "ENDS", lead: [],
    columns: [{ head: "END", share: 0, minMm: 11, align: "middle" }, { head: "WHAT IT IS", share: 1, minMm: 40 }, { head: "SIZE", share: 0, minMm: 20 }],
    rows: ends.map((end) => ({ cells: [[{ text: String(end.number), face: "bold" }], `${end.name}${end.trimMm > 0 ? `; supplied ${formatTapeLength(end.trimMm, units)} longer, checks are to the finished end` : ""}`, sizeText(end.nps, null, units)] })),
    foot: [],
  };
}

/** Check dimensions with blanks for what was measured (PFI ES-3 tolerances). */
export function checksTable(facts: SheetFacts): Table | null {
  const rows = benchChecks(facts);
  if (rows.length === 0) return null;
  const { units } = facts.input;
  return {
    title: "CHECK DIMENSIONS",
    lead: ["Verify by tape, two readings. E, N and U are plant directions. Tolerances as PFI ES-3, shop work, not cumulative."],
    columns: [
      { head: "NO.", share: 0, minMm: 11, align: "middle" }, { head: "BETWEEN", share: 1, minMm: 34 }, { head: "WHAT", share: 0, minMm: 22 },
      { head: "WANTED", share: 0, minMm: 25, align: "end", boxed: true }, { head: "+/-", share: 0, minMm: 15, align: "end" },
      { head: "ACTUAL", share: 1, minMm: 20 }, { head: "BY", share: 0.6, minMm: 14 },
    ],
    rows: rows.map((row): Row => ({ cells: [[{ text: row.mark, face: "bold" }], row.kind === "diagonal" && row.what === "DIAGONAL" ? `${row.group}: ${row.how}` : row.group, row.what, [{ text: row.kind === "square" ? "0" : formatLength(row.wantedMm, units), face: "bold" }], formatFraction(row.toleranceMm, units).replace(/ (in|mm)$/, ""), "", ""] })),
    foot: [
      "SQUARE: gap under a square laid across the pipe's OD at the face, two ways a quarter apart (1/16 in per ft, 1 mm in 200: ASME B31.3 335.1.1, from memory).",
      "A length outside its tolerance: find the cause before welding out. Do not pull, jack or heat pipe to fit.",
    ],
  };
}

const row = (label: string, value: string): Row => ({ cells: [label, [{ text: value, face: "bold" }]] });
/** An arc of this radius reads one inch per degree, 180/pi (common practice); ten millimetres per degree on a metric table. */
const DEGREE_ARC_IN = 180 / Math.PI;

/** Numbers of one turn, beside its pictures. */
export function turnTable(turn: Turn, units: UnitSystem): Table {
  const rows = [
    row("PLANE", `${turn.plane}; turn ${formatAngleDeg(turn.angleRad)}`),
    row("TAKE-OUT", `${formatMark(turn.takeOutMm, units)}, corner to ${turn.kind === "mitre" ? "first cut" : "square-off"}`),
    ...(turn.kind === "mitre" ? mitreRows(turn, units) : elbowRows(turn, units)),
    row(units === "metric" ? "573 MM ARC" : "57.3 IN ARC", degreeArc(turn.angleRad, units)),
    ...rollRows(turn, units),
  ];
  return { title: turn.name, lead: leadOf(turn), columns: [{ head: "", share: 0, minMm: 27 }, { head: "", share: 1, minMm: 40 }], rows, foot: [] };
}

function leadOf(turn: Turn): string[] {
  if (turn.kind === "trimmed") return ["Trimmed: confirm it is permitted (engineer). Measure the fitting in hand."];
  return turn.kind === "mitre" ? ["Cuts off square: confirm the mitre is permitted (engineer)."] : ["Take-outs are nominal: measure the fitting in hand."];
}

function elbowRows(turn: Turn, units: UnitSystem): Row[] {
  if (turn.radiusMm === null) return [];
  const marks = elbowMarks(turn.radiusMm, turn.odMm, turn.angleRad);
  const radius = row("RADIUS", formatMark(turn.radiusMm, units));
  if (turn.kind === "whole") return [radius];
  const pair = (arc: number, chord: number) => `arc ${formatMark(arc, units)}, straight ${formatMark(chord, units)}`;
  return [
    radius, row("KEEP", `${formatAngleDeg(turn.angleRad)} from the uncut face; ${marks.restOf90Deg === null ? "" : `${marks.restOf90Deg.toFixed(2)}° falls off`}`),
    row("THROAT", pair(marks.throatMm, marks.throatChordMm)), row("SIDES", `arc ${formatMark(marks.sideMm, units)}`), row("BACK", pair(marks.backMm, marks.backChordMm)),
  ];
}

function mitreRows(turn: Turn, units: UnitSystem): Row[] {
  const welds = Math.max(1, turn.mitreWelds);
  const cut = mitreCut(turn.radiusMm ?? 0, turn.odMm, turn.angleRad, welds);
  const rows = [row("CUT", `${formatAngleDeg(cut.cutAngleRad)} off square, ${welds} ${welds === 1 ? "weld" : "welds"}; long to short ${formatMark(cut.longShortMm, units)}`)];
  if (welds === 1) return rows;
  return [...rows, row("SEGMENTS", `${cut.segments}: centre ${formatMark(cut.segmentCentreMm, units)}, back ${formatMark(cut.segmentBackMm, units)}, throat ${formatMark(cut.segmentThroatMm, units)}`), row("RADIUS", formatMark(turn.radiusMm ?? 0, units))];
}

function degreeArc(angleRad: number, units: UnitSystem): string {
  const unit = units === "metric" ? 10 : INCH_MM;
  const chord = 2 * DEGREE_ARC_IN * unit * Math.sin(angleRad / 2);
  return `${formatMark(angleRad * DEGREE_ARC_IN * unit, units)} along it (one ${units === "metric" ? "cm" : "inch"} a degree), straight ${formatMark(chord, units)}`;
}

function rollRows(turn: Turn, units: UnitSystem): Row[] {
  if (!turn.roll) return [row("ROLL", "the first of its run: roll the others from it")];
  const { angleRad, arcMm } = turn.roll;
  if (angleRad === 0) return [row("ROLL", `none: in the plane of ${turn.rollFrom}, turning the same way`)];
  return [row("ROLL", `${formatAngleDeg(Math.abs(angleRad))} ${angleRad > 0 ? "clockwise" : "counter-clockwise"}, looking along flow, from ${turn.rollFrom}; arc on the OD ${formatMark(Math.abs(arcMm), units)}`)];
}

/** Marks round a trimmed elbow, or set-backs of a mitre, at 16 stations; both sides are alike, so nine lines say all. */
export function stationsTable(turn: Turn, units: UnitSystem): Table | null {
  const values = stationValues(turn);
  if (values === null) return null;
  const name = (i: number) => (i === 0 ? "0 back" : i === 8 ? "8 throat" : i === 4 ? "4, 12 sides" : `${i}, ${16 - i}`);
  const cell = (i: number): [string, { text: string; face: "bold" }[]] => (i <= 8 ? [name(i), [{ text: formatMark(values[i]!, units), face: "bold" }]] : ["", []]);
  return {
    title: "16 STATIONS",
    lead: [turn.kind === "mitre" ? `Set back from the long point; stations ${formatMark((Math.PI * turn.odMm) / 16, units)} apart, 0 at the back.` : `From the uncut face along the surface; stations ${formatMark((Math.PI * turn.odMm) / 16, units)} apart, 0 at the back.`],
    columns: [{ head: "STATION", share: 1, minMm: 24 }, { head: "MARK", share: 1, minMm: 24, align: "end" }, { head: "STATION", share: 1, minMm: 24 }, { head: "MARK", share: 1, minMm: 24, align: "end" }],
    rows: [0, 1, 2, 3, 4].map((i): Row => ({ cells: [...cell(i), ...cell(i + 5)] })),
    foot: [],
  };
}

function stationValues(turn: Turn): readonly number[] | null {
  if (turn.kind === "mitre") return mitreCut(turn.radiusMm ?? 0, turn.odMm, turn.angleRad, Math.max(1, turn.mitreWelds)).setbackMm;
  return turn.kind === "trimmed" && turn.radiusMm !== null ? elbowMarks(turn.radiusMm, turn.odMm, turn.angleRad).roundMm : null;
}
