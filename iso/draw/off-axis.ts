/**
 * Off-axis legs on paper. A leg keeps 12 degrees from every axis and 20 from the axis of a pipe it meets (nearer than that it
 * reads as going along it), and is long enough for its words. First its components are stretched by themselves, the cheapest
 * way; then, since other legs share its coordinates, what the compaction made of it is mended in rounds. A level leg at 45
 * degrees is drawn level across the paper where the view allows.
 */
import type { Vec3 } from "../geometry/types";
import { AXES, type Axis } from "./clusters";
import type { Layout, OffsetEdge, PlacePlan, Wishes } from "./place-plan";
import type { Projection } from "./project";
import * as size from "./sizes";

/** Rounds of mending: each lengthens one component of every poor leg. */
const ROUNDS = 16;
const STEP = 1.25;
/** Components may be stretched by these factors. */
const FACTORS = [1, 1.25, 1.6, 2, 2.6, 3.4] as const;
/** A leg shorter than this on paper has no direction to speak of. */
const POINT_MM = 4;
/** Two components whose lengths differ by less than this share make 45 degrees. */
const EVEN_SHARE = 0.02;
/** To draw a 45 degree leg level its shorter component is lengthened by at most this. */
const EVEN_MOST = 1.8;
/** Prices of standing too near an axis (per radian) and of being no longer than a point, against mm of leg. */
const PRICE_NEAR = 1e4;
const PRICE_POINT = 1e6;
/** Radians a leg may fall short of its clearance before it is mended. */
const SLACK = 0.002;

/** How far a direction on paper falls short of its clearances, radians; 0 when it keeps them. */
export function shortfall(projection: Projection, x: number, y: number, clear: readonly [number, number, number]): number {
  const length = Math.hypot(x, y);
  if (length < size.PAPER_EPS) return Math.PI;
  let worst = 0;
  for (let k = 0; k < 3; k++) {
    const axis = projection.axes[k]!;
    const angle = Math.asin(Math.min(1, Math.abs(axis[0] * y - axis[1] * x) / length));
    worst = Math.max(worst, clear[k]! - angle);
  }
  return worst;
}

const paperX = (p: Projection, v: Vec3): number => v[0] * p.axes[0][0] + v[1] * p.axes[1][0] + v[2] * p.axes[2][0];
const paperY = (p: Projection, v: Vec3): number => v[0] * p.axes[0][1] + v[1] * p.axes[1][1] + v[2] * p.axes[2][1];

/** Smallest stretch of the components that draws the leg clear of the axes and long enough for its words. */
export function clearOfAxes(projection: Projection, real: Vec3, lengths: Vec3, travel: number, clear: readonly [number, number, number]): [number, number, number] {
  let best: [number, number, number] = [lengths[0], lengths[1], lengths[2]];
  let bestCost = Infinity;
  const signs: Vec3 = [Math.sign(real[0]), Math.sign(real[1]), Math.sign(real[2])];
  const even = evenAxes(real);
  const start: [number, number, number] = [lengths[0], lengths[1], lengths[2]];
  if (even) start[even[0]] = start[even[1]] = Math.max(lengths[even[0]], lengths[even[1]]);
  const choices = (axis: Axis): readonly number[] => (real[axis] === 0 ? ONE : FACTORS);
  for (const e of choices(0)) for (const n of choices(1)) for (const u of choices(2)) {
    const base: [number, number, number] = [start[0] * e, start[1] * n, start[2] * u];
    const way: Vec3 = [signs[0] * base[0], signs[1] * base[1], signs[2] * base[2]];
    const [x, y] = [paperX(projection, way), paperY(projection, way)];
    const length = Math.hypot(x, y);
    const grow = length > 0 ? Math.max(1, travel / length) : 1;
    const cost = (base[0] + base[1] + base[2]) * grow + nearPrice(shortfall(projection, x, y, clear)) + (length < POINT_MM ? PRICE_POINT : 0);
    if (cost < bestCost - size.PAPER_EPS) {
      bestCost = cost;
      best = [base[0] * grow, base[1] * grow, base[2] * grow];
    }
  }
  return best;
}

const ONE: readonly number[] = [1];
const nearPrice = (short: number): number => (short > 0 ? PRICE_NEAR * (1 + short) : 0);

