import { formatInches, formatTerm, type CutTerm, type Piece, type UnitSystem } from "@/iso";
import { formatLength } from "@/iso";
import type { ReactNode } from "react";
import type { SpoolFacts } from "./spool-facts";

/** The number to cut to, rounded once. */
export function cutLengthText(piece: Piece, units: UnitSystem): string {
  return units === "metric"
    ? `${formatLength(piece.cutLengthMm, units)} mm`
    : `${formatInches(piece.cutLengthMm)} in`;
}

/** The arithmetic of one piece: its signed terms, one under the other. */
export function CutTerms({
  terms,
  units,
}: {
  readonly terms: readonly CutTerm[];
  readonly units: UnitSystem;
}) {
  return (
    <ul className="text-sm">
      {terms.map((term, n) => (
        <li key={n} className="grid grid-cols-[5.5rem_minmax(0,1fr)] gap-x-3">
          <span className="figure text-right whitespace-nowrap">{signedText(term, units, n === 0)}</span>
          <span className="print:whitespace-nowrap">
            {term.label}
            {term.unconfirmed ? <strong className="text-caution"> *</strong> : null}
          </span>
        </li>
      ))}
    </ul>
  );
}

function signedText(term: CutTerm, units: UnitSystem, first: boolean): string {
  const size = formatTerm(Math.abs(term.valueMm), units);
  if (term.valueMm < 0) return `- ${size}`;
  return first ? size : `+ ${size}`;
}

export interface CutTableProps {
  readonly facts: SpoolFacts;
  readonly units: UnitSystem;
  /** What stands in the last column of a piece, such as its log and a button. */
  readonly done?: (piece: Piece) => ReactNode;
}

/** The cut list with its arithmetic and the cautions that belong beside the cut length. */
export function CutTable({ facts, units, done }: CutTableProps) {
  const starred = facts.pieces.some((piece) => piece.terms.some((term) => term.unconfirmed));
  return (
    <>
      <p className="mb-2 border-l-4 border-caution bg-caution-tint px-4 py-2">
        <strong className="mr-2">Caution.</strong>
        Verify by tape, two readings, before cutting. Take-outs are nominal: measure the fitting in hand. Gap,
        land and bevel come from the WPS.
      </p>
      <table role="table" data-stack className="ruled">
        <caption className="sr-only">Cut list</caption>
        <thead role="rowgroup">
          <tr role="row">
            <th role="columnheader" scope="col">
              Mark
            </th>
            <th role="columnheader" scope="col">
              Pipe
            </th>
            <th role="columnheader" scope="col">
              Arithmetic
            </th>
            <th role="columnheader" scope="col">
              Cut length
            </th>
            {done ? (
              <th role="columnheader" scope="col">
                Log
              </th>
            ) : (
              <th role="columnheader" scope="col">
                Heat no., cut by
              </th>
            )}
          </tr>
        </thead>
        <tbody role="rowgroup">
          {facts.pieces.map((piece) => (
            <CutRow
              key={piece.key}
              piece={piece}
              units={units}
              unverified={(piece.legIds ?? [piece.legId]).some((id) => facts.unverifiedLegs.has(id))}
              last={done ? done(piece) : <BlankLine />}
              lastLabel={done ? "Log" : "Heat, by"}
            />
          ))}
        </tbody>
      </table>
      {starred ? (
        <p className="mt-2 text-sm text-caution">
          * Take-out from memory and not yet confirmed by the shop. The owner confirms it under Shop.
        </p>
      ) : null}
    </>
  );
}

interface CutRowProps {
  readonly piece: Piece;
  readonly units: UnitSystem;
  readonly unverified: boolean;
  readonly last: ReactNode;
  readonly lastLabel: string;
}

function CutRow({ piece, units, unverified, last, lastLabel }: CutRowProps) {
  const fits = piece.cutLengthMm > 0;
  return (
    <tr role="row">
      <td role="cell" data-label="Mark" className="figure font-medium">
        {piece.mark}
      </td>
      <td role="cell" data-label="Pipe">
        <span>
          NPS {piece.nps} {piece.schedule}
          <span className="block text-sm text-soft">{piece.material}</span>
          <span className="block text-sm">
            Ends: {piece.ends[0].prep}, {piece.ends[1].prep}
          </span>
        </span>
      </td>
      <td role="cell" data-label="Arithmetic">
        <CutTerms terms={piece.terms} units={units} />
      </td>
      <td role="cell" data-label="Cut length">
        <span>
          <strong className="figure inline-block border-2 border-ink px-2 py-0.5 text-lg whitespace-nowrap">
            {fits ? cutLengthText(piece, units) : "DOES NOT FIT"}
          </strong>
          {unverified ? (
            <span className="mt-1 block text-sm font-bold text-caution">VIF: unverified dimension</span>
          ) : null}
        </span>
      </td>
      <td role="cell" data-label={lastLabel}>
        {last}
      </td>
    </tr>
  );
}

function BlankLine() {
  return <span className="block h-7 w-40 border-b border-ink" />;
}
