/**
 * Offset boxes: an off-axis leg carries its RUN, ROLL and RISE as a hatched triangle in the plane of its level components and
 * an upright edge, so that no paper angle has to carry the meaning (ISO 6412-2 clause 4, from memory; handbook practice).
 */
import type { PaperPoint, Vec3 } from "../geometry/types";
import { formatLength } from "../units/format";
import type { DrawnEdge } from "./drawn";
import type { DisplayItem, Ref } from "./drawing-types";
import type { LineText } from "./fixed-text";
import { lineItem } from "./paths";
import type { Placed } from "./place";
import { crossingOf, type Segment } from "./plane";
import { project } from "./project";
import * as size from "./sizes";
import { typedSlopes } from "./slopes";
import { offsetNaming, riseAngle, setLength, shortAngle, travelText, type OffsetNaming } from "./words";

export interface OffsetNote {
  readonly id: string;
  readonly anchors: readonly PaperPoint[];
  readonly lines: readonly string[];
}

export interface OffsetInk {
  readonly items: readonly DisplayItem[];
  readonly light: readonly Segment[];
  readonly texts: readonly LineText[];
  readonly notes: readonly OffsetNote[];
}

const DASH_DOT: readonly number[] = [3, 0.9, 0.6, 0.9];

export function offsetPass(placed: Placed, drawn: readonly DrawnEdge[]): OffsetInk {
  const parts: OffsetInk[] = [];
  for (const d of drawn) {
    if (d.edge.kind === "offset" && !d.edge.stub && !d.edge.neighbour) parts.push(offsetBox(placed, d, drawn, parts.flatMap((part) => part.light)));
  }
  return {
    items: parts.flatMap((part) => part.items), light: parts.flatMap((part) => part.light),
    texts: parts.flatMap((part) => part.texts), notes: parts.flatMap((part) => part.notes),
  };
}

/** Corners of the box along a chain of axes from the leg's start. */
function corners(placed: Placed, d: DrawnEdge, order: readonly (0 | 1 | 2)[]): readonly PaperPoint[] {
  const from = placed.at.get(d.edge.from) ?? [0, 0, 0];
  const to = placed.at.get(d.edge.to) ?? [0, 0, 0];
  const at: [number, number, number] = [from[0], from[1], from[2]];
  return order.map((axis) => {
    at[axis] = to[axis];
    const corner: Vec3 = [at[0], at[1], at[2]];
    return project(placed.projection, corner);
  });
}

/** Orders in which the box may be walked; the upright edge comes first or last, so that the hatched triangle is level. */
function orders(edge: DrawnEdge["edge"]): readonly (readonly (0 | 1 | 2)[])[] {
  const axes = ([0, 1, 2] as const).filter((axis) => edge.real[axis] !== 0);
  if (axes.length === 2) return [axes, [...axes].reverse()];
  return [[0, 1, 2], [1, 0, 2], [2, 0, 1], [2, 1, 0]];
}

function offsetBox(placed: Placed, d: DrawnEdge, drawn: readonly DrawnEdge[], before: readonly Segment[]): OffsetInk {
  const naming = offsetNaming(placed.sketch.model, d.edge);
  let best: readonly (0 | 1 | 2)[] = [0, 1, 2];
  let bestCost = Infinity;
  for (const order of orders(d.edge)) {
    const walk = [d.from, ...corners(placed, d, order)];
    const cost = walkCost(d, walk, drawn, order, naming) + overlapCost(walk, before);
    if (cost < bestCost) [best, bestCost] = [order, cost];
  }
  return boxInk(placed, d, best, naming);
}

/** Two boxes should not lie over each other. */
function overlapCost(walk: readonly PaperPoint[], before: readonly Segment[]): number {
  let cost = 0;
  for (let i = 0; i + 1 < walk.length; i++) {
    const edge = { from: walk[i] ?? [0, 0], to: walk[i + 1] ?? [0, 0] } as const;
    for (const line of before) if (crossingOf(edge, line)) cost += 3;
  }
  return cost;
}

/** Edges of a box should neither lie on a pipe nor cross one. */
function walkCost(d: DrawnEdge, walk: readonly PaperPoint[], drawn: readonly DrawnEdge[], order: readonly number[], naming: OffsetNaming): number {
  let cost = order[0] === naming.runAxis ? 0 : 1;
  for (let i = 0; i + 1 < walk.length; i++) {
    const [a, b] = [walk[i] ?? d.from, walk[i + 1] ?? d.to];
    for (const other of drawn) if (other !== d) cost += nearness({ from: a, to: b }, other);
  }
  return cost;
}

function nearness(edge: Segment, other: DrawnEdge): number {
  let cost = 0;
  const length = Math.max(size.PAPER_EPS, Math.hypot(edge.to[0] - edge.from[0], edge.to[1] - edge.from[1]));
  const steps = Math.max(2, Math.round(length / 3));
  for (let i = 1; i <= steps; i++) {
    const p: PaperPoint = [edge.from[0] + ((edge.to[0] - edge.from[0]) * (i - 0.5)) / steps, edge.from[1] + ((edge.to[1] - edge.from[1]) * (i - 0.5)) / steps];
    const along = (p[0] - other.from[0]) * other.direction[0] + (p[1] - other.from[1]) * other.direction[1];
    const beside = Math.abs((p[0] - other.from[0]) * other.direction[1] - (p[1] - other.from[1]) * other.direction[0]);
    if (along > -1 && along < other.length + 1 && beside < 3) cost += 4;
  }
  return cost;
}

