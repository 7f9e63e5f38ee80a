/** Turns of the pipe on paper: elbows rounded, socket elbows sharp, mitres in straight steps, bends with ticks at their tangents, returns as half circles. */
import type { PaperPoint } from "../geometry/types";
import type { Component } from "../run/model-types";
import { paperAddScaled as plus } from "../geometry/paper";
import type { DrawnEdge, DrawnJoint } from "./drawn";
import type { DisplayItem, PathSegment, Ref } from "./drawing-types";
import { isBend, isTurnLeg } from "./paper-model";
import { lineItem, pathItem, QUARTER_CUBIC } from "./paths";
import type { Placed } from "./place";
import { paperDirection, type Segment } from "./plane";
import { project } from "./project";
import * as size from "./sizes";

/** Components that turn the line: pipe is not drawn straight through them. */
export const TURN_KINDS: ReadonlySet<Component["kind"]> = new Set(["elbow", "trimmed-elbow", "socket-elbow", "mitre"]);
const NEIGHBOUR_DASH: readonly number[] = [2.4, 1.4];
const TICK_HALF = 1.9;
/** Share of the way to the corner by which a mitre's cuts stand outside the curve they follow. */
const MITRE_OUT = 0.06;

export interface Turn {
  readonly component: Component;
  readonly start: PaperPoint;
  readonly corner: PaperPoint;
  readonly end: PaperPoint;
  readonly neighbour: boolean;
}

const refOf = (turn: Turn): Ref => ({ kind: "component", id: turn.component.id });

/** The line of a turn, and its ticks where the pipe itself is bent. */
export function turnItems(turn: Turn, pieces: number): readonly DisplayItem[] {
  const { start, corner, end, component } = turn;
  const ink = turn.neighbour ? ("grey" as const) : ("ink" as const);
  const brush = { stroke: ink, widthMm: size.PIPE_WIDTH, ...(turn.neighbour ? { dash: NEIGHBOUR_DASH } : {}) };
  const path = (segments: readonly PathSegment[]): DisplayItem => pathItem("pipe", refOf(turn), segments, brush);
  const through = (points: readonly PaperPoint[]): DisplayItem => path([{ op: "M", to: start }, ...points.map((to) => ({ op: "L" as const, to }))]);
  if (component.kind === "socket-elbow") return [through([corner, end])];
  if (component.kind === "mitre") return [through([...mitreCuts(turn, pieces).map((cut) => cut.at), end])];
  const towards = (p: PaperPoint): PaperPoint => [p[0] + (corner[0] - p[0]) * QUARTER_CUBIC, p[1] + (corner[1] - p[1]) * QUARTER_CUBIC];
  const curve = path([{ op: "M", to: start }, { op: "C", c1: towards(start), c2: towards(end), to: end }]);
  return isBend(component) ? [curve, tick(turn, start), tick(turn, end)] : [curve];
}

function tick(turn: Turn, at: PaperPoint): DisplayItem {
  const way = paperDirection([turn.corner[0] - at[0], turn.corner[1] - at[1]]);
  const side: PaperPoint = [-way[1], way[0]];
  return lineItem("symbol", refOf(turn), plus(at, side, -TICK_HALF), plus(at, side, TICK_HALF), 0.35, turn.neighbour ? "grey" : "ink");
}

/** Where the cuts of a mitred turn stand on paper, in flow order, with the way the pipe goes there. */
export function mitreCuts({ start, corner, end }: Turn, pieces: number): readonly { readonly at: PaperPoint; readonly direction: PaperPoint }[] {
  if (pieces <= 2) return [{ at: corner, direction: paperDirection([end[0] - start[0], end[1] - start[1]]) }];
  return Array.from({ length: pieces - 1 }, (_, k) => {
    const t = (2 * k + 1) / (2 * (pieces - 1));
    const mix = (axis: 0 | 1): number => (1 - t) ** 2 * start[axis] + 2 * t * (1 - t) * corner[axis] + t ** 2 * end[axis];
    const way = (axis: 0 | 1): number => (1 - t) * (corner[axis] - start[axis]) + t * (end[axis] - corner[axis]);
    const at: PaperPoint = [mix(0), mix(1)];
    return { at: [at[0] + (corner[0] - at[0]) * MITRE_OUT, at[1] + (corner[1] - at[1]) * MITRE_OUT], direction: paperDirection([way(0), way(1)]) };
  });
}

/** How many pieces a mitre at a point has, the two pipes counted in. */
export function mitrePieces(placed: Placed, pointId: string): number {
  for (const run of placed.sketch.model.document.runs) {
    for (const point of run.points) if (point.id === pointId) return point.item.kind === "mitre" ? point.item.pieces : 2;
  }
  return 2;
}

