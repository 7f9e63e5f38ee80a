/**
 * A bitmap of what is inked, half a millimetre a cell, 32 cells a word: whether ink lies in a box takes a word or two for each
 * half millimetre of its height, under a leader a step for each of its length. Measured beside it on the same lines, summed
 * areas answer as fast, but take longer to make than all the questions of a sheet and do not stay in the cache; an index of
 * exact segments took about ten times as long in an earlier trial and found the same places free but for a quarter of a millimetre.
 * Long because drawing into the bits and asking them belong together.
 */
import type { PaperBox, PaperPoint } from "../geometry/types";
import { BOX_STRIDE, writeBox } from "./label-field";
import { boxAroundBoxes, boxAroundSegments, type Segment, type TurnedBox } from "./plane";

/** Cells to a millimetre. Cells of all maps stand on one raster, so that one sum finds a place in each of them. */
export const CELLS_PER_MM = 2;
const CELL = 1 / CELLS_PER_MM;
/** Blank cells round the ink, and the most either way: ink beyond has no map. */
const RIM = 4;
const MOST = 16_384;
const ALL_BITS = 0xffffffff;
/** Rows looked at together. */
const TALL = 8;
/** Steps along a line looked at together. */
const CHUNK = 16;
const scratch = new Float64Array(4);

function bitCount(word: number): number {
  const pairs = word - ((word >>> 1) & 0x55555555);
  const fours = (pairs & 0x33333333) + ((pairs >>> 2) & 0x33333333);
  return (((fours + (fours >>> 4)) & 0x0f0f0f0f) * 0x01010101) >>> 24;
}

export class InkMap {
  /** The raster's column and row this map begins with. */
  private readonly left: number;
  private readonly top: number;
  private readonly columns: number;
  private readonly rows: number;
  private readonly words: number;
  private readonly bits: Uint32Array;
  /** Made when first asked for, once all is drawn. */
  private tall: Uint32Array | null = null;

  /** Blank cells over a box of paper and a rim round it. */
  constructor(minX: number, minY: number, maxX: number, maxY: number) {
    const blank = !Number.isFinite(minX);
    this.left = blank ? 0 : Math.floor(minX * CELLS_PER_MM) - RIM;
    this.top = blank ? 0 : Math.floor(minY * CELLS_PER_MM) - RIM;
    this.columns = blank ? 0 : Math.min(MOST, Math.ceil(maxX * CELLS_PER_MM) + RIM - this.left);
    this.rows = blank ? 0 : Math.min(MOST, Math.ceil(maxY * CELLS_PER_MM) + RIM - this.top);
    this.words = (this.columns + 31) >>> 5;
    this.bits = new Uint32Array(this.words * this.rows);
  }

  /** True when nothing can be inked on it. */
  get blank(): boolean {
    return this.columns === 0;
  }

  /** True when a cell from (x0, y0) up to, not with, (x1, y1) of the raster is inked. Whole numbers only, since it is asked most. */
  anyCells(x0: number, y0: number, x1: number, y1: number): boolean {
    const { bits, words, rows, columns } = this;
    const from = Math.max(0, x0 - this.left);
    const to = Math.min(columns, x1 - this.left) - 1;
    const top = Math.max(0, y0 - this.top);
    const bottom = Math.min(rows, y1 - this.top);
    if (to < from || bottom <= top) return false;
    const first = from >>> 5;
    const last = to >>> 5;
    const leftMask = ALL_BITS << (from & 31);
    const rightMask = ALL_BITS >>> (31 - (to & 31));
    const tall = bottom - top >= TALL;
    const step = tall ? TALL : 1;
    const list = tall ? (this.tall ??= this.risen()) : bits;
    // Eight rows at a time; the last eight may have been seen in part.
    for (let y = top; y < bottom; y += step) {
      const row = (tall && y + TALL > bottom ? bottom - TALL : y) * words;
      if (first === last) {
        if ((list[row + first]! & leftMask & rightMask) !== 0) return true;
        continue;
      }
      if ((list[row + first]! & leftMask) !== 0 || (list[row + last]! & rightMask) !== 0) return true;
      for (let word = first + 1; word < last; word++) if (list[row + word] !== 0) return true;
    }
    return false;
  }

  /** Each word with those of the seven rows below it: what eight rows hold in one look. */
  private risen(): Uint32Array {
    const { words } = this;
    const risen = this.bits.slice();
    for (let rows = 1; rows < TALL; rows *= 2) {
      for (let at = 0, end = risen.length - rows * words; at < end; at++) risen[at]! |= risen[at + rows * words]!;
    }
    return risen;
  }

