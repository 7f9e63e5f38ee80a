/**
 * Lap-joint stub ends: F, from the lap's contact face to the weld end, lap included (its lap is at least the pipe's wall).
 * Long pattern ASME B16.9, short pattern MSS SP-43. Inches, millimetres (the table read gives tenths, as 25.4 makes them).
 */
import { sizeRows, type SizeRow, type SizeTuple } from "./row";

const SOURCES = [
  "ASME B16.9 (scribd.com/doc/205091102; arfluengineering.com/Forge_Fittings.html)",
  "ASME B16.9 (from memory)",
  "MSS SP-43 (scribd.com/doc/205091102)",
  "MSS SP-43 (from memory)",
] as const;

const rows = (tuples: readonly SizeTuple[]) => sizeRows(tuples, SOURCES);

export const LONG_STUB_ENDS: readonly SizeRow[] = rows([
  ["1/2", 3, 76.2, "partial", 0], ["3/4", 3, 76.2, "partial", 0], ["1", 4, 101.6, "partial", 0], ["1-1/4", 4, 101.6, "partial", 0],
  ["1-1/2", 4, 101.6, "partial", 0], ["2", 6, 152.4, "partial", 0], ["2-1/2", 6, 152.4, "partial", 0], ["3", 6, 152.4, "partial", 0],
  ["3-1/2", 6, null, "yes", 1], ["4", 6, 152.4, "partial", 0], ["5", 8, 203.2, "partial", 0], ["6", 8, 203.2, "partial", 0],
  ["8", 8, 203.2, "partial", 0], ["10", 10, 254, "partial", 0], ["12", 10, 254, "partial", 0], ["14", 12, 305, "partial", 0],
  ["16", 12, 305, "partial", 0], ["18", 12, 305, "partial", 0], ["20", 12, 305, "partial", 0], ["22", 12, null, "yes", 1],
  ["24", 12, null, "yes", 1],
]);

export const SHORT_STUB_ENDS: readonly SizeRow[] = rows([
  ["1/2", 2, 50.8, "partial", 2], ["3/4", 2, 50.8, "partial", 2], ["1", 2, 50.8, "partial", 2], ["1-1/4", 2, 50.8, "partial", 2],
  ["1-1/2", 2, 50.8, "partial", 2], ["2", 2.5, 63.5, "partial", 2], ["2-1/2", 2.5, 63.5, "partial", 2], ["3", 2.5, 63.5, "partial", 2],
  ["3-1/2", 3, null, "yes", 3], ["4", 3, 76.2, "partial", 2], ["5", 3, 76.2, "partial", 2], ["6", 3.5, 88.9, "partial", 2],
  ["8", 4, 101.6, "partial", 2], ["10", 5, 127, "partial", 2], ["12", 6, 152.4, "partial", 2], ["14", 6, 152.4, "partial", 2],
  ["16", 6, 152.4, "partial", 2], ["18", 6, 152.4, "partial", 2], ["20", 6, 152.4, "partial", 2], ["24", 6, null, "yes", 3],
]);
