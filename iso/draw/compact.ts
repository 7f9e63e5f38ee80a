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

/** Rows in flat arrays, with those that end and those that start at each cluster side by side: solved thousands of times a second. */
interface RowTable {
  readonly a: Int32Array;
  readonly b: Int32Array;
  readonly least: Float64Array;
  /** 0: no wish. */
  readonly target: Float64Array;
  /** Rows into cluster i: into[intoFrom[i]] up to into[intoFrom[i + 1]]; likewise those out of it. */
  readonly into: Int32Array;
  readonly intoFrom: Int32Array;
  readonly out: Int32Array;
  readonly outFrom: Int32Array;
}

function rowTable(count: number, rows: readonly Row[]): RowTable {
  const a = new Int32Array(rows.length);
  const b = new Int32Array(rows.length);
  const least = new Float64Array(rows.length);
  const target = new Float64Array(rows.length);
  for (let i = 0; i < rows.length; i++) {
    const row = rows[i];
    if (!row) continue;
    a[i] = row.a;
    b[i] = row.b;
    least[i] = row.least;
    target[i] = row.target ?? 0;
  }
  const [into, intoFrom] = grouped(count, b);
  const [out, outFrom] = grouped(count, a);
  return { a, b, least, target, into, intoFrom, out, outFrom };
}

/** Row numbers sorted by cluster, and where each cluster's begin. */
function grouped(count: number, cluster: Int32Array): [Int32Array, Int32Array] {
  const from = new Int32Array(count + 1);
  for (let row = 0; row < cluster.length; row++) from[(cluster[row] ?? 0) + 1]! += 1;
  for (let at = 0; at < count; at++) from[at + 1]! += from[at] ?? 0;
  const next = from.slice();
  const list = new Int32Array(cluster.length);
  for (let row = 0; row < cluster.length; row++) list[next[cluster[row] ?? 0]!++] = row;
  return [list, from];
}

/** @returns paper coordinates, least at 0. Rows must be free of cycles. */
export function compactAxis(count: number, rows: readonly Row[]): readonly number[] {
  if (count === 0) return [];
  const x = new Float64Array(count);
  const table = rowTable(count, rows);
  const { a, least, target, into, intoFrom } = table;
  const order = topologicalOrder(count, table);
  for (const at of order) {
    for (let k = intoFrom[at] ?? 0; k < (intoFrom[at + 1] ?? 0); k++) {
      const row = into[k] ?? 0;
      x[at] = Math.max(x[at] ?? 0, (x[a[row] ?? 0] ?? 0) + Math.max(least[row] ?? 0, target[row] ?? 0));
    }
  }
  for (let sweep = 0; sweep < SWEEPS; sweep++) {
    let moved = 0;
    for (let i = 0; i < order.length; i++) moved = Math.max(moved, relax(x, order[sweep % 2 === 0 ? order.length - 1 - i : i] ?? 0, table));
    if (moved < SETTLED) break;
  }
  let lowest = Infinity;
  for (let at = 0; at < count; at++) lowest = Math.min(lowest, x[at] ?? 0);
  const line: number[] = [];
  for (let at = 0; at < count; at++) line.push((x[at] ?? 0) - lowest);
  return line;
}

function relax(x: Float64Array, at: number, table: RowTable): number {
  const { a, b, least, target, into, intoFrom, out, outFrom } = table;
  let low = -Infinity;
  let high = Infinity;
  let sum = 0;
  let weight = 0;
  for (let k = intoFrom[at] ?? 0, end = intoFrom[at + 1] ?? 0; k < end; k++) {
    const row = into[k] ?? 0;
    const other = x[a[row] ?? 0] ?? 0;
    const wish = target[row] ?? 0;
    low = Math.max(low, other + (least[row] ?? 0));
    if (wish === 0) continue;
    sum += (other + wish) / wish;
    weight += 1 / wish;
  }
  for (let k = outFrom[at] ?? 0, end = outFrom[at + 1] ?? 0; k < end; k++) {
    const row = out[k] ?? 0;
    const other = x[b[row] ?? 0] ?? 0;
    const wish = target[row] ?? 0;
    high = Math.min(high, other - (least[row] ?? 0));
    if (wish === 0) continue;
    sum += (other - wish) / wish;
    weight += 1 / wish;
  }
  if (weight === 0) return 0;
  const wish = Math.min(high, Math.max(low, sum / weight));
  const moved = Math.abs(wish - (x[at] ?? 0));
  x[at] = wish;
  return moved;
}

function topologicalOrder(count: number, { b, intoFrom, out, outFrom }: RowTable): Int32Array {
  const waiting = new Int32Array(count);
  const order = new Int32Array(count);
  let ready = 0;
  for (let at = 0; at < count; at++) {
    waiting[at] = (intoFrom[at + 1] ?? 0) - (intoFrom[at] ?? 0);
    if (waiting[at] === 0) order[ready++] = at;
  }
  for (let head = 0; head < ready; head++) {
    const at = order[head] ?? 0;
    for (let k = outFrom[at] ?? 0; k < (outFrom[at + 1] ?? 0); k++) {
      const to = b[out[k] ?? 0] ?? 0;
      const left = (waiting[to] ?? 0) - 1;
      waiting[to] = left;
      if (left === 0) order[ready++] = to;
    }
  }
  return order.subarray(0, ready);
}
