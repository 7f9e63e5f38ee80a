/**
 * ASME B36.10M and B36.19M pipe of NPS 3-1/2 and 22, sizes no table was read for: from memory. NPS, DN, outside diameters;
 * then standard, schedule, NPS, wall in inches, wall in millimetres.
 */
import type { Nps } from "../run/document";

export const REMEMBERED_DIAMETERS: readonly (readonly [Nps, number, number, number])[] = [
  ["3-1/2", 90, 4, 101.6],
  ["22", 550, 22, 559],
];

const B36_10 = "ASME B36.10M";
const B36_19 = "ASME B36.19M";

export const REMEMBERED_WALLS: readonly (readonly [string, string, Nps, number, number])[] = [
  [B36_19, "5S", "3-1/2", 0.083, 2.11], [B36_19, "10S", "3-1/2", 0.12, 3.05], [B36_19, "40S", "3-1/2", 0.226, 5.74], [B36_19, "80S", "3-1/2", 0.318, 8.08],
  [B36_10, "10", "3-1/2", 0.12, 3.05], [B36_10, "STD", "3-1/2", 0.226, 5.74], [B36_10, "40", "3-1/2", 0.226, 5.74],
  [B36_10, "XS", "3-1/2", 0.318, 8.08], [B36_10, "80", "3-1/2", 0.318, 8.08],
  [B36_19, "5S", "22", 0.188, 4.78], [B36_19, "10S", "22", 0.218, 5.54],
  [B36_10, "10", "22", 0.25, 6.35], [B36_10, "20", "22", 0.375, 9.53], [B36_10, "STD", "22", 0.375, 9.53], [B36_10, "30", "22", 0.5, 12.7],
  [B36_10, "XS", "22", 0.5, 12.7], [B36_10, "60", "22", 0.875, 22.23], [B36_10, "80", "22", 1.125, 28.58], [B36_10, "100", "22", 1.375, 34.93],
  [B36_10, "120", "22", 1.625, 41.28], [B36_10, "140", "22", 1.875, 47.63], [B36_10, "160", "22", 2.125, 53.98],
];
