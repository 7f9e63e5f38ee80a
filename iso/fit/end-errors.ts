/** How well the two ends of a closing are known, wherever that comes from: typed by hand, one covariance, or readings. */
import type { Vec3 } from "../geometry/types";
import { vecCross, vecPerpendicular } from "../geometry/vec3";
import type { EndInfluence } from "../survey/end-influences";
import { DEVIATIONS_IN_TOLERANCE } from "../survey/survey-tools";
import type { EndError } from "./fit-types";
import { factorOf, transposed } from "./twist";

/** Errors of an end typed by hand: position ± each way and axis ±, two deviations. */
export function typedEndError(end: 0 | 1, axis: Vec3, positionMm: number, axisRad: number, name = `End ${end} (not surveyed)`): EndError {
  const offset = end * 6;
  const place = (values: readonly number[], from: number) => Array.from({ length: 12 }, (_, i) => values[i - offset - from] ?? 0);
  const up = vecPerpendicular(axis);
  const ways = [up, vecCross(axis, up)];
  return {
    id: `end:${end}`, kind: "end", name,
    columns: [
      ...[0, 1, 2].map((k) => place([0, 1, 2].map((i) => (i === k ? positionMm / DEVIATIONS_IN_TOLERANCE : 0)), 0)),
      ...ways.map((way) => place(way.map((v) => (v * axisRad) / DEVIATIONS_IN_TOLERANCE), 3)),
    ],
  };
}

/** An end known by its covariance alone, six by six: position E, N, U in mm, then axis. */
export function knownEndError(end: 0 | 1, covariance: readonly (readonly number[])[], name: string): EndError {
  const columns = transposed(factorOf(covariance)).filter((column) => column.some((v) => v !== 0));
  return { id: `end:${end}`, kind: "end", name, columns: columns.map((column) => Array.from({ length: 12 }, (_, i) => column[i - end * 6] ?? 0)) };
}

/** Readings of a survey that holds both ends, in the order end 0, end 1. */
export function surveyedErrors(influences: readonly EndInfluence[]): EndError[] {
  return influences.map(({ id, name, columns }) => ({ id, kind: "reading", name, columns }));
}

/** Readings of a survey that holds one of the ends. */
export function surveyedEndErrors(end: 0 | 1, influences: readonly EndInfluence[]): EndError[] {
  return influences.map(({ id, name, columns }) => ({ id, kind: "reading", name, columns: columns.map((column) => Array.from({ length: 12 }, (_, i) => column[i - end * 6] ?? 0)) }));
}
