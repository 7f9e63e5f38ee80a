/** Everything that may be off, as what it does to the far end: the survey's errors and the shop's. */
import type { Vec3 } from "../geometry/types";
import { vecCross, vecLerp, vecPerpendicular, vecSub } from "../geometry/vec3";
import { DEVIATIONS_IN_TOLERANCE } from "../survey/survey-tools";
import { turnAxis, turnCentre, type ChainFrame, type ChainStep, type FitPiece } from "./chain";
import type { ShopTolerances } from "./fit-settings";
import type { FitInput, Twist } from "./fit-types";
import { twistAbout, twistAlong } from "./twist";

/** One thing that may be off, with what one deviation of each of its parts does to "piece less true end" at end 1. */
export interface FitSource {
  readonly id: string;
  readonly kind: "reading" | "end" | "shop";
  readonly name: string;
  readonly columns: readonly Twist[];
}

type Joint = Extract<FitPiece, { kind: "joint" }>;

export const SHOP_NAMES: Readonly<Record<keyof ShopTolerances, string>> = {
  cutLengthMm: "Cut length", elbowAngleDeg: "Elbow angle", rollDeg: "Roll", gapMm: "Root gap of shop welds", hiLoMm: "High-low of shop welds", squareMm: "Squareness of shop welds",
};

const RAD = Math.PI / 180;

/** @param fitted joints that take up what is off; every other one is off itself, like a shop weld. */
export function fitSources(input: FitInput, steps: readonly ChainStep[], fitted: ReadonlySet<string>): FitSource[] {
  const { start, end } = input;
  const readings = input.errors.map((error) => ({ id: error.id, kind: error.kind, name: error.name, columns: error.columns.map((column) => endTwist(column, start, end)) }));
  return [...readings, ...shopSources(input, steps, fitted)];
}

/** What true less measured ends do to the piece at end 1: it moves with end 0, and end 1 itself is elsewhere. */
export function endTwist(column: readonly number[], start: { readonly position: Vec3; readonly axis: Vec3 }, end: { readonly position: Vec3; readonly axis: Vec3 }): number[] {
  const part = (from: number): Vec3 => [column[from]!, column[from + 1]!, column[from + 2]!];
  const turn0 = vecCross(start.axis, part(3));
  const turn1 = vecCross(end.axis, part(9));
  const swing = vecCross(turn0, vecSub(end.position, start.position));
  const [p0, p1] = [part(0), part(6)];
  return [...p0.map((v, i) => v + swing[i]! - p1[i]!), ...turn0.map((v, i) => v - turn1[i]!)];
}

function shopSources(input: FitInput, steps: readonly ChainStep[], fitted: ReadonlySet<string>): FitSource[] {
  const { shop } = input.settings;
  const reference = input.end.position;
  const made = placedJoints(steps).filter(({ joint }) => !fitted.has(joint.id));
  const across = (frame: ChainFrame) => [frame.side, vecCross(frame.along, frame.side)] as const;
  const columns: Record<keyof ShopTolerances, number[][]> = {
    cutLengthMm: steps.flatMap(({ piece, before }) => (piece.kind === "straight" && piece.cut ? [twistAlong(before.along)] : [])),
    elbowAngleDeg: steps.flatMap(({ piece, before }) => (piece.kind === "turn" ? [twistAbout(turnCentre(before, piece.radiusMm), turnAxis(before), reference, RAD)] : [])),
    rollDeg: steps.flatMap(({ piece, before }) => (piece.kind === "roll" && piece.set ? [twistAbout(before.at, before.along, reference, RAD)] : [])),
    gapMm: made.map(({ frame }) => twistAlong(frame.along)),
    hiLoMm: made.flatMap(({ frame }) => across(frame).map((way) => twistAlong(way))),
    squareMm: made.flatMap(({ frame }) => across(frame).map((way) => twistAbout(frame.at, way, reference, 1 / input.odMm))),
  };
  return (Object.keys(SHOP_NAMES) as (keyof ShopTolerances)[]).flatMap((key) => {
    const sigma = shop[key] / DEVIATIONS_IN_TOLERANCE;
    if (!(sigma > 0) || columns[key].length === 0) return [];
    return [{ id: `shop:${key}`, kind: "shop" as const, name: SHOP_NAMES[key], columns: columns[key].map((column) => column.map((v) => v * sigma)) }];
  });
}

/** Middle of a joint's gap, its way along, and level (or, on a riser, east) and upright ways across it. */
export function jointFrame(before: ChainFrame, after: ChainFrame): ChainFrame {
  return { at: vecLerp(before.at, after.at, 0.5), along: before.along, side: vecCross(before.along, vecPerpendicular(before.along)) };
}

/** A joint with where it stands. */
export interface PlacedJoint {
  readonly joint: Joint;
  readonly frame: ChainFrame;
}

export function placedJoints(steps: readonly ChainStep[]): PlacedJoint[] {
  return steps.flatMap(({ piece, before, after }) => (piece.kind === "joint" ? [{ joint: piece, frame: jointFrame(before, after) }] : []));
}
