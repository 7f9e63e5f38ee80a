/** Clusters: along each axis by itself, the working points that share a coordinate on paper. */
import type { Row } from "./compact";
import { fractionsOf, integersOf } from "./flat-lists";
import * as size from "./sizes";
import type { Sketch, SketchEdge } from "./sketch";

export type Axis = 0 | 1 | 2;
export const AXES: readonly Axis[] = [0, 1, 2];

export interface AxisClusters {
  readonly count: number;
  /** Cluster of each vertex, in the order of the sketch's vertices; numbered along the axis. */
  readonly of: Int32Array;
}

/** Vertices of a sketch by number: what every axis needs to know. */
export interface Numbered {
  readonly sketch: Sketch;
  readonly ids: readonly string[];
  /** Legs, and the numbers of their ends. */
  readonly edges: readonly SketchEdge[];
  readonly from: Int32Array;
  readonly to: Int32Array;
}

export function numberedSketch(sketch: Sketch): Numbered {
  const ids = [...sketch.vertices.keys()];
  const place = new Map(ids.map((id, i) => [id, i]));
  const { edges } = sketch;
  return { sketch, ids, edges, from: integersOf(edges, (edge) => place.get(edge.from) ?? 0), to: integersOf(edges, (edge) => place.get(edge.to) ?? 0) };
}

/**
 * Unites points joined by a leg without a component along the axis (a slope counts as level), then merges neighbours within
 * MERGE_MM unless a leg joins them along this axis; loose ends of stubs are never merged along their own leg.
 */
export function clustersOf(numbers: Numbered, axis: Axis): AxisClusters {
  const { sketch, ids, edges, from, to } = numbers;
  const parent = integersOf(ids, (_, i) => i);
  const root = (at: number): number => {
    let top = at;
    while (parent[top] !== top) top = parent[top]!;
    parent[at] = top;
    return top;
  };
  edges.forEach((edge, i) => {
    if (edge.real[axis] === 0) parent[root(from[i]!)] = root(to[i]!);
  });
  const found = new Map<number, Cluster>();
  ids.forEach((id, i) => {
    const value = sketch.vertices.get(id)?.position[axis] ?? 0;
    const at = root(i);
    const cluster = found.get(at);
    if (!cluster) found.set(at, { root: at, sum: value, count: 1, loose: false, joined: new Set() });
    else {
      cluster.sum += value;
      cluster.count += 1;
    }
  });
  edges.forEach((edge, i) => {
    if (edge.real[axis] === 0) return;
    const [a, b] = [found.get(root(from[i]!))!, found.get(root(to[i]!))!];
    a.joined.add(b);
    b.joined.add(a);
    if (edge.stub) (edge.stub === "from" ? a : b).loose = true;
  });
  const sorted = mergeNear([...found.values()].sort(alongAxis), parent);
  const number = new Map(sorted.map((cluster, i) => [cluster.root, i]));
  return { count: sorted.length, of: integersOf(ids, (_, i) => number.get(root(i)) ?? 0) };
}

interface Cluster {
  root: number;
  sum: number;
  count: number;
  /** Holds the loose end of a stub. */
  loose: boolean;
  /** Clusters a leg joins it with along the axis. */
  readonly joined: Set<Cluster>;
}

const meanOf = (cluster: Cluster): number => cluster.sum / cluster.count;
const alongAxis = (p: Cluster, q: Cluster): number => meanOf(p) - meanOf(q) || p.root - q.root;

/** Merges from the lowest up; what lies below has been tried against all that can reach it. */
function mergeNear(sorted: Cluster[], parent: Int32Array): Cluster[] {
  for (let i = 0; i < sorted.length; ) {
    const low = sorted[i]!;
    let merged = false;
    for (let j = i + 1; j < sorted.length; j++) {
      const high = sorted[j]!;
      if (meanOf(high) - meanOf(low) > size.MERGE_MM) break;
      if (low.loose || high.loose || low.joined.has(high)) continue;
      parent[low.root] = high.root;
      unite(high, low);
      sorted.splice(i, 1);
      sorted.sort(alongAxis);
      merged = true;
      break;
    }
    if (!merged) i++;
  }
  return sorted;
}

function unite(kept: Cluster, gone: Cluster): void {
  kept.sum += gone.sum;
  kept.count += gone.count;
  for (const other of gone.joined) {
    other.joined.delete(gone);
    other.joined.add(kept);
    kept.joined.add(other);
  }
}

/** How many clusters beyond it each is ordered against. */
const SEEN_MOST = 4;

/** Order rows between clusters that see each other along the axis: something of one lies within SEE_MM beside something of the other. */
export function orderRows(numbers: Numbered, axis: Axis, clusters: AxisClusters): readonly Row[] {
  const slabs = slabsOf(numbers, axis, clusters);
  const rows: Row[] = [];
  for (let a = 0; a < clusters.count; a++) {
    let seen = 0;
    for (let b = a + 1; b < clusters.count && seen < SEEN_MOST; b++) {
      if (!slabsSee(slabs[a]!, slabs[b]!)) continue;
      rows.push({ a, b, least: size.ORDER_GAP, target: null });
      seen++;
    }
  }
  return rows;
}

/** What of a cluster stands where across the axis: four numbers a thing (low and high along either other axis), the first four round all of it. */
function slabsOf({ sketch, ids, edges, from, to }: Numbered, axis: Axis, { count, of }: AxisClusters): readonly number[][] {
  const [p, q] = AXES.filter((other) => other !== axis) as [Axis, Axis];
  const along = (other: Axis): Float64Array => fractionsOf(ids, (id) => sketch.vertices.get(id)?.position[other] ?? 0);
  const [atP, atQ] = [along(p), along(q)];
  const slabs: number[][] = Array.from({ length: count }, () => [Infinity, -Infinity, Infinity, -Infinity]);
  const add = (cluster: number, one: number, two: number): void => {
    const list = slabs[cluster]!;
    const [lowP, highP, lowQ, highQ] = [Math.min(atP[one]!, atP[two]!), Math.max(atP[one]!, atP[two]!), Math.min(atQ[one]!, atQ[two]!), Math.max(atQ[one]!, atQ[two]!)];
    list.push(lowP, highP, lowQ, highQ);
    list[0] = Math.min(list[0]!, lowP);
    list[1] = Math.max(list[1]!, highP);
    list[2] = Math.min(list[2]!, lowQ);
    list[3] = Math.max(list[3]!, highQ);
  };
  edges.forEach((_, i) => {
    const [a, b] = [from[i]!, to[i]!];
    if (of[a] === of[b]) return add(of[a]!, a, b);
    add(of[a]!, a, a);
    add(of[b]!, b, b);
  });
  return slabs;
}

function slabsSee(a: readonly number[], b: readonly number[]): boolean {
  if (!see(a, 0, b, 0)) return false;
  for (let i = 4; i < a.length; i += 4) {
    if (!see(a, i, b, 0)) continue;
    for (let j = 4; j < b.length; j += 4) if (see(a, i, b, j)) return true;
  }
  return false;
}

function see(a: readonly number[], i: number, b: readonly number[], j: number): boolean {
  const m = size.SEE_MM;
  return a[i]! - m < b[j + 1]! && b[j]! - m < a[i + 1]! && a[i + 2]! - m < b[j + 3]! && b[j + 2]! - m < a[i + 3]!;
}
