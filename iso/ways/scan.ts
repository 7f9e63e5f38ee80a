/**
 * Walks round a family of ways with one parameter and finds what is worth a fitter's look: the shortest places of every
 * stretch where all straights have room for a pipe, and every place where two faces come just one gap apart and are welded.
 *
 * The walk takes equal steps; between them, ends of stretches and meetings of faces are bisected, shortest places narrowed
 * by the golden section. A stretch, or a pair of meetings, that lies wholly between two steps is looked for wherever the
 * steps beside it point to one (the value turns round close to nothing). What is narrower than that is missed: the step is
 * stated with the answer.
 */
import { WAYS_DIRECT_MM, WAYS_REFINED } from "../geometry/tolerances";

/** One place of a family: null where a straight cannot be told. */
export interface ScanPlace {
  readonly lengthMm: number;
  /** For each straight that is free: x beyond what a pipe needs. All at least 0 = room for every pipe. */
  readonly room: readonly number[];
  /** The same straights' x: 0 = faces welded to each other. NaN where that is not allowed. */
  readonly apart: readonly number[];
  /** Spare clearance from keep-outs; 0 when there are none. */
  readonly spare: number;
}

export type PlaceAt = (t: number) => ScanPlace | null;

const GOLDEN = (Math.sqrt(5) - 1) / 2;
const ROUND = 2 * Math.PI;
/** How far beyond a straight guess from the neighbours a hidden turn may reach. */
const HOPE = 2;

/** Parameters worth a look: local shortest places, and places where two faces are welded. */
export interface Scanned {
  readonly shortest: readonly number[];
  readonly welded: readonly number[];
}

/** Walks a family once round. @param taken the places at equal steps, taken beforehand. */
export function scanFamily(at: PlaceAt, taken: readonly (ScanPlace | null)[]): Scanned {
  const step = ROUND / taken.length;
  return { shortest: shortestPlaces(at, taken, step), welded: weldedPlaces(at, taken, step) };
}

function leastRoom(place: ScanPlace | null): number {
  return place === null ? -Infinity : Math.min(place.spare, ...place.room);
}

function shortestPlaces(at: PlaceAt, taken: readonly (ScanPlace | null)[], step: number): number[] {
  const room = (t: number) => leastRoom(at(t));
  const length = (t: number) => {
    const place = at(t);
    return place !== null && leastRoom(place) >= 0 ? place.lengthMm : Infinity;
  };
  const rooms = taken.map(leastRoom);
  return stretches(rooms, step, room).flatMap((points) => localLeasts(points, length));
}

/** Stretches with room, as rising parameters with refined ends. */
function stretches(rooms: readonly number[], step: number, room: (t: number) => number): number[][] {
  const count = rooms.length;
  const value = (k: number) => rooms[((k % count) + count) % count] ?? -Infinity;
  const found: number[][] = [];
  const first = rooms.findIndex((r) => r < 0);
  if (first < 0) return [Array.from({ length: count + 3 }, (_, k) => (k - 1) * step)];
  let open: number[] | null = null;
  for (let k = first; k <= first + count; k += 1) {
    const [here, before] = [value(k), value(k - 1)];
    if (here >= 0) {
      open ??= [edge(room, k * step, (k - 1) * step)];
      open.push(k * step);
    } else if (open) {
      found.push([...open, edge(room, (k - 1) * step, k * step)]);
      open = null;
    } else if (here > before && here >= value(k + 1) && k < first + count && mayReach(here, before, value(k + 1))) {
      const top = goldenLeast((t) => -room(t), (k - 1) * step, (k + 1) * step);
      if (room(top) >= 0) found.push([edge(room, top, (k - 1) * step), top, edge(room, top, (k + 1) * step)]);
    }
  }
  return found;
}

/** Whether a peak under nothing could stand over it between the steps. */
function mayReach(here: number, before: number, after: number): boolean {
  const rise = Math.max(Number.isFinite(before) ? here - before : 0, Number.isFinite(after) ? here - after : 0);
  return here + HOPE * rise >= 0;
}

/** Last place with room between one with it and one without. */
function edge(room: (t: number) => number, inside: number, outside: number): number {
  let [low, high] = [inside, outside];
  while (Math.abs(high - low) > WAYS_REFINED) {
    const middle = (low + high) / 2;
    if (middle === low || middle === high) break;
    if (room(middle) >= 0) low = middle;
    else high = middle;
  }
  return low;
}

function localLeasts(points: readonly number[], length: (t: number) => number): number[] {
  const lengths = points.map(length);
  return points.flatMap((t, k) => {
    const here = lengths[k] ?? Infinity;
    const [before, after] = [lengths[k - 1] ?? Infinity, lengths[k + 1] ?? Infinity];
    if (!Number.isFinite(here) || here > before || here > after) return [];
    const low = goldenLeast(length, points[k - 1] ?? t, points[k + 1] ?? t);
    return [length(low) < here ? low : t];
  });
}

