/**
 * Empty weights. Pipe by its table, LR 90 elbows by a published table; other butt-weld fittings are estimated from pipe
 * of the same wall along their centre line, flanges from their dimensions (common practice, marked as an estimate). What
 * is left (valves, outlets, forged fittings, supports) is counted unweighed.
 */
import { elbowWeightKg, pipeWall } from "../catalogue/pipe";
import { vecDistance } from "../geometry/vec3";
import type { Nps, UnitSystem } from "./document";
import { flangeWeightKg } from "./flange-weight";
import type { Component } from "./model-types";

const FLANGE_ESTIMATE = "estimated from the flange's tabulated dimensions (ASME B16.5)";
const ESTIMATE = "estimated from pipe of the same wall";

export type Weight = Pick<Component, "weightKg" | "weightSource">;

/** Weight of a component, where one can be told; what the fitting itself said comes first. */
export function componentWeight(c: Component, units: UnitSystem): Weight {
  if (c.weightKg !== null || c.weightSource !== "") return { weightKg: c.weightKg, weightSource: c.weightSource };
  const table = c.kind === "elbow" && c.radiusMm !== null && /^Elbow 90 LR/.test(c.description) && c.schedule ? elbowWeightKg("lr-90", c.nps, c.schedule) : null;
  if (table) return { weightKg: table.kg, weightSource: table.source };
  if (c.kind.startsWith("flange-")) {
    const kg = flangeWeightKg(c);
    return { weightKg: kg, weightSource: kg === null ? "not known" : FLANGE_ESTIMATE };
  }
  const length = estimateLengthMm(c, units);
  const perMetre = c.schedule === null ? null : meanKgPerM(c, c.schedule, units);
  if (length === null || perMetre === null) return { weightKg: null, weightSource: "not known" };
  return { weightKg: (length * perMetre) / 1000, weightSource: ESTIMATE };
}

function meanKgPerM(c: Component, schedule: string, units: UnitSystem): number | null {
  const of = (nps: Nps) => pipeWall(nps, schedule, units)?.kgPerM ?? null;
  const large = of(c.nps);
  if (c.kind !== "reducer-concentric" && c.kind !== "reducer-eccentric") return large;
  const small = c.nps2 === null ? large : of(c.nps2);
  return large === null || small === null ? null : (large + small) / 2;
}

/** Centre-line length of steel in a butt-weld fitting, mm; null for what is no such fitting. */
function estimateLengthMm(c: Component, units: UnitSystem): number | null {
  const [a, b, d] = c.ports;
  switch (c.kind) {
    case "elbow":
    case "trimmed-elbow":
      return c.radiusMm !== null && c.angleRad !== null ? c.radiusMm * c.angleRad : null;
    case "reducer-concentric":
    case "reducer-eccentric":
      return a && b ? vecDistance(a.position, b.position) : null;
    case "tee":
    case "reducing-tee": {
      if (!a || !b || !d) return null;
      const od = pipeWall(c.nps, c.schedule ?? "", units)?.odMm ?? 0;
      return vecDistance(a.position, b.position) + Math.max(vecDistance(c.centre, d.position) - od / 2, 0);
    }
    case "cap":
      return a ? vecDistance(c.centre, a.position) : null;
    default:
      return null;
  }
}
