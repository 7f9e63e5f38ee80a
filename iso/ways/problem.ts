/**
 * The question checked and made ready: unit axes, the elbows of both sizes with their take-outs, the reducer between the
 * sizes. What is wrong with it comes back as one sentence.
 */
import { catalogueValue } from "../catalogue/catalogue";
import { reducerKey } from "../catalogue/keys";
import { pipeOdMm, pipeWall } from "../catalogue/pipe";
import { vecAddScaled, vecDistance, vecDot, vecIsFinite, vecLength, vecNegate, vecSub, vecUnit } from "../geometry/vec3";
import type { Vec3 } from "../geometry/types";
import { NPS_SIZES, type Nps } from "../run/document";
import { formatLength } from "../units/format";
import { INCH_MM } from "../units/length";
import { SAME_POINT_MM } from "../geometry/tolerances";
import { stockElbows, type StockElbow } from "./stock";
import type { WaysInput } from "./ways-types";

/** One of the two ends' pipes: its size and what it is cut and turned with. */
export interface WaysPipe {
  readonly nps: Nps;
  readonly odMm: number;
  readonly kgPerM: number | null;
  readonly wallSource: string;
  readonly stock: readonly StockElbow[];
  readonly leastPupMm: number;
}

export interface WaysReducer {
  readonly large: Nps;
  readonly small: Nps;
  /** True when the size goes down from end 0 to end 1. */
  readonly down: boolean;
  readonly lengthMm: number;
  readonly source: string;
  readonly unverified: boolean;
}

export interface WaysProblem {
  readonly input: WaysInput;
  readonly p0: Vec3;
  readonly p1: Vec3;
  readonly d0: Vec3;
  /** Into end 1: the direction the closing arrives with. */
  readonly into1: Vec3;
  readonly gapMm: number;
  readonly pipes: readonly [WaysPipe, WaysPipe];
  readonly reducer: WaysReducer | null;
}

/** Least pipe between two weld toes whatever the size, mm (common practice; no code sets it). */
const SHORTEST_PUP_MM = 50;
/** Farther apart than this many diameters, two ends are another line. */
const FARTHEST_ODS = 5_000;
/** Two readings of one survey are hardly ever in just this ratio by chance. */
const SLIP_WITHIN = 0.002;

/** The question made ready, or what is wrong with it. Never throws on user data. */
export function waysProblem(input: WaysInput): WaysProblem | string {
  const wrong = wrongEnds(input) ?? wrongNumbers(input);
  if (wrong !== null) return wrong;
  const [d0, d1] = [vecUnit(input.end0.direction), vecUnit(input.end1.direction)];
  if (!d0 || !d1) return `End ${d0 ? 1 : 0} has no direction: say which way its axis points.`;
  const pipes = [pipeOf(input, 0), pipeOf(input, 1)] as const;
  if (typeof pipes[0] === "string") return pipes[0];
  if (typeof pipes[1] === "string") return pipes[1];
  const apart = wrongPlaces(input, d0, d1, Math.max(pipes[0].odMm, pipes[1].odMm));
  if (apart !== null) return apart;
  const reducer = reducerOf(input);
  if (typeof reducer === "string") return reducer;
  return { input, p0: input.end0.position, p1: input.end1.position, d0, into1: vecNegate(d1), gapMm: input.rootGapMm, pipes: [pipes[0], pipes[1]], reducer };
}

function wrongEnds({ end0, end1 }: WaysInput): string | null {
  for (const [i, end] of [end0, end1].entries()) {
    if (!end || !Array.isArray(end.position) || end.position.length !== 3 || !vecIsFinite(end.position)) return `End ${i}: give its position as three numbers.`;
    if (!Array.isArray(end.direction) || end.direction.length !== 3 || !vecIsFinite(end.direction)) return `End ${i}: give its direction as three numbers.`;
    if (!Number.isFinite(end.straightMm) || end.straightMm < 0) return `End ${i}: a straight cannot be shorter than nothing.`;
  }
  return null;
}

