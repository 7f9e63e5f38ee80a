/** The centre line of a way as points: straights whole, arcs in chords. */
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecCross, vecRotate, vecUnit } from "../geometry/vec3";
import type { Draft } from "./draft";

/** Largest angle of a chord; its sagitta is 0.1 % of the bend radius. */
const CHORD_RAD = (5 * Math.PI) / 180;

/** Corners of a draft, from the first end to where the last straight arrives. */
export function cornersOf({ directions, lengths }: Pick<Draft, "directions" | "lengths">, start: Vec3): Vec3[] {
  const points: Vec3[] = [start];
  directions.forEach((direction, j) => points.push(vecAddScaled(points[j] ?? start, direction, lengths[j] ?? 0)));
  return points;
}

/** Points along the centre line; corners rounded with each turn's bend radius (a mitre keeps its segments' corners). */
export function centreLine(draft: Draft, corners: readonly Vec3[]): Vec3[] {
  const path: Vec3[] = [corners[0] ?? [0, 0, 0]];
  draft.turns.forEach((turn, i) => {
    const [before, after, corner] = [draft.directions[i], draft.directions[i + 1], corners[i + 1]];
    if (!before || !after || !corner) return;
    const mitre = turn.fitting.make === "mitre" ? turn.fitting.pieces - 1 : null;
    path.push(...(mitre === null ? arcPoints(corner, before, after, turn.angleRad, turn.radiusMm) : mitrePoints(corner, before, after, turn.angleRad, turn.radiusMm, mitre)));
  });
  path.push(corners[corners.length - 1] ?? [0, 0, 0]);
  return path;
}

function arcPoints(corner: Vec3, before: Vec3, after: Vec3, angleRad: number, radiusMm: number): Vec3[] {
  const axis = vecUnit(vecCross(before, after));
  if (!axis) return [corner];
  const steps = Math.max(1, Math.ceil(angleRad / CHORD_RAD));
  const start = vecAddScaled(corner, before, -radiusMm * Math.tan(angleRad / 2));
  const toCentre = vecCross(axis, before);
  const centre = vecAddScaled(start, toCentre, radiusMm);
  return Array.from({ length: steps + 1 }, (_, k) => vecAddScaled(centre, vecRotate(toCentre, axis, (angleRad * k) / steps), -radiusMm));
}

/** Corners of the segments, which touch the arc: the first cut, and one more after each segment of 2R·tan(δ/2). */
function mitrePoints(corner: Vec3, before: Vec3, after: Vec3, angleRad: number, radiusMm: number, welds: number): Vec3[] {
  const axis = vecUnit(vecCross(before, after));
  if (!axis || welds === 1) return [corner];
  const delta = angleRad / welds;
  const half = radiusMm * Math.tan(delta / 2);
  const points = [vecAddScaled(corner, before, half - radiusMm * Math.tan(angleRad / 2))];
  for (let k = 1; k < welds; k += 1) points.push(vecAddScaled(points[k - 1] ?? corner, vecRotate(before, axis, k * delta), 2 * half));
  return points;
}

/** Length of the centre line end to end: arcs as arcs, mitres along their segments. */
export function centreLineMm({ lengths, turns }: Pick<Draft, "lengths" | "turns">): number {
  const straight = lengths.reduce((sum, length) => sum + length, 0);
  return turns.reduce((sum, turn) => {
    const tangents = 2 * turn.radiusMm * Math.tan(turn.angleRad / 2);
    if (turn.fitting.make === "elbow") return sum - tangents + turn.radiusMm * turn.angleRad;
    const welds = turn.fitting.pieces - 1;
    return welds === 1 ? sum : sum - tangents + 2 * welds * turn.radiusMm * Math.tan(turn.angleRad / welds / 2);
  }, straight);
}
