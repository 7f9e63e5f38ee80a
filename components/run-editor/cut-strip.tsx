"use client";
import clsx from "clsx";
import { memo } from "react";
import { formatFeetInches, formatTerm, type Model, type Piece, type UnitSystem } from "@/iso";
import { useEditor } from "./editor-context";
import { cutLengthText, cutTerms, pieceSpan } from "./cut-words";

export interface CutStripProps {
  readonly model: Model;
  readonly activePointId: string | null;
  readonly onPoint: (pointId: string) => void;
}

/** The cut list with its arithmetic, rounded once at the end. */
export const CutStrip = memo(function CutStrip({ model, activePointId, onPoint }: CutStripProps) {
  if (model.pieces.length === 0) return <p className="py-2 text-soft">No pipe to cut yet.</p>;
  return (
    <>
      <p className="py-1 text-sm text-caution">Verify by tape, two readings, before cutting. Take-outs are nominal: measure the fitting in hand.</p>
      <ol aria-label="Cut list" className="divide-y divide-hair border-y border-hair">
        {model.pieces.map((piece) => (
          <PieceRow key={piece.key} units={model.document.settings.units} span={pieceSpan(model, piece)} piece={piece} active={piece.legId === activePointId} onPoint={onPoint} />
        ))}
      </ol>
    </>
  );
});

interface PieceRowProps {
  readonly units: UnitSystem;
  /** Rows it lies between, in words. */
  readonly span: string;
  readonly piece: Piece;
  readonly active: boolean;
  readonly onPoint: (pointId: string) => void;
}

/** Painted again only when its own piece changed: a long line has a hundred of them. */
const PieceRow = memo(function PieceRow({ units, span, piece, active, onPoint }: PieceRowProps) {
  const { pointed } = useEditor();
  const fits = piece.cutLengthMm > 0;
  return (
    <li data-piece={piece.mark} onPointerEnter={() => pointed.set(piece.legId)} onPointerLeave={() => pointed.set(null)}>
      <button type="button" onClick={() => onPoint(piece.legId)} className={clsx("flex w-full flex-wrap items-baseline gap-x-4 gap-y-1 px-1 py-2 text-left", active ? "bg-dye-tint" : "hover:bg-shade")}>
        <span className="figure w-10 font-medium">{piece.mark}</span>
        <span className="figure min-w-0 flex-1 basis-64 text-sm leading-6">
          {cutTerms(piece, units).map((term, i) => (
            <span key={i} className="mr-2 inline-block">
              {term.sign} <span className="text-ink">{term.value}</span>
              <span className="ml-1 font-sans text-xs text-soft">
                {term.label}
                {term.unconfirmed ? " *" : ""}
              </span>
            </span>
          ))}
        </span>
        <span className="ml-auto text-right">
          <span data-cut className={clsx("figure text-lg font-medium", !fits && "text-alert")}>
            {fits ? cutLengthText(piece.cutLengthMm, units) : "does not fit"}
          </span>
          <span className="block text-xs text-soft">
            {fits && units === "imperial" ? `${formatFeetInches(piece.cutLengthMm)}, ` : fits ? "" : `${formatTerm(piece.cutLengthMm, units)}, `}
            {span}
          </span>
        </span>
      </button>
    </li>
  );
}, sameRow);

/** A new model has new pieces; most of them say the same as before. */
function sameRow(before: PieceRowProps, after: PieceRowProps): boolean {
  const { piece: old } = before;
  const { piece: now } = after;
  if (before.active !== after.active || before.span !== after.span || before.units !== after.units || before.onPoint !== after.onPoint) return false;
  if (old === now) return true;
  return old.mark === now.mark && old.legId === now.legId && old.cutLengthMm === now.cutLengthMm && old.terms.length === now.terms.length
    && old.terms.every((term, i) => term.label === now.terms[i]?.label && term.valueMm === now.terms[i]?.valueMm && term.unconfirmed === now.terms[i]?.unconfirmed);
}
