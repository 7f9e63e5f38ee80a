/** Small builders every kind of item uses to say what it puts into the line and what it offers the pipe on either side. */
import type { Vec3 } from "../geometry/types";
import { VEC_EAST, vecAddScaled, vecNegate } from "../geometry/vec3";
import type { BuildContext } from "./build-context";
import type { BoltedFace, Fitting, JointDraft, PlacedPoint, Side } from "./build-types";
import type { Nps, Pipe, Place } from "./document";
import { threadEngagementKey } from "../catalogue/keys";
import { sizeText } from "./words";
import type { Component, ComponentKind, CutTerm, Port } from "./model-types";
import { originalSide } from "./original-side";

/** Which of an item's sides: the upstream weld, the downstream one, the branch, or a cross's second branch. */
export type SideName = "in" | "out" | "branch" | "branch-2";

/** How a fitting meets the pipe. */
export type FittingEnds = "butt" | "socket" | "threaded";

/** The pipe runs through without a cut. */
export const THROUGH: Side = {
  through: true, terms: [], componentId: null, weld: null, gap: null, trimMm: 0, bolted: null,
};

/** Where a joint of this side is made; the shop unless said. */
export function sidePlace(p: PlacedPoint, side: SideName): Place {
  return p.point.places[side === "branch-2" ? "branch" : side] ?? "shop";
}

/** Supplied extra at a field-fit joint of this point, mm; 0 elsewhere. */
export function sideTrim(p: PlacedPoint, place: Place, ctx: BuildContext): number {
  return place === "field-fit" ? (p.point.trimMm ?? ctx.settings.fieldTrimMm) : 0;
}

interface WeldedSide {
  readonly terms: readonly CutTerm[];
  readonly componentId: string;
  readonly mismatchRad?: number;
  readonly place?: Place;
  readonly key?: string;
}

function weldSide(p: PlacedPoint, side: SideName, ctx: BuildContext, given: WeldedSide, kind: "butt" | "socket" | "slip-on" | "branch" | "threaded", gap: Side["gap"]): Side {
  const place = given.place ?? sidePlace(p, side);
  return {
    through: false, terms: given.terms, componentId: given.componentId,
    weld: { key: given.key ?? `${p.uid}:${originalSide(p.point, side)}`, kind, place, mismatchRad: given.mismatchRad ?? 0 },
    gap, trimMm: sideTrim(p, place, ctx), bolted: null,
  };
}

/** A bevelled end with a root gap. */
export function buttSide(p: PlacedPoint, side: SideName, ctx: BuildContext, given: WeldedSide): Side {
  return weldSide(p, side, ctx, given, "butt", { kind: "root-gap", mm: ctx.settings.allowances.rootGapMm, label: "root gap" });
}

/** A socket: the take-out goes to its bottom, the pipe stays back from it. */
export function socketSide(p: PlacedPoint, side: SideName, ctx: BuildContext, given: WeldedSide): Side {
  return weldSide(p, side, ctx, given, "socket", { kind: "pull-back", mm: ctx.settings.allowances.socketPullBackMm, label: "pull-back in the socket" });
}

/** A threaded end: the take-out goes to the end of the fitting, the pipe goes in from there by the thread's engagement. */
export function threadedSide(p: PlacedPoint, side: SideName, ctx: BuildContext, given: WeldedSide, nps: Nps = p.pipeIn.nps): Side {
  const own = ctx.settings.allowances.threadMakeUpMm;
  const table = own === undefined ? ctx.takeOut(threadEngagementKey(nps), `thread engagement in ${sizeText(nps, ctx.units)}`, p) : null;
  const mm = own ?? table?.mm ?? 0;
  return weldSide(p, side, ctx, given, "threaded", {
    kind: "make-up", mm: -mm, label: "thread make-up", source: table ? table.source || null : "make-up of the line", unconfirmed: table?.unconfirmed ?? false,
  });
}

/** The side of a fitting by the kind of its ends. */
export function endedSide(ends: FittingEnds, p: PlacedPoint, side: SideName, ctx: BuildContext, given: WeldedSide, nps: Nps = p.pipeIn.nps): Side {
  if (ends === "threaded") return threadedSide(p, side, ctx, given, nps);
  return (ends === "socket" ? socketSide : buttSide)(p, side, ctx, given);
}

