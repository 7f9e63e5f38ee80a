/**
 * Candidate places of labels: rings round their anchors, weighed against what stands on paper already (pipe and symbols,
 * thin lines, numbers). Tens of thousands are weighed for a sheet, so they live in flat arrays and are made tier by tier,
 * only when the nearer rings leave something to wish for. Long because what fills the arrays and what reads them belong together.
 */
import type { PaperBox, PaperPoint } from "../geometry/types";
import type { DisplayItem } from "./drawing-types";
import { CELLS_PER_MM, type InkMap } from "./ink-map";
import { ALONG_COSINE, leaderIsShort, leaderSkip } from "./label-leaders";
import {
  RINGS, POOR_TIER, POOR_RINGS, FAR_RINGS, NEAR_TIERS, MOST_ANCHORS, TIER_COUNT, PRICE, COST_PER_MM,
  COST_OF_TOUCH, COST_PER_CELL, COST_ON_THIN, COST_PER_THIN_CELL, COST_OF_WORDS_ON_THIN, COST_OVER_THIN, COST_PER_OVER_CELL,
  COST_OUTSIDE, COST_PER_OUTSIDE, COST_ALONG_PIPE, COST_OF_ANCHOR, HALF_ANGLES_UNDER, HALF_ANGLES_OVER,
  MARGIN, LEADER_END, MOST_IN_TIER, type Fineness,
} from "./label-rings";

/** Where a leader may meet a label: a disc about `offset` from the label's middle. */
export interface Hub {
  readonly offset: PaperPoint;
  readonly radius: number;
}

export interface Label {
  readonly id: string;
  readonly anchors: readonly PaperPoint[];
  /** The leader starts this far from the anchor. */
  readonly clear: number;
  /** So far from the anchor a leader square to the pipe runs over the symbol it names, mm; absent = not at all. */
  readonly own?: number;
  readonly halfWidth: number;
  readonly halfHeight: number;
  readonly hubs: readonly Hub[];
  /** Paper directions of the pipe at the anchor: a leader along them reads as pipe. */
  readonly along: readonly PaperPoint[];
  /** A leader shorter than this is left out. */
  readonly leaderFrom: number;
  readonly draw: (centre: PaperPoint, leader: { readonly from: PaperPoint; readonly to: PaperPoint } | null) => readonly DisplayItem[];
}

export interface LabelInk {
  readonly heavy: InkMap;
  readonly light: InkMap;
  readonly room: PaperBox;
}

/** Numbers of a candidate in the store: its middle, its leader's start and end, mm. */
export const STRIDE = 6;
export const X = 0;
export const Y = 1;
export const FROM_X = 2;
export const FROM_Y = 3;
export const TO_X = 4;
export const TO_Y = 5;
const BOX_TOUCHES = 1;
const LEADER_TOUCHES = 2;
export const LED = 4;
/** What its box and leader run over is not known yet. */
const UNKNOWN = 8;

/** Kept from sheet to sheet, since fresh memory costs more than what is written into it; one sheet is done at a time. */
const pool = { at: new Float64Array(STRIDE * 32_768), flags: new Uint8Array(32_768), base: new Int32Array(32_768), over: new Int32Array(32_768), order: new Int32Array(32_768), blocker: new Int32Array(32_768), blockedBy: new Int32Array(32_768), keys: new Float64Array(MOST_IN_TIER) };
const ends = new Float64Array(4);

export class Candidates {
  /** STRIDE numbers for each candidate. */
  at = pool.at;
  flags = pool.flags;
  /** Price of ring, pipe and angle: never more than the whole. What lines cost is worked out when first asked for. */
  base = pool.base;
  private over = pool.over;
  /** Candidates of tiers, cheapest first: those of a tier stand together. */
  order = pool.order;
  /** Label last seen standing on a candidate, and its seat then: while it sits there the candidate is taken, unasked. */
  blocker = pool.blocker;
  blockedBy = pool.blockedBy;
  private count = 0;
  private readonly starts: Int32Array;
  private readonly ends: Int32Array;
  private readonly follows: (Float64Array | null)[];

  constructor(private readonly labels: readonly Label[], private readonly ink: LabelInk, private readonly numbers: InkMap, private readonly fineness: Fineness) {
    this.starts = new Int32Array(labels.length * TIER_COUNT).fill(-1);
    this.ends = new Int32Array(labels.length * TIER_COUNT);
    this.follows = new Array<Float64Array | null>(labels.length).fill(null);
  }

  /** No candidate of a tier is cheaper. */
  leastCost(tier: number): number {
    return Math.floor(tier < POOR_TIER ? RINGS[tier]![0]! * COST_PER_MM : COST_OF_TOUCH + (tier === POOR_TIER ? 0 : FAR_RINGS[tier - POOR_TIER - 1]![0]! * COST_PER_MM));
  }