  /** Inked cells from (x0, y0) up to, not with, (x1, y1) of the raster. */
  countCells(x0: number, y0: number, x1: number, y1: number): number {
    const { bits, words, rows, columns } = this;
    const from = Math.max(0, x0 - this.left);
    const to = Math.min(columns, x1 - this.left) - 1;
    const top = Math.max(0, y0 - this.top);
    const bottom = Math.min(rows, y1 - this.top);
    if (to < from || !this.anyCells(x0, y0, x1, y1)) return 0;
    const first = from >>> 5;
    const last = to >>> 5;
    const leftMask = ALL_BITS << (from & 31);
    const rightMask = ALL_BITS >>> (31 - (to & 31));
    let count = 0;
    for (let y = top; y < bottom; y++) {
      for (let word = first; word <= last; word++) {
        const inked = bits[y * words + word]!;
        if (inked !== 0) count += bitCount(inked & (word === first ? leftMask : ALL_BITS) & (word === last ? rightMask : ALL_BITS));
      }
    }
    return count;
  }

  /** Inked cells inside an axis-parallel box of paper; cells it cuts count whole. */
  inBox(minX: number, minY: number, maxX: number, maxY: number): number {
    return this.countCells(Math.floor(minX * CELLS_PER_MM), Math.floor(minY * CELLS_PER_MM), Math.ceil(maxX * CELLS_PER_MM), Math.ceil(maxY * CELLS_PER_MM));
  }

  /** Inked cells met along a segment. */
  along(from: PaperPoint, to: PaperPoint): number {
    scratch[0] = from[0];
    scratch[1] = from[1];
    scratch[2] = to[0];
    scratch[3] = to[1];
    return this.under(scratch);
  }

  /** Inked cells met along a segment, its ends as four numbers at a place in a list. */
  under(ends: Float64Array, at = 0): number {
    const { bits, columns, rows, words } = this;
    if (columns === 0) return 0;
    const wx = (ends[at + 2]! - ends[at]!) * CELLS_PER_MM;
    const wy = (ends[at + 3]! - ends[at + 1]!) * CELLS_PER_MM;
    const steps = Math.max(1, Math.ceil(Math.sqrt(wx * wx + wy * wy)));
    const stepX = wx / steps;
    const stepY = wy / steps;
    let x = ends[at]! * CELLS_PER_MM - this.left;
    let y = ends[at + 1]! * CELLS_PER_MM - this.top;
    let count = 0;
    for (let i = 0; i <= steps; ) {
      const next = i + CHUNK;
      // Long lines run over blank paper for most of their way.
      if (next <= steps && !this.anyBetween(x, y, x + stepX * CHUNK, y + stepY * CHUNK)) {
        x += stepX * CHUNK;
        y += stepY * CHUNK;
        i = next;
        continue;
      }
      for (const end = Math.min(steps + 1, next); i < end; i++) {
        if (x >= 0 && y >= 0 && x < columns && y < rows) count += (bits[(y | 0) * words + ((x | 0) >>> 5)]! >>> (x & 31)) & 1;
        x += stepX;
        y += stepY;
      }
    }
    return count;
  }

  /** True when a cell of the upright box between two places of this map is inked. */
  private anyBetween(x0: number, y0: number, x1: number, y1: number): boolean {
    const { left, top } = this;
    return this.anyCells(Math.floor(Math.min(x0, x1)) - 1 + left, Math.floor(Math.min(y0, y1)) - 1 + top, Math.floor(Math.max(x0, x1)) + 2 + left, Math.floor(Math.max(y0, y1)) + 2 + top);
  }

  /** Inks the cells within a thickness of a line. */
  drawLine(fromX: number, fromY: number, toX: number, toY: number, thicknessMm: number): void {
    const { bits, columns, rows, words } = this;
    this.tall = null;
    const half = Math.floor((thicknessMm * CELLS_PER_MM) / 2);
    const steps = Math.max(1, Math.ceil((Math.sqrt((toX - fromX) * (toX - fromX) + (toY - fromY) * (toY - fromY)) * CELLS_PER_MM) / 0.7));
    const stepX = ((toX - fromX) * CELLS_PER_MM) / steps;
    const stepY = ((toY - fromY) * CELLS_PER_MM) / steps;
    const startX = fromX * CELLS_PER_MM - this.left;
    const startY = fromY * CELLS_PER_MM - this.top;
    for (let i = 0; i <= steps; i++) {
      const cx = Math.floor(startX + stepX * i);
      const cy = Math.floor(startY + stepY * i);
      const x1 = Math.min(columns - 1, cx + half);
      for (let y = Math.max(0, cy - half), last = Math.min(rows - 1, cy + half); y <= last; y++) {
        for (let x = Math.max(0, cx - half); x <= x1; x++) bits[y * words + (x >>> 5)]! |= 1 << (x & 31);
      }
    }
  }

