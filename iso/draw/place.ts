/**
 * Place: paper coordinates of every working point. Each axis is compacted by itself (compact.ts): order kept, each leg its
 * room, long stretches shortened, points that share a coordinate moving together, so loops stay closed and parallels
 * parallel. Off-axis legs then get their components stretched until they stand clear of every axis on paper.
 */
import type { PaperPoint, Vec3 } from "../geometry/types";
import { AXES, clustersOf, orderRows, type Axis, type AxisClusters } from "./clusters";
import { compactAxis, rowsWithoutCycles, type Row } from "./compact";
import type { MeasureText } from "./drawing-types";
import { axisAngle, project, type Projection } from "./project";
import * as size from "./sizes";
import type { Sketch, SketchEdge } from "./sketch";
import { edgeNeed, targetLength, type EdgeNeed } from "./words";

export interface PlacePlan {
  readonly sketch: Sketch;
  readonly clusters: readonly [AxisClusters, AxisClusters, AxisClusters];
  /** Legs that make rows along each axis, and the order rows, all free of cycles. */
  readonly legs: readonly (readonly AxisLeg[])[];
  readonly order: readonly (readonly Row[])[];
  readonly needs: ReadonlyMap<string, EdgeNeed>;
}

export interface Placed {
  readonly sketch: Sketch;
  readonly projection: Projection;
  /** Drawn coordinates in the model frame, paper mm. */
  readonly at: ReadonlyMap<string, Vec3>;
  readonly paper: ReadonlyMap<string, PaperPoint>;
}

/** Rounds of stretching off-axis legs: each round lengthens a component by a quarter. */
const STRETCH_ROUNDS = 14;
const STRETCH_STEP = 1.25;

/** A leg's row along an axis: which clusters it holds apart. */
interface AxisLeg {
  readonly edge: SketchEdge;
  readonly a: number;
  readonly b: number;
}

export function placePlan(sketch: Sketch, measure: MeasureText): PlacePlan {
  const clusters = AXES.map((axis) => clustersOf(sketch, axis)) as unknown as PlacePlan["clusters"];
  const legs: AxisLeg[][] = [];
  const order: Row[][] = [];
  for (const axis of AXES) {
    const wanted = axisLegs(sketch, axis, clusters[axis]);
    const rows = [...wanted.map((leg) => ({ a: leg.a, b: leg.b, least: 0, target: 1, leg })), ...orderRows(sketch, axis, clusters[axis]).map((row) => ({ ...row, leg: null }))];
    const kept = rowsWithoutCycles(clusters[axis].count, rows);
    legs.push(kept.flatMap((row) => row.leg ?? []));
    order.push(kept.filter((row) => row.leg === null));
  }
  return { sketch, clusters, legs, order, needs: new Map(sketch.edges.map((edge) => [edge.id, edgeNeed(sketch.model, edge, measure)])) };
}

function axisLegs(sketch: Sketch, axis: Axis, clusters: AxisClusters): AxisLeg[] {
  return sketch.edges.filter((edge) => edge.real[axis] !== 0).map((edge) => {
    const from = clusters.of.get(edge.from) ?? 0;
    const to = clusters.of.get(edge.to) ?? 0;
    return edge.real[axis] > 0 ? { edge, a: from, b: to } : { edge, a: to, b: from };
  });
}

/** Least and wished length of each leg's component, which stretching raises. */
interface Wish {
  readonly edge: SketchEdge;
  least: [number, number, number];
  target: [number, number, number];
}

/** @param extra rows that hold crowded neighbours apart, per axis */
export function placeAll(plan: PlacePlan, projection: Projection, stretch: number, extra: readonly (readonly Row[])[] = [[], [], []]): Placed {
  const wishes = plan.sketch.edges.filter((edge) => edge.kind !== "none").map((edge) => wishOf(plan, projection, edge, stretch));
  let placed = solve(plan, projection, wishes, extra);
  for (let round = 0; round < STRETCH_ROUNDS; round++) {
    const poor = wishes.filter((wish) => wish.edge.kind === "offset" && stretchPoor(plan, wish, placed));
    if (poor.length === 0) break;
    placed = solve(plan, projection, wishes, extra);
  }
  return placed;
}

function wishOf(plan: PlacePlan, projection: Projection, edge: SketchEdge, stretch: number): Wish {
  const need = plan.needs.get(edge.id) ?? { least: [0, 0, 0], travel: 0 };
  const least: [number, number, number] = [...need.least];
  const target: [number, number, number] = [0, 0, 0];
  // A leg without pipe is fitting to fitting: it keeps its least room, whatever the stretch.
  const growth = edge.stub || (edge.pieces.length === 0 && edge.kind !== "offset") ? 0 : stretch;
  for (const axis of AXES) target[axis] = edge.real[axis] === 0 ? 0 : Math.max(least[axis], edge.stub ? 0 : targetLength(edge.real[axis], growth));
  if (edge.kind !== "offset") return { edge, least, target };
  const drawn = clearOfAxes(projection, edge.real, target, need.travel);
  return { edge, least: [...drawn], target: drawn };
}