function wrongNumbers({ rootGapMm, minimumPupMm, trimMaxDeg, angles, radii }: WaysInput): string | null {
  if (!Number.isFinite(rootGapMm) || rootGapMm < 0) return "The root gap cannot be less than nothing.";
  if (minimumPupMm !== null && (!Number.isFinite(minimumPupMm) || minimumPupMm < 0)) return "The shortest pup cannot be less than nothing.";
  if (!Number.isFinite(trimMaxDeg) || trimMaxDeg < 0 || trimMaxDeg > 90) return "An elbow can be trimmed to an angle between 0 and 90 degrees.";
  if (radii.length === 0) return "Choose long-radius or short-radius elbows.";
  if (angles.length === 0 && trimMaxDeg === 0) return "Choose at least one elbow angle, or allow trimming.";
  return null;
}

/** Ends that cannot be meant: on top of each other, one inside the other, or in different units. */
function wrongPlaces({ end0, end1, units }: WaysInput, d0: Vec3, d1: Vec3, odMm: number): string | null {
  const [p0, p1] = [end0.position, end1.position];
  const apart = vecDistance(p0, p1);
  const say = (mm: number) => (units === "metric" ? `${formatLength(mm, units)} mm` : formatLength(mm, units));
  if (apart <= SAME_POINT_MM) return "Both ends stand at the same place: there is nothing to close. Check the two positions.";
  const slip = unitSlip(p0, p1);
  if (slip !== null) return slip;
  if (isInside(p1, p0, d0, odMm) || isInside(p0, p1, d1, odMm)) return `The ends stand inside each other: one lies within the other's pipe, ${say(apart)} away. Check the positions and which way each axis points.`;
  if (apart > FARTHEST_ODS * odMm) return `The ends are ${say(apart)} apart. Check the units: a factor of 25.4 (inches and millimetres) or 12 (feet and inches) slips in easily.`;
  return null;
}

/** Whether a point lies within the pipe that stands behind an end. */
function isInside(point: Vec3, end: Vec3, out: Vec3, odMm: number): boolean {
  const way = vecSub(point, end);
  const along = vecDot(way, out);
  return along < 0 && along > -4 * odMm && vecLength(vecAddScaled(way, out, -along)) < odMm / 2;
}

/** One end's numbers being the other's times 25.4 or 12 on every axis is a slip of units. */
function unitSlip(p0: Vec3, p1: Vec3): string | null {
  const [near, far] = vecLength(p0) <= vecLength(p1) ? [p0, p1] : [p1, p0];
  const size = vecLength(near);
  if (size === 0) return null;
  const axes = near.filter((part) => Math.abs(part) > SLIP_WITHIN * size).length;
  for (const [factor, words] of [[INCH_MM, "25.4 (inches read as millimetres)"], [12, "12 (feet read as inches)"]] as const) {
    // 1 ft and 12 ft along one axis are an honest pair of numbers.
    if (factor === 12 && axes < 2) continue;
    if (vecDistance(far, vecAddScaled([0, 0, 0], near, factor)) <= SLIP_WITHIN * factor * size) {
      return `The numbers of one end are those of the other times ${words}: check the units of both.`;
    }
  }
  return null;
}

function pipeOf(input: WaysInput, end: 0 | 1): WaysPipe | string {
  const { nps } = end === 0 ? input.end0 : input.end1;
  const odMm = pipeOdMm(nps, input.units);
  if (odMm === null) return `The pipe table has no size NPS ${nps}.`;
  const wall = pipeWall(nps, end === 1 ? (input.schedule1 ?? input.schedule) : input.schedule, input.units);
  return {
    nps, odMm, kgPerM: wall?.kgPerM ?? null, wallSource: wall?.source ?? "wall not known",
    stock: stockElbows(input, nps), leastPupMm: input.minimumPupMm ?? Math.max(1.5 * odMm, SHORTEST_PUP_MM),
  };
}

function reducerOf({ end0, end1, units, takeOuts }: WaysInput): WaysReducer | null | string {
  if (end0.nps === end1.nps) return null;
  const down = NPS_SIZES.indexOf(end1.nps) < NPS_SIZES.indexOf(end0.nps);
  const [large, small] = down ? [end0.nps, end1.nps] : [end1.nps, end0.nps];
  const value = catalogueValue(reducerKey(large, small), units, takeOuts);
  if (!value) return `The tables have no reducer NPS ${large} x ${small}: give its length as the shop's own take-out, or take ends of one size.`;
  return { large, small, down, lengthMm: value.mm, source: value.source, unverified: value.unverified };
}
