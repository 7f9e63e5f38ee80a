/**
 * Weight of a raised-face flange estimated from its tabulated dimensions (ASME B16.5): the drilled disc, and a hub that
 * tapers from the pipe's diameter to HUB_BASE times it. Within about a tenth of makers' lists in the common sizes.
 */
import { catalogueValue, flangeBolts } from "../catalogue/catalogue";
import { flangeHubKey, flangeThicknessKey } from "../catalogue/keys";
import { pipeOdMm, pipeWall } from "../catalogue/pipe";
import type { Component } from "./model-types";

/** Density of carbon steel, kg/mm³ (7.85 g/cm³). */
const STEEL_KG_PER_MM3 = 7.85e-6;
/** Diameter of a hub at the flange's back over the pipe's outside diameter (5 5/16 on 4 1/2 at NPS 4 class 150, B16.5). */
const HUB_BASE = 1.18;
const QUARTER_PI = Math.PI / 4;

/** Kilograms, or null when the tables lack the flange. */
export function flangeWeightKg(c: Component): number | null {
  if (c.ratingClass === null) return null;
  const bolts = flangeBolts(c.ratingClass, c.nps);
  const thickness = catalogueValue(flangeThicknessKey(c.ratingClass, c.nps), "imperial", [])?.mm;
  const od = pipeOdMm(c.nps, "imperial");
  if (!bolts || thickness === undefined || od === null) return null;
  const drilled = bolts.outsideMm ** 2 - bolts.count * bolts.holeMm ** 2;
  if (c.kind === "flange-blind") return QUARTER_PI * drilled * thickness * STEEL_KG_PER_MM3;
  const type = c.kind === "flange-weld-neck" ? "weld-neck" : c.kind === "flange-slip-on" ? "slip-on" : "socket-weld";
  const through = catalogueValue(flangeHubKey(type, c.ratingClass, c.nps), "imperial", [])?.mm;
  if (through === undefined) return null;
  const wall = type === "weld-neck" ? (pipeWall(c.nps, c.schedule ?? "STD", "imperial") ?? pipeWall(c.nps, "STD", "imperial")) : null;
  const bore = wall ? wall.odMm - 2 * wall.wallMm : od;
  const base = HUB_BASE * od;
  const meanHub = type === "weld-neck" ? (base ** 2 + base * od + od ** 2) / 3 : base ** 2;
  const hub = (meanHub - bore ** 2) * Math.max(through - thickness, 0);
  return QUARTER_PI * ((drilled - bore ** 2) * thickness + hub) * STEEL_KG_PER_MM3;
}
