/**
 * MSS SP-97 butt-weld branch outlets, standard weight, reducing: height A from the run's surface to the branch weld end,
 * whatever the run. All from memory (no table could be reached). Branch NPS, inches, millimetres.
 */
import type { Nps } from "../run/document";

export const OUTLET_SOURCE = "MSS SP-97 (from memory)";

export const OUTLET_HEIGHTS: readonly (readonly [Nps, number, number])[] = [
  ["1/2", 0.75, 19],
  ["3/4", 0.875, 22],
  ["1", 1.0625, 27],
  ["1-1/4", 1.25, 32],
  ["1-1/2", 1.3125, 33],
  ["2", 1.5, 38],
  ["2-1/2", 1.625, 41],
  ["3", 1.75, 44],
  ["4", 2, 51],
  ["5", 2.25, 57],
  ["6", 2.375, 60],
  ["8", 2.75, 70],
  ["10", 3.0625, 78],
  ["12", 3.375, 86],
];
