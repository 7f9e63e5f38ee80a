/**
 * What a new shop starts with. Every number is a starting point the shop changes; none is a standard's requirement.
 * Sources: common practice, from memory (root gap and gasket 1/8 in, pull-back 1/16 in, field trim 6 in or 150 mm,
 * shipping box 40 x 8 x 8 ft or 12 x 2.4 x 2.4 m).
 */
import { INCH_MM, type LineSettings, type SheetSize, type TitleBlock, type UnitSystem } from "@/iso";
import type { JobSettings, ShopSettings } from "./api-types";
import type { NestingSettings } from "./nest-plans";

/** What the shops table keeps beside the name. */
export interface StoredShopSettings {
  readonly fields: TitleBlock["fields"];
  /** Absent or empty = the usual order. */
  readonly titleOrder?: readonly string[];
  readonly logo: TitleBlock["logo"];
  readonly sheetSize: SheetSize;
  readonly defaults: LineSettings;
  readonly stock: ShopSettings["stock"];
  /** Absent = as a new shop starts. */
  readonly nesting?: NestingSettings;
}

/** What the jobs table keeps beside number, title, client, area and open. */
export type StoredJobSettings = Pick<JobSettings, "fields" | "titleOrder" | "logo" | "sheetSize" | "plantNorthDeg" | "defaults">;

const NOTHING_ENTERED = { insulation: "", pwht: "", nde: "", test: "", paint: "" };

const IMPERIAL: LineSettings = {
  units: "imperial",
  pipe: { nps: "4", schedule: "STD", material: "ASTM A106 Gr B", specification: "" },
  elbow: "LR",
  ratingClass: 150,
  allowances: { rootGapMm: INCH_MM / 8, socketPullBackMm: INCH_MM / 16, gasketMm: INCH_MM / 8, slipOnSettingMm: (INCH_MM * 3) / 8 },
  standardElbowWithinDeg: 3,
  minimumPupMm: null,
  fieldTrimMm: INCH_MM * 6,
  faceIncludesGasket: false,
  shippingBoxMm: [INCH_MM * 480, INCH_MM * 96, INCH_MM * 96],
  asEntered: NOTHING_ENTERED,
};

const METRIC: LineSettings = {
  ...IMPERIAL,
  units: "metric",
  allowances: { rootGapMm: 3, socketPullBackMm: 1.5, gasketMm: 3, slipOnSettingMm: 10 },
  fieldTrimMm: 150,
  shippingBoxMm: [12_000, 2_400, 2_400],
};

/** Settings a line starts with in a shop that has not changed them. */
export function defaultLineSettings(units: UnitSystem): LineSettings {
  return units === "imperial" ? IMPERIAL : METRIC;
}

/** Settings of a new shop. */
export function defaultShopSettings(units: UnitSystem): StoredShopSettings {
  return {
    fields: [],
    logo: null,
    sheetSize: units === "imperial" ? "tabloid" : "A3",
    defaults: defaultLineSettings(units),
    stock: [],
  };
}

/**
 * Line settings in another unit system: the pipe and the words stay, the allowances become the other system's
 * starting points. The same system gives the settings unchanged.
 */
export function lineSettingsIn(units: UnitSystem, settings: LineSettings): LineSettings {
  if (settings.units === units) return settings;
  const { allowances, fieldTrimMm, shippingBoxMm } = defaultLineSettings(units);
  return { ...settings, units, allowances, fieldTrimMm, shippingBoxMm };
}
