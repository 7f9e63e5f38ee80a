/**
 * ASME B16.5 raised-face flanges, classes 150, 300 and 600 (900 and 1500 stand in b16-5-high-flanges), inches as exact fractions; the tables read have no
 * millimetre column, so metric lines round the inch value. In classes 150 and 300 thickness and hub length INCLUDE the
 * 1/16 raised face (tables up to the 1996 edition; later ones leave it out); in class 600 they EXCLUDE the 1/4 one.
 */
import type { Nps, RatingClass } from "../run/document";
import { HIGH_FLANGE_ROWS } from "./b16-5-high-flanges";
import type { FlangeRow } from "./flange-row";
import type { Memory } from "./row";

/**
 * Class, NPS, outside diameter, thickness (blind too), raised-face diameter, hub length through weld-neck, slip-on and
 * socket-weld (null over NPS 3), bolt circle, number of bolts, bolt diameter, hole, stud length, then what is from
 * memory: lengths, thickness, drilling; index of the source.
 */
type FlangeTuple = readonly [
  RatingClass, Nps, number, number, number, number, number, number | null, number, number, string, number, number,
  Memory, Memory, Memory, number,
];

const SOURCES = [
  "ASME B16.5 (scribd.com/document/444932968; pdfslide.net/documents/bonace-mr-0175lting.html (B16.5-2009 Table 7) [drilling]; scribd.com/document/369807774)",
  "ASME B16.5 (zaffertec.com/specs/ANSI-Normal-Flanges_files/sheet002.htm (Class 300, mm))",
  "ASME B16.5 (scribd.com/document/625693665)",
  "ASME B16.5 (from memory)",
  "ASME B16.5 (zaffertec.com/specs/ANSI-Normal-Flanges_files/sheet003.htm (Class 400 = same as 600 for NPS<=3, mm); scribd.com/document/176227010; scribd.com/document/900574630)",
  "ASME B16.5 (scribd.com/document/176227010; scribd.com/document/900574630)",
  "ASME B16.5 (studylib.net/doc/26303121 (maker's catalogue, rev 1-99))",
] as const;

