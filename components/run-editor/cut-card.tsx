"use client";
import type { Model, Piece } from "@/iso";
import { cutLengthText, cutTerms, pieceSpan } from "./cut-words";

/** The arithmetic of one cut length, shown over the drawing while its pipe or mark is pointed at. */
export function CutCard({ model, piece }: { readonly model: Model; readonly piece: Piece }) {
  const { units } = model.document.settings;
  const fits = piece.cutLengthMm > 0;
  return (
    <div role="status" data-cut-card={piece.mark} className="pointer-events-none absolute left-2 top-2 z-10 max-w-[min(20rem,80%)] border border-ink bg-sheet px-3 py-2 shadow-md">
      <p className="text-sm">
        <b className="figure">{piece.mark}</b> <span className="text-soft">{pieceSpan(model, piece)}</span>
      </p>
      <table className="figure text-sm leading-5">
        <tbody>
          {cutTerms(piece, units).map((term, i) => (
            <tr key={i}>
              <td className="pr-1 text-right">{term.sign} {term.value}</td>
              <td className="pl-2 font-sans text-xs text-soft">{term.label}{term.unconfirmed ? " *" : ""}</td>
            </tr>
          ))}
          <tr className="border-t border-ink font-medium">
            <td className="pr-1 text-right">{fits ? cutLengthText(piece.cutLengthMm, units) : "does not fit"}</td>
            <td className="pl-2 font-sans text-xs">cut length</td>
          </tr>
        </tbody>
      </table>
    </div>
  );
}
