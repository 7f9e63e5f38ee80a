"use client";
import { useMemo } from "react";
import { overlayLegend } from "@/iso";
import { measureText } from "@/fonts/widths";
import { DrawingItems } from "@/components/run-editor/drawing-items";

/** What the marks of the overlay mean: one strip on a wide screen, some rows on a phone. */
export function OverlayKey() {
  return (
    <>
      <Strip widthMm={320} className="hidden sm:block" />
      <Strip widthMm={104} className="sm:hidden" />
    </>
  );
}

const EDGE_MM = 2;
const WORDS = "Marks of the overlay: thin in both; heavy and ringed, added or moved to here; dashed and crossed, removed or moved away; in square brackets what a changed dimension was; bold words with numbers, rows of the list.";

function Strip({ widthMm, className }: { readonly widthMm: number; readonly className: string }) {
  const { items, heightMm } = useMemo(() => overlayLegend([EDGE_MM, 0], widthMm - 2 * EDGE_MM, measureText), [widthMm]);
  return (
    <svg role="img" aria-label={WORDS} viewBox={`0 0 ${widthMm} ${heightMm}`} className={`w-full border border-t-0 border-ink bg-white ${className}`}>
      <DrawingItems items={items} />
    </svg>
  );
}
