/** Clusters: along each axis by itself, the working points that share a coordinate on paper. */
import type { Row } from "./compact";
import * as size from "./sizes";
import type { Sketch, SketchEdge } from "./sketch";

export type Axis = 0 | 1 | 2;
export const AXES: readonly Axis[] = [0, 1, 2];

export interface AxisClusters {
  readonly count: number;
  /** Cluster of each vertex id, numbered along the axis. */
  readonly of: ReadonlyMap<string, number>;
  /** Mean real coordinate of each cluster. */
  readonly mean: readonly number[];
}

/**
 * Unites points joined by a leg without a component along the axis (a slope counts as level), then merges neighbours within
 * MERGE_MM unless a leg joins them along this axis; loose ends of stubs are never merged along their own leg.
 */
export function clustersOf(sketch: Sketch, axis: Axis): AxisClusters {
  const ids = [...sketch.vertices.keys()];
  const index = new Map(ids.map((id, at) => [id, at]));
  const parent = ids.map((_, at) => at);
  const root = (at: number): number => {
    let top = at;
    while (parent[top] !== top) top = parent[top] ?? top;
    parent[at] = top;
    return top;
  };
  const indexOf = (id: string): number => index.get(id) ?? 0;
  for (const edge of sketch.edges) if (edge.real[axis] === 0) parent[root(indexOf(edge.from))] = root(indexOf(edge.to));
  const joined = sketch.edges.filter((edge) => edge.real[axis] !== 0);
  const loose = new Set(joined.filter((edge) => edge.stub).map((edge) => indexOf(edge.stub === "from" ? edge.from : edge.to)));
  mergeNear(ids.map((id) => sketch.vertices.get(id)?.position[axis] ?? 0), root, parent, joined.map((edge) => [indexOf(edge.from), indexOf(edge.to)]), loose);
  return numbered(ids, ids.map((id) => sketch.vertices.get(id)?.position[axis] ?? 0), root);
}

function mergeNear(at: readonly number[], root: (i: number) => number, parent: number[], joined: readonly (readonly [number, number])[], loose: ReadonlySet<number>): void {
  const blocked = (p: number, q: number): boolean =>
    loose.has(p) || loose.has(q) ||
    joined.some(([a, b]) => (root(a) === p && root(b) === q) || (root(a) === q && root(b) === p));
  for (let again = true; again; ) {
    again = false;
    const roots = clusterMeans(at, root);
    for (let i = 0; i + 1 < roots.length && !again; i++) {
      const [p, meanP] = roots[i] ?? [0, 0];
      for (let j = i + 1; j < roots.length; j++) {
        const [q, meanQ] = roots[j] ?? [0, 0];
        if (meanQ - meanP > size.MERGE_MM) break;
        if (blocked(p, q)) continue;
        parent[p] = q;
        again = true;
        break;
      }
    }
  }
}

function clusterMeans(at: readonly number[], root: (i: number) => number): readonly (readonly [number, number])[] {
  const sums = new Map<number, { sum: number; count: number }>();
  at.forEach((value, i) => {
    const entry = sums.get(root(i)) ?? { sum: 0, count: 0 };
    sums.set(root(i), { sum: entry.sum + value, count: entry.count + 1 });
  });
  return [...sums].map(([key, { sum, count }]) => [key, sum / count] as const).sort((p, q) => p[1] - q[1] || p[0] - q[0]);
}

function numbered(ids: readonly string[], at: readonly number[], root: (i: number) => number): AxisClusters {
  const means = clusterMeans(at, root);
  const number = new Map(means.map(([key], i) => [key, i]));
  return { count: means.length, of: new Map(ids.map((id, i) => [id, number.get(root(i)) ?? 0])), mean: means.map(([, mean]) => mean) };
}

interface Slab {
  readonly low: readonly [number, number];
  readonly high: readonly [number, number];
}

/** Order rows between clusters that see each other along the axis: something of one lies within SEE_MM beside something of the other. */
export function orderRows(sketch: Sketch, axis: Axis, clusters: AxisClusters): readonly Row[] {
  const others = AXES.filter((other) => other !== axis) as [Axis, Axis];
  const slabs: Slab[][] = Array.from({ length: clusters.count }, () => []);
  const add = (cluster: number, points: readonly (readonly [number, number])[]): void => {
    slabs[cluster]?.push({
      low: [Math.min(...points.map((p) => p[0])), Math.min(...points.map((p) => p[1]))],
      high: [Math.max(...points.map((p) => p[0])), Math.max(...points.map((p) => p[1]))],
    });
  };
  const flat = (id: string): readonly [number, number] => {
    const at = sketch.vertices.get(id)?.position ?? [0, 0, 0];
    return [at[others[0]], at[others[1]]];
  };
  for (const edge of sketch.edges) slabOfEdge(edge, axis, clusters, flat, add);
  const rows: Row[] = [];
  for (let a = 0; a < clusters.count; a++) {
    let seen = 0;
    for (let b = a + 1; b < clusters.count && seen < 4; b++) {
      if (!(slabs[a] ?? []).some((p) => (slabs[b] ?? []).some((q) => slabsSee(p, q)))) continue;
      rows.push({ a, b, least: size.ORDER_GAP, target: null });
      seen++;
    }
  }
  return rows;
}

function slabOfEdge(
  edge: SketchEdge, axis: Axis, clusters: AxisClusters,
  flat: (id: string) => readonly [number, number], add: (cluster: number, points: readonly (readonly [number, number])[]) => void,
): void {
  const from = clusters.of.get(edge.from) ?? 0;
  const to = clusters.of.get(edge.to) ?? 0;
  if (from === to) return add(from, [flat(edge.from), flat(edge.to)]);
  add(from, [flat(edge.from)]);
  add(to, [flat(edge.to)]);
}

function slabsSee(p: Slab, q: Slab): boolean {
  return [0, 1].every((k) => (p.low[k] ?? 0) - size.SEE_MM < (q.high[k] ?? 0) && (q.low[k] ?? 0) - size.SEE_MM < (p.high[k] ?? 0));
}
