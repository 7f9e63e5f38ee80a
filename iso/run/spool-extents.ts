/** What of a spool reaches out: rims of pipe and flanges, and the arcs of elbows, returns and bends. */
import { flangeBolts } from "../catalogue/catalogue";
import { pipeOdMm } from "../catalogue/pipe";
import type { Vec3 } from "../geometry/types";
import { vecAdd, vecAddScaled, vecLerp, vecReject, vecScale, vecSub, vecUnit } from "../geometry/vec3";
import type { UnitSystem } from "./document";
import type { Component, Piece } from "./model-types";
import type { Disc } from "./shipping-box";

type Extended = Pick<Piece, "start" | "end" | "direction" | "odMm">;

/** Discs of a spool's parts, mm. */
export function spoolExtents(components: readonly Component[], pieces: readonly Extended[], units: UnitSystem): Disc[] {
  const discs: Disc[] = pieces.flatMap((p) => [p.start, p.end].map((centre) => ({ centre, axis: p.direction, radiusMm: p.odMm / 2 })));
  for (const c of components) {
    const radiusMm = (pipeOdMm(c.nps, units) ?? 0) / 2;
    for (const port of c.ports) discs.push({ centre: port.position, axis: port.direction, radiusMm: (pipeOdMm(port.nps, units) ?? 0) / 2 });
    const axis = c.ports[0]?.direction;
    if (axis && c.kind.startsWith("flange-") && c.ratingClass) discs.push({ centre: c.centre, axis, radiusMm: (flangeBolts(c.ratingClass, c.nps)?.outsideMm ?? 0) / 2 });
    discs.push(...arcDiscs(c, radiusMm));
  }
  return discs;
}

/** Three sections along an elbow's arc, a quarter apart: its back reaches out beyond the faces. */
function arcDiscs(c: Component, radiusMm: number): Disc[] {
  const [a, b] = c.ports;
  if (!a || !b || c.radiusMm === null || c.angleRad === null) return [];
  const inward = vecUnit(vecAdd(a.direction, b.direction));
  if (!inward) return [];
  const centre = c.kind === "return" ? vecLerp(a.position, b.position, 0.5) : vecAddScaled(c.centre, inward, c.radiusMm / Math.cos(c.angleRad / 2));
  const towards = (p: Vec3) => vecUnit(vecSub(p, centre));
  const [start, end, middle] = [towards(a.position), towards(b.position), vecScale(inward, -1)];
  if (!start || !end) return [];
  const radius = c.radiusMm;
  const section = (way: Vec3 | null): Disc[] => {
    const axis = way && vecUnit(vecReject(vecSub(b.position, a.position), way));
    return way && axis ? [{ centre: vecAddScaled(centre, way, radius), axis, radiusMm }] : [];
  };
  return [...section(vecUnit(vecAdd(start, middle))), ...section(middle), ...section(vecUnit(vecAdd(middle, end)))];
}
