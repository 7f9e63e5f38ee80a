/** ASME B16.9 butt-welding elbows: inches as exact fractions, and the tables' own millimetre columns. */
import { sizeRows, type SizeRow, type SizeTuple } from "./row";

const SOURCES = [
  "ASME B16.9 (fortunefittings.in/index.php/dimensions; scribd.com/document/727609779; scribd.com/document/447724146; scribd.com/doc/205091102)",
  "ASME B16.9 (fortunefittings.in/index.php/dimensions; scribd.com/document/727609779; scribd.com/document/447724146)",
  "ASME B16.9 (wermac.org/fittings/dim_elbows_b.html; scribd.com/document/727609779)",
  "ASME B16.9 (wermac.org/fittings/dim_elbows_b.html; scribd.com/document/727609779; scribd.com/doc/205091102)",
  "ASME B16.9 (fortunefittings.in/index.php/dimensions; scribd.com/document/727609779; arfluengineering.com/Forge_Fittings.html; scribd.com/doc/205091102)",
  "ASME B16.9 (fortunefittings.in/index.php/dimensions; scribd.com/document/727609779; arfluengineering.com/Forge_Fittings.html)",
  "ASME B16.9 (from memory)",
] as const;

const rows = (tuples: readonly SizeTuple[]) => sizeRows(tuples, SOURCES);

/** Long-radius 90: centre to end, which is also the bend radius. NPS 1/2 and 3/4 are no 1.5 NPS; editions before about 2001 gave 1 1/8 for NPS 3/4. */
export const LR_90_ROWS: readonly SizeRow[] = rows([
  ["1/2", 1.5, 38, "partial", 0],
  ["3/4", 1.5, 38, "partial", 0],
  ["1", 1.5, 38, "partial", 0],
  ["1-1/4", 1.875, 48, "partial", 0],
  ["1-1/2", 2.25, 57, "partial", 0],
  ["2", 3, 76, "partial", 0],
  ["2-1/2", 3.75, 95, "partial", 0],
  ["3", 4.5, 114, "partial", 0],
  ["3-1/2", 5.25, 133, "yes", 6],
  ["4", 6, 152, "partial", 0],
  ["5", 7.5, 190, "partial", 0],
  ["6", 9, 229, "partial", 0],
  ["8", 12, 305, "partial", 0],
  ["10", 15, 381, "partial", 0],
  ["12", 18, 457, "partial", 0],
  ["14", 21, 533, "partial", 0],
  ["16", 24, 610, "partial", 0],
  ["18", 27, 686, "partial", 0],
  ["20", 30, 762, "partial", 0],
  ["22", 33, 838, "yes", 6],
  ["24", 36, 914, "partial", 1],
]);

/** Short-radius 90: centre to end, which is also the bend radius. None below NPS 1. */
export const SR_90_ROWS: readonly SizeRow[] = rows([
  ["1", 1, 25, "partial", 2],
  ["1-1/4", 1.25, 32, "partial", 2],
  ["1-1/2", 1.5, 38, "partial", 2],
  ["2", 2, 51, "partial", 2],
  ["2-1/2", 2.5, 64, "partial", 2],
  ["3", 3, 76, "partial", 2],
  ["3-1/2", 3.5, 89, "yes", 6],
  ["4", 4, 102, "partial", 2],
  ["5", 5, 127, "partial", 2],
  ["6", 6, 152, "partial", 2],
  ["8", 8, 203, "partial", 2],
  ["10", 10, 254, "partial", 2],
  ["12", 12, 305, "partial", 3],
  ["14", 14, 356, "partial", 2],
  ["16", 16, 406, "partial", 2],
  ["18", 18, 457, "partial", 2],
  ["20", 20, 508, "partial", 2],
  ["22", 22, 559, "yes", 6],
  ["24", 24, 610, "partial", 2],
]);

/** Long-radius 45: centre to end as tabulated, which is not R·tan 22.5° in small sizes. */
export const LR_45_ROWS: readonly SizeRow[] = rows([
  ["1/2", 0.625, 16, "partial", 4],
  ["3/4", 0.75, 19, "partial", 4],
  ["1", 0.875, 22, "partial", 4],
  ["1-1/4", 1, 25, "partial", 4],
  ["1-1/2", 1.125, 29, "partial", 4],
  ["2", 1.375, 35, "partial", 4],
  ["2-1/2", 1.75, 44, "partial", 4],
  ["3", 2, 51, "partial", 4],
  ["3-1/2", 2.25, 57, "yes", 6],
  ["4", 2.5, 64, "partial", 4],
  ["5", 3.125, 79, "partial", 4],
  ["6", 3.75, 95, "partial", 4],
  ["8", 5, 127, "partial", 4],
  ["10", 6.25, 159, "partial", 4],
  ["12", 7.5, 190, "partial", 4],
  ["14", 8.75, 222, "partial", 4],
  ["16", 10, 254, "partial", 4],
  ["18", 11.25, 286, "partial", 4],
  ["20", 12.5, 318, "partial", 4],
  ["22", 13.5, 343, "yes", 6],
  ["24", 15, 381, "partial", 5],
]);
