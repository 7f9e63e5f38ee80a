/**
 * Compaction of one axis. Unknowns are the paper coordinates x of clusters (working points that share a coordinate). Rows
 * say x[b] - x[a] >= least, and some also wish x[b] - x[a] = target. Longest paths give a feasible start with every wish met
 * or exceeded; then each cluster in turn moves to the weighted mean of its wishes inside what its rows allow. Unlike a
 * general quadratic programme this cannot fail, has no solver noise and stays feasible after every step.
 */

export interface Row {
  readonly a: number;
  readonly b: number;
  readonly least: number;
  /** null: the row only keeps order. */
  readonly target: number | null;
}

/** Sweeps of the descent: moves die out well before this on a hundred clusters. */
const SWEEPS = 40;
/** Paper mm under which a sweep has settled. */
const SETTLED = 0.01;

/** Drops the rows that would close a cycle (contradictory order), keeping earlier ones first, and all that are `sure` to close none. */
export function rowsWithoutCycles<T extends Row>(count: number, rows: readonly T[], sure: readonly T[] = []): readonly T[] {
  const next: number[][] = Array.from({ length: count }, () => []);
  const kept: T[] = [...sure];
  for (const row of sure) next[row.a]?.push(row.b);
  for (const row of rows) {
    if (row.a === row.b || reaches(next, row.b, row.a)) continue;
    next[row.a]?.push(row.b);
    kept.push(row);
  }
  return kept;
}

function reaches(next: readonly (readonly number[])[], from: number, to: number): boolean {
  const seen = new Set<number>([from]);
  const stack = [from];
  for (let at = stack.pop(); at !== undefined; at = stack.pop()) {
    if (at === to) return true;
    for (const other of next[at] ?? []) {
      if (!seen.has(other)) {
        seen.add(other);
        stack.push(other);
      }
    }
  }
  return false;
}

/** @returns paper coordinates, least at 0. Rows must be free of cycles. */
export function compactAxis(count: number, rows: readonly Row[]): readonly number[] {
  const x = new Float64Array(count);
  const after: Row[][] = Array.from({ length: count }, () => []);
  const before: Row[][] = Array.from({ length: count }, () => []);
  for (const row of rows) {
    after[row.a]?.push(row);
    before[row.b]?.push(row);
  }
  const order = topologicalOrder(count, after, before);
  for (const at of order) {
    for (const row of before[at] ?? []) x[at] = Math.max(x[at] ?? 0, (x[row.a] ?? 0) + Math.max(row.least, row.target ?? 0));
  }
  for (let sweep = 0; sweep < SWEEPS; sweep++) {
    let moved = 0;
    const sequence = sweep % 2 === 0 ? [...order].reverse() : order;
    for (const at of sequence) moved = Math.max(moved, relax(x, at, before[at] ?? [], after[at] ?? []));
    if (moved < SETTLED) break;
  }
  const least = count === 0 ? 0 : Math.min(...x);
  return Array.from(x, (value) => value - least);
}

function relax(x: Float64Array, at: number, before: readonly Row[], after: readonly Row[]): number {
  let low = -Infinity;
  let high = Infinity;
  let sum = 0;
  let weight = 0;
  for (const row of before) {
    const other = x[row.a] ?? 0;
    low = Math.max(low, other + row.least);
    if (row.target === null) continue;
    sum += (other + row.target) / row.target;
    weight += 1 / row.target;
  }
  for (const row of after) {
    const other = x[row.b] ?? 0;
    high = Math.min(high, other - row.least);
    if (row.target === null) continue;
    sum += (other - row.target) / row.target;
    weight += 1 / row.target;
  }
  if (weight === 0) return 0;
  const wish = Math.min(high, Math.max(low, sum / weight));
  const moved = Math.abs(wish - (x[at] ?? 0));
  x[at] = wish;
  return moved;
}

function topologicalOrder(count: number, after: readonly (readonly Row[])[], before: readonly (readonly Row[])[]): readonly number[] {
  const waiting = before.map((rows) => rows.length);
  const ready = Array.from({ length: count }, (_, at) => at).filter((at) => waiting[at] === 0);
  const order: number[] = [];
  for (let head = 0; head < ready.length; head++) {
    const at = ready[head] ?? 0;
    order.push(at);
    for (const row of after[at] ?? []) {
      const left = (waiting[row.b] ?? 0) - 1;
      waiting[row.b] = left;
      if (left === 0) ready.push(row.b);
    }
  }
  return order;
}
