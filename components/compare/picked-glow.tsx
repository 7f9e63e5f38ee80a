"use client";
import { memo } from "react";
import type { DisplayItem } from "@/iso";
import { pathData, textPlace } from "@/components/run-editor/drawing-items";

/** A band under what belongs to the picked row: wide enough to be found in any colour. */
const GLOW = "#b3c5ee";
const BAND_MM = 4.2;
const LETTER_BAND_MM = 1.6;

export const PickedGlow = memo(function PickedGlow({ items }: { readonly items: readonly DisplayItem[] }) {
  return (
    <g pointerEvents="none" fill="none" stroke={GLOW} strokeLinecap="round" strokeLinejoin="round" aria-hidden>
      {items.map((item, i) => (
        <Glow key={i} item={item} />
      ))}
    </g>
  );
});

function Glow({ item }: { readonly item: DisplayItem }) {
  if (item.type === "line") return <line x1={item.from[0]} y1={item.from[1]} x2={item.to[0]} y2={item.to[1]} strokeWidth={item.widthMm + BAND_MM} />;
  if (item.type === "path") return <path d={pathData(item.segments)} strokeWidth={item.widthMm + BAND_MM} />;
  return (
    <text {...textPlace(item)} fontFamily="Roboto, sans-serif" fontWeight={item.face === "bold" ? 700 : 400} strokeWidth={LETTER_BAND_MM}>
      {item.text}
    </text>
  );
}
