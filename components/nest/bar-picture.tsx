"use client";
import { formatLength, type UnitSystem } from "@/iso";
import type { PlanBar } from "@/lib/rules/nest-table";

/** Pixels of the drawing's own measure: all bars of a group stand to one scale. */
const WIDTH = 1000;
const HEIGHT = 46;
/** Narrower pieces carry no text; the table has it. */
const ROOM_FOR_MARK = 34;
const ROOM_FOR_LENGTH = 92;

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
        const text = width >= ROOM_FOR_LENGTH ? `${piece.mark}  ${formatLength(lengthMm, units)}` : width >= ROOM_FOR_MARK ? piece.mark : "";
        return (
          <g key={piece.id}>
            <title>{`${piece.line} ${piece.mark}, ${formatLength(lengthMm, units)}`}</title>
            <rect x={x(startMm)} y={1} width={Math.max(0.5, width)} height={HEIGHT - 2} fill="var(--color-dye-tint)" />
            <text x={x(startMm) + width / 2} y={HEIGHT / 2 + 6} textAnchor="middle" fontSize="17" className="figure" fill="var(--color-ink)">
              {text}
            </text>
          </g>
        );
      })}
      {bar.restMm > 0 ? <Rest from={x(restStart)} to={x(bar.lengthMm)} fill={bar.returned ? "var(--color-sheet)" : `url(#${hatch})`} /> : null}
      {bar.returned && x(bar.restMm) >= ROOM_FOR_LENGTH ? (
        <text x={x(restStart) + x(bar.restMm) / 2} y={HEIGHT / 2 + 6} textAnchor="middle" fontSize="17" className="figure" fill="var(--color-ink)">
          {`rest ${formatLength(bar.restMm, units)}`}
        </text>
      ) : null}
      <rect x={0} y={0} width={x(bar.lengthMm)} height={HEIGHT} fill="none" stroke="var(--color-ink)" strokeWidth="2" />
    </svg>
  );
}

function Rest({ from, to, fill }: { readonly from: number; readonly to: number; readonly fill: string }) {
  return (
    <>
      <rect x={from} y={1} width={Math.max(0, to - from)} height={HEIGHT - 2} fill="var(--color-sheet)" />
      <rect x={from} y={1} width={Math.max(0, to - from)} height={HEIGHT - 2} fill={fill} />
    </>
  );
}