  /** Where a label's tier begins in `order`; made when first asked for. */
  start(label: number, tier: number): number {
    const at = label * TIER_COUNT + tier;
    if (this.starts[at]! < 0) this.make(label, tier);
    return this.starts[at]!;
  }

  /** Where a tier ends that `start` was asked for. */
  end(label: number, tier: number): number {
    return this.ends[label * TIER_COUNT + tier]!;
  }

  private make(index: number, tier: number): void {
    const label = this.labels[index]!;
    const first = this.count;
    const poor = tier >= POOR_TIER;
    const rings = tier < POOR_TIER ? this.fineness.rings[tier]! : tier === POOR_TIER ? POOR_RINGS : FAR_RINGS[tier - POOR_TIER - 1]!;
    const anchors = Math.min(label.anchors.length, poor ? 1 : tier < NEAR_TIERS ? MOST_ANCHORS : this.fineness.farAnchors);
    const follows = (this.follows[index] ??= followsOf(label, this.fineness));
    for (let ring = 0; ring < rings.length; ring++) {
      for (let anchor = 0; anchor < anchors; anchor++) {
        for (const hub of label.hubs) this.ringPlaces(label, label.anchors[anchor]!, anchor, hub, rings[ring]!, follows, poor, tier > POOR_TIER);
      }
    }
    const made = Math.min(MOST_IN_TIER, this.count - first);
    const { keys } = pool;
    for (let i = 0; i < made; i++) keys[i] = this.base[first + i]! * MOST_IN_TIER + i;
    sortKeys(keys, made);
    for (let i = 0; i < made; i++) this.order[first + i] = first + (keys[i]! % MOST_IN_TIER);
    this.starts[index * TIER_COUNT + tier] = first;
    this.ends[index * TIER_COUNT + tier] = first + made;
  }

  /** Price of a candidate among what stands on paper: base and leader. */
  cost(label: number, candidate: number): number {
    if ((this.flags[candidate]! & UNKNOWN) !== 0) this.over[candidate] = this.linesCost(label, candidate);
    return this.base[candidate]! + this.over[candidate]!;
  }

  /** True when the box lies on pipe, or the leader runs over pipe or a symbol not its own. */
  touches(label: number, candidate: number): boolean {
    this.cost(label, candidate);
    return (this.flags[candidate]! & (BOX_TOUCHES | LEADER_TOUCHES)) !== 0;
  }

  /** Price of thin lines under the box, and of everything under the leader. */
  private linesCost(index: number, candidate: number): number {
    const { at, flags } = this;
    const { heavy, light } = this.ink;
    const o = candidate * STRIDE;
    const label = this.labels[index]!;
    const w = label.halfWidth + MARGIN;
    const h = label.halfHeight + MARGIN;
    const thin = light.countCells(Math.floor((at[o + X]! - w) * CELLS_PER_MM), Math.floor((at[o + Y]! - h) * CELLS_PER_MM), Math.ceil((at[o + X]! + w) * CELLS_PER_MM), Math.ceil((at[o + Y]! + h) * CELLS_PER_MM));
    const onThin = Math.floor(thin > 0 ? (label.leaderFrom > 0 ? COST_OF_WORDS_ON_THIN : COST_ON_THIN) + thin * COST_PER_THIN_CELL : 0);
    flags[candidate]! &= ~UNKNOWN;
    if ((flags[candidate]! & LED) === 0) return onThin;
    const tx = at[o + TO_X]!;
    const ty = at[o + TO_Y]!;
    const wx = tx - at[o + FROM_X]!;
    const wy = ty - at[o + FROM_Y]!;
    const length = Math.sqrt(wx * wx + wy * wy);
    if (leaderIsShort(length)) return onThin;
    const skip = leaderSkip(label.along, label.clear, label.own ?? 0, wx / length, wy / length) / length;
    if (skip >= 1) return onThin;
    ends[0] = at[o + FROM_X]! + wx * skip;
    ends[1] = at[o + FROM_Y]! + wy * skip;
    ends[2] = tx;
    ends[3] = ty;
    const pipe = heavy.under(ends);
    const numbers = this.numbers.under(ends);
    const lines = pipe > 0 || numbers > 0 ? 0 : light.under(ends);
    if (pipe > 0) flags[candidate]! |= LEADER_TOUCHES;
    return onThin + Math.floor((pipe > 0 ? COST_OF_TOUCH + pipe * PRICE : 0) + (numbers > 0 ? 2 * COST_OF_TOUCH : 0) + (lines > 0 ? COST_OVER_THIN + lines * COST_PER_OVER_CELL : 0));
  }

