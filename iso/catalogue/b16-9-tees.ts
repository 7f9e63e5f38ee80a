/**
 * ASME B16.9 butt-welding tees, straight and reducing on the branch: run size, branch size, C (centre to run end) and
 * M (centre to branch end), each in inches (exact fractions) and in the tables' millimetres (null where none was read).
 */
import type { Nps } from "../run/document";
import type { Memory } from "./row";

/** Run, branch, C in, C mm, M in, M mm, from memory, index of the source. */
type TeeTuple = readonly [Nps, Nps, number, number | null, number, number | null, Memory, number];

export interface TeeRow {
  readonly run: Nps;
  readonly branch: Nps;
  readonly runIn: number;
  readonly runMm: number | null;
  readonly branchIn: number;
  readonly branchMm: number | null;
  readonly fromMemory: Memory;
  readonly source: string;
}

const SOURCES = [
  "ASME B16.9 (alloysteelfittings.com/dim_tees_eq.html; arfluengineering.com/Forge_Fittings.html)",
  "ASME B16.9 (alloysteelfittings.com/dim_tees_eq.html)",
  "ASME B16.9 (pipingengineer.org/butt-weld-reducing-tees-and-crosses-inch-dimensions-as-per-asme-b16-9; pipingengineer.org/butt-weld-reducing-tees-and-crosses-metric-dimensions-as-per-asme-b16-9)",
  "ASME B16.9 (pipingengineer.org/butt-weld-reducing-tees-and-crosses-inch-dimensions-as-per-asme-b16-9; pipingengineer.org/butt-weld-reducing-tees-and-crosses-metric-dimensions-as-per-asme-b16-9/; arfluengineering.com/Forge_Fittings.html)",
  "ASME B16.9 (pipingengineer.org/butt-weld-reducing-tees-and-crosses-metric-dimensions-as-per-asme-b16-9; pipingengineer.org/butt-weld-reducing-tees-and-crosses-metric-dimensions-as-per-asme-b16-9/; arfluengineering.com/Forge_Fittings.html)",
  "ASME B16.9 (arfluengineering.com/Forge_Fittings.html; arfluengineering.com/Forge_Fittings.html)",
  "ASME B16.9 (from memory)",
] as const;

