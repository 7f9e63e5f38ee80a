/**
 * Take-outs by key. A metric line takes the tables' millimetre column; where none was read it takes the inch value
 * rounded as the standards round (whole millimetres, a half to the even one: 7 1/2 in is 190, 2 1/2 in is 64) and says so
 * in the source. A shop's own word on a key comes first. All take-outs are nominal: measure the fitting in hand.
 */
import type { Nps, RatingClass, UnitSystem } from "../run/document";
import type { TakeOutWord } from "../run/model-types";
import { HALF_STEP_SLACK } from "../geometry/tolerances";
import { inchesMm } from "../units/length";
import { FLANGE_ROWS } from "./b16-5-flanges";
import { CAP_LIMIT_WALLS } from "./b16-9-caps";
import { catalogueEntries } from "./entries";
import type { Entry } from "./entry";
import { keyWords } from "./key-words";
import { capKey, elbowKey, flangeHubKey } from "./keys";
import type { Memory } from "./row";

/** A take-out as a line uses it. `unverified`: from memory, and the shop has not confirmed or measured it yet. */
export interface CatalogueValue {
  readonly key: string;
  readonly mm: number;
  readonly source: string;
  readonly fromMemory: Memory;
  readonly unverified: boolean;
}

/** The value of a key on a line of these units, or null when no table has it and the shop gave none. */
export function catalogueValue(key: string, units: UnitSystem, takeOuts: readonly TakeOutWord[]): CatalogueValue | null {
  const found = catalogueEntries().get(key);
  const word = takeOuts.findLast((w) => w.key === key) ?? null;
  if (word && word.valueMm !== null) {
    return { key, mm: word.valueMm, source: `measured by the shop (${word.by})`, fromMemory: "no", unverified: false };
  }
  if (!found) return null;
  const { mm, marked } = entryMm(found, units);
  const source = found.source + marked + (word ? `; confirmed by the shop (${word.by})` : "");
  return { key, mm, source, fromMemory: found.fromMemory, unverified: found.fromMemory === "yes" && !word };
}

/** The limiting walls are printed to a hundredth of an inch (0.43 stands for XS, 0.432): half of one is no excess. */
const LIMIT_STEP_IN = 0.005;

/** Largest wall a butt-weld cap of plain length E comes in, mm (ASME B16.9, from memory); null where no table has it. */
export function capLimitWallMm(nps: Nps): number | null {
  const row = CAP_LIMIT_WALLS.find(([size]) => size === nps);
  return row ? inchesMm(row[1]) : null;
}

/** Key of the cap that goes with a wall: the longer one over the limit, the plain one when the wall or the limit is unknown. */
export function capKeyFor(nps: Nps, wallMm: number | null): string {
  const limit = capLimitWallMm(nps);
  return capKey(nps, wallMm !== null && limit !== null && wallMm > limit + inchesMm(LIMIT_STEP_IN));
}

/** The trade's words for a key ("LR 90 elbow NPS 4, centre to end"); for one no table has, words read from the key itself. */
export function catalogueWords(key: string): string {
  return catalogueEntries().get(key)?.words ?? keyWords(key) ?? key;
}

/** All keys of the tables, in table order. */
export function catalogueKeys(): readonly string[] {
  return [...catalogueEntries().keys()];
}

function entryMm(e: Entry, units: UnitSystem): { mm: number; marked: string } {
  if (units === "metric") {
    if (e.mm !== null) return { mm: e.mm, marked: "" };
    return { mm: roundHalfEven(inchesMm(e.inches!)), marked: "; no millimetre column read, inch value rounded" };
  }
  if (e.inches !== null) return { mm: inchesMm(e.inches), marked: "" };
  return { mm: e.mm!, marked: "; no inch column read, millimetres taken" };
}

/** Nearest whole millimetre, a half to the even one, as the metric columns of B16.9 and B16.10 are rounded. */
function roundHalfEven(mm: number): number {
  const below = Math.floor(mm);
  const rest = mm - below;
  if (Math.abs(rest - 0.5) < HALF_STEP_SLACK) return below % 2 === 0 ? below : below + 1;
  return Math.round(mm);
}

/** Bend radius of a butt-welding elbow, mm: the 90's centre to end (ASME B16.9). Null when there is no such elbow. */
export function elbowRadiusMm(radius: "LR" | "SR", nps: Nps, units: UnitSystem, takeOuts: readonly TakeOutWord[] = []): number | null {
  return catalogueValue(elbowKey(radius === "LR" ? "lr-90" : "sr-90", nps), units, takeOuts)?.mm ?? null;
}

/**
 * What a raised face adds to tabulated thickness and hub, mm: nothing in classes 150 and 300 (the tables include it),
 * 1/4 in from class 400 up; metric lines 7 mm, as the standard's metric edition rounds it (from memory).
 */
export function flangeFaceMm(ratingClass: RatingClass, units: UnitSystem = "imperial"): number {
  if (ratingClass <= 300) return 0;
  return units === "metric" ? 7 : 6.35;
}

/** Take-out of a weld-neck flange, contact face to weld end: hub as tabulated plus the face. Null when no table has it. */
export function weldNeckLengthMm(
  ratingClass: RatingClass, nps: Nps, units: UnitSystem, takeOuts: readonly TakeOutWord[],
): CatalogueValue | null {
  const hub = catalogueValue(flangeHubKey("weld-neck", ratingClass, nps), units, takeOuts);
  if (!hub) return null;
  const face = flangeFaceMm(ratingClass, units);
  if (face === 0) return hub;
  return { ...hub, mm: hub.mm + face, source: `${hub.source}; plus ${units === "metric" ? "7 mm" : "1/4 in"} face` };
}

/** Drilling of a flange. Lengths in mm from the inch tables; bolt holes straddle the centre lines (common practice). */
export interface FlangeBolts {
  readonly count: number;
  /** Nominal size in inches: "5/8". */
  readonly size: string;
  readonly holeMm: number;
  readonly circleMm: number;
  readonly studLengthMm: number;
  readonly outsideMm: number;
  readonly raisedFaceMm: number;
  readonly source: string;
}

/** Bolts and main diameters of a raised-face flange (ASME B16.5), or null when no table has it. */
export function flangeBolts(ratingClass: RatingClass, nps: Nps): FlangeBolts | null {
  return BOLTS.get(`${ratingClass} ${nps}`) ?? null;
}

const BOLTS: ReadonlyMap<string, FlangeBolts> = new Map(FLANGE_ROWS.map((row) => [`${row.ratingClass} ${row.nps}`, {
  count: row.bolts, size: row.boltSize, holeMm: inchesMm(row.holeIn), circleMm: inchesMm(row.boltCircleIn),
  studLengthMm: inchesMm(row.studIn), outsideMm: inchesMm(row.outsideIn), raisedFaceMm: inchesMm(row.raisedFaceIn),
  source: row.drillingMemory === "yes" ? "ASME B16.5 (from memory)" : row.source,
}]));