function boxInk(placed: Placed, d: DrawnEdge, order: readonly (0 | 1 | 2)[], naming: OffsetNaming): OffsetInk {
  const { edge } = d;
  const { units } = placed.sketch.model.document.settings;
  const ref: Ref = { kind: "leg", id: edge.id };
  const walk = [d.from, ...corners(placed, d, order)];
  const items: DisplayItem[] = [];
  const light: Segment[] = [];
  const texts: LineText[] = [];
  const middle: PaperPoint = [walk.reduce((sum, p) => sum + p[0], 0) / walk.length, walk.reduce((sum, p) => sum + p[1], 0) / walk.length];
  order.forEach((axis, i) => {
    const line: Segment = { from: walk[i] ?? d.from, to: walk[i + 1] ?? d.to };
    light.push(line);
    items.push(lineItem("box", ref, line.from, line.to, size.BOX_WIDTH));
    texts.push({ ref, text: `${naming.words[axis] ?? ""} ${formatLength(Math.abs(edge.leg.to[axis] - edge.leg.from[axis]), units)}`, line, off: size.DIMENSION_CAP / 2 + 1, awayFrom: middle, capMm: size.DIMENSION_CAP });
  });
  const upFirst = order[0] === 2 && order.length === 3;
  const triangle = order.length === 2 ? walk : upFirst ? walk.slice(1) : walk.slice(0, 3);
  const hatch = hatchLines(triangle);
  light.push(...hatch);
  items.push(...hatch.map((line) => lineItem("hatch", ref, line.from, line.to, size.HATCH_WIDTH)));
  if (order.length === 3) {
    const diagonal: Segment = { from: triangle[0] ?? d.from, to: triangle[2] ?? d.to };
    light.push(diagonal);
    items.push(lineItem("box", ref, diagonal.from, diagonal.to, size.BOX_WIDTH, "ink", DASH_DOT));
  }
  texts.push({ ref: { kind: "dimension", id: edge.id }, text: travelText(edge, units), line: { from: d.from, to: d.to }, off: size.DIMENSION_CAP / 2 + 1.5, awayFrom: middle, capMm: size.DIMENSION_CAP });
  const onLeg = [0.5, 0.35, 0.65].map((t): PaperPoint => [d.from[0] + (d.to[0] - d.from[0]) * t, d.from[1] + (d.to[1] - d.from[1]) * t]);
  const corner = triangle[1];
  const anchors = corner ? [...onLeg, corner] : onLeg;
  const typed = typedSlopes(placed.sketch.model).get(edge.leg.id);
  const slope = typed === undefined || edge.real[2] === 0 ? [] : [`SLOPE ${typed}`];
  return { items, light, texts, notes: [{ id: edge.id, anchors, lines: [naming.title, ...angleLines(d, naming, units), ...slope] }] };
}

/** SET and angles of the note beside a box. */
function angleLines(d: DrawnEdge, naming: OffsetNaming, units: "imperial" | "metric"): readonly string[] {
  const { leg, real } = d.edge;
  const level = Math.hypot(leg.to[0] - leg.from[0], leg.to[1] - leg.from[1]);
  const fromRun = Math.acos(Math.min(1, Math.abs(leg.direction[naming.runAxis])));
  if (naming.title === "HORIZONTAL OFFSET") return [`${shortAngle(fromRun)} FROM RUN`];
  if (naming.title === "VERTICAL OFFSET") return [`${shortAngle(riseAngle(leg))} FROM LEVEL`];
  const plan = level > 0 ? Math.acos(Math.min(1, Math.max(Math.abs(leg.to[0] - leg.from[0]), Math.abs(leg.to[1] - leg.from[1])) / level)) : 0;
  const run = naming.runAxis === 2 ? plan : Math.acos(Math.min(1, Math.abs(leg.to[naming.runAxis] - leg.from[naming.runAxis]) / Math.max(level, size.LEVEL_MM)));
  return [`SET ${formatLength(setLength(d.edge, naming.runAxis), units)}`, `HORIZONTAL ${shortAngle(real[0] !== 0 && real[1] !== 0 ? run : 0)}`, `VERTICAL ${shortAngle(riseAngle(leg))}`];
}

/** Hatching of a triangle, parallel to its first edge. */
export function hatchLines(triangle: readonly PaperPoint[]): readonly Segment[] {
  const [a, b, c] = triangle;
  if (!a || !b || !c) return [];
  const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
  if (length < 1) return [];
  const height = Math.abs((b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0])) / length;
  const lines: Segment[] = [];
  const count = Math.floor(height / size.HATCH_SPACING);
  for (let i = 1; i <= count; i++) {
    const t = (i * size.HATCH_SPACING) / height;
    if (t >= 0.97) break;
    lines.push({ from: [a[0] + (c[0] - a[0]) * t, a[1] + (c[1] - a[1]) * t], to: [b[0] + (c[0] - b[0]) * t, b[1] + (c[1] - b[1]) * t] });
  }
  return lines;
}
