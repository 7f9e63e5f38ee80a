/**
 * The slow, obvious second answer to closings of whole elbows. Two elbows: roll the first elbow all round in half degrees,
 * bisect wherever the second one's angle comes right, then lay the three straights by elimination. Three elbows: step the
 * first elbow's roll round in tenths of the search's step, turn the second about it until the third's angle is right, and
 * take the best lengths with one straight at a bound. Shares no code and no formula with iso/ways: angles by arc cosine,
 * directions by rolling about an axis, lengths by Gaussian elimination.
 */
export type P = readonly [number, number, number];

/** Inches, NPS 4: ASME B16.9 centre to end of LR 90 and LR 45 (6, 2 1/2), OD 4 1/2 (B36.10M); 60 and 30 on a radius of 6 by 6·tan 30° and 6·tan 15°. */
export const NPS4 = { od: 4.5, reach: new Map([[90, 6], [60, 6 / Math.sqrt(3)], [45, 2.5], [30, 6 * (2 - Math.sqrt(3))]]), radius: 6 };

export interface Ends { p0: P; d0: P; p1: P; d1: P; gap: number; leastPup: number }

const dot = (a: P, b: P): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const plus = (a: P, b: P, k: number): P => [a[0] + k * b[0], a[1] + k * b[1], a[2] + k * b[2]];
const minus = (a: P): P => [-a[0], -a[1], -a[2]];
const between = (a: P, b: P): number => Math.acos(Math.max(-1, Math.min(1, dot(a, b))));
export const unitOf = (a: P): P => plus([0, 0, 0], a, 1 / Math.sqrt(dot(a, a)));
const crossOf = (a: P, b: P): P => [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
const RAD = Math.PI / 180;

/** A direction turned from `along` by an angle, towards a side at roll `roll`. */
export function tiltedFrom(along: P, angle: number, roll: number): P {
  const help: P = Math.abs(along[0]) < 0.6 ? [1, 0, 0] : [0, 1, 0];
  const e = unitOf(crossOf(along, help));
  const f = crossOf(along, e);
  return plus(plus(plus([0, 0, 0], along, Math.cos(angle)), e, Math.sin(angle) * Math.cos(roll)), f, Math.sin(angle) * Math.sin(roll));
}

/** Lengths along three directions that add up to a way, by elimination with pivots; null when a pivot vanishes. */
export function eliminated(columns: readonly P[], way: P): number[] | null {
  const rows = [0, 1, 2].map((i) => [...columns.map((c) => c[i as 0]), way[i as 0]]);
  for (let k = 0; k < 3; k += 1) {
    let best = k;
    for (let i = k + 1; i < 3; i += 1) if (Math.abs(rows[i]![k]!) > Math.abs(rows[best]![k]!)) best = i;
    [rows[k], rows[best]] = [rows[best]!, rows[k]!];
    const pivot = rows[k]![k]!;
    if (Math.abs(pivot) < 1e-9) return null;
    for (let i = 0; i < 3; i += 1) {
      if (i === k) continue;
      const share = rows[i]![k]! / pivot;
      for (let j = k; j < 4; j += 1) rows[i]![j]! -= share * rows[k]![j]!;
    }
  }
  return rows.map((row, k) => row[3]! / row[k]!);
}

/** What the fittings ask: x beyond face to face with one gap; direct 0, or a gap and a pup. */
export function beyond(lengths: readonly number[], reaches: readonly number[], gap: number): number[] {
  return lengths.map((s, j) => s - (reaches[j - 1] ?? 0) - (reaches[j] ?? 0) - gap);
}

const fits = (x: number, { gap, leastPup }: Ends): boolean => Math.abs(x) < 1e-6 || x >= gap + leastPup - 1e-6;

/** Every direction of the middle pipe that turns the two angles: rolls of the first elbow all round, where the second's angle comes right. */
export function twoElbowDirections(ends: Ends, angles: readonly [number, number], rolls = 720): P[] {
  const into = minus(ends.d1);
  const step = (2 * Math.PI) / rolls;
  const at = (roll: number): P => tiltedFrom(ends.d0, angles[0], roll);
  const off = (roll: number): number => between(at(roll), into) - angles[1];
  const offs = Array.from({ length: rolls }, (_, k) => off(k * step));
  const found: number[] = [];
  for (let k = 0; k < rolls; k += 1) {
    const [before, here, next] = [offs[(k + rolls - 1) % rolls]!, offs[k]!, offs[(k + 1) % rolls]!];
    if (here < 0 !== next < 0) found.push(bisected(off, k * step, (k + 1) * step));
    // Both answers between two rolls: the angle turns round there, on the other side of right.
    else if (before < 0 === here < 0 && Math.abs(here) <= Math.abs(before) && Math.abs(here) <= Math.abs(next)) {
      const turn = nearest((roll) => Math.sign(here) * off(roll), (k - 1) * step, (k + 1) * step);
      if (off(turn) < 0 !== here < 0) found.push(bisected(off, (k - 1) * step, turn), bisected(off, turn, (k + 1) * step));
    }
  }
  return found.map(at);
}

function bisected(f: (x: number) => number, from: number, to: number): number {
  let [low, high] = [from, to];
  const negative = f(low) < 0;
  for (let k = 0; k < 60; k += 1) {
    const middle = (low + high) / 2;
    if (f(middle) < 0 === negative) low = middle;
    else high = middle;
  }
  return low;
}

/** Least place by thirds. */
function nearest(f: (x: number) => number, from: number, to: number): number {
  let [low, high] = [from, to];
  for (let k = 0; k < 80; k += 1) {
    const [a, b] = [low + (high - low) / 3, high - (high - low) / 3];
    if (f(a) < f(b)) high = b;
    else low = a;
  }
  return (low + high) / 2;
}

export interface Found { angles: number[]; directions: P[]; lengths: number[] }

/** All two-elbow closings that are out of one plane, with lengths that fit. */
export function twoElbowSearch(ends: Ends, stock: readonly number[] = [90, 45]): Found[] {
  const found: Found[] = [];
  for (const a of stock) {
    for (const b of stock) {
      for (const u of twoElbowDirections(ends, [a * RAD, b * RAD])) {
        const lengths = eliminated([ends.d0, u, minus(ends.d1)], plus(ends.p1, ends.p0, -1));
        const reaches = [NPS4.reach.get(a)!, NPS4.reach.get(b)!];
        if (lengths && beyond(lengths, reaches, ends.gap).every((x) => fits(x, ends))) found.push({ angles: [a, b], directions: [ends.d0, u, minus(ends.d1)], lengths });
      }
    }
  }
  return found;
}

/** Length of the centre line: straights less what the arcs cut off. */
export function centreLength(angles: readonly number[], lengths: readonly number[]): number {
  return lengths.reduce((sum, s) => sum + s, 0) - angles.reduce((sum, a) => sum + NPS4.radius * (2 * Math.tan((a * RAD) / 2) - a * RAD), 0);
}

/** Second directions turned theta2 from u1 and theta3 from the last one: A + B cos + C sin = cos theta3, solved for the roll. */
function secondDirections(u1: P, into: P, theta2: number, theta3: number): P[] {
  const [a, b] = [tiltedFrom(u1, Math.PI / 2, 0), tiltedFrom(u1, Math.PI / 2, Math.PI / 2)];
  const [x, y] = [Math.sin(theta2) * dot(a, into), Math.sin(theta2) * dot(b, into)];
  const want = Math.cos(theta3) - Math.cos(theta2) * dot(u1, into);
  const size = Math.hypot(x, y);
  if (Math.abs(want) > size || size === 0) return [];
  return [1, -1].map((side) => tiltedFrom(u1, theta2, Math.atan2(y, x) + side * Math.acos(want / size)));
}

/** Shortest closing of three elbows of given angles on a grid of rolls; null when the grid meets none. */
export function threeElbowGrid(ends: Ends, angles: readonly [number, number, number], steps: number, slides = 0): (Found & { length: number }) | null {
  const into = minus(ends.d1);
  const way = plus(ends.p1, ends.p0, -1);
  const reaches = angles.map((a) => NPS4.reach.get(a)!);
  const bases = [0, 1, 2, 3].map((j) => (reaches[j - 1] ?? 0) + (reaches[j] ?? 0) + ends.gap);
  const pins = [0, ends.gap + ends.leastPup, ...Array.from({ length: slides }, (_, k) => ends.gap + ends.leastPup + (k + 1) * 0.5)];
  let best: (Found & { length: number }) | null = null;
  for (let k = 0; k < steps; k += 1) {
    const u1 = tiltedFrom(ends.d0, angles[0] * RAD, (2 * Math.PI * k) / steps);
    for (const u2 of secondDirections(u1, into, angles[1] * RAD, angles[2] * RAD)) {
      const directions = [ends.d0, u1, u2, into];
      for (let i = 0; i < 4; i += 1) {
        for (const x of pins) {
          const pinned = bases[i]! + x;
          const others = eliminated(directions.filter((_, j) => j !== i), plus(way, directions[i]!, -pinned));
          if (!others) continue;
          const lengths = [...others.slice(0, i), pinned, ...others.slice(i)];
          if (!beyond(lengths, reaches, ends.gap).every((each) => fits(each, ends))) continue;
          const length = centreLength(angles, lengths);
          if (best === null || length < best.length) best = { angles: [...angles], directions, lengths, length };
        }
      }
    }
  }
  return best;
}
