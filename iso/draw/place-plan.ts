/** The plan of a placing: clusters, rows and needs of a sketch, which depend on neither view nor stretch; and the shapes of what placing gives. */
import type { PaperPoint, Vec3 } from "../geometry/types";
import { AXES, clustersOf, numberedSketch, orderRows, type Axis, type Numbered } from "./clusters";
import { rowsWithoutCycles, rowTable, type Row, type RowTable } from "./compact";
import type { MeasureText } from "./drawing-types";
import { fractionsOf, integersOf } from "./flat-lists";
import type { Projection } from "./project";
import * as size from "./sizes";
import type { Sketch, SketchEdge } from "./sketch";
import { edgeNeed, type EdgeNeed } from "./words";

export interface PlacePlan {
  readonly sketch: Sketch;
  /** Legs that make rows along each axis, and the order rows, all free of cycles. */
  readonly axes: readonly [AxisPlan, AxisPlan, AxisPlan];
  /** Legs that are drawn, and their ends as places in `ids`. */
  readonly edges: readonly SketchEdge[];
  readonly needs: readonly EdgeNeed[];
  readonly offsets: readonly OffsetEdge[];
  readonly ids: readonly string[];
  readonly from: Int32Array;
  readonly to: Int32Array;
}

interface AxisPlan {
  /** Cluster of each place in `ids`. */
  readonly of: Int32Array;
  readonly count: number;
  /** Leg of each row, as a place in `edges`; -1 where the row only keeps order. */
  readonly leg: Int32Array;
  readonly least: Float64Array;
  readonly rows: readonly PlanRow[];
  readonly table: RowTable;
  /** Tables with extra rows, by the list of them. */
  readonly more: WeakMap<readonly Row[], AxisRows>;
}

interface PlanRow {
  readonly a: number;
  readonly b: number;
  readonly least: number;
  readonly leg: number;
}

export type AxisRows = Pick<AxisPlan, "leg" | "least" | "table">;

/** An off-axis leg: its place in `edges`, and the angle it keeps from each axis on paper, radians. */
export interface OffsetEdge {
  readonly index: number;
  readonly clear: readonly [number, number, number];
}

export interface Placed {
  readonly sketch: Sketch;
  readonly projection: Projection;
  /** Drawn coordinates in the model frame, paper mm. */
  readonly at: ReadonlyMap<string, Vec3>;
  readonly paper: ReadonlyMap<string, PaperPoint>;
}

/** Least and wished paper length of each leg's component along each axis: three numbers a leg, in the order of `edges`. */
export interface Wishes {
  readonly least: Float64Array;
  readonly target: Float64Array;
}

/** One solution: drawn coordinates of each axis' clusters. */
export interface Layout {
  readonly projection: Projection;
  readonly x: readonly [Float64Array, Float64Array, Float64Array];
}

export type ExtraRows = readonly (readonly Row[])[];
export const NO_ROWS: ExtraRows = [[], [], []];

export function placePlan(sketch: Sketch, measure: MeasureText): PlacePlan {
  const numbers = numberedSketch(sketch);
  const drawn = numbers.edges.flatMap((edge, i) => (edge.kind === "none" ? [] : [i]));
  const edges = drawn.map((i) => numbers.edges[i]!);
  const [from, to] = [integersOf(drawn, (i) => numbers.from[i]!), integersOf(drawn, (i) => numbers.to[i]!)];
  return {
    sketch, ids: numbers.ids, edges, from, to,
    axes: AXES.map((axis) => axisPlan(numbers, axis, edges, from, to)) as unknown as PlacePlan["axes"],
    needs: edges.map((edge) => edgeNeed(sketch.model, edge, measure)),
    offsets: edges.flatMap((edge, index) => (edge.kind === "offset" ? [{ index, clear: clearances(sketch, edge) }] : [])),
  };
}

function axisPlan(numbers: Numbered, axis: Axis, edges: readonly SketchEdge[], starts: Int32Array, ends: Int32Array): AxisPlan {
  const clusters = clustersOf(numbers, axis);
  const wanted: PlanRow[] = [];
  edges.forEach((edge, leg) => {
    if (edge.real[axis] === 0) return;
    const from = clusters.of[starts[leg]!]!;
    const to = clusters.of[ends[leg]!]!;
    wanted.push(edge.real[axis] > 0 ? { a: from, b: to, least: 0, leg } : { a: to, b: from, least: 0, leg });
  });
  for (const { a, b, least } of orderRows(numbers, axis, clusters)) wanted.push({ a, b, least, leg: -1 });
  const rows = rowsWithoutCycles(clusters.count, wanted);
  return { of: clusters.of, count: clusters.count, rows, ...axisRows(clusters.count, rows), more: new WeakMap() };
}

function axisRows(count: number, rows: readonly PlanRow[]): AxisRows {
  return { leg: integersOf(rows, (row) => row.leg), least: fractionsOf(rows, (row) => row.least), table: rowTable(count, rows) };
}

export function rowsWith(axis: AxisPlan, extra: readonly Row[]): AxisRows {
  if (extra.length === 0) return axis;
  const known = axis.more.get(extra);
  if (known) return known;
  const more = extra.map(({ a, b, least }): PlanRow => ({ a, b, least, leg: -1 }));
  const made = axisRows(axis.count, rowsWithoutCycles(axis.count, more, axis.rows));
  axis.more.set(extra, made);
  return made;
}

/** Angle each axis asks of the leg: more where a pipe along that axis meets it. */
function clearances(sketch: Sketch, edge: SketchEdge): readonly [number, number, number] {
  const clear: [number, number, number] = [size.AXIS_CLEARANCE_RAD, size.AXIS_CLEARANCE_RAD, size.AXIS_CLEARANCE_RAD];
  for (const id of [edge.from, edge.to]) {
    for (const other of sketch.edgesAt.get(id) ?? []) {
      if (other === edge || other.kind === "offset" || other.kind === "none") continue;
      const axis = AXES.find((one) => other.real[one] !== 0);
      if (axis !== undefined) clear[axis] = size.NEIGHBOUR_CLEARANCE_RAD;
    }
  }
  return clear;
}
