/** Weights of butt-weld ends computed from their dimensions: caps and stub ends. */
import { flangeBolts } from "../catalogue/catalogue";
import { pipeWall, STEEL_KG_PER_MM3 } from "../catalogue/pipe";
import { vecDistance } from "../geometry/vec3";
import type { RatingClass, UnitSystem } from "./document";
import type { Component } from "./model-types";

/** Area of a 2:1 half ellipsoid over the square of its diameter (geometry). */
export const HEAD_AREA = 1.084;
/** A 2:1 head is a quarter of its diameter deep. */
export const HEAD_DEPTH = 0.25;
/** The raised face, and so a lap, is one diameter in every class: any class's row tells it. */
const ANY_CLASS: RatingClass = 150;

function wallOf(c: Component, units: UnitSystem) {
  return c.schedule === null ? null : pipeWall(c.nps, c.schedule, units);
}

/** A cap as a 2:1 ellipsoidal head with a straight skirt (B16.9 gives the length only; the form is common practice). */
export function capWeightKg(c: Component, units: UnitSystem): number | null {
  const wall = wallOf(c, units);
  const port = c.ports[0];
  if (!wall || !port || c.ends === "socket" || c.ends === "threaded") return null;
  const mean = wall.odMm - wall.wallMm;
  const skirt = Math.max(vecDistance(c.centre, port.position) - wall.odMm * HEAD_DEPTH, 0);
  return (HEAD_AREA * mean ** 2 + Math.PI * mean * skirt) * wall.wallMm * STEEL_KG_PER_MM3;
}

/** A stub end: its length of pipe, and the lap outside it, as wide as the raised face and as thick as the wall. */
export function stubEndWeightKg(c: Component, units: UnitSystem): number | null {
  const wall = wallOf(c, units);
  const [a, b] = c.ports;
  if (!wall || !a || !b) return null;
  const lap = flangeBolts(ANY_CLASS, c.nps)?.raisedFaceMm ?? wall.odMm;
  const ring = (Math.PI / 4) * Math.max(lap ** 2 - wall.odMm ** 2, 0) * wall.wallMm * STEEL_KG_PER_MM3;
  return (vecDistance(a.position, b.position) * wall.kgPerM) / 1000 + ring;
}
