/**
 * Compaction of one axis. Unknowns are the paper coordinates x of clusters (working points that share a coordinate). Rows
 * say x[b] - x[a] >= least, and some also wish x[b] - x[a] = target. Longest paths give a feasible start with every wish met
 * or exceeded; then each cluster in turn moves to the weighted mean of its wishes inside what its rows allow. Unlike a
 * general quadratic programme this cannot fail, has no solver noise and stays feasible after every step. Rows stand in flat
 * arrays: a drawing solves them hundreds of times.
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
export function rowsWithoutCycles<T extends { readonly a: number; readonly b: number }>(count: number, rows: readonly T[], sure: readonly T[] = []): readonly T[] {
  const next: number[][] = Array.from({ length: count }, () => []);
  const kept: T[] = [...sure];
  const reach = new Reach(count);
  for (const row of sure) next[row.a]?.push(row.b);
  for (const row of rows) {
    if (row.a === row.b || reach.goes(next, row.b, row.a)) continue;
    next[row.a]?.push(row.b);
    kept.push(row);
  }
  return kept;
}

/** Walks along rows; its marks are reused from question to question. */
class Reach {
  private readonly seen: Int32Array;
  private readonly stack: Int32Array;
  private round = 0;

  constructor(count: number) {
    this.seen = new Int32Array(count);
    this.stack = new Int32Array(count + 1);
  }

  goes(next: readonly (readonly number[])[], from: number, to: number): boolean {
    const round = ++this.round;
    const { seen, stack } = this;
    let top = 0;
    stack[top++] = from;
    seen[from] = round;
    while (top > 0) {
      const at = stack[--top]!;
      if (at === to) return true;
      for (const other of next[at]!) {
        if (seen[other] === round) continue;
        seen[other] = round;
        stack[top++] = other;
      }
    }
    return false;
  }
}

/** The shape of a set of rows: which clusters each holds apart, those into and out of each cluster side by side, and an order that follows them. */
export interface RowTable {
  readonly count: number;
  readonly a: Int32Array;
  readonly b: Int32Array;
  /** Rows into cluster i: into[intoFrom[i]] up to into[intoFrom[i + 1]]; likewise those out of it. */
  readonly into: Int32Array;
  readonly intoFrom: Int32Array;
  readonly out: Int32Array;
  readonly outFrom: Int32Array;
  readonly order: Int32Array;
}

/** @param rows free of cycles */
export function rowTable(count: number, rows: readonly { readonly a: number; readonly b: number }[]): RowTable {
  const a = new Int32Array(rows.length);
  const b = new Int32Array(rows.length);
  for (let i = 0; i < rows.length; i++) {
    a[i] = rows[i]!.a;
    b[i] = rows[i]!.b;
  }
  const [into, intoFrom] = byCluster(count, b);
  const [out, outFrom] = byCluster(count, a);
  return { count, a, b, into, intoFrom, out, outFrom, order: topologicalOrder(count, b, intoFrom, out, outFrom) };
}

function byCluster(count: number, key: Int32Array): readonly [Int32Array, Int32Array] {
  const from = new Int32Array(count + 1);
  for (let i = 0; i < key.length; i++) from[key[i]! + 1]!++;
  for (let at = 0; at < count; at++) from[at + 1]! += from[at]!;
  const fill = from.slice();
  const list = new Int32Array(key.length);
  for (let i = 0; i < key.length; i++) list[fill[key[i]!]!++] = i;
  return [list, from];
}

function topologicalOrder(count: number, b: Int32Array, intoFrom: Int32Array, out: Int32Array, outFrom: Int32Array): Int32Array {
  const waiting = new Int32Array(count);
  const order = new Int32Array(count);
  let ready = 0;
  for (let at = 0; at < count; at++) {
    waiting[at] = intoFrom[at + 1]! - intoFrom[at]!;
    if (waiting[at] === 0) order[ready++] = at;
  }
  for (let head = 0; head < ready; head++) {
    const at = order[head]!;
    for (let k = outFrom[at]!; k < outFrom[at + 1]!; k++) {
      const to = b[out[k]!]!;
      if (--waiting[to]! === 0) order[ready++] = to;
    }
  }
  return order.subarray(0, ready);
}

/**
 * Coordinates of the clusters, the lowest at 0, paper mm.
 * @param least of each row
 * @param target of each row; 0: no wish
 */
export function compactRows(table: RowTable, least: Float64Array, target: Float64Array): Float64Array {
  const x = new Float64Array(table.count);
  const { a, into, intoFrom, order } = table;
  for (const at of order) {
    let far = 0;
    for (let k = intoFrom[at]!, end = intoFrom[at + 1]!; k < end; k++) {
      const row = into[k]!;
      far = Math.max(far, x[a[row]!]! + Math.max(least[row]!, target[row]!));
    }
    x[at] = far;
  }
  const count = order.length;
  // A row without a wish pulls at nothing.
  const pull = new Float64Array(target.length);
  for (let row = 0; row < target.length; row++) if (target[row] !== 0) pull[row] = 1 / target[row]!;
  for (let sweep = 0; sweep < SWEEPS && swept(x, table, least, pull, sweep % 2 === 0); sweep++);
  let lowest = Infinity;
  for (let at = 0; at < count; at++) lowest = Math.min(lowest, x[at]!);
  for (let at = 0; at < count; at++) x[at]! -= lowest;
  return x;
}

/** Moves each cluster once to the mean of its wishes; true when one moved. Written out in one loop: a drawing runs through it tens of thousands of times. */
function swept(x: Float64Array, table: RowTable, least: Float64Array, pulls: Float64Array, backward: boolean): boolean {
  const { a, b, into, intoFrom, out, outFrom, order } = table;
  const count = order.length;
  let moved = false;
  for (let i = 0; i < count; i++) {
    const at = order[backward ? count - 1 - i : i]!;
    let low = -Infinity;
    let high = Infinity;
    let sum = 0;
    let weight = 0;
    for (let k = intoFrom[at]!, end = intoFrom[at + 1]!; k < end; k++) {
      const row = into[k]!;
      const other = x[a[row]!]!;
      const nearest = other + least[row]!;
      if (nearest > low) low = nearest;
      const pull = pulls[row]!;
      if (pull === 0) continue;
      sum += other * pull + 1;
      weight += pull;
    }
    for (let k = outFrom[at]!, end = outFrom[at + 1]!; k < end; k++) {
      const row = out[k]!;
      const other = x[b[row]!]!;
      const farthest = other - least[row]!;
      if (farthest < high) high = farthest;
      const pull = pulls[row]!;
      if (pull === 0) continue;
      sum += other * pull - 1;
      weight += pull;
    }
    if (weight === 0) continue;
    const mean = sum / weight;
    const next = mean < low ? (low > high ? high : low) : mean > high ? high : mean;
    if (Math.abs(next - x[at]!) >= SETTLED) moved = true;
    x[at] = next;
  }
  return moved;
}
