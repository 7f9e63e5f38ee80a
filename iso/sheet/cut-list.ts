/**
 * The cut list: each piece with its arithmetic. Terms print to 1/64 in or 0.1 mm and the cut length is rounded once, to
 * 1/16 in or 1 mm, so that the sum shows on paper (TRADE.md, bench: cut row; common practice).
 */
import { formatFeetInches, formatInches, formatLength, formatTerm } from "../units/format";
import type { UnitSystem } from "../run/document";
import type { CutTerm, Piece } from "../run/model-types";
import { CUT_CAP } from "./sheet-size";
import { sizeText, type SheetFacts } from "./sheet-facts";
import type { Cell, CellLine, Column, Row, Table } from "./table";

const COLUMNS: readonly Column[] = [
  { head: "MARK", share: 0, minMm: 13 },
  { head: "SIZE", share: 1, minMm: 21 },
  { head: "WORKING POINTS", share: 2, minMm: 34 },
  { head: "LESS TAKE-OUTS", share: 4, minMm: 44 },
  { head: "LESS GAPS", share: 2, minMm: 32 },
  { head: "PLUS TRIM", share: 1, minMm: 19 },
  { head: "CUT LENGTH", share: 1, minMm: 29, align: "middle", boxed: true },
  { head: "ENDS", share: 1, minMm: 15 },
  { head: "HEAT NO.", share: 2, minMm: 18 },
  { head: "CUT BY", share: 2, minMm: 15 },
];

const LEAD = [
  "VERIFY BY TAPE, TWO READINGS, BEFORE CUTTING. Take-outs are nominal: measure the fitting in hand. Bevel, land and gap as the WPS says.",
];

/** Table of the spool's cut pieces, or null when it has none. */
export function cutListTable(facts: SheetFacts): Table | null {
  if (facts.pieces.length === 0) return null;
  const unit = facts.input.units === "metric" ? "MILLIMETRES" : "INCHES";
  return { title: `CUT LIST, ${unit}`, lead: LEAD, columns: COLUMNS, rows: facts.pieces.map((piece) => cutRow(facts, piece)), foot: footOf(facts) };
}

function cutRow(facts: SheetFacts, piece: Piece): Row {
  const { units } = facts.input;
  const unverified = facts.legs.some((leg) => leg.id === piece.legId && leg.unverified);
  const mark: CellLine[] = [{ text: piece.mark, face: "bold", capMm: 3 }, ...(unverified ? [{ text: "VIF", face: "bold" as const }] : [])];
  const span = piece.terms.filter((term) => term.kind === "centre-to-centre");
  return {
    cells: [
      mark,
      sizeText(piece.nps, piece.schedule, units),
      span.flatMap((term) => [{ text: formatTerm(term.valueMm, units), face: "bold" as const }, { text: termWords(term) }]),
      groupedTerms(piece.terms.filter((term) => term.kind === "take-out"), units),
      groupedTerms(piece.terms.filter((term) => isGap(term)), units),
      groupedTerms(piece.terms.filter((term) => term.kind === "trim"), units),
      cutLengthCell(piece, units),
      endsText(piece),
      "",
      "",
    ],
  };
}

const isGap = (term: CutTerm): boolean => term.kind === "root-gap" || term.kind === "pull-back" || term.kind === "setting" || term.kind === "gasket";

/** A term's words without a number in front, which the value column already says. */
function termWords(term: CutTerm): string {
  return term.label.replace(/^[\d\s/.'"-]+(?=[A-Za-z])/, "");
}

/** Equal terms as one line, "2 x 1/8 root gap"; a value from memory that the shop has not confirmed carries an asterisk. */
function groupedTerms(terms: readonly CutTerm[], units: UnitSystem): Cell {
  const groups = new Map<string, { count: number; text: string }>();
  for (const term of terms) {
    const value = formatTerm(Math.abs(term.valueMm), units);
    const text = `${value}${term.unconfirmed ? "*" : ""} ${termWords(term)}`;
    const group = groups.get(text);
    groups.set(text, { count: (group?.count ?? 0) + 1, text });
  }
  return [...groups.values()].map(({ count, text }) => ({ text: count > 1 ? `${count} x ${text}` : text }));
}

/** The number to cut to, large; in inches with the feet and inches of the same number in brackets under it. */
function cutLengthCell(piece: Piece, units: UnitSystem): Cell {
  if (!(piece.cutLengthMm > 0)) return [{ text: "DOES NOT FIT", face: "bold", ink: "alert" }, { text: formatTerm(piece.cutLengthMm, units) }];
  const main: CellLine = { text: units === "metric" ? formatLength(piece.cutLengthMm, units) : formatInches(piece.cutLengthMm), face: "bold", capMm: CUT_CAP };
  const feet = formatFeetInches(piece.cutLengthMm);
  return units === "imperial" && feet.includes("'") ? [main, { text: `(${feet})` }] : [main];
}

function endsText(piece: Piece): Cell {
  const [a, b] = piece.ends;
  return [{ text: a.prep }, { text: b.prep }];
}

function footOf(facts: SheetFacts): string[] {
  const terms = facts.pieces.flatMap((piece) => piece.terms);
  const foot: string[] = [];
  if (terms.some((term) => term.unconfirmed)) foot.push("* Take-out from memory, not yet confirmed by the shop: measure it first.");
  if (terms.some((term) => term.kind === "trim")) foot.push("Trim is supplied extra at a field-fit weld: the cut length includes it.");
  if (facts.legs.some((leg) => leg.unverified)) foot.push("VIF: dimension not verified in the field. Verify before cutting.");
  return foot;
}
