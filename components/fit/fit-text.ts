/** Tolerances and limits of a fit as a form's texts and back. */
import { z } from "zod";
import { formatDecimal, parseLength, usualFitSettings, type FitSettings, type UnitSystem } from "@/iso";
import { tapeEntryText } from "./length-text";

/** The fields of a form that hold what the shop is good for and what a joint may be off by. */
export const fitTextShape = {
  fitCutLength: z.string(),
  fitElbowAngle: z.string(),
  fitRoll: z.string(),
  fitWeldGap: z.string(),
  fitWeldHiLo: z.string(),
  fitWeldSquare: z.string(),
  fitGapLimit: z.string(),
  fitHiLoLimit: z.string(),
  fitOpeningLimit: z.string(),
  fitFlangeGap: z.string(),
  fitFlangeParallel: z.string(),
  fitBoltHole: z.string(),
};
export type FitTexts = z.infer<z.ZodObject<typeof fitTextShape>>;

/** What the fields start with. */
export function fitSettingsToText(fit: FitSettings | undefined, units: UnitSystem): FitTexts {
  const { shop, limits } = fit ?? usualFitSettings(units);
  const length = (mm: number) => tapeEntryText(mm, units);
  const percent = limits.flangeParallelPercent;
  return {
    fitCutLength: length(shop.cutLengthMm), fitElbowAngle: formatDecimal(shop.elbowAngleDeg, 3), fitRoll: formatDecimal(shop.rollDeg, 3),
    fitWeldGap: length(shop.gapMm), fitWeldHiLo: length(shop.hiLoMm), fitWeldSquare: length(shop.squareMm),
    fitGapLimit: length(limits.gapMm), fitHiLoLimit: length(limits.hiLoMm), fitOpeningLimit: length(limits.openingMm),
    fitFlangeGap: length(limits.flangeGapMm), fitFlangeParallel: percent > 0 ? formatDecimal(100 / percent, 1) : "", fitBoltHole: length(limits.boltHoleMm),
  };
}

/** The settings of the texts; every field that cannot be read gets an issue. */
export function readFitTexts(values: FitTexts, units: UnitSystem, context: z.RefinementCtx): FitSettings {
  const length = (field: keyof FitTexts) => lengthOf(values[field], units, field, context);
  const number = (field: keyof FitTexts, least: number, most: number) => numberOf(values[field], field, least, most, context);
  return {
    shop: {
      cutLengthMm: length("fitCutLength"), elbowAngleDeg: number("fitElbowAngle", 0, 20), rollDeg: number("fitRoll", 0, 20),
      gapMm: length("fitWeldGap"), hiLoMm: length("fitWeldHiLo"), squareMm: length("fitWeldSquare"),
    },
    limits: {
      gapMm: length("fitGapLimit"), hiLoMm: length("fitHiLoLimit"), openingMm: length("fitOpeningLimit"),
      flangeGapMm: length("fitFlangeGap"), flangeParallelPercent: 100 / number("fitFlangeParallel", 5, 100_000), boltHoleMm: length("fitBoltHole"),
    },
  };
}

/** The setting of a line or job; absent when it is the usual one, so that such settings stay as they were stored. */
export function fitSettingOf(values: FitTexts, units: UnitSystem, context: z.RefinementCtx): { fit?: FitSettings } {
  const fit = readFitTexts(values, units, context);
  return sameFit(fit, usualFitSettings(units)) ? {} : { fit };
}

/** Two lengths typed alike agree within this, mm. */
const ALIKE_MM = 0.001;

export function sameFit(a: FitSettings, b: FitSettings): boolean {
  const same = (one: object, other: object) => Object.entries(one).every(([key, value]) => Math.abs((value as number) - (other as Record<string, number>)[key]!) < ALIKE_MM);
  return same(a.shop, b.shop) && same(a.limits, b.limits);
}

/** Longest tolerance taken, mm: past it somebody slipped. */
const MOST_MM = 100;

function lengthOf(text: string, units: UnitSystem, field: keyof FitTexts, context: z.RefinementCtx): number {
  const parsed = parseLength(text, units);
  if (parsed.ok && parsed.mm >= 0 && parsed.mm <= MOST_MM) return parsed.mm;
  context.addIssue({ code: "custom", path: [field], message: parsed.ok ? (parsed.mm < 0 ? "Not under zero." : "That is more than a fit can be off by.") : parsed.message });
  return 0;
}

function numberOf(text: string, field: keyof FitTexts, least: number, most: number, context: z.RefinementCtx): number {
  const value = Number(text.trim());
  if (text.trim() !== "" && value >= least && value <= most) return value;
  context.addIssue({ code: "custom", path: [field], message: `Enter a number, ${least} to ${most}.` });
  return Math.max(least, 1);
}
