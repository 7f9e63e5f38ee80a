/** What a shop holds to and what a joint may be off by: optional settings of shop, job and line, with usual values. */
import { z } from "zod";

const mm = z.number().finite().min(0).max(100);
const degrees = z.number().finite().min(0).max(20);

/** How far the shop's own work may be off, ±, two standard deviations each. */
export const shopTolerancesSchema = z.object({
  /** Length of a cut pipe. */
  cutLengthMm: mm,
  /** Angle of an elbow as it comes or as it is cut. */
  elbowAngleDeg: degrees,
  /** Roll of one fitting against the one before. */
  rollDeg: degrees,
  /** Root gap of a shop weld. */
  gapMm: mm,
  /** High-low of a shop weld, each way. */
  hiLoMm: mm,
  /** Faces of a shop weld out of parallel, across the outside diameter. */
  squareMm: mm,
});
export type ShopTolerances = z.infer<typeof shopTolerancesSchema>;

/** What a joint made in the field may be off by and still be welded, or bolted, as it stands. */
export const fitLimitsSchema = z.object({
  /** Root gap, wider or tighter than set. */
  gapMm: mm,
  hiLoMm: mm,
  /** Difference of the gap across the outside diameter. */
  openingMm: mm,
  /** Gap between flange faces, more or less than the gasket. */
  flangeGapMm: mm,
  /** Flange faces out of parallel, mm in 100 mm. */
  flangeParallelPercent: z.number().finite().min(0).max(20),
  /** Offset of bolt holes, shift and rotation together. */
  boltHoleMm: mm,
});
export type FitLimits = z.infer<typeof fitLimitsSchema>;

export const fitSettingsSchema = z.object({ shop: shopTolerancesSchema, limits: fitLimitsSchema });
export type FitSettings = z.infer<typeof fitSettingsSchema>;

/** Millimetres. The schema of settings stands before every other file of the core, so it takes nothing from them. */
const INCH = 25.4;
const SIXTEENTH = INCH / 16;
const THIRTY_SECOND = INCH / 32;

/**
 * Usual values, all for the shop to change. Squareness in the manner of PFI ES-3 (1/32 in across any diameter) and flanges
 * of ASME B31.3 335.1.1(c) (1 mm in 200 mm, holes 3 mm), both from memory; root gap, high-low, cuts and angles common practice.
 */
export function usualFitSettings(units: "imperial" | "metric"): FitSettings {
  const metric = units === "metric";
  const small = metric ? 0.8 : THIRTY_SECOND;
  const large = metric ? 1.5 : SIXTEENTH;
  return {
    shop: { cutLengthMm: large, elbowAngleDeg: 0.5, rollDeg: 0.5, gapMm: small, hiLoMm: small, squareMm: small },
    limits: { gapMm: small, hiLoMm: large, openingMm: large, flangeGapMm: large, flangeParallelPercent: 0.5, boltHoleMm: metric ? 3 : 2 * SIXTEENTH },
  };
}

/** Where each usual value comes from, as a note beside its field. */
export const FIT_SOURCES: Readonly<Record<keyof ShopTolerances | keyof FitLimits, string>> = {
  cutLengthMm: "common practice", elbowAngleDeg: "common practice", rollDeg: "common practice", gapMm: "common practice; the WPS decides",
  hiLoMm: "common practice; the WPS decides", squareMm: "PFI ES-3, from memory", openingMm: "common practice; the WPS decides",
  flangeGapMm: "common practice", flangeParallelPercent: "ASME B31.3 335.1.1, from memory", boltHoleMm: "ASME B31.3 335.1.1, from memory",
};
