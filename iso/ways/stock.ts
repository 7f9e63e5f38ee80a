/**
 * Elbows a shop has, with their take-outs. 90s and 45s by the tables (the tabulated 45 is not R·tan 22.5° in small
 * sizes); other angles by R·tan(θ/2), the tangent of an arc, with R the 90's centre to end (ASME B16.9).
 */
import { catalogueValue } from "../catalogue/catalogue";
import { elbowKey, type ElbowName } from "../catalogue/keys";
import type { Nps } from "../run/document";
import { formatDecimal } from "../units/format";
import type { ElbowRadius, StockAngle, WaysInput } from "./ways-types";

export interface StockElbow {
  readonly name: string;
  readonly radius: ElbowRadius;
  readonly angleDeg: StockAngle;
  readonly angleRad: number;
  readonly takeOutMm: number;
  readonly radiusMm: number;
  readonly tabulated: boolean;
  readonly source: string;
  readonly unverified: boolean;
}

const RAD = Math.PI / 180;

/** Whole elbows of the configured angles and radii in a size, in a fixed order: large angles first, LR before SR. */
export function stockElbows({ angles, radii, units, takeOuts }: Pick<WaysInput, "angles" | "radii" | "units" | "takeOuts">, nps: Nps): StockElbow[] {
  const sorted = [...new Set(angles)].sort((a, b) => b - a);
  return (["LR", "SR"] as const).filter((r) => radii.includes(r)).flatMap((radius) => sorted.flatMap((angle) => stockElbow(radius, angle, nps, units, takeOuts) ?? []));
}

function stockElbow(radius: ElbowRadius, angleDeg: StockAngle, nps: Nps, units: WaysInput["units"], takeOuts: WaysInput["takeOuts"]): StockElbow | null {
  const prefix = radius === "LR" ? "lr" : "sr";
  const whole = catalogueValue(elbowKey(`${prefix}-90`, nps), units, takeOuts);
  if (!whole) return null;
  const table = angleDeg === 90 || angleDeg === 45 ? catalogueValue(elbowKey(`${prefix}-${angleDeg}` as ElbowName, nps), units, takeOuts) : null;
  // No standard tabulates a short-radius 45: it waits for the shop's own measure.
  if (!table && angleDeg === 45) return null;
  const angleRad = angleDeg * RAD;
  return {
    name: `${radius} ${formatDecimal(angleDeg, 1)}`, radius, angleDeg, angleRad, radiusMm: whole.mm,
    takeOutMm: table?.mm ?? whole.mm * Math.tan(angleRad / 2), tabulated: table !== null,
    source: table?.source ?? `R·tan(θ/2) with R from ${whole.source}`, unverified: (table ?? whole).unverified,
  };
}

/** Bend radius and where it is from, of an elbow to be trimmed; null when there is none in the size. */
export function trimStock(radius: ElbowRadius, nps: Nps, { units, takeOuts }: Pick<WaysInput, "units" | "takeOuts">) {
  return catalogueValue(elbowKey(radius === "LR" ? "lr-90" : "sr-90", nps), units, takeOuts);
}
