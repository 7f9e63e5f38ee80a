/**
 * Two faces bolted together: the gasket between them, the joint, and the set of studs. B16.5 tabulates the length for two
 * flanges of one class; where the studs take in more (a wafer valve, stub ends, a thick gasket) the length is computed
 * from it and says so.
 */
import { flangeBolts, flangeFaceMm } from "../catalogue/catalogue";
import { pipeWall } from "../catalogue/pipe";
import type { Vec3 } from "../geometry/types";
import { vecNegate } from "../geometry/vec3";
import { INCH_MM } from "../units/length";
import { sentenceStart, type BuildContext } from "./build-context";
import type { JointDraft, PlacedPoint, StudShare } from "./build-types";
import type { Pipe, Place, RatingClass } from "./document";
import { makeComponent, makeJoint, port } from "./fit-common";
import type { Component } from "./model-types";
import { sizeText } from "./words";

/** Gasket the tables' stud lengths are good for, mm: the common 1/8 in (the tables' own is 1/16; the allowance covers both). */
const TABLE_GASKET_MM = INCH_MM / 8;

/** Raised face within tabulated thickness, mm: the 1/16 in of classes 150 and 300. */
const LOW_FACE_MM = INCH_MM / 16;

/** A face whose studs pass elsewhere: the far side of a wafer valve. */
export const NO_STUDS: StudShare = { extraMm: 0, because: "", none: true };

/** A lap-joint flange has no raised face of its own: the stub end's lap, as thick as the pipe's wall at least (B16.9), lies there. */
export function lapShare(ratingClass: RatingClass, pipe: Pipe, ctx: BuildContext): StudShare {
  const face = Math.max(flangeFaceMm(ratingClass, ctx.units), LOW_FACE_MM);
  const lap = pipeWall(pipe.nps, pipe.schedule, ctx.units)?.wallMm ?? face;
  return { extraMm: lap - face, because: "stub end" };
}

export interface BoltedGiven {
  readonly key: string;
  /** Id of the gasket; the studs' id is formed from it. */
  readonly gasketId: string;
  readonly pipe: Pipe;
  readonly ratingClass: RatingClass;
  readonly centre: Vec3;
  readonly flow: Vec3;
  /** Parts upstream and downstream. */
  readonly sides: readonly [string, string];
  readonly place: Place;
  readonly gasketMm: number;
  readonly shares: readonly (StudShare | null)[];
}

export interface BoltedParts {
  readonly components: readonly Component[];
  readonly joint: JointDraft;
  /** The studs go where the gasket goes. */
  readonly held: readonly (readonly [string, string])[];
}

export function boltedParts(p: PlacedPoint, given: BoltedGiven, ctx: BuildContext): BoltedParts {
  const gasket = gasketPart(p, given);
  const studs = boltSet(p, given, ctx);
  const joint = makeJoint(p, {
    key: given.key, kind: "bolted", place: given.place, position: given.centre, direction: given.flow, a: given.sides[0], b: given.sides[1],
    nps: given.pipe.nps, gapMm: given.gasketMm, gasketId: gasket.id,
  });
  return { components: [gasket, ...studs], joint, held: studs.map((set) => [gasket.id, set.id] as const) };
}

function gasketPart(p: PlacedPoint, { gasketId, pipe, ratingClass, centre, flow }: BoltedGiven): Component {
  return makeComponent(p, pipe, {
    id: gasketId, kind: "gasket", ends: "flanged", ratingClass, centre, material: "as specified", weightSource: "not counted",
    ports: [port("in", centre, vecNegate(flow), 0, pipe.nps), port("out", centre, flow, 0, pipe.nps)],
    description: `Gasket, class ${ratingClass}, raised face`, weightKg: 0,
  });
}

/** One component for the studs of a face; none where another face's pass through, or where no table has the drilling (said once). */
function boltSet(p: PlacedPoint, given: BoltedGiven, ctx: BuildContext): Component[] {
  const { pipe, ratingClass, shares, gasketId } = given;
  if (shares.some((share) => share?.none)) return [];
  const table = flangeBolts(ratingClass, pipe.nps);
  if (!table) {
    ctx.report("bolts-missing", "note", `${sentenceStart(p.label)}: the tables have no bolting for class ${ratingClass} in ${sizeText(pipe.nps, ctx.units)}. Count the studs from the flange in hand.`, { pointId: p.point.id, runId: p.runId });
    return [];
  }
  const reasons = [...new Set(shares.flatMap((share) => (share && share.extraMm !== 0 ? [share.because] : [])))];
  const thick = Math.max(given.gasketMm - TABLE_GASKET_MM, 0);
  if (thick > 0) reasons.push("thick gasket");
  const extra = shares.reduce((sum, share) => sum + (share?.extraMm ?? 0), thick);
  const isPlain = reasons.length === 0;
  const lengthMm = isPlain ? table.studLengthMm : wholeStep(table.studLengthMm + extra, ctx);
  return [makeComponent(p, pipe, {
    id: gasketId.replace(".gasket", ".bolts"), kind: "bolt-set", ends: "flanged", ratingClass, centre: given.centre, material: "as specified",
    bolts: { count: table.count, diameter: table.size, lengthMm }, description: isPlain ? "Stud bolt with two nuts" : "Stud bolt with two nuts, length computed",
    source: isPlain ? table.source : `${table.source}; length computed for ${reasons.join(", ")}`,
  })];
}

/** Studs are ordered in steps of 1/4 in, or 5 mm: up to the next. */
function wholeStep(mm: number, ctx: BuildContext): number {
  const step = ctx.units === "metric" ? 5 : INCH_MM / 4;
  return Math.ceil(mm / step - STEP_SLACK) * step;
}

/** Part of a step float noise may add. */
const STEP_SLACK = 0.001;
