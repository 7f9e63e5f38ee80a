/** Candidate places of a label: rings of points around its anchors, priced against fixed ink. */
import type { PaperBox, PaperPoint } from "../geometry/types";
import type { DisplayItem } from "./drawing-types";
import { boxInside, type InkMap } from "./ink-map";
import type { TurnedBox } from "./plane";

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

export interface Candidate {
  /** Middle of the label. */
  readonly x: number;
  readonly y: number;
  /** The leader's start at its anchor and its end at the label. */
  readonly fromX: number;
  readonly fromY: number;
  readonly toX: number;
  readonly toY: number;
  readonly ring: number;
  /** Price of ring, box and angle; never more than the whole. */
  readonly base: number;
  readonly boxTouches: boolean;
}

/**
 * Candidates of some rings, cheapest first. Tens of thousands are weighed for one sheet, so each is a single number: its
 * price in steps, then anchor, hub, angle, ring and whether it touches pipe.
 */
export interface Candidates {
  readonly rings: readonly number[];
  readonly keys: Float64Array;
}

/** Rings by tiers: a farther tier is only looked at while the nearer ones leave something to wish for. */
export const TIERS: readonly (readonly number[])[] = [[1.5, 2.8], [4.5, 6.5], [9, 12], [16, 21], [27, 34]];
export const FAR_TIERS: readonly (readonly number[])[] = [[42, 52], [64, 80], [100, 130], [170, 220], [290, 380], [500, 700], [1000, 1500], [2200, 3200]];
/** Price of a millimetre of leader. */
export const COST_PER_MM = 0.7;
const COST_ON_PIPE = 30;
const COST_OUTSIDE = 30;
/** No place on a pipe or outside the room is cheaper. */
export const POOR_FROM = Math.min(COST_ON_PIPE, COST_OUTSIDE);
const ANGLES = 24;
const OFFSET_DEG = 7.5;
/** cos 9°: nearer than this to a pipe or an axis a leader reads as one of them. */
export const ALONG_COSINE = Math.cos((9 * Math.PI) / 180);
const AXIS_DIRECTIONS: readonly PaperPoint[] = [[Math.cos(Math.PI / 6), 0.5], [Math.cos(Math.PI / 6), -0.5], [0, 1]];
const DIRECTIONS: readonly PaperPoint[] = Array.from({ length: ANGLES }, (_, i) => {
  const angle = ((OFFSET_DEG + (i * 360) / ANGLES) * Math.PI) / 180;
  return [Math.cos(angle), Math.sin(angle)];
});
const AXIAL: readonly boolean[] = DIRECTIONS.map((d) => AXIS_DIRECTIONS.some((axis) => Math.abs(axis[0] * d[0] + axis[1] * d[1]) > ALONG_COSINE));

export function labelBox(label: Label, { x, y }: Candidate): TurnedBox {
  return { centre: [x, y], halfWidth: label.halfWidth, halfHeight: label.halfHeight, angle: 0 };
}

/** Which places are asked for: those clear of pipe and inside the room, or the others. */
export type Kind = "clear" | "poor";

/** So far before its end a leader is still outside its label, mm. */
const LEADER_END = 0.8;
const MOST_ANCHORS = 8;
/** Where no place is good one anchor is as good as another. */
const POOR_ANCHORS = 1;
const MOST_HUBS = 16;
/** A number of each: angle and ring in pairs, hub, anchor, and whether pipe is touched. */
const RING_CODES = 2;
const TOUCH_CODES = 2;
const CODES = TOUCH_CODES * RING_CODES * ANGLES * MOST_HUBS * MOST_ANCHORS;
/** Prices are kept in steps of this share of one. */
const PRICE_STEPS = 256;
const scratch = new Float64Array(CODES);

/** Candidates on the given rings (two at most), cheapest base price first. */
export function candidatesOf(label: Label, rings: readonly number[], kind: Kind, ink: LabelInk): Candidates {
  const follows = DIRECTIONS.map((direction) => (label.along.some((d) => Math.abs(d[0] * direction[0] + d[1] * direction[1]) > ALONG_COSINE) ? 8 : 0));
  let count = 0;
  label.anchors.slice(0, kind === "poor" ? POOR_ANCHORS : MOST_ANCHORS).forEach((anchor, place) => label.hubs.slice(0, MOST_HUBS).forEach((hub, end) => {
    const back = 0.35 * Math.sqrt(hub.offset[0] ** 2 + hub.offset[1] ** 2);
    for (let i = 0; i < ANGLES; i++) {
      const direction = DIRECTIONS[i] ?? [1, 0];
      // The label must lie beyond its hub, not back over the anchor.
      if (hub.offset[0] * direction[0] + hub.offset[1] * direction[1] > back) continue;
      const fixed = place * 0.6 + (follows[i] ?? 0) + (AXIAL[i] ? 1.2 : 0);
      for (let r = 0; r < rings.length; r++) {
        const price = placePrice(label, anchor, hub, direction, rings[r] ?? 0, kind, ink);
        if (price === 0) continue;
        const code = ((place * MOST_HUBS + end) * ANGLES + i) * RING_CODES + r;
        scratch[count++] = Math.floor((Math.abs(price) + fixed) * PRICE_STEPS) * CODES + code * TOUCH_CODES + (price < 0 ? 1 : 0);
      }
    }
  }));
  return { rings, keys: scratch.slice(0, count).sort() };
}