const TUPLES: readonly FlangeTuple[] = [
  [150, "1/2", 3.5, 0.4375, 1.375, 1.875, 0.625, 0.625, 2.375, 4, "1/2", 0.625, 2.25, "partial", "partial", "partial", 0],
  [150, "3/4", 3.875, 0.5, 1.6875, 2.0625, 0.625, 0.625, 2.75, 4, "1/2", 0.625, 2.5, "partial", "partial", "partial", 0],
  [150, "1", 4.25, 0.5625, 2, 2.1875, 0.6875, 0.6875, 3.125, 4, "1/2", 0.625, 2.5, "partial", "partial", "partial", 0],
  [150, "1-1/4", 4.625, 0.625, 2.5, 2.25, 0.8125, 0.8125, 3.5, 4, "1/2", 0.625, 2.75, "partial", "partial", "partial", 0],
  [150, "1-1/2", 5, 0.6875, 2.875, 2.4375, 0.875, 0.875, 3.875, 4, "1/2", 0.625, 2.75, "partial", "partial", "partial", 0],
  [150, "2", 6, 0.75, 3.625, 2.5, 1, 1, 4.75, 4, "5/8", 0.75, 3.25, "partial", "partial", "partial", 0],
  [150, "2-1/2", 7, 0.875, 4.125, 2.75, 1.125, 1.125, 5.5, 4, "5/8", 0.75, 3.5, "partial", "partial", "partial", 0],
  [150, "3", 7.5, 0.9375, 5, 2.75, 1.1875, 1.1875, 6, 4, "5/8", 0.75, 3.5, "partial", "partial", "partial", 0],
  [150, "3-1/2", 8.5, 0.9375, 5.5, 2.8125, 1.25, null, 7, 8, "5/8", 0.75, 3.5, "partial", "partial", "yes", 6],
  [150, "4", 9, 0.9375, 6.1875, 3, 1.3125, null, 7.5, 8, "5/8", 0.75, 3.5, "partial", "partial", "partial", 0],
  [150, "5", 10, 0.9375, 7.3125, 3.5, 1.4375, null, 8.5, 8, "3/4", 0.875, 3.75, "partial", "partial", "partial", 0],
  [150, "6", 11, 1, 8.5, 3.5, 1.5625, null, 9.5, 8, "3/4", 0.875, 4, "partial", "partial", "partial", 0],
  [150, "8", 13.5, 1.125, 10.625, 4, 1.75, null, 11.75, 8, "3/4", 0.875, 4.25, "partial", "partial", "partial", 0],
  [150, "10", 16, 1.1875, 12.75, 4, 1.9375, null, 14.25, 12, "7/8", 1, 4.5, "partial", "partial", "partial", 0],
  [150, "12", 19, 1.25, 15, 4.5, 2.1875, null, 17, 12, "7/8", 1, 4.75, "partial", "partial", "partial", 0],
  [150, "14", 21, 1.375, 16.25, 5, 2.25, null, 18.75, 12, "1", 1.125, 5.25, "partial", "partial", "partial", 0],
  [150, "16", 23.5, 1.4375, 18.5, 5, 2.5, null, 21.25, 16, "1", 1.125, 5.25, "partial", "partial", "partial", 0],
  [150, "18", 25, 1.5625, 21, 5.5, 2.6875, null, 22.75, 16, "1-1/8", 1.25, 5.75, "partial", "partial", "partial", 0],
  [150, "20", 27.5, 1.6875, 23, 5.6875, 2.875, null, 25, 20, "1-1/8", 1.25, 6.25, "partial", "partial", "partial", 0],
  [150, "24", 32, 1.875, 27.25, 6, 3.25, null, 29.5, 20, "1-1/4", 1.375, 6.75, "partial", "partial", "partial", 0],
  [300, "1/2", 3.75, 0.5625, 1.375, 2.0625, 0.875, 0.875, 2.625, 4, "1/2", 0.625, 2.5, "partial", "partial", "partial", 1],
  [300, "3/4", 4.625, 0.625, 1.6875, 2.25, 1, 1, 3.25, 4, "5/8", 0.75, 3, "partial", "partial", "partial", 1],
  [300, "1", 4.875, 0.6875, 2, 2.4375, 1.0625, 1.0625, 3.5, 4, "5/8", 0.75, 3, "partial", "partial", "partial", 1],
  [300, "1-1/4", 5.25, 0.75, 2.5, 2.5625, 1.0625, 1.0625, 3.875, 4, "5/8", 0.75, 3.25, "partial", "partial", "partial", 1],
  [300, "1-1/2", 6.125, 0.8125, 2.875, 2.6875, 1.1875, 1.1875, 4.5, 4, "3/4", 0.875, 3.5, "partial", "partial", "partial", 1],
  [300, "2", 6.5, 0.875, 3.625, 2.75, 1.3125, 1.3125, 5, 8, "5/8", 0.75, 3.5, "partial", "partial", "partial", 1],
  [300, "2-1/2", 7.5, 1, 4.125, 3, 1.5, 1.5, 5.875, 8, "3/4", 0.875, 4, "partial", "partial", "partial", 1],
  [300, "3", 8.25, 1.125, 5, 3.125, 1.6875, 1.6875, 6.625, 8, "3/4", 0.875, 4.25, "partial", "partial", "partial", 1],
  [300, "3-1/2", 9, 1.1875, 5.5, 3.1875, 1.75, null, 7.25, 8, "3/4", 0.875, 4.25, "yes", "yes", "yes", 3],
  [300, "4", 10, 1.25, 6.1875, 3.375, 1.875, null, 7.875, 8, "3/4", 0.875, 4.5, "yes", "yes", "yes", 2],
  [300, "5", 11, 1.375, 7.3125, 3.875, 2, null, 9.25, 8, "3/4", 0.875, 4.75, "yes", "yes", "yes", 2],
  [300, "6", 12.5, 1.4375, 8.5, 3.875, 2.0625, null, 10.625, 12, "3/4", 0.875, 4.75, "yes", "yes", "yes", 3],
  [300, "8", 15, 1.625, 10.625, 4.375, 2.4375, null, 13, 12, "7/8", 1, 5.5, "yes", "yes", "yes", 3],
  [300, "10", 17.5, 1.875, 12.75, 4.625, 2.625, null, 15.25, 16, "1", 1.125, 6.25, "yes", "yes", "yes", 3],
  [300, "12", 20.5, 2, 15, 5.125, 2.875, null, 17.75, 16, "1-1/8", 1.25, 6.75, "yes", "yes", "yes", 3],
  [300, "14", 23, 2.125, 16.25, 5.625, 3, null, 20.25, 20, "1-1/8", 1.25, 7, "yes", "yes", "yes", 3],
  [300, "16", 25.5, 2.25, 18.5, 5.75, 3.25, null, 22.5, 20, "1-1/4", 1.375, 7.5, "yes", "yes", "yes", 3],
  [300, "18", 28, 2.375, 21, 6.25, 3.5, null, 24.75, 24, "1-1/4", 1.375, 7.75, "yes", "yes", "yes", 3],
  [300, "20", 30.5, 2.5, 23, 6.375, 3.75, null, 27, 24, "1-1/4", 1.375, 8, "yes", "yes", "yes", 3],
  [300, "24", 36, 2.75, 27.25, 6.625, 4.1875, null, 32, 24, "1-1/2", 1.625, 9, "yes", "yes", "yes", 3],
  [600, "1/2", 3.75, 0.5625, 1.375, 2.0625, 0.875, 0.875, 2.625, 4, "1/2", 0.625, 3, "partial", "partial", "partial", 4],
  [600, "3/4", 4.625, 0.625, 1.6875, 2.25, 1, 1, 3.25, 4, "5/8", 0.75, 3.5, "partial", "partial", "partial", 4],
  [600, "1", 4.875, 0.6875, 2, 2.4375, 1.0625, 1.0625, 3.5, 4, "5/8", 0.75, 3.5, "partial", "partial", "partial", 4],
  [600, "1-1/4", 5.25, 0.8125, 2.5, 2.625, 1.125, 1.125, 3.875, 4, "5/8", 0.75, 3.75, "partial", "partial", "partial", 4],
  [600, "1-1/2", 6.125, 0.875, 2.875, 2.75, 1.25, 1.25, 4.5, 4, "3/4", 0.875, 4.25, "partial", "partial", "partial", 4],
  [600, "2", 6.5, 1, 3.625, 2.875, 1.4375, 1.4375, 5, 8, "5/8", 0.75, 4.25, "partial", "partial", "partial", 4],
  [600, "2-1/2", 7.5, 1.125, 4.125, 3.125, 1.625, 1.625, 5.875, 8, "3/4", 0.875, 4.75, "partial", "yes", "partial", 4],
  [600, "3", 8.25, 1.25, 5, 3.25, 1.8125, 1.8125, 6.625, 8, "3/4", 0.875, 5, "partial", "partial", "partial", 4],
  [600, "3-1/2", 9, 1.375, 5.5, 3.375, 1.9375, null, 7.25, 8, "7/8", 1, 5.5, "yes", "yes", "yes", 3],
  [600, "4", 10.75, 1.5, 6.1875, 4, 2.125, null, 8.5, 8, "7/8", 1, 5.75, "yes", "yes", "partial", 5],
  [600, "5", 13, 1.75, 7.3125, 4.5, 2.375, null, 10.5, 8, "1", 1.125, 6.5, "yes", "yes", "partial", 5],
  [600, "6", 14, 1.875, 8.5, 4.625, 2.625, null, 11.5, 12, "1", 1.125, 6.75, "yes", "yes", "partial", 5],
  [600, "8", 16.5, 2.1875, 10.625, 5.25, 3, null, 13.75, 12, "1-1/8", 1.25, 7.5, "yes", "yes", "partial", 5],
  [600, "10", 20, 2.5, 12.75, 6, 3.375, null, 17, 16, "1-1/4", 1.375, 8.5, "yes", "yes", "partial", 5],
  [600, "12", 22, 2.625, 15, 6.125, 3.625, null, 19.25, 20, "1-1/4", 1.375, 8.75, "yes", "yes", "partial", 5],
  [600, "14", 23.75, 2.75, 16.25, 6.5, 3.6875, null, 20.75, 20, "1-3/8", 1.5, 9.25, "yes", "yes", "partial", 5],
  [600, "16", 27, 3, 18.5, 7, 4.1875, null, 23.75, 20, "1-1/2", 1.625, 10, "yes", "yes", "partial", 5],
  [600, "18", 29.25, 3.25, 21, 7.25, 4.625, null, 25.75, 20, "1-5/8", 1.75, 10.75, "yes", "yes", "partial", 5],
  [600, "20", 32, 3.5, 23, 7.5, 5, null, 28.5, 24, "1-5/8", 1.75, 11.25, "yes", "yes", "partial", 5],
  [600, "24", 37, 4, 27.25, 8, 5.5, null, 33, 24, "1-7/8", 2, 13, "yes", "yes", "partial", 5],
];