/** A slip-on: its setting stands among the terms, no gap. */
export function slipOnSide(p: PlacedPoint, side: SideName, ctx: BuildContext, given: WeldedSide): Side {
  return weldSide(p, side, ctx, given, "slip-on", null);
}

/** A branch pipe set on its header. */
export function branchWeldSide(p: PlacedPoint, ctx: BuildContext, given: WeldedSide): Side {
  return weldSide(p, "branch", ctx, given, "branch", { kind: "root-gap", mm: ctx.settings.allowances.rootGapMm, label: "root gap" });
}

/** The pipe simply ends here; `weld` when somebody welds it to what is outside. */
export function endSide(weld: Side["weld"] = null, trimMm = 0): Side {
  return { through: false, terms: [], componentId: null, weld, gap: null, trimMm, bolted: null };
}

/** A part with no joint towards the pipe on this side (a bare valve end at the end of a run). */
export function bareSide(terms: readonly CutTerm[], componentId: string, bolted: BoltedFace | null = null): Side {
  return { through: false, terms, componentId, weld: null, gap: null, trimMm: 0, bolted };
}

/** A fitting that does nothing but let the pipe through, to be filled in. */
export function fittingOf(given: Partial<Fitting>): Fitting {
  return { components: [], joints: [], riders: [], in: THROUGH, out: THROUGH, branches: [], ...given };
}

/** Flow at a point: what arrives, else what leaves, else east. */
export function flowAt(p: PlacedPoint): Vec3 {
  return p.arriving ?? p.leaving ?? VEC_EAST;
}

/** Flow on the downstream side. */
export function flowAfter(p: PlacedPoint): Vec3 {
  return p.leaving ?? p.arriving ?? VEC_EAST;
}

export function port(id: Port["id"], centre: Vec3, direction: Vec3, reachMm: number, nps: Nps): Port {
  return { id, position: vecAddScaled(centre, direction, reachMm), direction, nps };
}

/** In and out ports of a straight part: faces `before` and `after` its centre along flow. */
export function straightPorts(centre: Vec3, flow: Vec3, before: number, after: number, nps: Nps): Port[] {
  return [port("in", centre, vecNegate(flow), before, nps), port("out", centre, flow, after, nps)];
}

type ComponentGiven = Partial<Component> & { kind: ComponentKind; description: string };

/** A component with everything not given at its neutral value. */
export function makeComponent(p: PlacedPoint, pipe: Pipe, given: ComponentGiven): Component {
  return {
    id: p.uid, pointId: p.point.id, runId: p.runId, valve: null, ends: null, nps: pipe.nps, nps2: null, schedule: null,
    ratingClass: null, centre: p.position, ports: [], aside: null, asideName: null, angleRad: null, radiusMm: null,
    unconfirmedKey: null, material: pipe.material, weightKg: null, weightSource: "", source: "", text: "", spool: null,
    ...given,
  };
}

type JointGiven = Pick<JointDraft, "key" | "kind" | "a" | "b" | "position" | "direction"> & Partial<JointDraft>;

/** A joint of this point, in the shop and square unless said otherwise. */
export function makeJoint(p: PlacedPoint, given: JointGiven): JointDraft {
  const { key, kind, a, b, position, direction, pointId = p.point.id, runId = p.runId, place = "shop", nps = p.pipeIn.nps, mismatchRad = 0, gapMm = 0, gasketId = null } = given;
  return { key, pointId, runId, kind, place, position, direction, a, b, nps, mismatchRad, gapMm, gasketId };
}

/** Sum of the take-outs, as a positive reach from the working point. */
export function reachOf(terms: readonly CutTerm[]): number {
  return -terms.reduce((sum, t) => sum + t.valueMm, 0);
}

/** Key as `${first unconfirmed}` of several take-outs; null when all are sure. */
export function unconfirmedOf(...takeOuts: readonly { key: string; unconfirmed: boolean }[]): string | null {
  return takeOuts.find((t) => t.unconfirmed)?.key ?? null;
}

