"use client";
import clsx from "clsx";
import { memo } from "react";
import { formatFeetInches, formatTerm, type Model, type Piece } from "@/iso";
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
          <PieceRow key={piece.key} model={model} piece={piece} active={piece.legId === activePointId} onPoint={onPoint} />
        ))}
      </ol>
    </>
  );
});

function PieceRow({ model, piece, active, onPoint }: { readonly model: Model; readonly piece: Piece; readonly active: boolean; readonly onPoint: (pointId: string) => void }) {
  const { units } = model.document.settings;
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
            {pieceSpan(model, piece)}
          </span>
        </span>
      </button>
    </li>
  );
}
