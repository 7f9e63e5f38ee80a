"use client";
import { memo } from "react";
import type { DisplayItem } from "@/iso";
import { EM_PER_CAPITAL } from "@/fonts/widths";
import { pathData } from "@/components/run-editor/drawing-items";

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
  const [x, y] = item.at;
  const turn = (item.rotateRad * 180) / Math.PI;
  return (
    <text
      x={x}
      y={y}
      fontSize={item.capMm * EM_PER_CAPITAL}
      textAnchor={item.anchor}
      fontFamily="Roboto, sans-serif"
      fontWeight={item.face === "bold" ? 700 : 400}
      strokeWidth={LETTER_BAND_MM}
      transform={turn === 0 ? undefined : `rotate(${turn} ${x} ${y})`}
    >
      {item.text}
    </text>
  );
}
