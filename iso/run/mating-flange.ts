/** The flange, gasket and studs a flanged part (a valve, an instrument) brings on each side a pipe comes to. */
import { vecAddScaled, vecNegate } from "../geometry/vec3";
import { boltedParts } from "./bolted-face";
import { plainTerm, type BuildContext } from "./build-context";
import type { JointDraft, PlacedPoint, Side, StudShare } from "./build-types";
import type { RatingClass } from "./document";
import { flowAfter, flowAt } from "./fit-common";
import { pipeFlange, type PipeFlange } from "./flange-seat";
import type { Component, CutTerm } from "./model-types";
import { originalSide } from "./original-side";

export interface MatedSide {
  readonly side: Side;
  readonly components: readonly Component[];
  readonly joints: readonly JointDraft[];
  readonly held: readonly (readonly [string, string])[];
}

export interface MatingFace {
  readonly mating: PipeFlange;
  readonly ratingClass: RatingClass;
  readonly name: "in" | "out";
  /** Take-out of the part itself, centre to face; `halfMm` is its size. */
  readonly term: CutTerm;
  readonly halfMm: number;
  /** A wafer's studs; null for a part with flanges of its own. */
  readonly studs: StudShare | null;
}

/** The mating flange and gasket of one face of the part at a point. */
export function matingFlange(p: PlacedPoint, face: MatingFace, ctx: BuildContext): MatedSide {
  const { mating, ratingClass, name, term, halfMm, studs } = face;
  const gasketMm = ctx.settings.allowances.gasketMm;
  const pipe = name === "in" ? p.pipeIn : p.pipeOut;
  const flow = name === "in" ? flowAt(p) : flowAfter(p);
  const toPipe = name === "in" ? vecNegate(flow) : flow;
  const sideName = originalSide(p.point, name);
  const flange = pipeFlange(p, {
    id: `${p.uid}.flange-${sideName}`, side: name, type: mating, ratingClass, pipe, faceReachMm: halfMm + gasketMm, text: "",
    toFace: [term, plainTerm("gasket", "gasket", gasketMm)],
  }, ctx);
  // A wafer's studs go through both mating flanges, which are of one kind.
  const passesBoth = studs !== null && !studs.none && !p.isFirst && !p.isLast;
  const bolted = boltedParts(p, {
    key: `${p.uid}:bolts-${sideName}`, gasketId: `${p.uid}.gasket-${sideName}`, pipe, ratingClass, centre: vecAddScaled(p.position, toPipe, halfMm + gasketMm / 2), flow,
    sides: name === "in" ? [flange.faceId, p.uid] : [p.uid, flange.faceId], place: p.point.places.bolts ?? "shop", gasketMm,
    shares: passesBoth ? [studs, flange.studs, flange.studs] : [studs, flange.studs],
  }, ctx);
  return { side: flange.side, components: [...flange.components, ...bolted.components], joints: [bolted.joint], held: [...flange.held, ...bolted.held] };
}
