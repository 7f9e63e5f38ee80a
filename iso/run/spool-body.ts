/** Weight, centre of gravity, contents and outer box of one spool. */
import { pipeOdMm } from "../catalogue/pipe";
import { flangeBolts } from "../catalogue/catalogue";
import type { Vec3 } from "../geometry/types";
import { STRAIGHT_RAD, WEIGHTLESS_KG } from "../geometry/tolerances";
import { vecAdd, vecAddScaled, vecDistance, vecLerp, vecScale } from "../geometry/vec3";
import type { UnitSystem } from "./document";
import type { Component, ComponentKind, Leg } from "./model-types";
import type { PieceDraft } from "./piece-draft";
import { spoolVolume, type SpoolVolume } from "./spool-volume";

export interface SpoolBody extends SpoolVolume {
  readonly weightKg: number;
  readonly unweighed: number;
  readonly centreOfGravity: Vec3 | null;
  readonly boxMm: Vec3;
}

/** Empty weight and its centre (weighed parts only), what fills it, and the axis-parallel box around pipes, fittings and flanges. */
export function spoolBody(components: readonly Component[], pieces: readonly PieceDraft[], legs: ReadonlyMap<string, Leg>, units: UnitSystem): SpoolBody {
  let [weightKg, unweighed] = [0, 0];
  let moment: Vec3 = [0, 0, 0];
  const weigh = (kg: number | null, centre: () => Vec3): void => {
    if (kg === null) unweighed += 1;
    else if (kg !== 0) [weightKg, moment] = [weightKg + kg, vecAddScaled(moment, centre(), kg)];
  };
  for (const p of pieces) weigh(p.weightKg, () => pathCentre(piecePath(p, legs)));
  for (const c of components) weigh(c.weightKg, () => componentCentre(c));
  return {
    weightKg, unweighed,
    centreOfGravity: weightKg > WEIGHTLESS_KG ? vecScale(moment, 1 / weightKg) : null, boxMm: spoolBox(components, pieces, units),
    ...spoolVolume(components, pieces, weightKg, units),
  };
}

/** Corners of a piece's centre line: its two ends, and where it is bent the working points between (near enough for a weight). */
function piecePath(p: PieceDraft, legs: ReadonlyMap<string, Leg>): Vec3[] {
  if (!p.bends) return [p.start, p.end];
  const passed = (p.legIds ?? []).slice(0, -1);
  const corners = passed.map((id) => legs.get(id)?.to).filter((to) => to !== undefined);
  return [p.start, ...corners, p.end];
}

function pathCentre(path: readonly Vec3[]): Vec3 {
  let length = 0;
  let moment: Vec3 = [0, 0, 0];
  for (let i = 1; i < path.length; i++) {
    const [from, to] = [path[i - 1]!, path[i]!];
    const step = vecDistance(from, to);
    length += step;
    moment = vecAddScaled(moment, vecLerp(from, to, 0.5), step);
  }
  return length > 0 ? vecScale(moment, 1 / length) : (path[0] ?? [0, 0, 0]);
}

/**
 * Middle of a fitting's weight. An elbow's is its arc's (exact for a thin line), a reducer's and a tee's the middle of its
 * ports, everything else's halfway from its working point to there (near enough for an estimate).
 */
function componentCentre(c: Component): Vec3 {
  if (c.ports.length === 0) return c.centre;
  const middle = vecScale(c.ports.reduce<Vec3>((total, p) => vecAdd(total, p.position), [0, 0, 0]), 1 / c.ports.length);
  return vecLerp(c.centre, middle, centreShare(c));
}

const BETWEEN_PORTS: ReadonlySet<ComponentKind> = new Set(["reducer-concentric", "reducer-eccentric", "tee", "reducing-tee", "cross", "return"]);
const ELBOWS: ReadonlySet<ComponentKind> = new Set(["elbow", "trimmed-elbow", "socket-elbow"]);

/** How far from the working point to the middle of the ports the weight lies. */
function centreShare(c: Component): number {
  if (BETWEEN_PORTS.has(c.kind)) return 1;
  if (!ELBOWS.has(c.kind) || c.angleRad === null || c.angleRad < STRAIGHT_RAD) return 0.5;
  const half = c.angleRad / 2;
  const [corner, chord, arc] = [1 / Math.cos(half), Math.cos(half), Math.sin(half) / half];
  return (corner - arc) / (corner - chord);
}

function spoolBox(components: readonly Component[], pieces: readonly PieceDraft[], units: UnitSystem): Vec3 {
  const low: [number, number, number] = [Infinity, Infinity, Infinity];
  const high: [number, number, number] = [-Infinity, -Infinity, -Infinity];
  const disc = (centre: Vec3, axis: Vec3, radius: number) => {
    for (let i = 0 as 0 | 1 | 2; i < 3; i++) {
      const half = radius * Math.sqrt(Math.max(1 - axis[i] * axis[i], 0));
      low[i] = Math.min(low[i], centre[i] - half);
      high[i] = Math.max(high[i], centre[i] + half);
    }
  };
  for (const p of pieces) {
    disc(p.start, p.direction, p.odMm / 2);
    disc(p.end, p.direction, p.odMm / 2);
  }
  for (const c of components) {
    for (const port of c.ports) disc(port.position, port.direction, (pipeOdMm(port.nps, units) ?? 0) / 2);
    const axis = c.ports[0]?.direction;
    if (axis && c.kind.startsWith("flange-") && c.ratingClass) disc(c.centre, axis, (flangeBolts(c.ratingClass, c.nps)?.outsideMm ?? 0) / 2);
  }
  return low[0] === Infinity ? [0, 0, 0] : [high[0] - low[0], high[1] - low[1], high[2] - low[2]];
}
