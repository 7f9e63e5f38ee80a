/**
 * The smallest box a spool can be put in, whichever way it is turned. What is measured: the rims of its pipes, fittings
 * and flanges, each a disc (a centre, an axis, a radius), whose reach along a unit direction d is exactly
 * c·d ± r·sqrt(1 - (a·d)²); elbows and bends add discs along their arc. Valve bodies and stems beyond their ends are not
 * known and left out.
 *
 * Method. A box is a frame of three square directions. Frames made of the spool's own directions (its pipes, its longest
 * diagonal, two at a time) are tried first, the best of them turned about their three axes and the three between, step
 * halved down to SMALLEST_STEP. Exact support functions, so the box given always holds the spool: an upper
 * bound: its volume lies within 1 % of the smallest, its excess over the room within 1 % of the room's length, of what a
 * dense grid of rotations finds in the tests. A box that fits the room beats one that does not, then the smaller excess,
 * then the smaller volume. Deterministic: no dice, fixed order.
 * More than MOST_DISCS rims: frames are sought on those that reach out farthest, the best one only is turned further, and
 * the result is measured on all. A little over 200 lines: one search is read on one page.
 */
import type { Vec3 } from "../geometry/types";
import { NEARLY_ALONG } from "../geometry/tolerances";
import { vecCross, vecDistance, vecDot, vecPerpendicular, vecReject, vecSub, vecUnit } from "../geometry/vec3";

/** A rim of a pipe or flange: a disc square to its axis. Millimetres. */
export interface Disc {
  readonly centre: Vec3;
  readonly axis: Vec3;
  readonly radiusMm: number;
}

export interface ShippingBox {
  /** Longest first, mm. */
  readonly sizeMm: Vec3;
  /** By how much its worst side stands out of the room, mm; 0 when it goes in. */
  readonly overMm: number;
  /** Direction of its longest side. */
  readonly along: Vec3;
}

/** Three unit directions square to each other, nine numbers one after the other: the search turns thousands and keeps few. */
type Frame = number[];
/** Where a direction begins in a frame. */
type Way = 0 | 3 | 6;
interface Try { readonly frame: Frame; readonly sizes: Vec3; readonly overMm: number; readonly volume: number }

const MOST_DISCS = 48;
const MOST_DIRECTIONS = 6;
const REFINED_STARTS = 4;
const QUICK_DIRECTIONS = 3;
const FIRST_STEP = (15 * Math.PI) / 180;
/** 0.2°: a hand on a full truck length, well under the one percent that is promised. */
const SMALLEST_STEP = (0.2 * Math.PI) / 180;
const AXES: Frame = frameOf([1, 0, 0], [0, 1, 0], [0, 0, 1]);

/** Whether a spool's axis-parallel box goes into the room as it lies, so that no search is needed to say that it ships. */
export function boxFits(sizeMm: Vec3, roomMm: Vec3): boolean {
  return overOf(sizeMm[0], sizeMm[1], sizeMm[2], longestFirst(roomMm)) <= 0;
}

/** The smallest box over rotations. `refinedStarts` frames are turned further; 0 stops at the spool's own directions: enough where it fits already. */
export function shippingBox(discs: readonly Disc[], roomMm: Vec3, refinedStarts: number = REFINED_STARTS): ShippingBox {
  if (discs.length === 0) return { sizeMm: [0, 0, 0], overMm: 0, along: [1, 0, 0] };
  const room = longestFirst(roomMm);
  const all = flattened(discs);
  if (refinedStarts === 0) return boxOf(ownFrames(discs).map((frame) => tried(frame, all, room)).sort(better)[0]!);
  const few = discs.length <= MOST_DISCS ? discs : outermost(discs, all);
  const rims = few === discs ? all : flattened(few);
  const starts = startFrames(few).map((frame) => tried(frame, rims, room)).sort(better).slice(0, few === discs ? refinedStarts : 1);
  return boxOf(starts.map((start) => tried(refine(start, rims, room).frame, all, room)).sort(better)[0]!);
}

function boxOf(best: Try): ShippingBox {
  const at = best.sizes.indexOf(Math.max(...best.sizes)) * 3;
  return { sizeMm: longestFirst(best.sizes), overMm: Math.max(best.overMm, 0), along: [best.frame[at]!, best.frame[at + 1]!, best.frame[at + 2]!] };
}

