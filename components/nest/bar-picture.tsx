"use client";
import { formatLength, type UnitSystem } from "@/iso";
import type { PlanBar } from "@/lib/rules/nest-table";

/** Pixels of the drawing's own measure: all bars of a group stand to one scale. */
const WIDTH = 1000;
const HEIGHT = 60;
/** On a letter page this is 2.6 mm high. */
const TEXT = 20;
/** Width of a letter of Roboto Mono, and the air beside a text. */
const LETTER = 0.62 * TEXT;
const AIR = 6;
/** A saw cut is drawn at least this wide. */
const LEAST_CUT = 3;

/** The texts that have room, one below the other; the table has them all. */
function fitting(texts: readonly string[], width: number): string[] {
  return texts.filter((text) => text.length * LETTER + AIR <= width);
}

/**
 * One length to scale: pieces outlined with their mark and length, saw cuts as black strokes, trim and scrap hatched, a rest that
 * goes back left white with its length. Reads in black and white.
 */
export function BarPicture({ bar, longestMm, units, label }: { readonly bar: PlanBar; readonly longestMm: number; readonly units: UnitSystem; readonly label: string }) {
  const x = (mm: number) => (mm / longestMm) * WIDTH;
  const restStart = bar.lengthMm - bar.restMm;
  const first = bar.pieces[0];
  const hatch = `scrap-${bar.key.replace(":", "-")}`;
  return (
    <svg viewBox={`-1 -1 ${WIDTH + 2} ${HEIGHT + 2}`} role="img" aria-label={label} className="block w-full min-w-[40rem]">
      <defs>
        <pattern id={hatch} width="7" height="7" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <line x1="0" y1="0" x2="0" y2="7" stroke="var(--color-ink)" strokeWidth="1.4" />
        </pattern>
      </defs>
      <rect x={0} y={0} width={x(bar.lengthMm)} height={HEIGHT} fill="var(--color-ink)" />
      {first && first.startMm > 0 ? <Rest from={0} to={x(first.startMm)} fill={`url(#${hatch})`} /> : null}
      {bar.pieces.map(({ piece, startMm, lengthMm }) => {
        const width = x(lengthMm);
        return (
          <g key={piece.id}>
            <title>{`${piece.line} ${piece.mark}, ${formatLength(lengthMm, units)}`}</title>
            <rect x={x(startMm)} y={1} width={Math.max(0.5, width)} height={HEIGHT - 2} fill="var(--color-dye-tint)" />
            <Words middle={x(startMm) + width / 2} texts={fitting([piece.mark, formatLength(lengthMm, units)], width)} />
          </g>
        );
      })}
      {bar.restMm > 0 ? <Rest from={x(restStart)} to={x(bar.lengthMm)} fill={bar.returned ? "var(--color-sheet)" : `url(#${hatch})`} /> : null}
      {bar.returned ? <Words middle={x(restStart) + x(bar.restMm) / 2} texts={fitting(["rest", formatLength(bar.restMm, units)], x(bar.restMm))} /> : null}
      {bar.pieces.map(({ piece, startMm, lengthMm }) => (
        <rect key={piece.id} x={x(startMm + lengthMm)} y={1} width={LEAST_CUT} height={HEIGHT - 2} fill="var(--color-ink)" />
      ))}
      <rect x={0} y={0} width={x(bar.lengthMm)} height={HEIGHT} fill="none" stroke="var(--color-ink)" strokeWidth="2" />
    </svg>
  );
}

function Words({ middle, texts }: { readonly middle: number; readonly texts: readonly string[] }) {
  const first = HEIGHT / 2 + TEXT * 0.36 - ((texts.length - 1) * TEXT * 1.15) / 2;
  return texts.map((text, n) => (
    <text key={text} x={middle} y={first + n * TEXT * 1.15} textAnchor="middle" fontSize={TEXT} className="figure" fill="var(--color-ink)">
      {text}
    </text>
  ));
}

function Rest({ from, to, fill }: { readonly from: number; readonly to: number; readonly fill: string }) {
  return (
    <>
      <rect x={from} y={1} width={Math.max(0, to - from)} height={HEIGHT - 2} fill="var(--color-sheet)" />
      <rect x={from} y={1} width={Math.max(0, to - from)} height={HEIGHT - 2} fill={fill} />
    </>
  );
}
