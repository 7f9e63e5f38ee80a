/**
 * Separate: pipes that do not meet but come too close on paper (one lying on another, an end on a foreign pipe) are moved
 * apart. For the worst pair every axis and sense that tells the two apart is tried as one more row of the compaction; the
 * row that helps most is kept; again until nothing helps. Clean crossings in mid-pipe are left to the hidden-line gap.
 */
import { AXES, type Axis } from "./clusters";
import type { Row } from "./compact";
import { mendOffAxis } from "./off-axis";
import { layoutAt, layoutBox, layoutLines, layoutOf, solveAxis, wishesAt, type ExtraRows, type Layout, type PlacePlan, type Wishes } from "./place";
import type { Projection } from "./project";
import * as size from "./sizes";

const ROUNDS = 16;
/** Trials in all: large lines stop here, so that editing stays quick; later where pipe still lies on pipe. */
const TRIALS = 40;
const TRIALS_LAID = 240;
/** Pairs looked at in one round, worst first. */
const PAIRS = 3;
/** Paper added between two that are too close; and more where one lies on the other and a small step may only move it onto a third. */
const STEPS: readonly number[] = [9];
const STEPS_LAID: readonly number[] = [9, 17, 30];
/** A gain smaller than this is not worth a row. */
const LEAST_GAIN = 0.5;
/** Price of a millimetre of larger paper against one of closeness. */
const COST_OF_SIZE = 0.02;
/** Price of a crossing in mid-pipe, of a near touch, and of what touches outright. */
const PRICE_CROSSING = 1;
const PRICE_NEAR = 1;
const PRICE_TOUCH = 5;
/** A pipe lying on another in one line cannot be read at all: price of each mm of it, and of the fact. */
const PRICE_LAID = 20;
const PRICE_LAID_MM = 0.5;
/** Two directions whose sine is under this run together. */
const TOGETHER = 0.035;
/** Lines this near run in one. */
const IN_ONE_MM = 2;

export interface Conflict {
  /** Places of the two legs in the plan. */
  readonly a: number;
  readonly b: number;
  readonly cost: number;
}

/** One state of the search. */
interface Trial {
  readonly rows: ExtraRows;
  readonly layout: Layout;
  readonly conflicts: readonly Conflict[];
  readonly cost: number;
  /** Part of the cost from pipe that lies on pipe. */
  readonly laid: number;
}

export function separateRows(plan: PlacePlan, projection: Projection, stretch: number, start: ExtraRows): ExtraRows {
  const wishes = wishesAt(plan, projection, stretch);
  const first = judged(plan, start, layoutOf(plan, projection, wishes, start));
  const found = searched(plan, first, (now, axis, rows) => movedLayout(plan, now.layout, wishes, axis, rows));
  if (found === first || plan.offsets.length === 0) return found.rows;
  // Off-axis legs stand where their mending led; laid out afresh they may stand a little otherwise, and the search goes on from there.
  const afresh = (rows: ExtraRows): Layout => layoutAt(plan, projection, stretch, rows);
  const again = judged(plan, found.rows, afresh(found.rows));
  return again.cost <= found.cost + LEAST_GAIN ? found.rows : searched(plan, again, (_, __, rows) => afresh(rows)).rows;
}

function searched(plan: PlacePlan, start: Trial, moved: (now: Trial, axis: Axis, rows: ExtraRows) => Layout): Trial {
  let now = start;
  let trials = 0;
  for (let round = 0; round < ROUNDS; round++) {
    const [worst] = now.conflicts;
    const most = worst && worst.cost >= PRICE_LAID ? TRIALS_LAID : TRIALS;
    if (!worst || trials >= most) break;
    let best: Trial | null = null;
    // What frees most of the pipe that lies on pipe, at whatever price: taken when nothing makes the whole better.
    let freed: Trial | null = null;
    for (const [rank, conflict] of now.conflicts.entries()) {
      // The worst few are weighed against each other; the rest only while those cannot be helped.
      if (trials >= most || (rank >= PAIRS && best)) break;
      for (const { axis, row } of optionsFor(plan, now.layout, conflict)) {
        if (trials++ >= most) break;
        const rows = now.rows.map((list, at) => (at === axis ? [...list, row] : list));
        const next = judged(plan, rows, moved(now, axis, rows));
        if (next.cost < (best?.cost ?? now.cost - LEAST_GAIN)) best = next;
        if (next.laid < (freed?.laid ?? now.laid - LEAST_GAIN)) freed = next;
      }
    }
    const better: Trial | null = best ?? freed;
    if (!better) break;
    now = better;
  }
  return now;
}

