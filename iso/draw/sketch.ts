/**
 * What is drawn: vertices (working points), edges (legs) with their arms, for the whole line or for one spool with stubs of
 * its neighbours.
 */
import { vecAddScaled, vecDot, vecLength, vecReject, vecScale, vecSub } from "../geometry/vec3";
import type { Vec3 } from "../geometry/types";
import type { Component, Joint, Leg, Model, Node, Piece } from "../run/model-types";
import { armAlong, NO_ARM, type Arm } from "./arms";
import * as size from "./sizes";

export interface SketchVertex {
  readonly id: string;
  /** null for the loose end of a stub. */
  readonly node: Node | null;
  readonly position: Vec3;
}

export type EdgeKind = "axis" | "slope" | "offset" | "none";

export interface SketchEdge {
  readonly id: string;
  readonly leg: Leg;
  readonly from: string;
  readonly to: string;
  /** Components of the leg, mm, with what is level or too small to see set to zero (a slope counts as level). */
  readonly real: Vec3;
  readonly kind: EdgeKind;
  readonly fromArm: Arm;
  readonly toArm: Arm;
  readonly pieces: readonly Piece[];
  /** The end that is loose: the leg belongs to a neighbour spool and only a stub of it is drawn. */
  readonly stub: "from" | "to" | null;
  /** Belongs to a neighbour spool. */
  readonly neighbour: boolean;
}

export interface Sketch {
  readonly model: Model;
  readonly spool: string | null;
  readonly vertices: ReadonlyMap<string, SketchVertex>;
  readonly edges: readonly SketchEdge[];
  readonly edgesAt: ReadonlyMap<string, readonly SketchEdge[]>;
  readonly componentsAt: ReadonlyMap<string, readonly Component[]>;
  /** Those shown with their marks (not the neighbours'). */
  readonly components: readonly Component[];
  readonly joints: readonly Joint[];
  readonly pieces: readonly Piece[];
}

export function groupBy<T>(items: readonly T[], key: (item: T) => string): Map<string, T[]> {
  const groups = new Map<string, T[]>();
  for (const item of items) {
    const group = groups.get(key(item));
    if (group) group.push(item);
    else groups.set(key(item), [item]);
  }
  return groups;
}

/** Components of a leg that count on paper, and what kind of leg that makes it. */
export function legShape(leg: Leg): { readonly real: Vec3; readonly kind: EdgeKind } {
  const way: Vec3 = [leg.to[0] - leg.from[0], leg.to[1] - leg.from[1], leg.to[2] - leg.from[2]];
  const least = Math.max(size.LEVEL_MM, size.LEVEL_RATIO * leg.lengthMm);
  const real = way.map((c) => (Math.abs(c) < least ? 0 : c)) as unknown as [number, number, number];
  const level = Math.hypot(real[0], real[1]);
  const sloped = real[2] !== 0 && level > 0 && Math.abs(real[2]) <= size.SLOPE_RATIO * level;
  if (sloped) real[2] = 0;
  const count = real.filter((c) => c !== 0).length;
  if (count === 0) return { real, kind: "none" };
  if (count === 1) return { real, kind: sloped ? "slope" : "axis" };
  return { real, kind: "offset" };
}

