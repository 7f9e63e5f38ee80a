/**
 * Place: paper coordinates of every working point. Each axis is compacted by itself (compact.ts): order kept, each leg its
 * room, long stretches shortened, points that share a coordinate moving together, so loops stay closed and parallels
 * parallel. Off-axis legs then get their components stretched until they stand clear of every axis on paper (off-axis.ts).
 * A plan is what does not depend on view or stretch; a layout is one solution in flat arrays; placed() spells it out.
 */
import type { PaperBox, PaperPoint, Vec3 } from "../geometry/types";
import { AXES, type Axis } from "./clusters";
import { compactRows, type Row } from "./compact";
import { clearOfAxes, mendOffAxis } from "./off-axis";
import { NO_ROWS, rowsWith, type ExtraRows, type Layout, type Placed, type PlacePlan, type Wishes } from "./place-plan";
import type { Projection } from "./project";
import { targetLength } from "./words";

export { NO_ROWS, placePlan, type ExtraRows, type Layout, type Placed, type PlacePlan, type Wishes } from "./place-plan";

/** Solves one axis. */
export function solveAxis(plan: PlacePlan, wishes: Wishes, axis: Axis, extra: readonly Row[]): Float64Array {
  const { leg, least: order, table } = rowsWith(plan.axes[axis], extra);
  const least = new Float64Array(leg.length);
  const target = new Float64Array(leg.length);
  for (let row = 0; row < leg.length; row++) {
    const of = leg[row]!;
    least[row] = of < 0 ? order[row]! : wishes.least[of * 3 + axis]!;
    target[row] = of < 0 ? 0 : wishes.target[of * 3 + axis]!;
  }
  return compactRows(table, least, target);
}

/** @param extra rows that hold crowded neighbours apart, per axis */
export function layoutAt(plan: PlacePlan, projection: Projection, stretch: number, extra: ExtraRows = NO_ROWS): Layout {
  return layoutOf(plan, projection, wishesAt(plan, projection, stretch), extra);
}

/** As layoutAt, from wishes at hand, which it raises where off-axis legs need it. */
export function layoutOf(plan: PlacePlan, projection: Projection, wishes: Wishes, extra: ExtraRows): Layout {
  const solve = (axis: Axis): Float64Array => solveAxis(plan, wishes, axis, extra[axis] ?? []);
  const layout: Layout = { projection, x: [solve(0), solve(1), solve(2)] };
  return plan.offsets.length === 0 ? layout : mendOffAxis(plan, layout, wishes, solve);
}

export function wishesAt(plan: PlacePlan, projection: Projection, stretch: number): Wishes {
  const least = new Float64Array(plan.edges.length * 3);
  const target = new Float64Array(plan.edges.length * 3);
  plan.edges.forEach((edge, i) => {
    const need = plan.needs[i]!;
    // A leg without pipe is fitting to fitting: it keeps its least room, whatever the stretch.
    const growth = edge.stub !== null || (edge.pieces.length === 0 && edge.kind !== "offset") ? 0 : stretch;
    for (const axis of AXES) {
      if (edge.real[axis] === 0) continue;
      least[i * 3 + axis] = need.least[axis];
      target[i * 3 + axis] = Math.max(need.least[axis], edge.stub ? 0 : targetLength(edge.real[axis], growth));
    }
  });
  for (const { index, clear } of plan.offsets) {
    const lengths: Vec3 = [target[index * 3]!, target[index * 3 + 1]!, target[index * 3 + 2]!];
    const drawn = clearOfAxes(projection, plan.edges[index]!.real, lengths, plan.needs[index]!.travel, clear);
    for (const axis of AXES) least[index * 3 + axis] = target[index * 3 + axis] = drawn[axis];
  }
  return { least, target };
}

/** Box round every working point. */
export function layoutBox(plan: PlacePlan, { projection, x }: Layout): PaperBox {
  const [e, n, u] = projection.axes;
  const [ofE, ofN, ofU] = [plan.axes[0].of, plan.axes[1].of, plan.axes[2].of];
  let minX = Infinity, minY = Infinity, maxX = -Infinity, maxY = -Infinity;
  for (let i = 0; i < plan.ids.length; i++) {
    const [a, b, c] = [x[0][ofE[i]!]!, x[1][ofN[i]!]!, x[2][ofU[i]!]!];
    const px = a * e[0] + b * n[0] + c * u[0];
    const py = a * e[1] + b * n[1] + c * u[1];
    if (px < minX) minX = px;
    if (px > maxX) maxX = px;
    if (py < minY) minY = py;
    if (py > maxY) maxY = py;
  }
  return { minX, minY, maxX, maxY };
}

/** Ends of every drawn leg on paper: x and y of its start, x and y of its end, in the order of `edges`. */
export function layoutLines(plan: PlacePlan, { projection, x }: Layout): Float64Array {
  const lines = new Float64Array(plan.edges.length * 4);
  const [e, n, u] = projection.axes;
  const [ofE, ofN, ofU] = [plan.axes[0].of, plan.axes[1].of, plan.axes[2].of];
  for (let i = 0; i < plan.edges.length; i++) {
    for (let end = 0; end < 2; end++) {
      const at = end === 0 ? plan.from[i]! : plan.to[i]!;
      const [a, b, c] = [x[0][ofE[at]!]!, x[1][ofN[at]!]!, x[2][ofU[at]!]!];
      lines[i * 4 + end * 2] = a * e[0] + b * n[0] + c * u[0];
      lines[i * 4 + end * 2 + 1] = a * e[1] + b * n[1] + c * u[1];
    }
  }
  return lines;
}

export function placed(plan: PlacePlan, { projection, x }: Layout): Placed {
  const at = new Map<string, Vec3>();
  const paper = new Map<string, PaperPoint>();
  const [e, n, u] = projection.axes;
  plan.ids.forEach((id, i) => {
    const drawn: Vec3 = [x[0][plan.axes[0].of[i]!]!, x[1][plan.axes[1].of[i]!]!, x[2][plan.axes[2].of[i]!]!];
    at.set(id, drawn);
    paper.set(id, [drawn[0] * e[0] + drawn[1] * n[0] + drawn[2] * u[0], drawn[0] * e[1] + drawn[1] * n[1] + drawn[2] * u[1]]);
  });
  // A run that comes back ends at the fitting it meets, under its own point's name too.
  for (const { pointId } of plan.sketch.model.nodes) {
    const id = plan.sketch.vertexOf(pointId);
    const [there, point] = [at.get(id), paper.get(id)];
    if (id === pointId || !there || !point) continue;
    at.set(pointId, there);
    paper.set(pointId, point);
  }
  return { sketch: plan.sketch, projection, at, paper };
}

export function placeAll(plan: PlacePlan, projection: Projection, stretch: number, extra: ExtraRows = NO_ROWS): Placed {
  return placed(plan, layoutAt(plan, projection, stretch, extra));
}