/** Only the axis with the new row has to be solved again; off-axis legs it left standing badly are mended. */
function movedLayout(plan: PlacePlan, layout: Layout, wishes: Wishes, axis: Axis, rows: ExtraRows): Layout {
  const x: [Float64Array, Float64Array, Float64Array] = [...layout.x];
  x[axis] = solveAxis(plan, wishes, axis, rows[axis] ?? []);
  const moved: Layout = { projection: layout.projection, x };
  if (plan.offsets.length === 0) return moved;
  const own: Wishes = { least: wishes.least.slice(), target: wishes.target.slice() };
  return mendOffAxis(plan, moved, own, (one) => solveAxis(plan, own, one, rows[one] ?? []));
}

function judged(plan: PlacePlan, rows: ExtraRows, layout: Layout): Trial {
  const conflicts = conflictsOf(plan, layoutLines(plan, layout));
  const box = layoutBox(plan, layout);
  let cost = (box.maxX - box.minX + box.maxY - box.minY) * COST_OF_SIZE;
  let laid = 0;
  for (const conflict of conflicts) {
    cost += conflict.cost;
    if (conflict.cost >= PRICE_LAID) laid += conflict.cost;
  }
  return { rows, layout, conflicts, cost, laid };
}

/** Rows that would push the two apart along an axis on which they do not overlap. */
function optionsFor(plan: PlacePlan, layout: Layout, { a, b, cost }: Conflict): readonly { readonly axis: Axis; readonly row: Row }[] {
  return AXES.flatMap((axis) => {
    const { of } = plan.axes[axis];
    const sorted = (edge: number): readonly [number, number] => {
      const [p, q] = [of[plan.from[edge]!]!, of[plan.to[edge]!]!];
      return p < q ? [p, q] : [q, p];
    };
    const [aLow, aHigh] = sorted(a);
    const [bLow, bHigh] = sorted(b);
    const pairs: (readonly [number, number])[] = [];
    for (const pair of [[aHigh, bLow], [bHigh, aLow], [aLow, bLow], [bLow, aLow]] as const) {
      if (pair[0] < pair[1] && !pairs.some((other) => other[0] === pair[0] && other[1] === pair[1])) pairs.push(pair);
    }
    return pairs
      .flatMap(([low, high]) => (cost >= PRICE_LAID ? STEPS_LAID : STEPS).map((step) => ({ axis, row: { a: low, b: high, least: layout.x[axis][high]! - layout.x[axis][low]! + step, target: null } })));
  });
}

/** Pairs of legs that read as touching, worst first. @param lines four numbers a leg (layoutLines) */
export function conflictsOf(plan: PlacePlan, lines: Float64Array): readonly Conflict[] {
  const found: Conflict[] = [];
  const { from, to } = plan;
  const near = size.NEAR_TOUCH;
  for (let i = 0; i < from.length; i++) {
    const [ax, ay, bx, by] = [lines[i * 4]!, lines[i * 4 + 1]!, lines[i * 4 + 2]!, lines[i * 4 + 3]!];
    const lowX = Math.min(ax, bx) - near, highX = Math.max(ax, bx) + near, lowY = Math.min(ay, by) - near, highY = Math.max(ay, by) + near;
    for (let j = i + 1; j < from.length; j++) {
      const cx = lines[j * 4]!, dx = lines[j * 4 + 2]!;
      if ((cx > highX && dx > highX) || (cx < lowX && dx < lowX)) continue;
      const cy = lines[j * 4 + 1]!, dy = lines[j * 4 + 3]!;
      if ((cy > highY && dy > highY) || (cy < lowY && dy < lowY)) continue;
      if (from[i] === from[j] || from[i] === to[j] || to[i] === from[j] || to[i] === to[j]) continue;
      const cost = closeness(ax, ay, bx, by, cx, cy, dx, dy);
      if (cost > 0) found.push({ a: i, b: j, cost });
    }
  }
  return found.sort((p, q) => q.cost - p.cost);
}

