/**
 * The cut list: each piece with its arithmetic. Terms print to 1/64 in or 0.1 mm and the cut length is rounded once, to
 * 1/16 in or 1 mm, so that the sum shows on paper (TRADE.md, bench: cut row; common practice).
 */
import { formatAngleDeg, formatFeetInches, formatInches, formatLength, formatTerm } from "../units/format";
import type { CutTerm, Piece } from "../run/model-types";
import { CUT_CAP, HEAD_CAP } from "./sheet-size";
import { sizeText, type SheetFacts } from "./sheet-facts";
import type { Cell, CellLine, Column, Row, Table } from "./table";

type CellOf = (facts: SheetFacts, piece: Piece) => Cell;

/** A column with what it prints; one that would be empty or the same in every row is left out. */
interface CutColumn {
  readonly column: Column;
  readonly cell: CellOf;
}

function cutColumns(facts: SheetFacts): CutColumn[] {
  const has = (kind: CutTerm["kind"]): boolean => facts.pieces.some((piece) => piece.terms.some((term) => term.kind === kind));
  const plus = [...(has("make-up") ? ["MAKE-UP"] : []), ...(has("trim") ? ["TRIM"] : [])];
  return [
    { column: { head: "MARK", share: 0, minMm: 13 }, cell: markCell },
    ...(oneSize(facts) === null ? [{ column: { head: "SIZE", share: 1, minMm: 20 }, cell: sizeCell }] : []),
    { column: { head: "WORKING POINTS", share: 2, minMm: 36 }, cell: spanCell },
    { column: { head: "LESS TAKE-OUTS", share: 5, minMm: 44 }, cell: (of, piece) => groupedTerms(of, piece, (term) => term.kind === "take-out" || term.kind === "bend") },
    { column: { head: "LESS GAPS", share: 2, minMm: 30 }, cell: (of, piece) => groupedTerms(of, piece, isGap) },
    ...(plus.length > 0 ? [{ column: { head: `PLUS ${plus.join(", ")}`, share: 1, minMm: 20 }, cell: ((of, piece) => groupedTerms(of, piece, isPlus)) satisfies CellOf }] : []),
    { column: { head: "CUT LENGTH", share: 1, minMm: 31, align: "middle", boxed: true }, cell: cutLengthCell },
    { column: { head: "ENDS", share: 1, minMm: 14 }, cell: endsCell },
    { column: { head: "HEAT NO.", share: 2, minMm: 18 }, cell: () => "" },
    { column: { head: "CUT BY", share: 1, minMm: 15 }, cell: () => "" },
  ];
}

/** The size all pieces share, for the title; null when they differ. */
export function oneSize(facts: SheetFacts): string | null {
  const sizes = new Set(facts.pieces.map((piece) => sizeText(piece.nps, piece.schedule, facts.input.units)));
  return sizes.size === 1 ? [...sizes][0]! : null;
}

const LEAD = [
  "VERIFY BY TAPE, TWO READINGS, BEFORE CUTTING. Take-outs are nominal: measure the fitting in hand. Bevel, land and gap as the WPS says.",
];

/** Table of the spool's cut pieces, or null when it has none. */
export function cutListTable(facts: SheetFacts): Table | null {
  if (facts.pieces.length === 0) return null;
  const columns = cutColumns(facts);
  const title = ["CUT LIST", oneSize(facts), facts.input.units === "metric" ? "MILLIMETRES" : "INCHES"].filter((part) => part !== null).join(", ");
  return {
    title, lead: LEAD, columns: columns.map(({ column }) => column),
    rows: facts.pieces.map((piece): Row => ({ cells: columns.map(({ cell }) => cell(facts, piece)) })),
    foot: footOf(facts),
  };
}

const markCell: CellOf = (facts, piece) => {
  const unverified = facts.legs.some((leg) => leg.id === piece.legId && leg.unverified);
  return [{ text: piece.mark, face: "bold", capMm: HEAD_CAP }, ...(unverified ? [{ text: "VIF", face: "bold" as const }] : [])];
};