  /** Inks every cell a turned box reaches. */
  drawBox(box: TurnedBox): void {
    const { columns, rows, words, bits } = this;
    this.tall = null;
    const originX = this.left * CELL;
    const originY = this.top * CELL;
    const c = Math.cos(box.angle);
    const s = Math.sin(box.angle);
    // Half a cell's diagonal beyond the box, so that a cell it only cuts is inked too.
    const reach = CELL * Math.SQRT1_2;
    const w = Math.abs(c) * box.halfWidth + Math.abs(s) * box.halfHeight;
    const h = Math.abs(s) * box.halfWidth + Math.abs(c) * box.halfHeight;
    const x1 = Math.min(columns - 1, Math.floor((box.centre[0] + w - originX) * CELLS_PER_MM) + 1);
    const y1 = Math.min(rows - 1, Math.floor((box.centre[1] + h - originY) * CELLS_PER_MM) + 1);
    for (let y = Math.max(0, Math.floor((box.centre[1] - h - originY) * CELLS_PER_MM) - 1); y <= y1; y++) {
      for (let x = Math.max(0, Math.floor((box.centre[0] - w - originX) * CELLS_PER_MM) - 1); x <= x1; x++) {
        const dx = originX + (x + 0.5) * CELL - box.centre[0];
        const dy = originY + (y + 0.5) * CELL - box.centre[1];
        if (Math.abs(dx * c + dy * s) < box.halfWidth + reach && Math.abs(dy * c - dx * s) < box.halfHeight + reach) bits[y * words + (x >>> 5)]! |= 1 << (x & 31);
      }
    }
  }
}

export function inkMap(segments: readonly Segment[], thicknessMm: number): InkMap {
  const { minX, minY, maxX, maxY } = boxAroundSegments(segments);
  const map = new InkMap(minX, minY, maxX, maxY);
  for (const { from, to } of segments) map.drawLine(from[0], from[1], to[0], to[1], thicknessMm);
  return map;
}

/** Turned boxes, filled. */
export function boxMap(boxes: readonly TurnedBox[]): InkMap {
  const { minX, minY, maxX, maxY } = boxAroundBoxes(boxes);
  const map = new InkMap(minX, minY, maxX, maxY);
  for (const box of boxes) map.drawBox(box);
  return map;
}

export function boxInside(outer: PaperBox, minX: number, minY: number, maxX: number, maxY: number): number {
  return Math.max(0, outer.minX - minX) + Math.max(0, outer.minY - minY) + Math.max(0, maxX - outer.maxX) + Math.max(0, maxY - outer.maxY);
}

/** Ink under a turned box, sampled along four lines of it. */
export function turnedInk(map: InkMap, box: TurnedBox): number {
  writeBox(turned, 0, box);
  return turnedInkAt(map, turned);
}

/** As turnedInk, for a box at the beginning of a list (label-field.ts). */
export function turnedInkAt(map: InkMap, box: Float64Array): number {
  if (map.blank) return 0;
  const cx = box[0]!;
  const cy = box[1]!;
  const w = box[6]!;
  const h = box[7]!;
  if (!map.anyCells(Math.floor((cx - w) * CELLS_PER_MM), Math.floor((cy - h) * CELLS_PER_MM), Math.ceil((cx + w) * CELLS_PER_MM), Math.ceil((cy + h) * CELLS_PER_MM))) return 0;
  const alongX = box[4]! * box[2]!;
  const alongY = box[5]! * box[2]!;
  let ink = 0;
  for (let i = 0; i < ACROSS.length; i++) {
    const x = cx - box[5]! * box[3]! * ACROSS[i]!;
    const y = cy + box[4]! * box[3]! * ACROSS[i]!;
    scratch[0] = x - alongX;
    scratch[1] = y - alongY;
    scratch[2] = x + alongX;
    scratch[3] = y + alongY;
    ink += map.under(scratch);
  }
  return ink;
}

const turned = new Float64Array(BOX_STRIDE);
const ACROSS = [-1, -0.33, 0.33, 1] as const;