  /** Adds the places of one ring about one anchor that are of the kind asked for. One long loop: a call with fractions as arguments costs more than its work here. */
  private ringPlaces(label: Label, anchor: PaperPoint, place: number, hub: Hub, ring: number, follows: Float64Array, poor: boolean, far: boolean): void {
    const { heavy, room } = this.ink;
    const { numbers, fineness } = this;
    const { count, dx: ways, dy: falls, axial } = fineness.directions;
    const hx = hub.offset[0];
    const hy = hub.offset[1];
    const ax = anchor[0];
    const ay = anchor[1];
    const back = 0.35 * Math.sqrt(hx * hx + hy * hy);
    const w = label.halfWidth + MARGIN;
    const h = label.halfHeight + MARGIN;
    const coverW = label.halfWidth - 0.1;
    const coverH = label.halfHeight - 0.1;
    const reach = label.clear + ring;
    const led = ring >= label.leaderFrom;
    const marks = (led ? LED : 0) | UNKNOWN;
    const fixed = ring * COST_PER_MM + place * COST_OF_ANCHOR;
    if (this.count + count > this.flags.length) this.grow();
    const { at, flags, base, over, blocker } = this;
    const step = ring < HALF_ANGLES_UNDER || ring > HALF_ANGLES_OVER ? 2 : 1;
    for (let i = step === 2 ? Math.floor(ring + place) & 1 : 0; i < count; i += step) {
      const dx = ways[i]!;
      const dy = falls[i]!;
      // The label must lie beyond its hub, not back over the anchor.
      if (hx * dx + hy * dy > back) continue;
      const toX = ax + dx * reach;
      const toY = ay + dy * reach;
      const x = toX + dx * hub.radius - hx;
      const y = toY + dy * hub.radius - hy;
      const out = Math.max(0, room.minX - x + w) + Math.max(0, room.minY - y + h) + Math.max(0, x + w - room.maxX) + Math.max(0, y + h - room.maxY);
      if (out > 0 && !poor) continue;
      // Nor over its anchor, nor over its own leader's middle or end.
      if (Math.abs(ax - x) < coverW && Math.abs(ay - y) < coverH) continue;
      if (Math.abs(ax * 0.4 + toX * 0.6 - x) < coverW && Math.abs(ay * 0.4 + toY * 0.6 - y) < coverH) continue;
      if (Math.abs(toX - dx * LEADER_END - x) < coverW && Math.abs(toY - dy * LEADER_END - y) < coverH) continue;
      const x0 = Math.floor((x - w) * CELLS_PER_MM);
      const x1 = Math.ceil((x + w) * CELLS_PER_MM);
      const y0 = Math.floor((y - h) * CELLS_PER_MM);
      const y1 = Math.ceil((y + h) * CELLS_PER_MM);
      const onPipe = heavy.anyCells(x0, y0, x1, y1);
      if (poor ? !onPipe && out === 0 && !far : onPipe) continue;
      if (numbers.anyCells(x0, y0, x1, y1)) continue;
      const c = this.count++;
      const o = c * STRIDE;
      at[o] = x;
      at[o + 1] = y;
      at[o + 2] = ax + dx * label.clear;
      at[o + 3] = ay + dy * label.clear;
      at[o + 4] = toX;
      at[o + 5] = toY;
      base[c] = fixed + axial[i]! + follows[i]!
        + (onPipe ? COST_OF_TOUCH + heavy.countCells(x0, y0, x1, y1) * COST_PER_CELL : 0) + (out > 0 ? COST_OUTSIDE + out * COST_PER_OUTSIDE : 0);
      over[c] = 0;
      blocker[c] = -1;
      flags[c] = onPipe ? marks | BOX_TOUCHES : marks;
    }
  }

  private grow(): void {
    const longer = <T extends Float64Array | Uint8Array | Int32Array>(list: T, fresh: T): T => {
      fresh.set(list);
      return fresh;
    };
    const count = this.flags.length * 2;
    this.at = pool.at = longer(this.at, new Float64Array(count * STRIDE));
    this.flags = pool.flags = longer(this.flags, new Uint8Array(count));
    this.base = pool.base = longer(this.base, new Int32Array(count));
    this.over = pool.over = longer(this.over, new Int32Array(count));
    this.order = pool.order = longer(this.order, new Int32Array(count));
    this.blocker = pool.blocker = longer(this.blocker, new Int32Array(count));
    this.blockedBy = pool.blockedBy = longer(this.blockedBy, new Int32Array(count));
  }
}

/** Few keys are sorted faster where they are than by a call. */
const FEW_KEYS = 80;

function sortKeys(keys: Float64Array, count: number): void {
  if (count > FEW_KEYS) {
    keys.subarray(0, count).sort();
    return;
  }
  for (let i = 1; i < count; i++) {
    const key = keys[i]!;
    let at = i;
    for (; at > 0 && keys[at - 1]! > key; at--) keys[at] = keys[at - 1]!;
    keys[at] = key;
  }
}

/** Price, by direction, of a leader that runs along its pipe. */
function followsOf(label: Label, { directions: { count, dx, dy } }: Fineness): Float64Array {
  const follows = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    for (const d of label.along) if (Math.abs(d[0] * dx[i]! + d[1] * dy[i]!) > ALONG_COSINE) follows[i] = COST_ALONG_PIPE;
  }
  return follows;
}
