/**
 * What the bench does to pipe besides cutting it square: bends, mitre cuts, and how fittings are turned against each other.
 * Each table is there only where the spool has such work.
 */
import { isSquareRoll } from "../draw/fitting-notes";
import type { Component, Piece, PieceBend, PieceEnd, Roll } from "../run/model-types";
import { formatAngleDeg, formatTerm } from "../units/format";
import type { SheetFacts } from "./sheet-facts";
import type { Row, Table } from "./table";

/** The tables of pipe work a spool needs, in the order of the work. */
export function pipeWorkTables(facts: SheetFacts): Table[] {
  return [bendsTable(facts), mitreCutsTable(facts), fittingTurnsTable(facts)].filter((table) => table !== null);
}

const NUMBER = { share: 1, minMm: 22 } as const;
const RAD = Math.PI / 180;

/** Where each bend begins along its cut pipe, and how long its centre line is (R times the angle in radians). */
export function bendsTable(facts: SheetFacts): Table | null {
  const rows = facts.pieces.flatMap((piece) => (piece.bends ?? []).map((bend): Row => bendRow(facts, piece, bend)));
  if (rows.length === 0) return null;
  return {
    title: "BENDS OF THE PIPE",
    lead: ["Measure along the centre line from the pipe's upstream end. The stretch of the outside and the spring-back are the bender's: try one first."],
    columns: [
      { head: "PIECE", share: 0, minMm: 15 }, { head: "BEND BEGINS AT", ...NUMBER, minMm: 30 }, { head: "ANGLE", ...NUMBER }, { head: "RADIUS", ...NUMBER },
      { head: "DEVELOPED LENGTH", ...NUMBER, minMm: 34 }, { head: "TURNED", share: 2, minMm: 40 },
    ],
    rows, foot: [],
  };
}

function bendRow(facts: SheetFacts, piece: Piece, bend: PieceBend): Row {
  const { units } = facts.input;
  return {
    cells: [
      [{ text: piece.mark, face: "bold" }], formatTerm(bend.startMm, units), formatAngleDeg(bend.angleRad), formatTerm(bend.radiusMm, units),
      formatTerm(bend.developedMm, units), bend.roll ? rollText(facts, bend.roll) : "",
    ],
  };
}

/** Mitred pipe ends: the angle off square, and what the back is longer and the throat shorter by than the centre line (OD/2 times its tangent). */
export function mitreCutsTable(facts: SheetFacts): Table | null {
  const rows = facts.pieces.flatMap((piece) => mitreRows(facts, piece));
  if (rows.length === 0) return null;
  return {
    title: "MITRE CUTS",
    lead: ["Sides as the centre line. Lengths finish at the cut; bevel after it. A cut over 22.5° off square: engineer's permission."],
    columns: [
      { head: "PIECE", share: 0, minMm: 15 }, { head: "END", share: 1, minMm: 26 }, { head: "OFF SQUARE", ...NUMBER }, { head: "BACK", ...NUMBER },
      { head: "CENTRE LINE", ...NUMBER, minMm: 26 }, { head: "THROAT", ...NUMBER },
    ],
    rows, foot: [],
  };
}

/** A row for each mitred end, or one for both where they belong to one turn: mark, end, angle, back, centre line, throat. */
export function mitreRows(facts: SheetFacts, piece: Piece): Row[] {
  const [start, end] = piece.ends;
  const mark = [{ text: piece.mark, face: "bold" as const }];
  const reach = (of: PieceEnd): number => (piece.odMm / 2) * Math.tan((of.cutAngleDeg ?? 0) * RAD);
  const row = (where: string, ends: readonly PieceEnd[]): Row => {
    const off = ends.reduce((sum, one) => sum + reach(one), 0);
    const length = (mm: number) => formatTerm(mm, facts.input.units);
    const { cutLengthMm } = piece;
    return { cells: [mark, where, formatAngleDeg((ends[0]?.cutAngleDeg ?? 0) * RAD), length(cutLengthMm + off), length(cutLengthMm), length(cutLengthMm - off)] };
  };
  const isCut = (of: PieceEnd) => of.prep === "mitre";
  if (isCut(start) && isCut(end) && turnOf(start) === turnOf(end)) return [row("both", [start, end])];
  return [...(isCut(start) ? [row("upstream", [start])] : []), ...(isCut(end) ? [row("downstream", [end])] : [])];
}

/** The turn a mitred end belongs to: the point in its weld's key. */
function turnOf(end: PieceEnd): string {
  return end.jointKey?.split(":")[0] ?? "";
}

/** Fittings that do not stand square to the one before, and flanges whose holes do not straddle. */
export function fittingTurnsTable(facts: SheetFacts): Table | null {
  const turned = facts.components.filter((component) => component.boltTurn || (component.roll && !isSquareRoll(component.roll.angleRad)));
  if (turned.length === 0) return null;
  return {
    title: "FITTING TURNS",
    lead: ["Turned against the fitting before it, looking along flow: CW clockwise, CCW the other way. The arc is measured on the pipe's outside."],
    columns: [{ head: "FITTING", share: 3, minMm: 52 }, { head: "AGAINST", share: 2, minMm: 40 }, { head: "TURN AND ARC", share: 2, minMm: 44 }, { head: "BOLT HOLES", share: 2, minMm: 40 }],
    rows: turned.map((component): Row => ({
      cells: [
        [{ text: component.description }, { text: weldsOf(facts, component) }].filter(({ text }) => text !== ""), againstText(facts, component.roll ?? null),
        component.roll ? rollText(facts, component.roll) : "", holesText(component),
      ],
    })),
    foot: [],
  };
}

function againstText(facts: SheetFacts, roll: Roll | null): string {
  if (!roll) return "";
  const other = facts.model.components.find((component) => component.id === roll.againstId);
  if (!other) return "the bend before it";
  return [other.description, weldsOf(facts, other)].filter((text) => text !== "").join(", ");
}

/** "31.50° CW, arc 1 1/4". */
export function rollText(facts: SheetFacts, { angleRad, arcMm }: Roll): string {
  if (angleRad === 0) return "in line";
  return `${formatAngleDeg(Math.abs(angleRad))} ${angleRad < 0 ? "CCW" : "CW"}, arc ${formatTerm(Math.abs(arcMm), facts.input.units)}`;
}

const SIDE_WORDS = { E: "the east", W: "the west", N: "the north", S: "the south", U: "above", D: "below" } as const;

function holesText({ boltTurn }: Component): string {
  return boltTurn ? `${formatAngleDeg(boltTurn.turnDeg * RAD)} clockwise, seen from ${SIDE_WORDS[boltTurn.from]}` : "";
}

/** "between welds 4 and 5": where on the drawing a fitting is; "" at fittings without numbered welds. */
export function weldsOf(facts: SheetFacts, component: Component): string {
  const numbers = facts.model.joints.filter((joint) => joint.number !== null && (joint.a === component.id || joint.b === component.id)).map((joint) => joint.number);
  if (numbers.length === 0) return "";
  return numbers.length === 1 ? `at weld ${numbers[0]}` : `between welds ${numbers.join(" and ")}`;
}
