/** A bitmap of what is inked, with summed areas: how much ink lies in a box or under a leader, in constant time. */
import type { PaperBox, PaperPoint } from "../geometry/types";
import { paperBoxAround, type Segment, type TurnedBox } from "./plane";

export interface InkMap {
  /** Inked cells inside an axis-parallel box. */
  readonly inBox: (minX: number, minY: number, maxX: number, maxY: number) => number;
  /** Inked cells met along a segment. */
  readonly along: (from: PaperPoint, to: PaperPoint) => number;
}

/** Side of a cell, paper mm; larger sheets take coarser cells so that the map stays small. */
const CELL = 0.5;
const MOST_CELLS = 3_000_000;

export function inkMap(segments: readonly Segment[], thicknessMm: number): InkMap {
  const box = paperBoxAround(segments.flatMap((s) => [s.from, s.to]));
  if (!Number.isFinite(box.minX)) return { inBox: () => 0, along: () => 0 };
  const wide = box.maxX - box.minX + 4;
  const high = box.maxY - box.minY + 4;
  const cell = Math.max(CELL, Math.sqrt((wide * high) / MOST_CELLS));
  const columns = Math.ceil(wide / cell) + 1;
  const rows = Math.ceil(high / cell) + 1;
  const bits = new Uint8Array(columns * rows);
  const originX = box.minX - 2;
  const originY = box.minY - 2;
  const half = Math.floor(thicknessMm / cell / 2);
  for (const { from, to } of segments) {
    const steps = Math.max(1, Math.ceil(Math.hypot(to[0] - from[0], to[1] - from[1]) / (cell * 0.7)));
    let before = -1;
    for (let i = 0; i <= steps; i++) {
      const cx = Math.floor((from[0] + ((to[0] - from[0]) * i) / steps - originX) / cell);
      const cy = Math.floor((from[1] + ((to[1] - from[1]) * i) / steps - originY) / cell);
      if (cy * columns + cx === before) continue;
      before = cy * columns + cx;
      for (let y = Math.max(0, cy - half); y <= cy + half && y < rows; y++) bits.fill(1, y * columns + Math.max(0, cx - half), y * columns + Math.min(columns, cx + half + 1));
    }
  }
  return { inBox: boxCounter(summedAreas(bits, columns, rows), columns, rows, originX, originY, cell), along: lineCounter(bits, columns, rows, originX, originY, cell) };
}

function summedAreas(bits: Uint8Array, columns: number, rows: number): Uint32Array {
  const width = columns + 1;
  const sums = new Uint32Array(width * (rows + 1));
  for (let y = 0; y < rows; y++) {
    let row = 0;
    for (let x = 0; x < columns; x++) {
      row += bits[y * columns + x] ?? 0;
      sums[(y + 1) * width + x + 1] = (sums[y * width + x + 1] ?? 0) + row;
    }
  }
  return sums;
}

function boxCounter(sums: Uint32Array, columns: number, rows: number, originX: number, originY: number, cell: number): InkMap["inBox"] {
  const width = columns + 1;
  return (minX, minY, maxX, maxY) => {
    const x0 = Math.max(0, Math.floor((minX - originX) / cell));
    const x1 = Math.min(columns, Math.ceil((maxX - originX) / cell));
    const y0 = Math.max(0, Math.floor((minY - originY) / cell));
    const y1 = Math.min(rows, Math.ceil((maxY - originY) / cell));
    if (x1 <= x0 || y1 <= y0) return 0;
    return (sums[y1 * width + x1] ?? 0) - (sums[y0 * width + x1] ?? 0) - (sums[y1 * width + x0] ?? 0) + (sums[y0 * width + x0] ?? 0);
  };
}

function lineCounter(bits: Uint8Array, columns: number, rows: number, originX: number, originY: number, cell: number): InkMap["along"] {
  return (from, to) => {
    const wx = to[0] - from[0];
    const wy = to[1] - from[1];
    const steps = Math.max(1, Math.ceil(Math.sqrt(wx * wx + wy * wy) / cell));
    const stepX = wx / (steps * cell);
    const stepY = wy / (steps * cell);
    let x = (from[0] - originX) / cell;
    let y = (from[1] - originY) / cell;
    let count = 0;
    for (let i = 0; i <= steps; i++) {
      if (x >= 0 && y >= 0 && x < columns && y < rows) count += bits[(y | 0) * columns + (x | 0)] ?? 0;
      x += stepX;
      y += stepY;
    }
    return count;
  };
}

export function boxInside(outer: PaperBox, minX: number, minY: number, maxX: number, maxY: number): number {
  return Math.max(0, outer.minX - minX) + Math.max(0, outer.minY - minY) + Math.max(0, maxX - outer.maxX) + Math.max(0, maxY - outer.maxY);
}

/** Ink under a turned box, sampled along three lines of it. */
export function turnedInk(map: InkMap, box: TurnedBox): number {
  const c = Math.cos(box.angle);
  const s = Math.sin(box.angle);
  const w = Math.abs(c) * box.halfWidth + Math.abs(s) * box.halfHeight;
  const h = Math.abs(s) * box.halfWidth + Math.abs(c) * box.halfHeight;
  if (map.inBox(box.centre[0] - w, box.centre[1] - h, box.centre[0] + w, box.centre[1] + h) === 0) return 0;
  let ink = 0;
  for (const across of [-1, -0.33, 0.33, 1]) {
    const x = box.centre[0] - s * box.halfHeight * across;
    const y = box.centre[1] + c * box.halfHeight * across;
    ink += map.along([x - c * box.halfWidth, y - s * box.halfWidth], [x + c * box.halfWidth, y + s * box.halfWidth]);
  }
  return ink;
}
