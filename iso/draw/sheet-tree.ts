/**
 * What can be cut where: the working points of a line or spool as a tree from its first point along flow, each with its
 * share of marks, and the legs at whose far end a real joint parts the two sides. Legs on a loop are told apart, so that
 * loops stay whole while anything else can be cut.
 */
import type { Joint } from "../run/model-types";
import * as size from "./sizes";
import type { Sketch, SketchEdge } from "./sketch";
import { isWeldJoint } from "./weld-joint";

/** What fills a sheet. */
export interface Load {
  readonly welds: number;
  readonly labels: number;
}

export interface TreeVertex {
  readonly id: string;
  /** Place in flow order. */
  readonly rank: number;
  readonly parent: TreeVertex | null;
  /** Leg from the parent; null at the root and where nothing but a shared fitting joins the two. */
  readonly edge: SketchEdge | null;
  readonly children: TreeVertex[];
  readonly load: Load;
  /** The leg to the parent lies on a loop. */
  looped: boolean;
}

export interface SheetTree {
  /** In flow order; the first is the root. */
  readonly vertices: readonly TreeVertex[];
  readonly sketch: Sketch;
}

/** Own legs: those another spool's sheet shows are left out. */
const isOwnLeg = (edge: SketchEdge): boolean => edge.stub === null && !edge.neighbour;

export function sheetTree(sketch: Sketch): SheetTree {
  const loads = loadsOf(sketch);
  const order = flowOrder(sketch);
  const made = new Map<string, TreeVertex>();
  const vertices: TreeVertex[] = [];
  const closing: (readonly [TreeVertex, TreeVertex])[] = [];
  const make = (id: string, parent: TreeVertex | null, edge: SketchEdge | null): TreeVertex => {
    const vertex: TreeVertex = { id, rank: order.get(id) ?? 0, parent, edge, children: [], load: loads.get(id) ?? NO_LOAD, looped: false };
    made.set(id, vertex);
    vertices.push(vertex);
    parent?.children.push(vertex);
    return vertex;
  };
  for (const id of order.keys()) {
    if (made.has(id)) continue;
    const stack = [make(id, vertices[0] ?? null, null)];
    for (let at = stack.pop(); at; at = stack.pop()) {
      for (const edge of sketch.edgesAt.get(at.id) ?? []) {
        if (!isOwnLeg(edge) || edge === at.edge) continue;
        const other = edge.from === at.id ? edge.to : edge.from;
        const there = made.get(other);
        if (there) closing.push([at, there]);
        else stack.push(make(other, at, edge));
      }
    }
  }
  for (const [a, b] of closing) markLoop(a, b);
  return { vertices: [...vertices].sort((p, q) => p.rank - q.rank), sketch };
}

function flowOrder(sketch: Sketch): ReadonlyMap<string, number> {
  const order = new Map<string, number>();
  for (const node of sketch.model.nodes) {
    const id = sketch.vertexOf(node.pointId);
    if (sketch.vertices.has(id) && !order.has(id)) order.set(id, order.size);
  }
  return order;
}

function markLoop(a: TreeVertex, b: TreeVertex): void {
  const above = new Set<TreeVertex>();
  for (let at: TreeVertex | null = a; at; at = at.parent) above.add(at);
  let meet: TreeVertex | null = b;
  for (; meet && !above.has(meet); meet = meet.parent) meet.looped = true;
  for (let at: TreeVertex | null = a; at && at !== meet; at = at.parent) at.looped = true;
}

export const NO_LOAD: Load = { welds: 0, labels: 0 };
/** Marks an end, or an off-axis leg with its box, takes. */
const END_LABELS = 1;
const BOX_LABELS = 4;

function loadsOf(sketch: Sketch): ReadonlyMap<string, Load> {
  const loads = new Map<string, { welds: number; labels: number }>();
  const add = (id: string, welds: number, labels: number): void => {
    const entry = loads.get(id);
    if (!entry) loads.set(id, { welds, labels });
    else {
      entry.welds += welds;
      entry.labels += labels;
    }
  };
  for (const joint of sketch.joints) if (isWeldJoint(joint)) add(sketch.vertexOf(joint.pointId), 1, 1);
  for (const component of sketch.components) if (component.kind !== "gasket" && component.kind !== "bolt-set") add(sketch.vertexOf(component.pointId), 0, component.text === "" ? 1 : 2);
  for (const edge of sketch.edges) if (isOwnLeg(edge)) add(edge.to, 0, edge.pieces.length + (edge.kind === "offset" ? BOX_LABELS : 1));
  for (const id of sketch.vertices.keys()) if ((sketch.edgesAt.get(id) ?? []).length === 1) add(id, 0, END_LABELS);
  return loads;
}

/** The joint at the child's end of its leg that parts the two, or null when nothing real does. */
export function partingJoint(sketch: Sketch, child: TreeVertex): Joint | null {
  const { edge } = child;
  if (!edge || !child.parent) return null;
  const others = (sketch.edgesAt.get(child.id) ?? []).filter((other) => other !== edge);
  if (others.length === 0 || edge.pieces.some((piece) => others.some((other) => other.pieces.includes(piece)))) return null;
  const near = new Set<string>([...edge.pieces.map((piece) => piece.key), ...(sketch.componentsAt.get(child.parent.id) ?? []).map((component) => component.id)]);
  const far = new Set<string>([...others.flatMap((other) => other.pieces.map((piece) => piece.key)), ...(sketch.componentsAt.get(child.id) ?? []).map((component) => component.id)]);
  const parts = (joint: Joint): boolean => {
    const [a, b] = [joint.a ?? "", joint.b ?? ""];
    return (near.has(a) && far.has(b)) || (near.has(b) && far.has(a));
  };
  return sketch.joints.find((joint) => joint.kind !== "attachment" && parts(joint)) ?? null;
}

/** True when the line goes straight on through the child: a cut there takes its overall dimension apart. */
export function goesStraight(sketch: Sketch, child: TreeVertex): boolean {
  const { edge } = child;
  if (!edge) return false;
  return child.children.some((next) => next.edge !== null && Math.abs(cosine(edge, next.edge)) > size.PORT_COSINE);
}

function cosine(a: SketchEdge, b: SketchEdge): number {
  return a.leg.direction[0] * b.leg.direction[0] + a.leg.direction[1] * b.leg.direction[1] + a.leg.direction[2] * b.leg.direction[2];
}
