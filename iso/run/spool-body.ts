/** Weight, centre of gravity, contents and outer box of one spool. */
import { pipeOdMm } from "../catalogue/pipe";
import { flangeBolts } from "../catalogue/catalogue";
import type { Vec3 } from "../geometry/types";
import { STRAIGHT_RAD, WEIGHTLESS_KG } from "../geometry/tolerances";
import { vecAdd, vecAddScaled, vecDistance, vecLerp, vecScale } from "../geometry/vec3";
import type { UnitSystem } from "./document";
import type { Component, Leg } from "./model-types";
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
  const weighed = [
    ...pieces.map((p) => ({ kg: p.weightKg, at: pathCentre(piecePath(p, legs)) })),
    ...components.map((c) => ({ kg: c.weightKg, at: componentCentre(c) })),
  ];
  const weightKg = weighed.reduce((sum, w) => sum + (w.kg ?? 0), 0);
  const moment = weighed.reduce<Vec3>((sum, w) => vecAddScaled(sum, w.at, w.kg ?? 0), [0, 0, 0]);
  return {
    weightKg, unweighed: weighed.filter((w) => w.kg === null).length,
    centreOfGravity: weightKg > WEIGHTLESS_KG ? vecScale(moment, 1 / weightKg) : null, boxMm: spoolBox(components, pieces, units),
    ...spoolVolume(components, pieces, weightKg, units),
  };
}

/** Corners of a piece's centre line: its two ends, and where it is bent the working points between (near enough for a weight). */
function piecePath(p: PieceDraft, legs: ReadonlyMap<string, Leg>): Vec3[] {
  const passed = p.bends ? (p.legIds ?? []).slice(0, -1) : [];
  const corners = passed.map((id) => legs.get(id)?.to).filter((to) => to !== undefined);
  return [p.start, ...corners, p.end];
}

function pathCentre(path: readonly Vec3[]): Vec3 {
  let length = 0;
  let moment: Vec3 = [0, 0, 0];
  path.slice(1).forEach((to, i) => {
    const from = path[i] ?? to;
    const step = vecDistance(from, to);
    length += step;
    moment = vecAddScaled(moment, vecLerp(from, to, 0.5), step);
  });
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

/** How far from the working point to the middle of the ports the weight lies. */
function centreShare(c: Component): number {
  if (/^(reducer|tee|reducing-tee|cross|return)/.test(c.kind)) return 1;
  if (!/elbow$/.test(c.kind) || c.angleRad === null || c.angleRad < STRAIGHT_RAD) return 0.5;
  const half = c.angleRad / 2;
  const [corner, chord, arc] = [1 / Math.cos(half), Math.cos(half), Math.sin(half) / half];
  return (corner - arc) / (corner - chord);
}

function spoolBox(components: readonly Component[], pieces: readonly PieceDraft[], units: UnitSystem): Vec3 {
  const low: [number, number, number] = [Infinity, Infinity, Infinity];
  const high: [number, number, number] = [-Infinity, -Infinity, -Infinity];
  const disc = (centre: Vec3, axis: Vec3, radius: number) => {
    for (const i of [0, 1, 2] as const) {
      const half = radius * Math.sqrt(Math.max(1 - axis[i] * axis[i], 0));
      low[i] = Math.min(low[i], centre[i] - half);
      high[i] = Math.max(high[i], centre[i] + half);
    }
  };
  for (const p of pieces) for (const end of [p.start, p.end]) disc(end, p.direction, p.odMm / 2);
  for (const c of components) {
    for (const port of c.ports) disc(port.position, port.direction, (pipeOdMm(port.nps, units) ?? 0) / 2);
    const axis = c.ports[0]?.direction;
    if (axis && c.kind.startsWith("flange-") && c.ratingClass) disc(c.centre, axis, (flangeBolts(c.ratingClass, c.nps)?.outsideMm ?? 0) / 2);
  }
  return low[0] === Infinity ? [0, 0, 0] : [high[0] - low[0], high[1] - low[1], high[2] - low[2]];
}