/** Lap-joint hubs longer than the slip-on's; elsewhere the two are one. Class, NPS, inches, from memory, index of the source. */
const LAP_JOINTS: readonly (readonly [RatingClass, Nps, number])[] = [
  [150, "14", 3.125], [150, "16", 3.4375], [150, "18", 3.8125], [150, "20", 4.0625], [150, "24", 4.375],
  [300, "10", 3.75], [300, "12", 4], [300, "14", 4.375], [300, "16", 4.75], [300, "18", 5.125], [300, "20", 5.5], [300, "24", 6],
  [600, "10", 4.375], [600, "12", 4.625], [600, "14", 5], [600, "16", 5.5], [600, "18", 6], [600, "20", 6.5], [600, "24", 7.25],
];

function lapJointIn(ratingClass: RatingClass, nps: Nps, slipOnIn: number): number {
  return LAP_JOINTS.find((row) => row[0] === ratingClass && row[1] === nps)?.[2] ?? slipOnIn;
}

const LOWER_ROWS: readonly FlangeRow[] = TUPLES.map((t) => ({
  ratingClass: t[0], nps: t[1], outsideIn: t[2], thicknessIn: t[3], raisedFaceIn: t[4], weldNeckIn: t[5], slipOnIn: t[6],
  socketWeldIn: t[7], threadedIn: t[6], lapJointIn: lapJointIn(t[0], t[1], t[6]), boltCircleIn: t[8], bolts: t[9], boltSize: t[10],
  holeIn: t[11], studIn: t[12], lengthMemory: t[13], lapJointMemory: "yes", thicknessMemory: t[14], drillingMemory: t[15], source: SOURCES[t[16]]!,
}));

/** Every flange, classes 150 to 1500. */
export const FLANGE_ROWS: readonly FlangeRow[] = [...LOWER_ROWS, ...HIGH_FLANGE_ROWS];

export const SOCKET_DEPTH_SOURCE = "ASME B16.5 (zaffertec.com/specs/ANSI-Normal-Flanges_files/sheet002.htm and sheet006.htm (Classes 300 and 1500, mm))";

/** Socket of a socket-weld flange: NPS, inches, millimetres as read (25.4 times the inch value, to a tenth). */
export const SOCKET_FLANGE_DEPTHS: readonly (readonly [Nps, number, number])[] = [
  ["1/2", 0.375, 9.7], ["3/4", 0.4375, 11.2], ["1", 0.5, 12.7], ["1-1/4", 0.5625, 14.2], ["1-1/2", 0.625, 15.7], ["2", 0.6875, 17.5],
  ["2-1/2", 0.75, 19.1], ["3", 0.8125, 20.6],
];