function weldedPlaces(at: PlaceAt, taken: readonly (ScanPlace | null)[], step: number): number[] {
  const free = Math.max(0, ...taken.map((place) => place?.apart.length ?? 0));
  return Array.from({ length: free }, (_, j) => j).flatMap((j) => {
    const apart = (t: number) => at(t)?.apart[j] ?? NaN;
    return meetings(taken, j, step, apart).filter((t) => othersFit(at(t), j));
  });
}

/** Places where the j-th pair of faces meets, among those the other straights may allow. */
function meetings(taken: readonly (ScanPlace | null)[], j: number, step: number, apart: (t: number) => number): number[] {
  const count = taken.length;
  const place = (k: number) => taken[((k % count) + count) % count] ?? null;
  const value = (k: number) => place(k)?.apart[j] ?? NaN;
  const found: number[] = [];
  for (let k = 0; k < count; k += 1) {
    const [here, next, before] = [value(k), value(k + 1), value(k - 1)];
    if (here < 0 !== next < 0 && Number.isFinite(here) && Number.isFinite(next)) {
      if (mayFit(place(k), place(k + 1), j)) found.push(...meeting(apart, k * step, (k + 1) * step));
    } else if (turnsNear(before, here, next) && mayFit(place(k), place(k + 1), j)) {
      const sign = here < 0 ? -1 : 1;
      const turn = goldenLeast((t) => sign * apart(t), (k - 1) * step, (k + 1) * step);
      const there = apart(turn);
      if (Math.abs(there) <= WAYS_DIRECT_MM) found.push(turn);
      else if (sign * there < 0) found.push(...meeting(apart, (k - 1) * step, turn), ...meeting(apart, turn, (k + 1) * step));
    }
  }
  return found;
}

/** A value that turns round without changing its sign, near enough to nothing to have reached it between the steps. */
function turnsNear(before: number, here: number, next: number): boolean {
  if (here < 0 !== before < 0 || here < 0 !== next < 0) return false;
  const [a, b, c] = [Math.abs(before), Math.abs(here), Math.abs(next)];
  return b <= a && b < c && b - HOPE * Math.max(a - b, c - b) <= 0;
}

/** Whether the other straights could be legal somewhere between two steps. */
function mayFit(from: ScanPlace | null, to: ScanPlace | null, j: number): boolean {
  if (!from || !to) return true;
  return from.room.every((room, k) => {
    const next = to.room[k] ?? room;
    const change = HOPE * Math.abs(next - room);
    const apart = Math.max(from.apart[k] ?? NaN, to.apart[k] ?? NaN);
    return k === j || Math.max(room, next) + change >= 0 || (apart + change >= 0 && Math.min(from.apart[k] ?? 0, to.apart[k] ?? 0) - change <= 0);
  });
}

function othersFit(place: ScanPlace | null, j: number): boolean {
  return place !== null && Math.abs(place.apart[j] ?? NaN) <= WAYS_DIRECT_MM && place.spare >= 0
    && place.room.every((room, k) => k === j || room >= -WAYS_DIRECT_MM || Math.abs(place.apart[k] ?? NaN) <= WAYS_DIRECT_MM);
}

/** Bisection; empty where the sign changes over a pole. */
function meeting(apart: (t: number) => number, from: number, to: number): number[] {
  let [low, high] = [from, to];
  const negative = apart(low) < 0;
  while (high - low > WAYS_REFINED / 1_000) {
    const middle = (low + high) / 2;
    if (middle === low || middle === high) break;
    if (apart(middle) < 0 === negative) low = middle;
    else high = middle;
  }
  const best = Math.abs(apart(low)) <= Math.abs(apart(high)) ? low : high;
  return Math.abs(apart(best)) <= WAYS_DIRECT_MM ? [best] : [];
}

/** Least place between two, for a value with one dip there. */
function goldenLeast(f: (t: number) => number, from: number, to: number): number {
  let [low, high] = [from, to];
  let x = high - GOLDEN * (high - low);
  let y = low + GOLDEN * (high - low);
  let [fx, fy] = [f(x), f(y)];
  // Beyond the square root of float64's grain a dip is flat.
  while (high - low > Math.sqrt(WAYS_REFINED) / 100) {
    if (fx <= fy) {
      [high, y, fy] = [y, x, fx];
      x = high - GOLDEN * (high - low);
      fx = f(x);
    } else {
      [low, x, fx] = [x, y, fy];
      y = low + GOLDEN * (high - low);
      fy = f(y);
    }
  }
  return fx <= fy ? x : y;
}
