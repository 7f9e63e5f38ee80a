/** Part frames: where each component's part lies on each of its legs, with its own axes on paper. */
import type { PaperPoint } from "../geometry/types";
import type { Component } from "../run/model-types";
import type { ArmPart } from "./arms";
import type { DrawnEdge } from "./drawn";
import type { Ink, Ref } from "./drawing-types";
import type { Placed } from "./place";
import type { Projection } from "./project";

/** One part of a symbol on one leg: its frame on paper. */
export interface PartFrame {
  readonly component: Component;
  readonly drawn: DrawnEdge;
  readonly ink: Ink;
  readonly ref: Ref;
  /** Point at a distance out from the working point and to the side. */
  readonly at: (out: number, side: number) => PaperPoint;
  readonly inner: number;
  readonly outer: number;
  /** Unit vector on paper a flange stroke lies along. */
  readonly stroke: PaperPoint;
}

/** Flange strokes stand upright on level pipe and along the east axis on a riser; square to an off-axis leg. */
function strokeDirection(projection: Projection, d: DrawnEdge): PaperPoint {
  if (d.edge.kind === "offset") return [-d.direction[1], d.direction[0]];
  return d.edge.real[2] !== 0 ? projection.axes[0] : projection.axes[2];
}

export function partFrames(placed: Placed, drawn: readonly DrawnEdge[]): readonly PartFrame[] {
  const { spool } = placed.sketch;
  return drawn.flatMap((d) =>
    ([[d.edge.fromArm.parts, d.from, 1], [d.edge.toArm.parts, d.to, -1]] as const).flatMap(([parts, origin, sign]) =>
      parts.map((part) => frameOf(placed.projection, d, part, origin, sign, spool)),
    ),
  );
}

function frameOf(projection: Projection, d: DrawnEdge, part: ArmPart, origin: PaperPoint, sign: 1 | -1, spool: string | null): PartFrame {
  const [ux, uy] = [d.direction[0] * sign, d.direction[1] * sign];
  return {
    component: part.component, drawn: d, inner: part.inner, outer: part.outer,
    ink: spool !== null && part.component.spool !== spool ? "grey" : "ink",
    ref: { kind: "component", id: part.component.id },
    at: (out, side) => [origin[0] + ux * out - uy * side, origin[1] + uy * out + ux * side],
    stroke: strokeDirection(projection, d),
  };
}
