/** Drawn edges: each leg as a straight line on paper with its arms, and what the passes add up. */
import type { PaperPoint, Vec3 } from "../geometry/types";
import { vecDot, vecSub } from "../geometry/vec3";
import type { Joint } from "../run/model-types";
import { paperAlong } from "./arms";
import type { DisplayItem } from "./drawing-types";
import type { Placed } from "./place";
import { paperDirection, type Segment } from "./plane";
import { depthOf } from "./project";
import type { SketchEdge } from "./sketch";

export interface DrawnEdge {
  readonly edge: SketchEdge;
  readonly from: PaperPoint;
  readonly to: PaperPoint;
  /** Unit vector on paper from start to end. */
  readonly direction: PaperPoint;
  readonly length: number;
  readonly depthFrom: number;
  readonly depthTo: number;
}

/** What a pass leaves behind: items, and what later passes keep clear of. */
export interface PassInk {
  readonly items: readonly DisplayItem[];
  /** Pipe and symbols: nothing may touch these. */
  readonly heavy: readonly Segment[];
  /** Thin lines: to be crossed only when it helps. */
  readonly light: readonly Segment[];
}

export function drawnEdges(placed: Placed): readonly DrawnEdge[] {
  return placed.sketch.edges.filter((edge) => edge.kind !== "none").map((edge) => {
    const from = placed.paper.get(edge.from) ?? [0, 0];
    const to = placed.paper.get(edge.to) ?? [0, 0];
    const depth = (id: string): number => depthOf(placed.projection, placed.at.get(id) ?? [0, 0, 0]);
    return {
      edge, from, to, direction: paperDirection([to[0] - from[0], to[1] - from[1]]), length: Math.hypot(to[0] - from[0], to[1] - from[1]),
      depthFrom: depth(edge.from), depthTo: depth(edge.to),
    };
  });
}

export function edgePoint(drawn: DrawnEdge, along: number): PaperPoint {
  return [drawn.from[0] + drawn.direction[0] * along, drawn.from[1] + drawn.direction[1] * along];
}

/** Paper distance from the edge's start of a model point on its leg. */
export function edgePlace(drawn: DrawnEdge, at: Vec3): number {
  const { edge } = drawn;
  const { leg, stub } = edge;
  const real = vecDot(vecSub(at, leg.from), leg.direction);
  if (stub === "to") return paperAlong(Math.min(real, lastReal(edge.fromArm)), Infinity, Infinity, edge.fromArm, edge.fromArm);
  if (stub === "from") return drawn.length - paperAlong(Math.min(leg.lengthMm - real, lastReal(edge.toArm)), Infinity, Infinity, edge.toArm, edge.toArm);
  return Math.min(drawn.length, Math.max(0, paperAlong(real, leg.lengthMm, drawn.length, edge.fromArm, edge.toArm)));
}

function lastReal(arm: SketchEdge["fromArm"]): number {
  return arm.knots[arm.knots.length - 1]?.real ?? 0;
}

export interface DrawnJoint {
  readonly joint: Joint;
  readonly at: PaperPoint;
  /** Unit vector on paper along the pipe at the joint. */
  readonly direction: PaperPoint;
}

/** Finds each joint's place on the drawn leg that passes through it; at its working point when no leg does. */
export function drawnJoints(placed: Placed, drawn: readonly DrawnEdge[]): readonly DrawnJoint[] {
  const byEdge = new Map(drawn.map((d) => [d.edge.id, d]));
  return placed.sketch.joints.flatMap((joint) => {
    const edges = (placed.sketch.edgesAt.get(placed.sketch.vertexOf(joint.pointId)) ?? []).flatMap((edge) => byEdge.get(edge.id) ?? []);
    let best: DrawnEdge | null = null;
    let bestMiss = Infinity;
    for (const candidate of edges) {
      const miss = missFrom(joint, candidate.edge);
      if (miss < bestMiss) [best, bestMiss] = [candidate, miss];
    }
    const vertex = placed.paper.get(placed.sketch.vertexOf(joint.pointId));
    if (best) return [{ joint, at: edgePoint(best, edgePlace(best, joint.position)), direction: best.direction }];
    return vertex ? [{ joint, at: vertex, direction: [1, 0] as PaperPoint }] : [];
  });
}

/** How far a joint lies from a leg: beside it, beyond its ends, or turned away from it. */
function missFrom(joint: Joint, edge: SketchEdge): number {
  const offset = vecSub(joint.position, edge.leg.from);
  const along = vecDot(offset, edge.leg.direction);
  const beyond = Math.max(0, -along, along - edge.leg.lengthMm);
  const beside = Math.sqrt(Math.max(0, vecDot(offset, offset) - along * along));
  const turned = 1 - Math.abs(vecDot(joint.direction, edge.leg.direction));
  return beyond + beside + 10 * turned;
}
