/**
 * Separate: pipes that do not meet but come too close on paper (one lying on another, an end on a foreign pipe) are moved
 * apart. For the worst pair every axis and sense that tells the two apart is tried as one more row of the compaction; the
 * row that helps most is kept; again until nothing helps. Clean crossings in mid-pipe are left to the hidden-line gap.
 */
import { segmentDistance } from "../geometry/paper";
import { AXES } from "./clusters";
import type { Row } from "./compact";
import { placeAll, type Placed, type PlacePlan } from "./place";
import { crossingOf, paperBoxAround, type Segment } from "./plane";
import type { Projection } from "./project";
import * as size from "./sizes";
import type { SketchEdge } from "./sketch";

export type ExtraRows = readonly (readonly Row[])[];
export const NO_ROWS: ExtraRows = [[], [], []];

const ROUNDS = 6;
/** Trials in all: large lines stop here, so that editing stays quick. */
const TRIALS = 16;
/** Paper added between two that are too close. */
const STEP = 9;
/** A gain smaller than this is not worth a row. */
const LEAST_GAIN = 0.5;
/** Price of a millimetre of larger paper against one of closeness. */
const COST_OF_SIZE = 0.02;

interface Conflict {
  readonly a: SketchEdge;
  readonly b: SketchEdge;
  readonly cost: number;
}

export function separateRows(plan: PlacePlan, projection: Projection, stretch: number, start: ExtraRows): ExtraRows {
  let rows = start;
  let placed = placeAll(plan, projection, stretch, rows);
  let conflicts = conflictsOf(placed);
  let trials = 0;
  for (let round = 0; round < ROUNDS && conflicts.length > 0; round++) {
    const now = total(placed, conflicts);
    let best: { rows: ExtraRows; placed: Placed; conflicts: readonly Conflict[]; cost: number } | null = null;
    for (const conflict of conflicts.slice(0, 2)) {
      for (const option of optionsFor(plan, placed, conflict)) {
        if (trials++ >= TRIALS) break;
        const tried = rows.map((list, axis) => (axis === option.axis ? [...list, option.row] : list));
        const moved = placeAll(plan, projection, stretch, tried);
        const left = conflictsOf(moved);
        const cost = total(moved, left);
        if (cost < now - LEAST_GAIN && (!best || cost < best.cost)) best = { rows: tried, placed: moved, conflicts: left, cost };
      }
    }
    if (!best) break;
    ({ rows, placed, conflicts } = best);
  }
  return rows;
}

function total(placed: Placed, conflicts: readonly Conflict[]): number {
  const box = paperBoxAround([...placed.paper.values()]);
  return conflicts.reduce((sum, conflict) => sum + conflict.cost, 0) + (box.maxX - box.minX + box.maxY - box.minY) * COST_OF_SIZE;
}

/** Rows that would push the two apart along an axis on which they do not overlap. */
function optionsFor(plan: PlacePlan, placed: Placed, { a, b }: Conflict): readonly { readonly axis: number; readonly row: Row }[] {
  return AXES.flatMap((axis) => {
    const cluster = (id: string): number => plan.clusters[axis].of.get(id) ?? 0;
    const drawn = (id: string): number => placed.at.get(id)?.[axis] ?? 0;
    const sorted = (edge: SketchEdge): readonly string[] => [edge.from, edge.to].sort((p, q) => cluster(p) - cluster(q));
    const [aLow = a.from, aHigh = a.to] = sorted(a);
    const [bLow = b.from, bHigh = b.to] = sorted(b);
    const pairs = [[aHigh, bLow], [bHigh, aLow], [aLow, bLow], [bLow, aLow]] as const;
    return pairs
      .filter(([low, high]) => cluster(low) < cluster(high))
      .map(([low, high]) => ({ axis, row: { a: cluster(low), b: cluster(high), least: drawn(high) - drawn(low) + STEP, target: null } }));
  });
}

/** Pairs of legs that read as touching, worst first. */
export function conflictsOf(placed: Placed): readonly Conflict[] {
  const edges = placed.sketch.edges.filter((edge) => edge.kind !== "none");
  const lines = edges.map((edge): Segment => ({ from: placed.paper.get(edge.from) ?? [0, 0], to: placed.paper.get(edge.to) ?? [0, 0] }));
  const boxes = lines.map((line) => paperBoxAround([line.from, line.to]));
  const found: Conflict[] = [];
  for (let i = 0; i < edges.length; i++) {
    for (let j = i + 1; j < edges.length; j++) {
      const [p, q, a, b] = [boxes[i], boxes[j], edges[i], edges[j]];
      if (!p || !q || !a || !b || p.minX > q.maxX + size.NEAR_TOUCH || q.minX > p.maxX + size.NEAR_TOUCH || p.minY > q.maxY + size.NEAR_TOUCH || q.minY > p.maxY + size.NEAR_TOUCH) continue;
      if (a.from === b.from || a.from === b.to || a.to === b.from || a.to === b.to) continue;
      const cost = closeness(lines[i] ?? NOWHERE, lines[j] ?? NOWHERE);
      if (cost > 0) found.push({ a, b, cost });
    }
  }
  return found.sort((p, q) => q.cost - p.cost);
}

const NOWHERE: Segment = { from: [0, 0], to: [0, 0] };

function closeness(a: Segment, b: Segment): number {
  const ends = [segmentDistance(a.from, b.from, b.to), segmentDistance(a.to, b.from, b.to), segmentDistance(b.from, a.from, a.to), segmentDistance(b.to, a.from, a.to)];
  const touching = ends.reduce((sum, gap) => sum + Math.max(0, 1 - gap / size.NEAR_TOUCH), 0);
  if (crossingOf(a, b)) return touching > 0 ? 2 + 5 * touching : 1;
  // Two segments that do not cross are nearest at an end.
  const gap = Math.min(...ends);
  return gap >= size.NEAR_TOUCH ? 0 : 1 + 5 * touching;
}