function longestFirst(v: Vec3): Vec3 {
  return [Math.max(v[0], v[1], v[2]), middleOf(v[0], v[1], v[2]), Math.min(v[0], v[1], v[2])];
}

function middleOf(a: number, b: number, c: number): number {
  return Math.max(Math.min(a, b), Math.min(Math.max(a, b), c));
}

/** By how much the worst of three sides, each against its like by length, is longer than the room's; negative when all go in. */
function overOf(a: number, b: number, c: number, room: Vec3): number {
  return Math.max(Math.max(a, b, c) - room[0], middleOf(a, b, c) - room[1], Math.min(a, b, c) - room[2]);
}

function better(a: Try, b: Try): number {
  const overA = Math.max(a.overMm, 0);
  const overB = Math.max(b.overMm, 0);
  return overA !== overB ? overA - overB : a.volume - b.volume;
}

function tried(frame: Frame, rims: Float64Array, room: Vec3): Try {
  const [a, b, c] = [extentAlong(frame, 0, rims), extentAlong(frame, 3, rims), extentAlong(frame, 6, rims)];
  return { frame, sizes: [a, b, c], overMm: overOf(a, b, c, room), volume: a * b * c };
}

/** A copy of the frame when it beats the best so far, else that one; its third side is measured only when the first two leave a chance. */
function betterTry(frame: Frame, rims: Float64Array, room: Vec3, best: Try): Try {
  const a = extentAlong(frame, 0, rims);
  const b = extentAlong(frame, 3, rims);
  const most = Math.max(best.overMm, 0);
  if (Math.max(a, b) - room[0] > most || Math.min(a, b) - room[1] > most) return best;
  const c = extentAlong(frame, 6, rims);
  const over = overOf(a, b, c, room);
  if (Math.max(over, 0) > most || (Math.max(over, 0) === most && a * b * c >= best.volume)) return best;
  return { frame: frame.slice(), sizes: [a, b, c], overMm: over, volume: a * b * c };
}

/** Seven numbers a disc (centre, axis, radius): the search reads them some ten thousand times. */
function flattened(discs: readonly Disc[]): Float64Array {
  const rims = new Float64Array(discs.length * 7);
  for (let i = 0, at = 0; i < discs.length; i++) {
    const { centre, axis, radiusMm } = discs[i]!;
    rims[at++] = centre[0];
    rims[at++] = centre[1];
    rims[at++] = centre[2];
    rims[at++] = axis[0];
    rims[at++] = axis[1];
    rims[at++] = axis[2];
    rims[at++] = radiusMm;
  }
  return rims;
}

/** How far the discs reach along one of a frame's directions, from side to side, mm. */
function extentAlong(frame: Frame, way: Way, rims: Float64Array): number {
  const x = frame[way]!;
  const y = frame[way + 1]!;
  const z = frame[way + 2]!;
  let low = Infinity;
  let high = -Infinity;
  for (let i = 0; i < rims.length; i += 7) {
    const lean = rims[i + 3]! * x + rims[i + 4]! * y + rims[i + 5]! * z;
    const reach = rims[i + 6]! * Math.sqrt(Math.max(1 - lean * lean, 0));
    const at = rims[i]! * x + rims[i + 1]! * y + rims[i + 2]! * z;
    if (at - reach < low) low = at - reach;
    if (at + reach > high) high = at + reach;
  }
  return high - low;
}

/** The plant's axes and one frame for each of the first few ways its pipes go: all that is asked of a spool that ships anyway. */
function ownFrames(discs: readonly Disc[]): Frame[] {
  const ways: Vec3[] = [];
  for (const { axis } of discs) {
    if (ways.length < QUICK_DIRECTIONS && ways.every((known) => Math.abs(vecDot(known, axis)) < 1 - NEARLY_ALONG)) ways.push(axis);
  }
  return [AXES, ...ways.map((first, i): Frame => {
    const second = squareTo(ways[i === 0 ? 1 : 0] ?? first, first) ?? vecPerpendicular(first);
    return frameOf(first, second, vecCross(first, second));
  })];
}

/** Frames made of two of the spool's own directions each, and the plant's axes. */
function startFrames(discs: readonly Disc[]): Frame[] {
  const ways = ownDirections(discs);
  const frames: Frame[] = [AXES];
  for (const first of ways) {
    const seconds = ways.map((way) => squareTo(way, first)).filter((way) => way !== null);
    if (seconds.length === 0) seconds.push(vecPerpendicular(first));
    for (const second of seconds) {
      const upright = frameOf(first, second, vecCross(first, second));
      const leaning = upright.slice();
      turn(leaning, 0, 3, Math.PI / 4);
      frames.push(upright, leaning);
    }
  }
  return frames;
}

