"use client";
/** Paints a display list as SVG elements: the screen's painter of the same list the paper gets. */
import { memo } from "react";
import { INK_COLOURS } from "@/iso";
import type { DisplayItem, Face, PathSegment, Ref } from "@/iso";
import { EM_PER_CAPITAL } from "@/fonts/widths";

/** Width of the unseen stroke that a finger or pointer meets, mm. */
const REACH_MM = 5;
const TOUCHABLE = new Set(["pipe", "symbol", "weld"]);
const FACES: Readonly<Record<Face, { readonly fontFamily: string; readonly fontWeight: number }>> = {
  regular: { fontFamily: "Roboto, sans-serif", fontWeight: 400 },
  bold: { fontFamily: "Roboto, sans-serif", fontWeight: 700 },
  mono: { fontFamily: "'Roboto Mono', monospace", fontWeight: 400 },
};

export interface DrawingItemsProps {
  readonly items: readonly DisplayItem[];
  /** Adds an unseen wide stroke to what may be pointed at. */
  readonly touchable?: boolean;
  /** Paints everything in the active colour, for what belongs to the current row. */
  readonly active?: boolean;
}

/** The items of a drawing or a page, in order; each carries what it shows in data-ref. */
export const DrawingItems = memo(function DrawingItems({ items, touchable = false, active = false }: DrawingItemsProps) {
  return (
    <g style={PLAIN_TEXT}>
      {items.map((item, i) => (
        <ItemShape key={i} item={item} touchable={touchable} active={active} />
      ))}
    </g>
  );
});

/** Said once for all texts: thousands of style attributes would each be computed anew. */
const PLAIN_TEXT = { fontVariantLigatures: "none", whiteSpace: "pre" } as const;

export function refText(ref: Ref | null): string | undefined {
  return ref ? `${ref.kind}:${ref.id}` : undefined;
}

/** Reads a data-ref back. */
export function parseRef(text: string): Ref | null {
  const cut = text.indexOf(":");
  return cut < 0 ? null : { kind: text.slice(0, cut) as Ref["kind"], id: text.slice(cut + 1) };
}

function ItemShape({ item, touchable, active }: { readonly item: DisplayItem; readonly touchable: boolean; readonly active: boolean }) {
  if (item.type === "text") return <TextShape item={item} active={active} />;
  const shape = item.type === "line" ? lineShape(item, active) : pathShape(item, active);
  if (!touchable || !item.ref || !TOUCHABLE.has(item.layer)) return shape;
  const d = item.type === "line" ? `M${point(item.from)}L${point(item.to)}` : pathData(item.segments);
  return (
    <g data-ref={refText(item.ref)} className="cursor-pointer">
      {shape}
      <path d={d} fill="transparent" stroke="transparent" strokeWidth={REACH_MM} pointerEvents="all" />
    </g>
  );
}

const ACTIVE_EXTRA_MM = 0.35;

function lineShape(item: Extract<DisplayItem, { type: "line" }>, active: boolean) {
  const [x1, y1] = item.from;
  const [x2, y2] = item.to;
  const stroke = active ? INK_COLOURS.dye : INK_COLOURS[item.ink];
  return <line x1={x1} y1={y1} x2={x2} y2={y2} stroke={stroke} strokeWidth={item.widthMm + (active ? ACTIVE_EXTRA_MM : 0)} strokeLinecap="round" strokeDasharray={item.dash?.join(" ")} data-ref={refText(item.ref)} />;
}

function pathShape(item: Extract<DisplayItem, { type: "path" }>, active: boolean) {
  const tint = (ink: typeof item.fill): string => (ink === null ? "none" : active && ink !== "paper" ? INK_COLOURS.dye : INK_COLOURS[ink]);
  return (
    <path
      d={pathData(item.segments)}
      fill={tint(item.fill)}
      stroke={tint(item.stroke)}
      strokeWidth={item.stroke === null ? undefined : item.widthMm + (active ? ACTIVE_EXTRA_MM : 0)}
      strokeLinecap="round"
      strokeLinejoin="round"
      strokeDasharray={item.dash?.join(" ")}
      data-ref={refText(item.ref)}
    />
  );
}

/** Where a text stands, how large and how turned, as its element takes it. */
export function textPlace({ at: [x, y], rotateRad, capMm, anchor }: Extract<DisplayItem, { type: "text" }>) {
  const turn = (rotateRad * 180) / Math.PI;
  return { x, y, fontSize: capMm * EM_PER_CAPITAL, textAnchor: anchor, transform: turn === 0 ? undefined : `rotate(${turn} ${x} ${y})` };
}

function TextShape({ item, active }: { readonly item: Extract<DisplayItem, { type: "text" }>; readonly active: boolean }) {
  return (
    <text
      {...textPlace(item)}
      fill={active ? INK_COLOURS.dye : INK_COLOURS[item.ink]}
      data-ref={refText(item.ref)}
      {...FACES[item.face]}
    >
      {item.text}
    </text>
  );
}

function point([x, y]: readonly [number, number]): string {
  return `${round(x)} ${round(y)}`;
}

function round(value: number): number {
  return Math.round(value * 1000) / 1000;
}

export function pathData(segments: readonly PathSegment[]): string {
  return segments
    .map((segment) => {
      if (segment.op === "Z") return "Z";
      if (segment.op === "C") return `C${point(segment.c1)} ${point(segment.c2)} ${point(segment.to)}`;
      return `${segment.op}${point(segment.to)}`;
    })
    .join("");
}