/** The two axes of a leg at 45 degrees in a plane of axes; null for any other. */
function evenAxes(real: Vec3): readonly [Axis, Axis] | null {
  const axes = AXES.filter((axis) => real[axis] !== 0);
  const [p, q] = axes;
  if (axes.length !== 2 || p === undefined || q === undefined) return null;
  const [a, b] = [Math.abs(real[p]), Math.abs(real[q])];
  return Math.abs(a - b) <= EVEN_SHARE * Math.max(a, b) ? [p, q] : null;
}

/** Raises wishes and solves again until every off-axis leg stands clear, or nothing more helps. */
export function mendOffAxis(plan: PlacePlan, start: Layout, wishes: Wishes, solve: (axis: Axis) => Float64Array): Layout {
  const x: [Float64Array, Float64Array, Float64Array] = [...start.x];
  const layout: Layout = { projection: start.projection, x };
  for (let round = 0; round < ROUNDS; round++) {
    const touched = new Set<Axis>();
    for (const offset of plan.offsets) {
      const axis = mendOne(plan, layout, offset, wishes, round);
      if (axis !== null) touched.add(axis);
    }
    if (touched.size === 0) break;
    for (const axis of touched) x[axis] = solve(axis);
  }
  return layout;
}

/** Drawn length of each component. */
function drawnOf(plan: PlacePlan, { x }: Layout, index: number): [number, number, number] {
  const length = (axis: Axis): number => {
    const { of } = plan.axes[axis];
    return Math.abs(x[axis][of[plan.to[index]!]!]! - x[axis][of[plan.from[index]!]!]!);
  };
  return [length(0), length(1), length(2)];
}

/** Lengthens the component that helps a poor leg most; the axis it did that on, or null when the leg is good. */
function mendOne(plan: PlacePlan, layout: Layout, { index, clear }: OffsetEdge, wishes: Wishes, round: number): Axis | null {
  const { projection } = layout;
  const { real } = plan.edges[index]!;
  const drawn = drawnOf(plan, layout, index);
  const toPaper = (lengths: readonly [number, number, number]): readonly [number, number] => {
    const way: Vec3 = [Math.sign(real[0]) * lengths[0], Math.sign(real[1]) * lengths[1], Math.sign(real[2]) * lengths[2]];
    return [paperX(projection, way), paperY(projection, way)];
  };
  const [px, py] = toPaper(drawn);
  const short = Math.hypot(px, py) < plan.needs[index]!.travel - 0.5;
  if (!short && shortfall(projection, px, py, clear) <= SLACK) return round === 0 ? evenOut(projection, real, drawn, wishes, index, clear) : null;
  let best: Axis = 0;
  let bestScore = -Infinity;
  for (const axis of AXES) {
    if (real[axis] === 0) continue;
    const trial: [number, number, number] = [...drawn];
    trial[axis] *= STEP;
    const [x, y] = toPaper(trial);
    const score = -shortfall(projection, x, y, clear) + (short ? Math.hypot(x, y) / 100 : 0);
    if (score > bestScore) [best, bestScore] = [axis, score];
  }
  raise(wishes, index, best, drawn[best] * STEP);
  return best;
}

/** A level leg at 45 degrees whose components came out uneven, in a view that would draw it level. */
function evenOut(projection: Projection, real: Vec3, drawn: readonly [number, number, number], wishes: Wishes, index: number, clear: readonly [number, number, number]): Axis | null {
  const even = evenAxes(real);
  if (!even || even[1] === 2) return null;
  const [short, long] = drawn[even[0]] < drawn[even[1]] ? even : [even[1], even[0]];
  if (drawn[long] - drawn[short] < EVEN_SHARE * drawn[long] || drawn[long] > EVEN_MOST * drawn[short]) return null;
  const way: Vec3 = [Math.sign(real[0]), Math.sign(real[1]), 0];
  if (shortfall(projection, paperX(projection, way), paperY(projection, way), clear) > SLACK) return null;
  raise(wishes, index, short, drawn[long]);
  return short;
}

function raise(wishes: Wishes, index: number, axis: Axis, lengthMm: number): void {
  wishes.least[index * 3 + axis] = lengthMm;
  wishes.target[index * 3 + axis] = Math.max(wishes.target[index * 3 + axis]!, lengthMm);
}