const sizeCell: CellOf = (facts, piece) => sizeText(piece.nps, piece.schedule, facts.input.units);

const spanCell: CellOf = (facts, piece) =>
  piece.terms.filter((term) => term.kind === "centre-to-centre").map((term) => ({ text: `${formatTerm(term.valueMm, facts.input.units)} ${termWords(term)}` }));

const isGap = (term: CutTerm): boolean => term.kind === "root-gap" || term.kind === "pull-back" || term.kind === "setting" || term.kind === "gasket";

const isPlus = (term: CutTerm): boolean => term.kind === "trim" || term.kind === "make-up";

/** A term's words without a number in front and without what the column's head says. */
export function termWords(term: CutTerm): string {
  return term.label.replace(/^[\d\s/.'"-]+(?=[A-Za-z])/, "").replace(/ take-out(?=$| at )/, "");
}

/** Equal terms once, "2 × 1/8 root gap"; a value from memory that the shop has not confirmed carries an asterisk. */
function groupedTerms(facts: SheetFacts, piece: Piece, belongs: (term: CutTerm) => boolean): Cell {
  const counts = new Map<string, number>();
  for (const term of piece.terms.filter(belongs)) {
    const text = `${formatTerm(Math.abs(term.valueMm), facts.input.units)}${term.unconfirmed ? "*" : ""} ${termWords(term)}`;
    counts.set(text, (counts.get(text) ?? 0) + 1);
  }
  return [...counts].map(([text, count]) => (count > 1 ? `${count} × ${text}` : text)).join(", ");
}

/** The number to cut to, large; in inches with the feet and inches of the same number in brackets under it. */
const cutLengthCell: CellOf = (facts, piece) => {
  const { units } = facts.input;
  if (!(piece.cutLengthMm > 0)) return [{ text: "DOES NOT FIT", face: "bold", ink: "alert" }, { text: formatTerm(piece.cutLengthMm, units) }];
  const main: CellLine = { text: units === "metric" ? formatLength(piece.cutLengthMm, units) : formatInches(piece.cutLengthMm), face: "bold", capMm: CUT_CAP };
  const feet = formatFeetInches(piece.cutLengthMm);
  return units === "imperial" && feet.includes("'") ? [main, { text: `(${feet})` }] : [main];
};

const endsCell: CellOf = (_facts, piece) => {
  const [a, b] = piece.ends.map((end) => (end.cutAngleDeg === undefined ? end.prep : `${end.prep} ${formatAngleDeg((end.cutAngleDeg * Math.PI) / 180)}`));
  return a === b ? (a ?? "") : [{ text: a ?? "" }, { text: b ?? "" }];
};

const TERMS_IMPERIAL = "Terms print to 1/64 in; the cut length is rounded once, to 1/16 in, from the exact sum.";
const TERMS_METRIC = "Terms print to 0.1 mm; the cut length is rounded once, to 1 mm, from the exact sum.";

export function footOf(facts: SheetFacts): string[] {
  const terms = facts.pieces.flatMap((piece) => piece.terms);
  const foot = [facts.input.units === "metric" ? TERMS_METRIC : TERMS_IMPERIAL];
  if (terms.some((term) => term.unconfirmed)) foot.push("* Take-out from memory, not yet confirmed by the shop: measure it first.");
  if (terms.some((term) => term.kind === "trim")) foot.push("Trim is supplied extra at a field-fit weld: the cut length includes it.");
  if (terms.some((term) => term.kind === "make-up")) foot.push("Make-up is pipe that screws into a fitting: the cut length includes it.");
  const added = facts.welds.filter((joint) => joint.key.includes(":stock-")).map((joint) => joint.number);
  if (added.length > 0) foot.push(`${added.length === 1 ? "Weld" : "Welds"} ${added.join(", ")} added because the stock is shorter than the pipe.`);
  if (facts.legs.some((leg) => leg.unverified)) foot.push("VIF: dimension not verified in the field. Verify before cutting.");
  return [foot.join(" ")];
}
