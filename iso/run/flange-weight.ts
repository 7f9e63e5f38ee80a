/**
 * Weight of a raised-face flange computed from its tabulated dimensions (ASME B16.5): the drilled disc, its raised face
 * from class 400 up, and a hub that tapers from the pipe's diameter to HUB_BASE times it. Within about a sixth of
 * makers' lists in the common sizes (a test lists where not); hub diameters are not tabulated here.
 */
import { catalogueValue, flangeBolts, flangeFaceMm } from "../catalogue/catalogue";
import { flangeHubKey, flangeThicknessKey } from "../catalogue/keys";
import { pipeOdMm, pipeWall, STEEL_KG_PER_MM3 } from "../catalogue/pipe";
import type { Component } from "./model-types";

/** Diameter of a hub at the flange's back over the pipe's outside diameter (5 5/16 on 4 1/2 at NPS 4 class 150, B16.5). */
const HUB_BASE = 1.18;
/** The same from class 900 up, where hubs are heavier (6 1/4 on 4 1/2 at NPS 4 class 900, B16.5). */
const HEAVY_HUB_BASE = 1.38;
const QUARTER_PI = Math.PI / 4;

type Hub = "weld-neck" | "slip-on" | "socket-weld" | "threaded" | "lap-joint";

/** Kilograms, or null when the tables lack the flange. */
export function flangeWeightKg(c: Component): number | null {
  if (c.ratingClass === null) return null;
  const bolts = flangeBolts(c.ratingClass, c.nps);
  const thickness = catalogueValue(flangeThicknessKey(c.ratingClass, c.nps), "imperial", [])?.mm;
  const od = pipeOdMm(c.nps, "imperial");
  if (!bolts || thickness === undefined || od === null) return null;
  const drilled = bolts.outsideMm ** 2 - bolts.count * bolts.holeMm ** 2;
  const face = c.kind === "flange-lap-joint" ? 0 : flangeFaceMm(c.ratingClass);
  if (c.kind === "flange-blind") return QUARTER_PI * (drilled * thickness + bolts.raisedFaceMm ** 2 * face) * STEEL_KG_PER_MM3;
  const type = c.kind.replace("flange-", "") as Hub;
  const through = catalogueValue(flangeHubKey(type, c.ratingClass, c.nps), "imperial", [])?.mm;
  if (through === undefined) return null;
  const wall = type === "weld-neck" ? (pipeWall(c.nps, c.schedule ?? "STD", "imperial") ?? pipeWall(c.nps, "STD", "imperial")) : null;
  const bore = wall ? wall.odMm - 2 * wall.wallMm : od;
  const base = (c.ratingClass >= 900 ? HEAVY_HUB_BASE : HUB_BASE) * od;
  const meanHub = type === "weld-neck" ? (base ** 2 + base * od + od ** 2) / 3 : base ** 2;
  const hub = (meanHub - bore ** 2) * Math.max(through - thickness, 0);
  const raised = Math.max(bolts.raisedFaceMm ** 2 - bore ** 2, 0) * face;
  return QUARTER_PI * ((drilled - bore ** 2) * thickness + hub + raised) * STEEL_KG_PER_MM3;
}