/** Price of a place by ring and fixed ink; below nothing when it touches pipe, 0 when it is not of the kind asked for. */
function placePrice(label: Label, anchor: PaperPoint, hub: Hub, d: PaperPoint, ring: number, kind: Kind, ink: LabelInk): number {
  const reach = label.clear + ring;
  const toX = anchor[0] + d[0] * reach;
  const toY = anchor[1] + d[1] * reach;
  const x = toX + d[0] * hub.radius - hub.offset[0];
  const y = toY + d[1] * hub.radius - hub.offset[1];
  const w = label.halfWidth + 0.6;
  const h = label.halfHeight + 0.6;
  const heavy = ink.heavy.inBox(x - w, y - h, x + w, y + h);
  if (heavy > 0 && kind === "clear") return 0;
  const out = boxInside(ink.room, x - w, y - h, x + w, y + h);
  if (heavy > 0 || out > 0 ? kind === "clear" : kind === "poor") return 0;
  if (covers(label, x, y, anchor[0], anchor[1]) || covers(label, x, y, anchor[0] * 0.4 + toX * 0.6, anchor[1] * 0.4 + toY * 0.6)) return 0;
  if (covers(label, x, y, toX - d[0] * LEADER_END, toY - d[1] * LEADER_END)) return 0;
  const light = ink.light.inBox(x - w, y - h, x + w, y + h);
  const price = ring * COST_PER_MM + (light > 0 ? 9 + light * 0.25 : 0) + (out > 0 ? COST_OUTSIDE + out * 3 : 0);
  return heavy > 0 ? -(price + COST_ON_PIPE + heavy * 0.5) : price;
}

export const basePrice = (key: number): number => Math.floor(key / CODES) / PRICE_STEPS;

/** Writes only the middle of the label a key stands for, since most places turn out to be taken. */
export function middleInto(out: Float64Array, label: Label, rings: readonly number[], key: number): void {
  const place = Math.floor((key % CODES) / TOUCH_CODES);
  const turn = Math.floor(place / RING_CODES);
  const end = Math.floor(turn / ANGLES);
  const anchor = label.anchors[Math.floor(end / MOST_HUBS)] ?? NO_HUB.offset;
  const hub = label.hubs[end % MOST_HUBS] ?? NO_HUB;
  const d = DIRECTIONS[turn % ANGLES] ?? NO_HUB.offset;
  const reach = label.clear + (rings[place % RING_CODES] ?? 0) + hub.radius;
  out[0] = anchor[0] + d[0] * reach - hub.offset[0];
  out[1] = anchor[1] + d[1] * reach - hub.offset[1];
}

/** The place a key stands for. */
export function candidateOf(label: Label, rings: readonly number[], key: number): Candidate {
  const code = key % CODES;
  const place = Math.floor(code / TOUCH_CODES);
  const turn = Math.floor(place / RING_CODES);
  const end = Math.floor(turn / ANGLES);
  const anchor = label.anchors[Math.floor(end / MOST_HUBS)] ?? [0, 0];
  const hub = label.hubs[end % MOST_HUBS] ?? NO_HUB;
  const d = DIRECTIONS[turn % ANGLES] ?? [1, 0];
  const ring = rings[place % RING_CODES] ?? 0;
  const toX = anchor[0] + d[0] * (label.clear + ring);
  const toY = anchor[1] + d[1] * (label.clear + ring);
  return {
    x: toX + d[0] * hub.radius - hub.offset[0], y: toY + d[1] * hub.radius - hub.offset[1],
    fromX: anchor[0] + d[0] * label.clear, fromY: anchor[1] + d[1] * label.clear, toX, toY, ring, base: basePrice(key), boxTouches: code % TOUCH_CODES === 1,
  };
}

const NO_HUB: Hub = { offset: [0, 0], radius: 0 };

/** True when a label at (x, y) would lie over a point of its own leader or its anchor. */
function covers(label: Label, x: number, y: number, px: number, py: number): boolean {
  return Math.abs(px - x) < label.halfWidth - 0.1 && Math.abs(py - y) < label.halfHeight - 0.1;
}
