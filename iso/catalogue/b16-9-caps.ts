/**
 * ASME B16.9 butt-welding caps: length E up to a limiting wall, E1 above it. The limiting walls are from memory. Inches,
 * millimetres.
 */
import type { Nps } from "../run/document";
import { sizeRows, type SizeRow, type SizeTuple } from "./row";

const SOURCES = [
  "ASME B16.9 (alloysteelfittings.com/dim_caps.html; arfluengineering.com/Forge_Fittings.html)",
  "ASME B16.9 (alloysteelfittings.com/dim_caps.html)",
  "ASME B16.9 (from memory)",
] as const;

const rows = (tuples: readonly SizeTuple[]) => sizeRows(tuples, SOURCES);

/** E. */
export const CAP_ROWS: readonly SizeRow[] = rows([
  ["1/2", 1, 25, "partial", 0], ["3/4", 1, 25, "partial", 0], ["1", 1.5, 38, "partial", 0], ["1-1/4", 1.5, 38, "partial", 0],
  ["1-1/2", 1.5, 38, "partial", 0], ["2", 1.5, 38, "partial", 0], ["2-1/2", 1.5, 38, "partial", 0], ["3", 2, 51, "partial", 0],
  ["3-1/2", 2.5, 64, "yes", 2], ["4", 2.5, 64, "partial", 0], ["5", 3, 76, "partial", 0], ["6", 3.5, 89, "partial", 0],
  ["8", 4, 102, "partial", 0], ["10", 5, 127, "partial", 0], ["12", 6, 152, "partial", 0], ["14", 6.5, 165, "partial", 0],
  ["16", 7, 178, "partial", 0], ["18", 8, 203, "partial", 0], ["20", 9, 229, "partial", 0], ["22", 10, 254, "yes", 2],
  ["24", 10.5, 267, "partial", 0],
]);

/** E1, for walls over the limit. */
export const HEAVY_CAP_ROWS: readonly SizeRow[] = rows([
  ["1/2", 1, 25, "partial", 1], ["3/4", 1, 25, "partial", 1], ["1", 1.5, 38, "partial", 1], ["1-1/4", 1.5, 38, "partial", 1],
  ["1-1/2", 1.5, 38, "partial", 1], ["2", 1.75, 44, "partial", 1], ["2-1/2", 2, 51, "partial", 1], ["3", 2.5, 64, "partial", 1],
  ["3-1/2", 3, 76, "yes", 2], ["4", 3, 76, "partial", 1], ["5", 3.5, 89, "partial", 1], ["6", 4, 102, "partial", 1],
  ["8", 5, 127, "partial", 1], ["10", 6, 152, "partial", 1], ["12", 7, 178, "partial", 1], ["14", 7.5, 191, "partial", 1],
  ["16", 8, 203, "partial", 1], ["18", 9, 229, "partial", 1], ["20", 10, 254, "partial", 1], ["22", 10, 254, "yes", 2],
  ["24", 12, 305, "partial", 1],
]);

/** Largest wall a cap of length E comes in, inches (from memory). */
export const CAP_LIMIT_WALLS: readonly (readonly [Nps, number])[] = [
  ["1/2", 0.18], ["3/4", 0.15], ["1", 0.18], ["1-1/4", 0.19], ["1-1/2", 0.2], ["2", 0.22], ["2-1/2", 0.28], ["3", 0.3], ["3-1/2", 0.32],
  ["4", 0.34], ["5", 0.38], ["6", 0.43], ["8", 0.5], ["10", 0.5], ["12", 0.5], ["14", 0.5], ["16", 0.5], ["18", 0.5], ["20", 0.5],
  ["22", 0.5], ["24", 0.5],
];
