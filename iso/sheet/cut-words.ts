/** What a piece's card says: its sum, its ends, what is marked on it, and where it comes out of the stock. */
import type { CutTerm, Piece, PieceEnd } from "../run/model-types";
import type { UnitSystem } from "../run/document";
import { formatAngleDeg, formatInches, formatLength, formatTerm } from "../units/format";
import { isSquareRoll } from "../draw/fitting-notes";
import { termWords } from "./cut-list";
import { mitreRows, rollText } from "./pipe-work-tables";
import type { StockPlace } from "./set-types";
import { sizeText, type SheetFacts } from "./sheet-facts";

/** A cut length as it is cut: inches to 1/16, whole millimetres. */
export function cutText(mm: number, units: UnitSystem): string {
  return units === "metric" ? formatLength(mm, units) : formatInches(mm);
}

/** "37 1/2 face to centre", "− 3 weld-neck hub", "− 6 LR 90", "− 2 × 1/8 root gap", "= 28 1/4": the terms as they sum, equal ones once. */
export function sumTerms({ terms, cutLengthMm }: Piece, units: UnitSystem): string[] {
  const counts = new Map<string, { readonly term: CutTerm; readonly count: number }>();
  for (const term of terms) {
    const key = `${term.valueMm} ${term.label} ${term.unconfirmed}`;
    counts.set(key, { term, count: (counts.get(key)?.count ?? 0) + 1 });
  }
  const parts = [...counts.values()].map(({ term, count }, index) => {
    const sign = term.valueMm < 0 ? "− " : index > 0 ? "+ " : "";
    const times = count > 1 ? `${count} × ` : "";
    return `${sign}${times}${formatTerm(Math.abs(term.valueMm), units)}${term.unconfirmed ? "*" : ""} ${termWords(term)}`;
  });
  return [...parts, `= ${cutLengthMm > 0 ? cutText(cutLengthMm, units) : `${formatTerm(cutLengthMm, units)}: DOES NOT FIT`}`];
}

/** "BEVEL, weld 3 at elbow". */
export function endText(facts: SheetFacts, piece: Piece, end: PieceEnd): string {
  const angle = end.cutAngleDeg === undefined ? "" : ` ${formatAngleDeg((end.cutAngleDeg * Math.PI) / 180)}`;
  const joint = facts.model.joints.find(({ key }) => key === end.jointKey);
  const weld = joint?.number ? `, weld ${joint.number}` : "";
  const other = joint ? (joint.a === piece.key ? joint.b : joint.a) : null;
  return `${end.prep.toUpperCase()}${angle}${weld}${other === null ? "" : partWords(facts, other)}`;
}

function partWords(facts: SheetFacts, id: string): string {
  const component = facts.model.components.find((one) => one.id === id);
  if (component) return ` at ${KIND_WORDS[component.kind] ?? component.kind.replace(/-/g, " ")}`;
  const pipe = facts.model.pieces.find((one) => one.key === id);
  return pipe ? ` to ${pipe.mark}` : "";
}

const KIND_WORDS: Readonly<Record<string, string>> = {
  "trimmed-elbow": "TRIMMED ELBOW", "flange-weld-neck": "weld-neck flange", "flange-slip-on": "slip-on flange", "flange-socket-weld": "socket-weld flange",
  "flange-threaded": "threaded flange", "reducer-concentric": "reducer", "reducer-eccentric": "eccentric reducer",
};

/** What else the saw and the layout need to know of a piece, one line each. */
export function noteTexts(facts: SheetFacts, piece: Piece): string[] {
  const { units } = facts.input;
  const unverified = facts.legs.some((leg) => leg.id === piece.legId && leg.unverified);
  const bends = (piece.bends ?? []).map((bend) => `BEND ${formatAngleDeg(bend.angleRad)} begins at ${formatTerm(bend.startMm, units)}, developed ${formatTerm(bend.developedMm, units)}${bend.roll ? `, turned ${rollText(facts, bend.roll)}` : ""}.`);
  return [...(unverified ? ["VIF: dimension not verified. Verify in the field before cutting."] : []), ...mitreTexts(facts, piece), ...bends, ...rollTexts(facts, piece)];
}

function mitreTexts(facts: SheetFacts, piece: Piece): string[] {
  return mitreRows(facts, piece).map(({ cells: [, end, angle, back, centre, throat] }) => `MITRE ${end === "both" ? "both ends" : end} ${angle}: back ${back}, centre line ${centre}, throat ${throat}.`);
}

/** How the fitting after the piece is turned against the one before it: the arc between their quarter lines on the pipe. */
function rollTexts(facts: SheetFacts, piece: Piece): string[] {
  const [before, after] = piece.ends.map((end) => {
    const joint = facts.model.joints.find(({ key }) => key === end.jointKey);
    const other = joint && (joint.a === piece.key ? joint.b : joint.a);
    return facts.model.components.find(({ id }) => id === other);
  });
  if (!before || !after?.roll || after.roll.againstId !== before.id || isSquareRoll(after.roll.angleRad)) return [];
  return [`ROLL the next fitting ${rollText(facts, after.roll)} on the outside, between quarter lines, looking along flow.`];
}

/** "NPS 4 STD, A106 Gr B". */
export function pipeText(facts: SheetFacts, piece: Piece): string {
  return [sizeText(piece.nps, piece.schedule, facts.input.units), piece.material].filter((part) => part.trim() !== "").join(", ");
}

/** Out of which length a locked plan takes it; a plan made for another length says so. */
export function stockText(piece: Piece, stock: StockPlace | undefined, units: UnitSystem): string {
  if (!stock) return "FROM length or offcut no. __________";
  const lengthText = (mm: number) => formatLength(mm, units);
  const what = `${stock.offcut ? "offcut" : "length"} of ${lengthText(stock.stockMm)}${stock.heat === "" ? "" : `, heat ${stock.heat}`}`;
  const changed = cutText(stock.plannedMm, units) === cutText(piece.cutLengthMm, units) ? "" : ` PLANNED AT ${cutText(stock.plannedMm, units)}: the length has changed since.`;
  return `FROM no. ${stock.length}, ${what}: cut ${stock.cut} of ${stock.cuts}, begins at ${cutText(stock.startMm, units)}. Plan: ${stock.plan}.${changed}`;
}
