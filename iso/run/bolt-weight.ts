/** Weight of a set of studs, each with two heavy hex nuts, computed from their sizes (ASME B18.2.2 proportions, from memory). */
import { INCH_MM } from "../units/length";
import { STEEL_KG_PER_MM3 } from "../catalogue/pipe";
import type { Component } from "./model-types";

/** Area of a hexagon over the square of its width across flats. */
const HEXAGON = Math.sqrt(3) / 2;
/** Stress area of a coarse thread over that of its nominal diameter, about (common practice). */
const THREAD_FULLNESS = 0.8;

/** Kilograms of the whole set; null when its length is not known. */
export function boltSetWeightKg(bolts: NonNullable<Component["bolts"]>): number | null {
  const d = boltInches(bolts.diameter) * INCH_MM;
  if (bolts.lengthMm === null || !(d > 0)) return null;
  const flats = 1.5 * d + INCH_MM / 8;
  const round = (Math.PI / 4) * d ** 2;
  const nut = (HEXAGON * flats ** 2 - round) * d;
  return bolts.count * (round * THREAD_FULLNESS * bolts.lengthMm + 2 * nut) * STEEL_KG_PER_MM3;
}

/** Inches of "5/8", "1-1/8" or "2". NaN for anything else. */
function boltInches(size: string): number {
  const parts = /^(?:(\d+)-)?(\d+)(?:\/(\d+))?$/.exec(size.trim());
  if (!parts) return Number.NaN;
  return Number(parts[1] ?? 0) + Number(parts[2]) / Number(parts[3] ?? 1);
}