/** Start, corner and end of each component that turns the line. */
export function turnsOf(placed: Placed, drawn: readonly DrawnEdge[]): readonly Turn[] {
  const ends = new Map<string, { component: Component; points: PaperPoint[]; corner: PaperPoint }>();
  for (const d of drawn) {
    for (const [arm, outward, corner] of [[d.edge.fromArm, 1, d.from], [d.edge.toArm, -1, d.to]] as const) {
      for (const part of arm.parts) {
        if (!TURN_KINDS.has(part.component.kind)) continue;
        const entry = ends.get(part.component.id) ?? { component: part.component, points: [], corner };
        const point: PaperPoint = [corner[0] + d.direction[0] * outward * part.outer, corner[1] + d.direction[1] * outward * part.outer];
        // Flow order: the leg that arrives first.
        if (outward === -1) entry.points.unshift(point);
        else entry.points.push(point);
        ends.set(part.component.id, entry);
      }
    }
  }
  return [...ends.values()].flatMap(({ component, points, corner }) => {
    const [start, end] = points;
    return start ? [{ component, start, corner, end: end ?? corner, neighbour: !placed.sketch.isOwn(component.id) }] : [];
  });
}

/** Returns: a half circle from the end of the leg that arrives to the start of the one that comes back. */
export function returnInk(placed: Placed, drawn: readonly DrawnEdge[]): { readonly items: readonly DisplayItem[]; readonly heavy: readonly Segment[] } {
  const items: DisplayItem[] = [];
  const heavy: Segment[] = [];
  for (const d of drawn.filter(({ edge }) => isTurnLeg(edge.leg))) {
    const node = placed.sketch.vertices.get(d.edge.from)?.node;
    const component = (placed.sketch.componentsAt.get(d.edge.from) ?? []).find((one) => one.kind === "return");
    if (!node?.arriving || !component) continue;
    const onward = project(placed.projection, node.arriving);
    const reach = (d.length * 2) / 3;
    const [c1, c2] = [plus(d.from, onward, reach), plus(d.to, onward, reach)];
    const own = placed.sketch.isOwn(component.id);
    const brush = { stroke: own ? ("ink" as const) : ("grey" as const), widthMm: size.PIPE_WIDTH, ...(own ? {} : { dash: NEIGHBOUR_DASH }) };
    items.push(pathItem("pipe", { kind: "component", id: component.id }, [{ op: "M", to: d.from }, { op: "C", c1, c2, to: d.to }], brush));
    const top = (t: number): PaperPoint => [0, 1].map((k) => (1 - t) ** 3 * d.from[k]! + 3 * t * (1 - t) ** 2 * c1[k]! + 3 * t ** 2 * (1 - t) * c2[k]! + t ** 3 * d.to[k]!) as unknown as PaperPoint;
    const points = [d.from, top(0.25), top(0.5), top(0.75), d.to];
    for (let i = 0; i + 1 < points.length; i++) heavy.push({ from: points[i] ?? d.from, to: points[i + 1] ?? d.to });
  }
  return { items, heavy };
}

/** Puts the welds within a mitred turn on its cuts, in flow order. */
export function mitreJoints(placed: Placed, drawn: readonly DrawnEdge[], joints: readonly DrawnJoint[]): readonly DrawnJoint[] {
  if (joints.every(({ joint }) => joint.kind !== "mitre")) return joints;
  const turns = new Map(turnsOf(placed, drawn).map((turn) => [turn.component.pointId, turn]));
  const seen = new Map<string, number>();
  return joints.map((mark) => {
    const { joint } = mark;
    const turn = turns.get(joint.pointId);
    if (joint.kind !== "mitre") return mark;
    const k = seen.get(joint.pointId) ?? 0;
    seen.set(joint.pointId, k + 1);
    const cut = turn ? mitreCuts(turn, mitrePieces(placed, joint.pointId))[k] : undefined;
    return cut ? { joint, at: cut.at, direction: cut.direction } : { ...mark, direction: cornerDirection(placed, drawn, joint.pointId) ?? mark.direction };
  });
}

/** Way across a bare corner: between the leg that arrives and the one that leaves. */
function cornerDirection(placed: Placed, drawn: readonly DrawnEdge[], pointId: string): PaperPoint | null {
  const vertex = placed.sketch.vertexOf(pointId);
  const [a, b] = [drawn.find((d) => d.edge.to === vertex), drawn.find((d) => d.edge.from === vertex)];
  return a && b ? paperDirection([a.direction[0] + b.direction[0], a.direction[1] + b.direction[1]]) : null;
}