function closeness(ax: number, ay: number, bx: number, by: number, cx: number, cy: number, dx: number, dy: number): number {
  const near = size.NEAR_TOUCH;
  const p = Math.min(1, pointGap(ax, ay, cx, cy, dx, dy) / near), q = Math.min(1, pointGap(bx, by, cx, cy, dx, dy) / near);
  const r = Math.min(1, pointGap(cx, cy, ax, ay, bx, by) / near), s = Math.min(1, pointGap(dx, dy, ax, ay, bx, by) / near);
  const touching = 4 - p - q - r - s;
  const laid = touching > 1 ? laidLength(ax, ay, bx, by, cx, cy, dx, dy) : 0;
  if (laid > 0) return PRICE_LAID + PRICE_LAID_MM * laid + PRICE_TOUCH * touching;
  if (crosses(ax, ay, bx, by, cx, cy, dx, dy)) return touching > 0 ? 2 * PRICE_CROSSING + PRICE_TOUCH * touching : PRICE_CROSSING;
  // Two segments that do not cross are nearest at an end.
  return touching === 0 ? 0 : PRICE_NEAR + PRICE_TOUCH * touching;
}

function pointGap(px: number, py: number, ax: number, ay: number, bx: number, by: number): number {
  const wx = bx - ax, wy = by - ay;
  const square = wx * wx + wy * wy;
  const t = square === 0 ? 0 : Math.min(1, Math.max(0, ((px - ax) * wx + (py - ay) * wy) / square));
  const ox = px - ax - t * wx, oy = py - ay - t * wy;
  return Math.sqrt(ox * ox + oy * oy);
}

/** On which side of p-q a point r lies, as twice the area of the three. */
function side(px: number, py: number, qx: number, qy: number, rx: number, ry: number): number {
  return (qx - px) * (ry - py) - (qy - py) * (rx - px);
}

function crosses(ax: number, ay: number, bx: number, by: number, cx: number, cy: number, dx: number, dy: number): boolean {
  return side(ax, ay, bx, by, cx, cy) * side(ax, ay, bx, by, dx, dy) < 0 && side(cx, cy, dx, dy, ax, ay) * side(cx, cy, dx, dy, bx, by) < 0;
}

/** Length two legs share that run together in one line; 0 when they do not. */
export function laidLength(ax: number, ay: number, bx: number, by: number, cx: number, cy: number, dx: number, dy: number): number {
  const wx = bx - ax, wy = by - ay, vx = dx - cx, vy = dy - cy;
  const length = Math.sqrt(wx * wx + wy * wy);
  const other = Math.sqrt(vx * vx + vy * vy);
  if (length === 0 || other === 0 || Math.abs(wx * vy - wy * vx) > TOGETHER * length * other) return 0;
  if (Math.min(Math.abs((cx - ax) * wy - (cy - ay) * wx), Math.abs((dx - ax) * wy - (dy - ay) * wx)) > IN_ONE_MM * length) return 0;
  const s = ((cx - ax) * wx + (cy - ay) * wy) / length, t = ((dx - ax) * wx + (dy - ay) * wy) / length;
  return Math.max(0, Math.min(length, Math.max(s, t)) - Math.max(0, Math.min(s, t)));
}
