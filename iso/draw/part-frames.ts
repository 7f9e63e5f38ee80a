/** Part frames: where each component's part lies on each of its legs, with its own axes on paper. */
import type { PaperPoint } from "../geometry/types";
import type { Item } from "../run/document";
import type { Component } from "../run/model-types";
import type { ArmPart } from "./arms";
import type { DrawnEdge } from "./drawn";
import type { Ink, Ref } from "./drawing-types";
import type { Placed } from "./place";
import type { Projection } from "./project";

/** One part of a symbol on one leg: its frame on paper. */
export interface PartFrame {
  readonly component: Component;
  /** What the detailer named at its point; null where nothing is. */
  readonly item: Item | null;
  readonly drawn: DrawnEdge;
  readonly ink: Ink;
  readonly ref: Ref;
  /** Point at a distance out from the working point and to the side. */
  readonly at: (out: number, side: number) => PaperPoint;
  readonly inner: number;
  readonly outer: number;
  /** Unit vector on paper a flange stroke lies along. */
  readonly stroke: PaperPoint;
  /** Unit vector on paper of the pipe a branch leaves from; square to the leg where there is none. */
  readonly run: PaperPoint;
}

/** Flange strokes stand upright on level pipe and along the east axis on a riser; square to an off-axis leg. */
function strokeDirection(projection: Projection, d: DrawnEdge): PaperPoint {
  if (d.edge.kind === "offset") return [-d.direction[1], d.direction[0]];
  return d.edge.real[2] !== 0 ? projection.axes[0] : projection.axes[2];
}

/** Cosine on paper above which two legs at a point count as one line. */
const SAME_LINE = 0.97;

/** Kept while the drawn legs are: symbols, marks and notes all ask for them. */
const known = new WeakMap<readonly DrawnEdge[], readonly PartFrame[]>();

export function partFrames(placed: Placed, drawn: readonly DrawnEdge[]): readonly PartFrame[] {
  const frames = known.get(drawn) ?? framesOf(placed, drawn);
  known.set(drawn, frames);
  return frames;
}

function framesOf(placed: Placed, drawn: readonly DrawnEdge[]): readonly PartFrame[] {
  const items = new Map(placed.sketch.model.document.runs.flatMap((run) => run.points.map((point) => [point.id, point.item] as const)));
  const at = new Map<string, DrawnEdge[]>();
  for (const d of drawn) {
    for (const id of [d.edge.from, d.edge.to]) {
      const there = at.get(id);
      if (there) there.push(d);
      else at.set(id, [d]);
    }
  }
  return drawn.flatMap((d) =>
    ([[d.edge.fromArm.parts, d.edge.from, d.from, 1], [d.edge.toArm.parts, d.edge.to, d.to, -1]] as const).flatMap(([parts, vertex, origin, sign]) => {
      const run = runBeside(d, at.get(vertex) ?? []);
      return parts.map((part) => frameOf(placed, d, part, origin, sign, run, items.get(part.component.pointId) ?? null));
    }),
  );
}

function runBeside(d: DrawnEdge, others: readonly DrawnEdge[]): PaperPoint {
  const other = others.find((o) => o !== d && Math.abs(o.direction[0] * d.direction[0] + o.direction[1] * d.direction[1]) < SAME_LINE);
  return other ? other.direction : [-d.direction[1], d.direction[0]];
}

function frameOf(placed: Placed, d: DrawnEdge, part: ArmPart, origin: PaperPoint, sign: 1 | -1, run: PaperPoint, item: Item | null): PartFrame {
  const [ux, uy] = [d.direction[0] * sign, d.direction[1] * sign];
  return {
    component: part.component, item, drawn: d, inner: part.inner, outer: part.outer, run,
    ink: placed.sketch.isOwn(part.component.id) ? "ink" : "grey",
    ref: { kind: "component", id: part.component.id },
    at: (out, side) => [origin[0] + ux * out - uy * side, origin[1] + uy * out + ux * side],
    stroke: strokeDirection(placed.projection, d),
  };
}
