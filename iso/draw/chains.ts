/** Straight chains: runs of legs that go on in one line through valves, tees and flanges, dimensioned on one line together. */
import type { DrawnEdge } from "./drawn";

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
