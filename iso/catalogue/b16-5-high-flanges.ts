/**
 * ASME B16.5 raised-face flanges, classes 900 and 1500, inches as exact fractions. Thickness and hubs EXCLUDE the 1/4
 * raised face. Class 900 takes class 1500's dimensions to NPS 2-1/2. The inch values are from memory; those to NPS 4 of
 * class 900 were checked against one published millimetre table (to 0.5 mm) and count as sourced.
 */
import type { Nps, RatingClass } from "../run/document";
import type { FlangeRow } from "./flange-row";
import type { Memory } from "./row";

const READ = "ASME B16.5 (zaffertec.com/specs/ANSI-Normal-Flanges_files/sheet005.htm (Class 900, mm))";
const REMEMBERED = "ASME B16.5 (from memory)";

/**
 * NPS, outside diameter, thickness, raised-face diameter, weld-neck hub, slip-on and threaded hub (null: no such flange),
 * lap-joint hub, bolt circle, number of bolts, bolt size, hole, stud length.
 */
type HighTuple = readonly [Nps, number, number, number, number, number | null, number, number, number, string, number, number];

/** NPS 1/2 to 2-1/2, one table for both classes. */
const SMALL: readonly HighTuple[] = [
  ["1/2", 4.75, 0.875, 1.375, 2.375, 1.25, 1.25, 3.25, 4, "3/4", 0.875, 4.25],
  ["3/4", 5.125, 1, 1.6875, 2.75, 1.375, 1.375, 3.5, 4, "3/4", 0.875, 4.5],
  ["1", 5.875, 1.125, 2, 2.875, 1.625, 1.625, 4, 4, "7/8", 1, 5],
  ["1-1/4", 6.25, 1.125, 2.5, 2.875, 1.625, 1.625, 4.375, 4, "7/8", 1, 5],
  ["1-1/2", 7, 1.25, 2.875, 3.25, 1.75, 1.75, 4.875, 4, "1", 1.125, 5.5],
  ["2", 8.5, 1.5, 3.625, 4, 2.25, 2.25, 6.5, 8, "7/8", 1, 5.75],
  ["2-1/2", 9.625, 1.625, 4.125, 4.125, 2.5, 2.5, 7.5, 8, "1", 1.125, 6.25],
];

const CLASS_900: readonly HighTuple[] = [
  ["3", 9.5, 1.5, 5, 4, 2.125, 2.125, 7.5, 8, "7/8", 1, 5.75],
  ["4", 11.5, 1.75, 6.1875, 4.5, 2.75, 2.75, 9.25, 8, "1-1/8", 1.25, 6.75],
  ["5", 13.75, 2, 7.3125, 5, 3.125, 3.125, 11, 8, "1-1/4", 1.375, 7.5],
  ["6", 15, 2.1875, 8.5, 5.5, 3.375, 3.375, 12.5, 12, "1-1/8", 1.25, 7.5],
  ["8", 18.5, 2.5, 10.625, 6.375, 4, 4.5, 15.5, 12, "1-3/8", 1.5, 8.75],
  ["10", 21.5, 2.75, 12.75, 7.25, 4.25, 5, 18.5, 16, "1-3/8", 1.5, 9.25],
  ["12", 24, 3.125, 15, 7.875, 4.625, 5.625, 21, 20, "1-3/8", 1.5, 10],
  ["14", 25.25, 3.375, 16.25, 8.375, 5.125, 6.125, 22, 20, "1-1/2", 1.625, 10.75],
  ["16", 27.75, 3.5, 18.5, 8.5, 5.25, 6.5, 24.25, 20, "1-5/8", 1.75, 11.25],
  ["18", 31, 4, 21, 9, 6, 7.5, 27, 20, "1-7/8", 2, 12.75],
  ["20", 33.75, 4.25, 23, 9.75, 6.25, 8.25, 29.5, 20, "2", 2.125, 13.75],
  ["24", 41, 5.5, 27.25, 11.5, 8, 10.5, 35.5, 20, "2-1/2", 2.625, 17.25],
];

const CLASS_1500: readonly HighTuple[] = [
  ["3", 10.5, 1.875, 5, 4.625, null, 2.875, 8, 8, "1-1/8", 1.25, 7],
  ["4", 12.25, 2.125, 6.1875, 4.875, null, 3.5625, 9.5, 8, "1-1/4", 1.375, 7.75],
  ["5", 14.75, 2.875, 7.3125, 6.125, null, 4.125, 11.5, 8, "1-1/2", 1.625, 9.75],
  ["6", 15.5, 3.25, 8.5, 6.75, null, 4.6875, 12.5, 12, "1-3/8", 1.5, 10.25],
  ["8", 19, 3.625, 10.625, 8.375, null, 5.625, 15.5, 12, "1-5/8", 1.75, 11.5],
  ["10", 23, 4.25, 12.75, 10, null, 7, 19, 12, "1-7/8", 2, 13.25],
  ["12", 26.5, 4.875, 15, 11.125, null, 8.625, 22.5, 16, "2", 2.125, 14.75],
  ["14", 29.5, 5.25, 16.25, 11.75, null, 9.5, 25, 16, "2-1/4", 2.375, 16],
  ["16", 32.5, 5.75, 18.5, 12.25, null, 10.25, 27.75, 16, "2-1/2", 2.625, 17.5],
  ["18", 36, 6.375, 21, 12.875, null, 10.875, 30.5, 16, "2-3/4", 2.875, 19.5],
  ["20", 38.75, 7, 23, 14, null, 11.5, 32.75, 16, "3", 3.125, 21.25],
  ["24", 46, 8, 27.25, 16, null, 13, 39, 16, "3-1/2", 3.625, 24.25],
];

/** Class 900 sizes found in the millimetre table that was read. */
const CHECKED_900: readonly Nps[] = ["1/2", "3/4", "1", "1-1/4", "1-1/2", "2", "2-1/2", "3", "4"];
/** Socket-weld flanges of class 1500 end at NPS 2-1/2; class 900 has them through the same table (from memory). */
const isSmall = (nps: Nps) => SMALL.some(([size]) => size === nps);

function rowsOf(ratingClass: RatingClass, tuples: readonly HighTuple[]): FlangeRow[] {
  return tuples.map(([nps, outsideIn, thicknessIn, raisedFaceIn, weldNeckIn, slipOnIn, lapJointIn, boltCircleIn, bolts, boltSize, holeIn, studIn]) => {
    // The two classes are one table to NPS 2-1/2, so one check serves both.
    const memory: Memory = isSmall(nps) || (ratingClass === 900 && CHECKED_900.includes(nps)) ? "partial" : "yes";
    return {
      ratingClass, nps, outsideIn, thicknessIn, raisedFaceIn, weldNeckIn, slipOnIn, socketWeldIn: isSmall(nps) ? slipOnIn : null,
      threadedIn: slipOnIn, lapJointIn, boltCircleIn, bolts, boltSize, holeIn, studIn, lengthMemory: memory, lapJointMemory: memory,
      thicknessMemory: memory, drillingMemory: memory, source: memory === "yes" ? REMEMBERED : READ,
    };
  });
}

export const HIGH_FLANGE_ROWS: readonly FlangeRow[] = [
  ...rowsOf(900, [...SMALL, ...CLASS_900]), ...rowsOf(1500, [...SMALL, ...CLASS_1500]),
];