/** @param spool its letter, or null for the whole line */
export function sketchOf(model: Model, spool: string | null): Sketch {
  const nodes = new Map(model.nodes.map((node) => [node.pointId, node]));
  const componentsAt = groupBy(model.components, (component) => component.pointId);
  const piecesOfRun = groupBy(model.pieces, (piece) => piece.runId);
  const piecesOf = new Map(model.legs.map((leg) => [leg.id, (piecesOfRun.get(leg.runId) ?? []).filter((piece) => pieceRunsAlong(piece, leg))]));
  const legs = model.legs.filter((leg) => nodes.has(leg.fromPointId) && nodes.has(leg.toPointId));
  const arms = (leg: Leg): [Arm, Arm] => [
    armAlong(componentsAt.get(leg.fromPointId) ?? [], leg.from, leg.direction),
    armAlong(componentsAt.get(leg.toPointId) ?? [], leg.to, vecScale(leg.direction, -1)),
  ];
  const mine = (id: string | null): boolean => spool === null || id === spool;
  const own = legs.filter((leg) => legIsOwn(leg, arms(leg), piecesOf.get(leg.id) ?? [], spool));
  const inside = new Set<string>(own.flatMap((leg) => [leg.fromPointId, leg.toPointId]));
  for (const component of model.components) if (mine(component.spool)) inside.add(component.pointId);

  const vertices = new Map<string, SketchVertex>();
  const edges: SketchEdge[] = [];
  const place = (pointId: string): void => {
    const node = nodes.get(pointId);
    if (node) vertices.set(pointId, { id: pointId, node, position: node.position });
  };
  for (const pointId of inside) place(pointId);
  for (const leg of legs) {
    const stub = inside.has(leg.fromPointId) ? (inside.has(leg.toPointId) ? null : "to") : inside.has(leg.toPointId) ? "from" : "outside";
    if (stub === "outside") continue;
    const [fromArm, toArm] = arms(leg);
    const loose = `${leg.id}~stub`;
    if (stub === "to") vertices.set(loose, { id: loose, node: null, position: vecAddScaled(leg.from, leg.direction, Math.min(leg.lengthMm, 400)) });
    if (stub === "from") vertices.set(loose, { id: loose, node: null, position: vecAddScaled(leg.to, leg.direction, -Math.min(leg.lengthMm, 400)) });
    edges.push({
      id: leg.id, leg, ...legShape(leg), stub, neighbour: !own.includes(leg), pieces: piecesOf.get(leg.id) ?? [],
      from: stub === "from" ? loose : leg.fromPointId, to: stub === "to" ? loose : leg.toPointId,
      fromArm: stub === "from" ? NO_ARM : fromArm, toArm: stub === "to" ? NO_ARM : toArm,
    });
  }
  const ownIds = new Set<string>();
  for (const component of model.components) if (mine(component.spool)) ownIds.add(component.id);
  for (const piece of model.pieces) if (mine(piece.spool)) ownIds.add(piece.key);
  const joints = model.joints.filter((joint) => spool === null || joint.spool === spool || ownIds.has(joint.a ?? "") || ownIds.has(joint.b ?? ""));
  const edgesAt = new Map<string, SketchEdge[]>();
  for (const edge of edges) for (const id of [edge.from, edge.to]) edgesAt.set(id, [...(edgesAt.get(id) ?? []), edge]);
  return {
    model, spool, vertices, edges, edgesAt, componentsAt, joints,
    components: model.components.filter((component) => ownIds.has(component.id)),
    pieces: model.pieces.filter((piece) => ownIds.has(piece.key)),
  };
}

/** One piece may pass through several legs (past a support or an outlet): it counts on each leg it shares a length with. */
function pieceRunsAlong(piece: Piece, leg: Leg): boolean {
  if (vecDot(piece.direction, leg.direction) < size.PORT_COSINE) return false;
  const start = vecSub(piece.start, leg.from);
  if (vecLength(vecReject(start, leg.direction)) > size.BESIDE_MM) return false;
  const from = Math.max(0, vecDot(start, leg.direction));
  const to = Math.min(leg.lengthMm, vecDot(vecSub(piece.end, leg.from), leg.direction));
  return to - from > size.LEVEL_MM;
}

/** A leg is the spool's own when a piece of it is, or when it has no pipe and the fittings at both ends are. */
function legIsOwn(leg: Leg, arms: readonly [Arm, Arm], pieces: readonly Piece[], spool: string | null): boolean {
  if (spool === null || pieces.some((piece) => piece.spool === spool)) return true;
  return pieces.length === 0 && arms.every((arm) => arm.parts.some((part) => part.component.spool === spool));
}
