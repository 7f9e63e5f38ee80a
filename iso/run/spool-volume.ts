/**
 * What fills a spool and what is painted: pipe and butt-weld parts (elbows, returns, tees, crosses, reducers, caps, stub
 * ends, weld-neck flanges) at their inside and outside diameters along their centre lines. Everything else (valves, forged
 * fittings, other flanges, outlets, instruments) is left out and named. Insulation is never guessed.
 */
import { pipeWall } from "../catalogue/pipe";
import { vecDistance } from "../geometry/vec3";
import type { Nps, UnitSystem } from "./document";
import type { Component, ComponentKind } from "./model-types";
import type { PieceDraft } from "./piece-draft";
import { HEAD_AREA, HEAD_DEPTH } from "./end-weights";
import { centreLineMm } from "./weights";

const MM3_PER_LITRE = 1_000_000;
const MM2_PER_M2 = 1_000_000;
/** Water at rest, kg per litre (rounded; common practice for a filled weight). */
const WATER_KG_PER_L = 1;

export interface SpoolVolume {
  readonly volumeL: number;
  readonly filledKg: number;
  readonly paintM2: number;
}

/** Water that fills it, the weight with it (known weights only), and the bare outside surface. */
export function spoolVolume(components: readonly Component[], pieces: readonly PieceDraft[], weightKg: number, units: UnitSystem): SpoolVolume {
  let [insideMm3, outsideMm2] = [0, 0];
  const count = (shape: Shape | null): void => {
    insideMm3 += shape?.insideMm3 ?? 0;
    outsideMm2 += shape?.outsideMm2 ?? 0;
  };
  for (const piece of pieces) count(pieceShape(piece));
  for (const c of components) count(componentShape(c, units));
  const volumeL = insideMm3 / MM3_PER_LITRE;
  return { volumeL, filledKg: weightKg + volumeL * WATER_KG_PER_L, paintM2: outsideMm2 / MM2_PER_M2 };
}

/** Kinds of parts whose inside and outside are not counted, as they come; parts without either (gaskets, supports) not named. */
export function volumeLeftOut(components: readonly Component[], units: UnitSystem): readonly ComponentKind[] {
  return [...new Set(components.filter((c) => !HOLLOWLESS.has(c.kind) && componentShape(c, units) === null).map((c) => c.kind))];
}

/** Parts that hold no water and carry no surface of their own, or whose pipe is counted. */
const HOLLOWLESS: ReadonlySet<ComponentKind> = new Set(["gasket", "bolt-set", "support", "stub-in", "mitre", "pad", "flange-blind", "flange-lap-joint", "flange-slip-on"]);

interface Shape {
  readonly insideMm3: number;
  readonly outsideMm2: number;
}

function tube(odMm: number, wallMm: number, lengthMm: number): Shape {
  const bore = Math.max(odMm - 2 * wallMm, 0);
  return { insideMm3: (Math.PI / 4) * bore ** 2 * lengthMm, outsideMm2: Math.PI * odMm * lengthMm };
}

function pieceShape(p: PieceDraft): Shape {
  return tube(p.odMm, p.wallMm, Math.max(p.cutLengthMm, 0));
}

function componentShape(c: Component, units: UnitSystem): Shape | null {
  if (c.kind === "cap") return capShape(c, units);
  const length = shapeLengthMm(c, units);
  const wall = wallOf(c.nps, c.schedule, units);
  if (length === null || !wall) return null;
  const large = tube(wall.odMm, wall.wallMm, length);
  if (c.kind !== "reducer-concentric" && c.kind !== "reducer-eccentric") return large;
  const small = c.nps2 === null ? null : wallOf(c.nps2, c.schedule, units);
  if (!small) return large;
  const end = tube(small.odMm, small.wallMm, length);
  return { insideMm3: (large.insideMm3 + end.insideMm3) / 2, outsideMm2: (large.outsideMm2 + end.outsideMm2) / 2 };
}

/** A 2:1 ellipsoidal head (volume πD³/24) on a straight skirt. */
function capShape(c: Component, units: UnitSystem): Shape | null {
  const wall = wallOf(c.nps, c.schedule, units);
  const port = c.ports[0];
  if (!wall || !port) return null;
  const bore = wall.odMm - 2 * wall.wallMm;
  const skirt = Math.max(vecDistance(c.centre, port.position) - wall.odMm * HEAD_DEPTH, 0);
  return {
    insideMm3: (Math.PI / 24) * bore ** 3 + (Math.PI / 4) * bore ** 2 * skirt,
    outsideMm2: HEAD_AREA * wall.odMm ** 2 + Math.PI * wall.odMm * skirt,
  };
}

function wallOf(nps: Nps, schedule: string | null, units: UnitSystem) {
  return schedule === null ? null : pipeWall(nps, schedule, units);
}

function shapeLengthMm(c: Component, units: UnitSystem): number | null {
  const [a, b] = c.ports;
  if (c.ends === "socket" || c.ends === "threaded") return null;
  if ((c.kind === "flange-weld-neck" || c.kind === "stub-end") && a && b) return vecDistance(a.position, b.position);
  return centreLineMm(c, units);
}
