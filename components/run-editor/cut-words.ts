/** The cut list's words on screen: the arithmetic of a piece, its cut length, where it lies. */
import { formatInches, formatLength, formatTerm, type Model, type Piece, type UnitSystem } from "@/iso";

export interface CutTermWords {
  /** "-" or "+"; "" for the first. */
  readonly sign: string;
  readonly value: string;
  readonly label: string;
  readonly unconfirmed: boolean;
}

/** Signed terms; equal ones in a row stand as "2 x". */
export function cutTerms(piece: Piece, units: UnitSystem): readonly CutTermWords[] {
  const rows: (CutTermWords & { readonly count: number })[] = [];
  for (const term of piece.terms) {
    const sign = rows.length === 0 && term.valueMm >= 0 ? "" : term.valueMm < 0 ? "−" : "+";
    const value = formatTerm(Math.abs(term.valueMm), units);
    const at = rows.findIndex((row) => row.sign === sign && row.label === term.label && row.value === value);
    const same = rows[at];
    if (same) rows[at] = { ...same, count: same.count + 1 };
    else rows.push({ sign, value, label: term.label, unconfirmed: term.unconfirmed, count: 1 });
  }
  return rows.map(({ count, ...row }) => (count > 1 ? { ...row, value: `${count} × ${row.value}` } : row));
}

/** The number to cut to, on a tape: inches to 1/16, or whole millimetres. */
export function cutLengthText(mm: number, units: UnitSystem): string {
  return units === "metric" ? `${formatLength(mm, units)} mm` : `${formatInches(mm)} in`;
}

/** Rows a piece lies between, by the run's own numbers. */
export function pieceSpan(model: Model, piece: Piece): string {
  const leg = model.legs.find((each) => each.id === piece.legId);
  const from = model.nodes.find((node) => node.pointId === leg?.fromPointId);
  const to = model.nodes.find((node) => node.pointId === leg?.toPointId);
  if (!from || !to) return "";
  return from.runId === to.runId ? `rows ${from.index + 1} to ${to.index + 1}` : `branch, to row ${to.index + 1}`;
}
