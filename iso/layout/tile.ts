/** Tiles of a template: windows of one size that overlap, row by row. Nothing is ever scaled. */
import type { PaperBox } from "../geometry/types";

/** Strip that two neighbouring pages both print, mm. */
export const OVERLAP_MM = 12;

export interface Tile {
  /** From 1. */
  readonly row: number;
  readonly column: number;
  readonly rows: number;
  readonly columns: number;
  /** What of the template it shows, in the template's frame. */
  readonly shown: PaperBox;
  /** Join lines in this window: x of upright ones, y of level ones. */
  readonly joinsX: readonly number[];
  readonly joinsY: readonly number[];
}

/** Cuts a template of the given size into windows no larger than the room. */
export function tilesOf(widthMm: number, heightMm: number, room: { readonly widthMm: number; readonly heightMm: number }): readonly Tile[] {
  const across = spansOf(widthMm, room.widthMm);
  const down = spansOf(heightMm, room.heightMm);
  return down.flatMap(([minY, maxY], r) =>
    across.map(([minX, maxX], c): Tile => ({
      row: r + 1, column: c + 1, rows: down.length, columns: across.length, shown: { minX, minY, maxX, maxY },
      joinsX: joinsOf(across, c), joinsY: joinsOf(down, r),
    })));
}

type Span = readonly [from: number, to: number];

function spansOf(length: number, room: number): readonly Span[] {
  if (length <= room) return [[0, length]];
  const step = Math.max(1, room - OVERLAP_MM);
  const count = Math.ceil((length - OVERLAP_MM) / step);
  return Array.from({ length: count }, (_, i): Span => [i * step, Math.min(length, i * step + room)]);
}

/** Middles of the strips shared with the span before and the span after. */
function joinsOf(spans: readonly Span[], i: number): readonly number[] {
  const joins: number[] = [];
  const [before, own, after] = [spans[i - 1], spans[i]!, spans[i + 1]];
  if (before) joins.push((before[1] + own[0]) / 2);
  if (after) joins.push((own[1] + after[0]) / 2);
  return joins;
}