const TUPLES: readonly TeeTuple[] = [
  ["1/2", "1/2", 1, 25, 1, 25, "partial", 0],
  ["3/4", "3/4", 1.125, 29, 1.125, 29, "partial", 0],
  ["1", "1", 1.5, 38, 1.5, 38, "partial", 0],
  ["1-1/4", "1-1/4", 1.875, 48, 1.875, 48, "partial", 0],
  ["1-1/2", "1-1/2", 2.25, 57, 2.25, 57, "partial", 0],
  ["2", "2", 2.5, 64, 2.5, 64, "partial", 0],
  ["2-1/2", "2-1/2", 3, 76, 3, 76, "partial", 1],
  ["3", "3", 3.375, 86, 3.375, 86, "partial", 0],
  ["3-1/2", "3-1/2", 3.75, 95, 3.75, 95, "yes", 6],
  ["4", "4", 4.125, 105, 4.125, 105, "partial", 0],
  ["5", "5", 4.875, 124, 4.875, 124, "partial", 0],
  ["6", "6", 5.625, 143, 5.625, 143, "partial", 1],
  ["8", "8", 7, 178, 7, 178, "partial", 1],
  ["10", "10", 8.5, 216, 8.5, 216, "partial", 0],
  ["12", "12", 10, 254, 10, 254, "partial", 0],
  ["14", "14", 11, 279, 11, 279, "partial", 0],
  ["16", "16", 12, 305, 12, 305, "partial", 1],
  ["18", "18", 13.5, 343, 13.5, 343, "partial", 1],
  ["20", "20", 15, 381, 15, 381, "partial", 0],
  ["22", "22", 16.5, 419, 16.5, 419, "yes", 6],
  ["24", "24", 17, 432, 17, 432, "partial", 0],
  ["3/4", "1/2", 1.125, null, 1.125, null, "no", 2],
  ["1", "3/4", 1.5, null, 1.5, null, "no", 2],
  ["1", "1/2", 1.5, null, 1.5, null, "no", 2],
  ["1-1/4", "1", 1.875, null, 1.875, null, "no", 2],
  ["1-1/4", "3/4", 1.875, null, 1.875, null, "no", 2],
  ["1-1/4", "1/2", 1.875, null, 1.875, null, "no", 2],
  ["1-1/2", "1-1/4", 2.25, null, 2.25, null, "no", 2],
  ["1-1/2", "1", 2.25, null, 2.25, null, "no", 2],
  ["1-1/2", "3/4", 2.25, null, 2.25, null, "no", 2],
  ["1-1/2", "1/2", 2.25, null, 2.25, null, "no", 2],
  ["2", "1-1/2", 2.5, null, 2.375, null, "no", 2],
  ["2", "1-1/4", 2.5, null, 2.25, null, "no", 2],
  ["2", "1", 2.5, null, 2, null, "no", 2],
  ["2", "3/4", 2.5, null, 1.75, null, "no", 2],
  ["2-1/2", "2", 3, null, 2.75, null, "no", 2],
  ["2-1/2", "1-1/2", 3, null, 2.625, null, "no", 2],
  ["2-1/2", "1-1/4", 3, null, 2.5, null, "no", 2],
  ["2-1/2", "1", 3, null, 2.25, null, "no", 2],
  ["3", "2-1/2", 3.375, null, 3.25, null, "no", 3],
  ["3", "2", 3.375, null, 3, null, "no", 3],
  ["3", "1-1/2", 3.375, null, 2.875, null, "no", 3],
  ["3", "1-1/4", 3.375, null, 2.75, null, "no", 3],
  ["4", "3-1/2", 4.125, null, 4, null, "no", 2],
  ["4", "3", 4.125, null, 3.875, null, "no", 3],
  ["4", "2-1/2", 4.125, null, 3.75, null, "no", 3],
  ["4", "2", 4.125, null, 3.5, null, "no", 3],
  ["4", "1-1/2", 4.125, null, 3.375, null, "no", 3],
  ["5", "4", 4.875, null, 4.625, null, "no", 3],
  ["5", "3-1/2", 4.875, null, 4.5, null, "no", 2],
  ["5", "3", 4.875, null, 4.375, null, "no", 3],
  ["5", "2-1/2", 4.875, null, 4.25, null, "no", 3],
  ["5", "2", 4.875, null, 4.125, null, "no", 3],
  ["6", "5", 5.625, null, 5.375, null, "no", 2],
  ["6", "4", 5.625, null, 5.125, null, "no", 2],
  ["6", "3-1/2", 5.625, null, 5, null, "no", 2],
  ["6", "3", 5.625, null, 4.875, null, "no", 2],
  ["6", "2-1/2", 5.625, null, 4.75, null, "no", 2],
  ["8", "6", 7, null, 6.625, null, "no", 2],
  ["8", "5", 7, null, 6.375, null, "no", 2],
  ["8", "4", 7, null, 6.125, null, "no", 2],
  ["8", "3-1/2", 7, null, 6, null, "no", 2],
  ["10", "8", 8.5, null, 8, null, "no", 3],
  ["10", "6", 8.5, 216, 7.625, 194, "partial", 4],
  ["10", "5", 8.5, 216, 7.5, 191, "partial", 4],
  ["10", "4", 8.5, 216, 7.25, 184, "partial", 4],
  ["12", "10", 10, 254, 9.5, 241, "partial", 4],
  ["12", "8", 10, 254, 9, 229, "partial", 4],
  ["12", "6", 10, 254, 8.625, 219, "partial", 4],
  ["12", "5", 10, 254, 8.5, 216, "partial", 5],
  ["14", "12", 11, 279, 10.625, 270, "partial", 5],
  ["14", "10", 11, 279, 10.125, 257, "partial", 5],
  ["14", "8", 11, 279, 9.75, 248, "partial", 5],
  ["14", "6", 11, 279, 9.375, 238, "partial", 5],
  ["16", "14", 12, null, 12, null, "yes", 6],
  ["16", "12", 12, null, 11.625, null, "yes", 6],
  ["16", "10", 12, null, 11.125, null, "yes", 6],
  ["16", "8", 12, null, 10.75, null, "yes", 6],
  ["16", "6", 12, null, 10.375, null, "yes", 6],
  ["18", "16", 13.5, null, 13, null, "yes", 6],
  ["18", "14", 13.5, null, 13, null, "yes", 6],
  ["18", "12", 13.5, null, 12.625, null, "yes", 6],
  ["18", "10", 13.5, null, 12.125, null, "yes", 6],
  ["18", "8", 13.5, null, 11.75, null, "yes", 6],
  ["20", "18", 15, 381, 14.5, 368, "partial", 5],
  ["20", "16", 15, 381, 14, 356, "partial", 5],
  ["20", "14", 15, 381, 14, 356, "partial", 5],
  ["20", "12", 15, 381, 13.625, 346, "partial", 5],
  ["20", "10", 15, null, 13.125, null, "yes", 6],
  ["20", "8", 15, null, 12.75, null, "yes", 6],
  ["24", "20", 17, 432, 17, 432, "partial", 5],
  ["24", "18", 17, 432, 16.5, 419, "partial", 5],
  ["24", "16", 17, 432, 16, 406, "partial", 5],
  ["24", "14", 17, 432, 16, 406, "partial", 5],
  ["24", "12", 17, null, 15.625, null, "yes", 6],
  ["24", "10", 17, null, 15.125, null, "yes", 6],
  ["3-1/2", "3", 3.75, 95, 3.625, 92, "yes", 6],
  ["3-1/2", "2-1/2", 3.75, 95, 3.5, 89, "yes", 6],
  ["3-1/2", "2", 3.75, 95, 3.25, 83, "yes", 6],
  ["22", "20", 16.5, 419, 16, 406, "yes", 6],
  ["22", "18", 16.5, 419, 15.5, 394, "yes", 6],
  ["22", "16", 16.5, 419, 15, 381, "yes", 6],
  ["24", "22", 17, 432, 17, 432, "yes", 6],
];

export const TEE_ROWS: readonly TeeRow[] = TUPLES.map(([run, branch, runIn, runMm, branchIn, branchMm, fromMemory, source]) => ({
  run, branch, runIn, runMm, branchIn, branchMm, fromMemory, source: SOURCES[source]!,
}));