const FACTORS = [1, 1.3, 1.7, 2.2, 3] as const;

/** Smallest stretch of the components that draws the leg clear of every axis and long enough for its words. */
export function clearOfAxes(projection: Projection, real: Vec3, lengths: readonly [number, number, number], travel: number): [number, number, number] {
  let best: [number, number, number] = [...lengths];
  let bestCost = Infinity;
  const choices = (axis: Axis): readonly number[] => (real[axis] === 0 ? [1] : FACTORS);
  for (const e of choices(0)) for (const n of choices(1)) for (const u of choices(2)) {
    const base: [number, number, number] = [lengths[0] * e, lengths[1] * n, lengths[2] * u];
    const paper = project(projection, signed(real, base));
    const length = Math.hypot(paper[0], paper[1]);
    const angle = axisAngle(projection, paper);
    const grow = length > 0 ? Math.max(1, travel / length) : 1;
    const cost = (base[0] + base[1] + base[2]) * grow + (angle < size.AXIS_CLEARANCE_RAD ? 1e4 * (1 + size.AXIS_CLEARANCE_RAD - angle) : 0) + (length < 4 ? 1e6 : 0);
    if (cost < bestCost - size.PAPER_EPS) {
      bestCost = cost;
      best = [base[0] * grow, base[1] * grow, base[2] * grow];
    }
  }
  return best;
}

function signed(real: Vec3, lengths: readonly [number, number, number]): Vec3 {
  return [Math.sign(real[0]) * lengths[0], Math.sign(real[1]) * lengths[1], Math.sign(real[2]) * lengths[2]];
}

/** Lengthens the component that helps a poor off-axis leg most; says whether it was poor. */
function stretchPoor(plan: PlacePlan, wish: Wish, placed: Placed): boolean {
  const { edge } = wish;
  const from = placed.at.get(edge.from);
  const to = placed.at.get(edge.to);
  if (!from || !to) return false;
  const drawn: [number, number, number] = [Math.abs(to[0] - from[0]), Math.abs(to[1] - from[1]), Math.abs(to[2] - from[2])];
  const paper = project(placed.projection, signed(edge.real, drawn));
  const short = Math.hypot(paper[0], paper[1]) < (plan.needs.get(edge.id)?.travel ?? 0) - 0.5;
  if (!short && axisAngle(placed.projection, paper) >= size.AXIS_CLEARANCE_RAD - 0.002) return false;
  let best: Axis = 0;
  let bestScore = -Infinity;
  for (const axis of AXES) {
    if (edge.real[axis] === 0) continue;
    const trial: [number, number, number] = [...drawn];
    trial[axis] *= STRETCH_STEP;
    const moved = project(placed.projection, signed(edge.real, trial));
    const score = axisAngle(placed.projection, moved) + (short ? Math.hypot(moved[0], moved[1]) / 100 : 0);
    if (score > bestScore) [best, bestScore] = [axis, score];
  }
  wish.least[best] = drawn[best] * STRETCH_STEP;
  wish.target[best] = Math.max(wish.target[best], wish.least[best]);
  return true;
}

function solve(plan: PlacePlan, projection: Projection, wishes: readonly Wish[], extra: readonly (readonly Row[])[]): Placed {
  const wishOf = new Map(wishes.map((wish) => [wish.edge, wish]));
  const lines = AXES.map((axis) => {
    const rows: Row[] = (plan.legs[axis] ?? []).map(({ edge, a, b }) => ({ a, b, least: wishOf.get(edge)?.least[axis] ?? 0, target: wishOf.get(edge)?.target[axis] ?? 1 }));
    const all = [...rows, ...(plan.order[axis] ?? [])];
    const more = extra[axis] ?? [];
    return compactAxis(plan.clusters[axis].count, more.length === 0 ? all : rowsWithoutCycles(plan.clusters[axis].count, more, all));
  });
  const at = new Map<string, Vec3>();
  const paper = new Map<string, PaperPoint>();
  for (const id of plan.sketch.vertices.keys()) {
    const on = (axis: Axis): number => lines[axis]?.[plan.clusters[axis].of.get(id) ?? 0] ?? 0;
    const drawn: Vec3 = [on(0), on(1), on(2)];
    at.set(id, drawn);
    paper.set(id, project(projection, drawn));
  }
  return { sketch: plan.sketch, projection, at, paper };
}
