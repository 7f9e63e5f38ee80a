/** Straight chains: runs of legs that go on in one line through valves, tees and flanges, dimensioned on one line together. */
import type { PaperPoint } from "../geometry/types";
import type { DrawnEdge } from "./drawn";
import type { Placed } from "./place";

export interface Chain {
  readonly edges: readonly DrawnEdge[];
  /** The axis it runs along: 0 east, 1 north, 2 up. */
  readonly axis: 0 | 1 | 2;
  readonly sign: 1 | -1;
}

/** Chains of the legs that get dimensions: axis legs and slopes that are the spool's own. */
export function straightChains(drawn: readonly DrawnEdge[]): readonly Chain[] {
  const chains: { edges: DrawnEdge[]; axis: 0 | 1 | 2; sign: 1 | -1 }[] = [];
  for (const d of drawn) {
    const { edge } = d;
    if (edge.kind === "offset" || edge.stub || edge.neighbour) continue;
    const axis = edge.real[0] !== 0 ? 0 : edge.real[1] !== 0 ? 1 : 2;
    const sign = edge.real[axis] > 0 ? 1 : -1;
    const open = chains.find((chain) => chain.axis === axis && chain.sign === sign && continues(chain.edges[chain.edges.length - 1], d));
    if (open) open.edges.push(d);
    else chains.push({ edges: [d], axis, sign });
  }
  return chains;
}

function continues(before: DrawnEdge | undefined, after: DrawnEdge): boolean {
  return before !== undefined && before.edge.to === after.edge.from && before.edge.leg.runId === after.edge.leg.runId;
}

/** Paper a mark takes along a pipe, mm, with both sides in use. */
const MARK_PITCH = 8;

/** True when a chain carries so many marks that they need the strip next to the pipe. */
export function chainCrowded(placed: Placed, chain: Chain): boolean {
  return marksAlong(placed, chain) * MARK_PITCH > chain.edges.reduce((sum, { length }) => sum + length, 0);
}

function marksAlong(placed: Placed, chain: Chain): number {
  const points = new Set(chain.edges.flatMap(({ edge }) => [edge.from, edge.to]));
  const { sketch } = placed;
  const parts = [...points].reduce((sum, id) => sum + (sketch.componentsAt.get(id)?.filter((c) => c.kind !== "gasket").length ?? 0), 0);
  return parts + chain.edges.reduce((sum, { edge }) => sum + edge.pieces.length, 0) + sketch.joints.filter((joint) => points.has(joint.pointId) && joint.number !== null).length;
}

/** Working points where a flange stroke stands, so that extension lines start farther off. */
export function flangedPoints(placed: Placed): ReadonlySet<string> {
  const ids = new Set<string>();
  for (const [pointId, components] of placed.sketch.componentsAt) if (components.some((component) => component.kind.startsWith("flange")) && !components.some((component) => component.kind === "valve")) ids.add(pointId);
  return ids;
}

/** Paper directions in which pipes leave each point. */
export function leavingDirections(drawn: readonly DrawnEdge[]): ReadonlyMap<string, readonly PaperPoint[]> {
  const directions = new Map<string, PaperPoint[]>();
  const add = (id: string, d: PaperPoint): void => {
    const there = directions.get(id);
    if (there) there.push(d);
    else directions.set(id, [d]);
  };
  for (const { edge, direction } of drawn) {
    add(edge.from, direction);
    add(edge.to, [-direction[0], -direction[1]]);
  }
  return directions;
}
