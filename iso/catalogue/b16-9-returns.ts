/**
 * ASME B16.9 butt-welding 180 degree returns: O (centre to centre of the ends) and K (from the ends' plane to the back),
 * inches as exact fractions, millimetres. O is twice the 90's A; K is A + OD/2, tabulated to 1/16 in. The short-radius
 * table, NPS 3-1/2 and 22 are from memory.
 */
import { sizeRows, type SizeRow, type SizeTuple } from "./row";

const SOURCES = [
  "ASME B16.9 (wermac.org/fittings/dim_elbows_c.html; mumbadevisteel.in/pipe-bends-return-dimensions.html)",
  "ASME B16.9 (wermac.org/fittings/dim_elbows_c.html; mumbadevisteel.in/pipe-bends-return-dimensions.html; scribd.com/doc/205091102)",
  "ASME B16.9 (from memory)",
] as const;

const rows = (tuples: readonly SizeTuple[]) => sizeRows(tuples, SOURCES);

/** Long radius, O. */
export const LR_RETURN_CENTRES: readonly SizeRow[] = rows([
  ["1/2", 3, 76, "partial", 0], ["3/4", 3, 76, "partial", 0], ["1", 3, 76, "partial", 0], ["1-1/4", 3.75, 95, "partial", 0],
  ["1-1/2", 4.5, 114, "partial", 0], ["2", 6, 152, "partial", 0], ["2-1/2", 7.5, 190, "partial", 0], ["3", 9, 229, "partial", 0],
  ["3-1/2", 10.5, 267, "yes", 2], ["4", 12, 305, "partial", 0], ["5", 15, 381, "partial", 0], ["6", 18, 457, "partial", 0],
  ["8", 24, 610, "partial", 0], ["10", 30, 762, "partial", 0], ["12", 36, 914, "partial", 0], ["14", 42, 1067, "partial", 0],
  ["16", 48, 1219, "partial", 0], ["18", 54, 1372, "partial", 0], ["20", 60, 1524, "partial", 0], ["22", 66, 1676, "yes", 2],
  ["24", 72, 1829, "partial", 0],
]);

/** Long radius, K. */
export const LR_RETURN_BACKS: readonly SizeRow[] = rows([
  ["1/2", 1.875, 48, "partial", 1], ["3/4", 2, 51, "partial", 1], ["1", 2.1875, 56, "partial", 0], ["1-1/4", 2.75, 70, "partial", 1],
  ["1-1/2", 3.25, 83, "partial", 1], ["2", 4.1875, 106, "partial", 1], ["2-1/2", 5.1875, 132, "partial", 1], ["3", 6.25, 159, "partial", 1],
  ["3-1/2", 7.25, 184, "yes", 2], ["4", 8.25, 210, "partial", 1], ["5", 10.3125, 262, "partial", 1], ["6", 12.3125, 313, "partial", 1],
  ["8", 16.3125, 414, "partial", 1], ["10", 20.375, 518, "partial", 1], ["12", 24.375, 619, "partial", 1], ["14", 28, 711, "partial", 1],
  ["16", 32, 813, "partial", 1], ["18", 36, 914, "partial", 1], ["20", 40, 1016, "partial", 1], ["22", 44, 1118, "yes", 2],
  ["24", 48, 1219, "partial", 0],
]);

/** Short radius, O: twice the SR 90, none below NPS 1. */
export const SR_RETURN_CENTRES: readonly SizeRow[] = rows([
  ["1", 2, 51, "yes", 2], ["1-1/4", 2.5, 64, "yes", 2], ["1-1/2", 3, 76, "yes", 2], ["2", 4, 102, "yes", 2], ["2-1/2", 5, 127, "yes", 2],
  ["3", 6, 152, "yes", 2], ["3-1/2", 7, 178, "yes", 2], ["4", 8, 203, "yes", 2], ["5", 10, 254, "yes", 2], ["6", 12, 305, "yes", 2],
  ["8", 16, 406, "yes", 2], ["10", 20, 508, "yes", 2], ["12", 24, 610, "yes", 2], ["14", 28, 711, "yes", 2], ["16", 32, 813, "yes", 2],
  ["18", 36, 914, "yes", 2], ["20", 40, 1016, "yes", 2], ["22", 44, 1118, "yes", 2], ["24", 48, 1219, "yes", 2],
]);

/** Short radius, K. */
export const SR_RETURN_BACKS: readonly SizeRow[] = rows([
  ["1", 1.625, 41, "yes", 2], ["1-1/4", 2.0625, 52, "yes", 2], ["1-1/2", 2.4375, 62, "yes", 2], ["2", 3.1875, 81, "yes", 2],
  ["2-1/2", 3.9375, 100, "yes", 2], ["3", 4.75, 121, "yes", 2], ["3-1/2", 5.5, 140, "yes", 2], ["4", 6.25, 159, "yes", 2],
  ["5", 7.75, 197, "yes", 2], ["6", 9.3125, 237, "yes", 2], ["8", 12.3125, 313, "yes", 2], ["10", 15.375, 391, "yes", 2],
  ["12", 18.375, 467, "yes", 2], ["14", 21, 533, "yes", 2], ["16", 24, 610, "yes", 2], ["18", 27, 686, "yes", 2],
  ["20", 30, 762, "yes", 2], ["22", 33, 838, "yes", 2], ["24", 36, 914, "yes", 2],
]);