function squareTo(way: Vec3, first: Vec3): Vec3 | null {
  const rest = vecReject(way, first);
  return Math.hypot(...rest) < NEARLY_ALONG ? null : vecUnit(rest);
}

/** The longest diagonal between rims, then the axes of the discs, no two alike. */
function ownDirections(discs: readonly Disc[]): Vec3[] {
  const ways: Vec3[] = [];
  const add = (way: Vec3 | null): void => {
    if (way && ways.length < MOST_DIRECTIONS && ways.every((known) => Math.abs(vecDot(known, way)) < 1 - NEARLY_ALONG)) ways.push(way);
  };
  add(longestDiagonal(discs));
  for (const disc of discs) add(disc.axis);
  return ways;
}

function longestDiagonal(discs: readonly Disc[]): Vec3 | null {
  let [from, to, most] = [0, 0, 0];
  for (let i = 0; i < discs.length; i++) {
    for (let k = i + 1; k < discs.length; k++) {
      const apart = vecDistance(discs[i]!.centre, discs[k]!.centre);
      if (apart > most) [from, to, most] = [i, k, apart];
    }
  }
  return most > 0 ? vecUnit(vecSub(discs[to]!.centre, discs[from]!.centre)) : null;
}

/** The rims that reach out farthest along evenly spread directions (a golden spiral on the sphere). */
function outermost(discs: readonly Disc[], rims: Float64Array): Disc[] {
  const kept = new Set<Disc>();
  for (let i = 0; i < MOST_DISCS; i++) {
    const z = 1 - (2 * i + 1) / MOST_DISCS;
    const level = Math.sqrt(1 - z * z);
    const turn = i * Math.PI * (3 - Math.sqrt(5));
    const d: Vec3 = [level * Math.cos(turn), level * Math.sin(turn), z];
    kept.add(discs[farthest(d, rims)]!);
  }
  return [...kept];
}

function farthest([x, y, z]: Vec3, rims: Float64Array): number {
  let far = -Infinity;
  let index = 0;
  for (let i = 0; i < rims.length; i += 7) {
    const lean = rims[i + 3]! * x + rims[i + 4]! * y + rims[i + 5]! * z;
    const reach = rims[i]! * x + rims[i + 1]! * y + rims[i + 2]! * z + rims[i + 6]! * Math.sqrt(Math.max(1 - lean * lean, 0));
    if (reach > far) [far, index] = [reach, i / 7];
  }
  return index;
}

/** Pairs of frame directions that are turned into each other, and by which share: the three axes, then two at a time. */
const TURNS: readonly (readonly (readonly [Way, Way, number])[])[] = [
  [[0, 3, 1]], [[3, 6, 1]], [[6, 0, 1]],
  [[0, 3, 0.7], [3, 6, 0.7]], [[0, 3, 0.7], [3, 6, -0.7]], [[3, 6, 0.7], [6, 0, 0.7]], [[3, 6, 0.7], [6, 0, -0.7]],
];

function refine(start: Try, rims: Float64Array, room: Vec3): Try {
  const frame = start.frame.slice();
  let best = start;
  for (let step = FIRST_STEP; step > SMALLEST_STEP; ) {
    let found = best;
    for (const turns of TURNS) {
      for (let sign = 1; sign >= -1; sign -= 2) {
        for (let i = 0; i < 9; i++) frame[i] = best.frame[i]!;
        for (const way of turns) turn(frame, way[0], way[1], sign * way[2] * step);
        found = betterTry(frame, rims, room, found);
      }
    }
    if (found === best) step /= 2;
    best = found;
  }
  return best;
}

function frameOf(a: Vec3, b: Vec3, c: Vec3): Frame {
  return [a[0], a[1], a[2], b[0], b[1], b[2], c[0], c[1], c[2]];
}

/** Turns a frame in the plane of two of its directions, in place; the third stays. */
function turn(frame: Frame, a: Way, b: Way, angle: number): void {
  const cos = Math.cos(angle);
  const sin = Math.sin(angle);
  for (let i = 0; i < 3; i++) {
    const u = frame[a + i]!;
    const v = frame[b + i]!;
    frame[a + i] = u * cos + v * sin;
    frame[b + i] = v * cos - u * sin;
  }
}
