/**
 * Empty weights, each with where it comes from: the shop's own word first; pipe by its table; LR 90 elbows by a published
 * table, every other bend by the pipe's weight along its centre line (exact for a torus of one wall, by Pappus); tees,
 * crosses, reducers, caps, stub ends, flanges and studs computed from their tabulated dimensions. Valves, outlets, forged
 * fittings, instruments and supports are their makers': not known until the shop says, and counted unweighed.
 */
import { capWeightKg, stubEndWeightKg } from "./end-weights";
import { elbowWeightKg, pipeOdMm, pipeWall } from "../catalogue/pipe";
import { vecDistance } from "../geometry/vec3";
import { boltSetWeightKg } from "./bolt-weight";
import type { Nps, UnitSystem } from "./document";
import { flangeWeightKg } from "./flange-weight";
import type { Component } from "./model-types";
import { partWeightKey } from "./part-weight-key";

const COMPUTED = "computed from its tabulated dimensions";
const PIPE_WALL = "computed from pipe of the same wall along its centre line";

export type Weight = Pick<Component, "weightKg" | "weightSource">;

/** Looks a key up among the shop's words; null when it has none. */
export type ShopWeight = (key: string) => number | null;

/** Weight of a component, where one can be told; the shop's word on it, then what the fitting itself said, come first. */
export function componentWeight(c: Component, units: UnitSystem, shop: ShopWeight | null = null): Weight {
  const own = shop && shop(partWeightKey(c));
  if (own !== null) return { weightKg: own, weightSource: "weighed by the shop" };
  if (c.weightKg !== null || c.weightSource !== "") return { weightKg: c.weightKg, weightSource: c.weightSource };
  const table = c.kind === "elbow" && c.radiusMm !== null && /^Elbow 90 LR/.test(c.description) && c.schedule ? elbowWeightKg("lr-90", c.nps, c.schedule) : null;
  if (table) return { weightKg: table.kg, weightSource: table.source };
  const kg = computedKg(c, units);
  if (kg !== null) return { weightKg: kg, weightSource: COMPUTED };
  const length = centreLineMm(c, units);
  const perMetre = c.schedule === null ? null : meanKgPerM(c, c.schedule, units);
  if (length === null || perMetre === null) return { weightKg: null, weightSource: "not known" };
  return { weightKg: (length * perMetre) / 1000, weightSource: PIPE_WALL };
}

/** What is computed from dimensions rather than from a length of pipe. */
function computedKg(c: Component, units: UnitSystem): number | null {
  if (c.kind === "cap") return capWeightKg(c, units);
  if (c.kind === "stub-end") return stubEndWeightKg(c, units);
  if (c.kind === "bolt-set") return c.bolts ? boltSetWeightKg(c.bolts) : null;
  return c.kind.startsWith("flange-") ? flangeWeightKg(c) : null;
}

function meanKgPerM(c: Component, schedule: string, units: UnitSystem): number | null {
  const of = (nps: Nps) => pipeWall(nps, schedule, units)?.kgPerM ?? null;
  const large = of(c.nps);
  if (c.kind !== "reducer-concentric" && c.kind !== "reducer-eccentric") return large;
  const small = c.nps2 === null ? large : of(c.nps2);
  return large === null || small === null ? null : (large + small) / 2;
}

/** Centre-line length of pipe a butt-weld fitting is like, mm; null for what is no such fitting. */
export function centreLineMm(c: Component, units: UnitSystem): number | null {
  const [a, b] = c.ports;
  switch (c.kind) {
    case "elbow":
    case "trimmed-elbow":
      return c.ends !== "socket" && c.ends !== "threaded" && c.radiusMm !== null && c.angleRad !== null ? c.radiusMm * c.angleRad : null;
    case "return":
      return a && b ? (Math.PI / 2) * vecDistance(a.position, b.position) : null;
    case "reducer-concentric":
    case "reducer-eccentric":
      return a && b ? vecDistance(a.position, b.position) : null;
    case "tee":
    case "reducing-tee":
    case "cross":
      return teeLengthMm(c, units);
    default:
      return null;
  }
}

/** The run from end to end, and what of each branch stands out of it, reduced to the run's size by the outside diameters. */
function teeLengthMm(c: Component, units: UnitSystem): number | null {
  const od = pipeOdMm(c.nps, units);
  if (od === null || c.ports.length < 3) return null;
  return c.ports.reduce((sum, port) => {
    const reach = vecDistance(c.centre, port.position);
    if (port.nps === c.nps && port.id !== "branch" && port.id !== "branch-2") return sum + reach;
    return sum + Math.max(reach - od / 2, 0) * ((pipeOdMm(port.nps, units) ?? od) / od);
  }, 0);
}
