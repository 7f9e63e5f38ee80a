/** Weight, centre of gravity and outer box of one spool. */
import { pipeOdMm } from "../catalogue/pipe";
import { flangeBolts } from "../catalogue/catalogue";
import type { Vec3 } from "../geometry/types";
import { vecAdd, vecAddScaled, vecLerp, vecScale } from "../geometry/vec3";
import type { UnitSystem } from "./document";
import type { Component } from "./model-types";
import type { PieceDraft } from "./piece-draft";

export interface SpoolBody {
  readonly weightKg: number;
  readonly unweighed: number;
  readonly centreOfGravity: Vec3 | null;
  readonly boxMm: Vec3;
}

/** Empty weight and its centre (weighed parts only), and the axis-parallel box around pipes, fittings and flanges. */
export function spoolBody(components: readonly Component[], pieces: readonly PieceDraft[], units: UnitSystem): SpoolBody {
  const weighed = [
    ...pieces.map((p) => ({ kg: p.weightKg, at: vecLerp(p.start, p.end, 0.5) })),
    ...components.map((c) => ({ kg: c.weightKg, at: componentCentre(c) })),
  ];
  const weightKg = weighed.reduce((sum, w) => sum + (w.kg ?? 0), 0);
  const moment = weighed.reduce<Vec3>((sum, w) => vecAddScaled(sum, w.at, w.kg ?? 0), [0, 0, 0]);
  return {
    weightKg, unweighed: weighed.filter((w) => w.kg === null).length,
    centreOfGravity: weightKg > 0 ? vecScale(moment, 1 / weightKg) : null, boxMm: spoolBox(components, pieces, units),
  };
}

/** Middle of a fitting: halfway between its centre and the middle of its ports (near enough for an estimate). */
function componentCentre(c: Component): Vec3 {
  if (c.ports.length === 0) return c.centre;
  const sum = c.ports.reduce<Vec3>((total, p) => vecAdd(total, p.position), [0, 0, 0]);
  return vecLerp(c.centre, vecScale(sum, 1 / c.ports.length), 0.5);
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
