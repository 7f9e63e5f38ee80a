"use client";
import { memo } from "react";
import type { DisplayItem, Face, Ink, LineItem, PathItem, PathSegment, TextItem } from "@/iso";
import { printableText } from "@/fonts/printable";
import { EM_PER_CAPITAL } from "@/fonts/widths";

/** The inks of the sheet on screen; the same colours as on paper. */
const INKS: Readonly<Record<Ink, string>> = {
  ink: "#111111",
  dye: "#1b3f94",
  grey: "#6b6b6b",
  paper: "#ffffff",
  alert: "#a3261b",
  pale: "#dcd6cb",
};

const FACES: Readonly<Record<Face, string>> = {
  regular: "font-sans",
  bold: "font-sans font-bold",
  mono: "font-mono",
};

/** Display items as SVG elements, in order; paper millimetres are the user units. */
export const DisplaySvg = memo(function DisplaySvg({ items }: { readonly items: readonly DisplayItem[] }) {
  return (
    <>
      {items.map((item, n) => (
        <Item key={n} item={item} />
      ))}
    </>
  );
});

function Item({ item }: { readonly item: DisplayItem }) {
  if (item.type === "line") return <Line item={item} />;
  return item.type === "path" ? <Path item={item} /> : <Text item={item} />;
}

function Line({ item }: { readonly item: LineItem }) {
  return (
    <line
      x1={item.from[0]}
      y1={item.from[1]}
      x2={item.to[0]}
      y2={item.to[1]}
      stroke={INKS[item.ink]}
      strokeWidth={item.widthMm}
      strokeDasharray={item.dash?.join(" ")}
      strokeLinecap={item.layer === "pipe" && !item.dash ? "round" : "butt"}
    />
  );
}

function Path({ item }: { readonly item: PathItem }) {
  return (
    <path
      d={item.segments.map(segmentText).join("")}
      stroke={item.stroke ? INKS[item.stroke] : "none"}
      strokeWidth={item.widthMm}
      strokeDasharray={item.dash?.join(" ")}
      strokeLinejoin="round"
      fill={item.fill ? INKS[item.fill] : "none"}
    />
  );
}

function segmentText(segment: PathSegment): string {
  if (segment.op === "Z") return "Z";
  if (segment.op === "C") return `C${pair(segment.c1)} ${pair(segment.c2)} ${pair(segment.to)}`;
  return `${segment.op}${pair(segment.to)}`;
}

/** Hundredths of a millimetre are finer than any screen. */
function pair(point: readonly [number, number]): string {
  return `${point[0].toFixed(2)} ${point[1].toFixed(2)}`;
}

function Text({ item }: { readonly item: TextItem }) {
  const [x, y] = item.at;
  return (
    <text
      x={x}
      y={y}
      textAnchor={item.anchor}
      fontSize={item.capMm * EM_PER_CAPITAL}
      className={FACES[item.face]}
      fill={INKS[item.ink]}
      transform={item.rotateRad === 0 ? undefined : `rotate(${(item.rotateRad * 180) / Math.PI} ${x} ${y})`}
    >
      {printableText(item.text).text}
    </text>
  );
}
