/**
 * Lengths of valves: ASME B16.10 flanged raised-face and butt-weld, API 609 wafer butterfly; NPS, inches, millimetres.
 * All from memory (no table could be reached), so a shop confirms what it uses. "check" is a swing check; "ball" the long
 * (full-bore) pattern, "ball-short" the short (reduced-bore) one; "butterfly" is API 609 category A in class 150 (the
 * concentric one) and category B in class 300, "butterfly-offset" category B. From class 300 up butt-weld ends are as long
 * as raised-face ones; in class 150 a butt-weld gate is longer. Socket-weld and threaded valves follow no common table:
 * their maker's length, measured, is what counts.
 */
import type { Nps, RatingClass } from "../run/document";
import type { ValveName } from "./keys";

const B16_10 = "ASME B16.10 (from memory)";
const API = "API 609 (from memory)";

export interface ValveTable {
  readonly valve: ValveName;
  readonly ratingClass: RatingClass;
  /** A wafer valve sits between two flanges: it is keyed with the flanged ones. */
  readonly ends: "flanged" | "butt" | "wafer";
  readonly words: string;
  readonly source: string;
  readonly faces: readonly (readonly [Nps, number, number])[];
}

// prettier-ignore
const FLANGED: readonly ValveTable[] = [
  { valve: "gate", ratingClass: 150, ends: "flanged", words: "gate valve", source: B16_10, faces: [
    ["2", 7, 178], ["2-1/2", 7.5, 190], ["3", 8, 203], ["4", 9, 229], ["5", 10, 254], ["6", 10.5, 267], ["8", 11.5, 292],
    ["10", 13, 330], ["12", 14, 356], ["14", 15, 381], ["16", 16, 406], ["18", 17, 432], ["20", 18, 457], ["24", 20, 508],
  ] },
  { valve: "gate", ratingClass: 300, ends: "flanged", words: "gate valve", source: B16_10, faces: [
    ["2", 8.5, 216], ["2-1/2", 9.5, 241], ["3", 11.125, 282], ["4", 12, 305], ["5", 15, 381], ["6", 15.875, 403], ["8", 16.5, 419],
    ["10", 18, 457], ["12", 19.75, 502], ["14", 30, 762], ["16", 33, 838], ["18", 36, 914], ["20", 39, 991], ["24", 45, 1143],
  ] },
  { valve: "gate", ratingClass: 600, ends: "flanged", words: "gate valve", source: B16_10, faces: [
    ["2", 11.5, 292], ["2-1/2", 13, 330], ["3", 14, 356], ["4", 17, 432], ["5", 20, 508], ["6", 22, 559], ["8", 26, 660],
    ["10", 31, 787], ["12", 33, 838], ["14", 35, 889], ["16", 39, 991], ["18", 43, 1092], ["20", 47, 1194], ["24", 55, 1397],
  ] },
  { valve: "gate", ratingClass: 900, ends: "flanged", words: "gate valve", source: B16_10, faces: [
    ["2", 14.5, 368], ["2-1/2", 16.5, 419], ["3", 15, 381], ["4", 18, 457], ["5", 22, 559], ["6", 24, 610], ["8", 29, 737],
    ["10", 33, 838], ["12", 38, 965], ["14", 40.5, 1029], ["16", 44.5, 1130], ["18", 48, 1219], ["20", 52, 1321], ["24", 61, 1549],
  ] },
  { valve: "gate", ratingClass: 1500, ends: "flanged", words: "gate valve", source: B16_10, faces: [
    ["2", 14.5, 368], ["2-1/2", 16.5, 419], ["3", 18.5, 470], ["4", 21.5, 546], ["5", 26.5, 673], ["6", 27.75, 705],
    ["8", 32.75, 832], ["10", 39, 991], ["12", 44.5, 1130], ["14", 49.5, 1257], ["16", 54.5, 1384], ["18", 60.5, 1537],
    ["20", 65.5, 1664], ["24", 76.5, 1943],
  ] },
  { valve: "globe", ratingClass: 150, ends: "flanged", words: "globe valve", source: B16_10, faces: [
    ["2", 8, 203], ["2-1/2", 8.5, 216], ["3", 9.5, 241], ["4", 11.5, 292], ["5", 14, 356], ["6", 16, 406], ["8", 19.5, 495],
    ["10", 24.5, 622], ["12", 27.5, 698],
  ] },
  { valve: "globe", ratingClass: 300, ends: "flanged", words: "globe valve", source: B16_10, faces: [
    ["2", 10.5, 267], ["2-1/2", 11.5, 292], ["3", 12.5, 318], ["4", 14, 356], ["5", 15.75, 400], ["6", 17.5, 444], ["8", 22, 559],
    ["10", 24.5, 622], ["12", 28, 711],
  ] },
  { valve: "globe", ratingClass: 600, ends: "flanged", words: "globe valve", source: B16_10, faces: [
    ["2", 11.5, 292], ["2-1/2", 13, 330], ["3", 14, 356], ["4", 17, 432], ["5", 20, 508], ["6", 22, 559], ["8", 26, 660],
    ["10", 31, 787], ["12", 33, 838],
  ] },
  { valve: "globe", ratingClass: 900, ends: "flanged", words: "globe valve", source: B16_10, faces: [
    ["2", 14.5, 368], ["2-1/2", 16.5, 419], ["3", 15, 381], ["4", 18, 457], ["5", 22, 559], ["6", 24, 610], ["8", 29, 737],
    ["10", 33, 838], ["12", 38, 965],
  ] },
  { valve: "globe", ratingClass: 1500, ends: "flanged", words: "globe valve", source: B16_10, faces: [
    ["2", 14.5, 368], ["2-1/2", 16.5, 419], ["3", 18.5, 470], ["4", 21.5, 546], ["5", 26.5, 673], ["6", 27.75, 705],
    ["8", 32.75, 832], ["10", 39, 991], ["12", 44.5, 1130],
  ] },
  { valve: "check", ratingClass: 150, ends: "flanged", words: "swing check valve", source: B16_10, faces: [
    ["2", 8, 203], ["2-1/2", 8.5, 216], ["3", 9.5, 241], ["4", 11.5, 292], ["5", 13, 330], ["6", 14, 356], ["8", 19.5, 495],
    ["10", 24.5, 622], ["12", 27.5, 698],
  ] },
  { valve: "check", ratingClass: 300, ends: "flanged", words: "swing check valve", source: B16_10, faces: [
    ["2", 10.5, 267], ["2-1/2", 11.5, 292], ["3", 12.5, 318], ["4", 14, 356], ["5", 15.75, 400], ["6", 17.5, 444], ["8", 21, 533],
    ["10", 24.5, 622], ["12", 28, 711],
  ] },
  { valve: "check", ratingClass: 600, ends: "flanged", words: "swing check valve", source: B16_10, faces: [
    ["2", 11.5, 292], ["2-1/2", 13, 330], ["3", 14, 356], ["4", 17, 432], ["5", 20, 508], ["6", 22, 559], ["8", 26, 660],
    ["10", 31, 787], ["12", 33, 838],
  ] },
  { valve: "check", ratingClass: 900, ends: "flanged", words: "swing check valve", source: B16_10, faces: [
    ["2", 14.5, 368], ["2-1/2", 16.5, 419], ["3", 15, 381], ["4", 18, 457], ["5", 22, 559], ["6", 24, 610], ["8", 29, 737],
    ["10", 33, 838], ["12", 38, 965],
  ] },
  { valve: "check", ratingClass: 1500, ends: "flanged", words: "swing check valve", source: B16_10, faces: [
    ["2", 14.5, 368], ["2-1/2", 16.5, 419], ["3", 18.5, 470], ["4", 21.5, 546], ["5", 26.5, 673], ["6", 27.75, 705],
    ["8", 32.75, 832], ["10", 39, 991], ["12", 44.5, 1130],
  ] },
  { valve: "ball", ratingClass: 150, ends: "flanged", words: "ball valve, long pattern,", source: B16_10, faces: [
    ["2", 7, 178], ["2-1/2", 7.5, 190], ["3", 8, 203], ["4", 9, 229], ["5", 14, 356], ["6", 15.5, 394], ["8", 18, 457],
    ["10", 21, 533], ["12", 24, 610], ["14", 27, 686], ["16", 30, 762], ["18", 34, 864], ["20", 36, 914], ["24", 42, 1067],
  ] },
  { valve: "ball-short", ratingClass: 150, ends: "flanged", words: "ball valve, short pattern,", source: B16_10, faces: [
    ["2", 7, 178], ["2-1/2", 7.5, 190], ["3", 8, 203], ["4", 9, 229], ["5", 10, 254], ["6", 10.5, 267], ["8", 11.5, 292],
    ["10", 13, 330], ["12", 14, 356],
  ] },
  { valve: "ball", ratingClass: 300, ends: "flanged", words: "ball valve, long pattern,", source: B16_10, faces: [
    ["2", 8.5, 216], ["2-1/2", 9.5, 241], ["3", 11.125, 282], ["4", 12, 305], ["5", 15, 381], ["6", 15.875, 403], ["8", 19.75, 502],
    ["10", 22.375, 568], ["12", 25.5, 648], ["14", 30, 762], ["16", 33, 838], ["18", 36, 914], ["20", 39, 991], ["24", 45, 1143],
  ] },
  { valve: "ball-short", ratingClass: 300, ends: "flanged", words: "ball valve, short pattern,", source: B16_10, faces: [
    ["2", 8.5, 216], ["2-1/2", 9.5, 241], ["3", 11.125, 282], ["4", 12, 305], ["5", 15, 381], ["6", 15.875, 403], ["8", 16.5, 419],
    ["10", 18, 457], ["12", 19.75, 502],
  ] },
  { valve: "ball", ratingClass: 600, ends: "flanged", words: "ball valve, long pattern,", source: B16_10, faces: [
    ["2", 11.5, 292], ["2-1/2", 13, 330], ["3", 14, 356], ["4", 17, 432], ["5", 20, 508], ["6", 22, 559], ["8", 26, 660],
    ["10", 31, 787], ["12", 33, 838], ["14", 35, 889], ["16", 39, 991], ["18", 43, 1092], ["20", 47, 1194], ["24", 55, 1397],
  ] },
  { valve: "ball", ratingClass: 900, ends: "flanged", words: "ball valve, long pattern,", source: B16_10, faces: [
    ["2", 14.5, 368], ["2-1/2", 16.5, 419], ["3", 15, 381], ["4", 18, 457], ["5", 22, 559], ["6", 24, 610], ["8", 29, 737],
    ["10", 33, 838], ["12", 38, 965], ["14", 40.5, 1029], ["16", 44.5, 1130], ["18", 48, 1219], ["20", 52, 1321], ["24", 61, 1549],
  ] },
  { valve: "ball", ratingClass: 1500, ends: "flanged", words: "ball valve, long pattern,", source: B16_10, faces: [
    ["2", 14.5, 368], ["2-1/2", 16.5, 419], ["3", 18.5, 470], ["4", 21.5, 546], ["5", 26.5, 673], ["6", 27.75, 705],
    ["8", 32.75, 832], ["10", 39, 991], ["12", 44.5, 1130],
  ] },
];

// prettier-ignore
const WAFER: readonly ValveTable[] = [
  { valve: "butterfly", ratingClass: 150, ends: "wafer", words: "butterfly valve", source: API, faces: [
    ["2", 1.6875, 43], ["2-1/2", 1.8125, 46], ["3", 1.8125, 46], ["4", 2.0625, 52], ["5", 2.1875, 56], ["6", 2.1875, 56],
    ["8", 2.375, 60], ["10", 2.6875, 68], ["12", 3.0625, 78], ["14", 3.0625, 78], ["16", 4, 102], ["18", 4.5, 114], ["20", 5, 127],
    ["24", 6.0625, 154],
  ] },
  { valve: "butterfly-offset", ratingClass: 150, ends: "wafer", words: "butterfly valve, offset disc,", source: API, faces: [
    ["3", 1.875, 48], ["4", 2.125, 54], ["6", 2.25, 57], ["8", 2.5, 64], ["10", 2.8125, 71], ["12", 3.1875, 81], ["14", 3.625, 92],
    ["16", 4, 102], ["18", 4.5, 114], ["20", 5, 127], ["24", 6.0625, 154],
  ] },
  { valve: "butterfly-offset", ratingClass: 300, ends: "wafer", words: "butterfly valve, offset disc,", source: API, faces: [
    ["3", 1.875, 48], ["4", 2.125, 54], ["6", 2.3125, 59], ["8", 2.875, 73], ["10", 3.25, 83], ["12", 3.625, 92], ["14", 4.625, 117],
    ["16", 5.25, 133], ["18", 5.875, 149], ["20", 6.25, 159], ["24", 7.125, 181],
  ] },
  { valve: "butterfly", ratingClass: 300, ends: "wafer", words: "butterfly valve", source: API, faces: [
    ["3", 1.875, 48], ["4", 2.125, 54], ["6", 2.3125, 59], ["8", 2.875, 73], ["10", 3.25, 83], ["12", 3.625, 92], ["14", 4.625, 117],
    ["16", 5.25, 133], ["18", 5.875, 149], ["20", 6.25, 159], ["24", 7.125, 181],
  ] },
];

/** The one butt-weld column of class 150 that differs from the raised-face one. */
// prettier-ignore
const GATE_150_BUTT: ValveTable =
  { valve: "gate", ratingClass: 150, ends: "butt", words: "gate valve", source: B16_10, faces: [
    ["2", 8.5, 216], ["2-1/2", 9.5, 241], ["3", 11.125, 282], ["4", 12, 305], ["5", 15, 381], ["6", 15.875, 403], ["8", 16.5, 419],
    ["10", 18, 457], ["12", 19.75, 502], ["14", 22.5, 572], ["16", 24, 610], ["18", 26, 660], ["20", 28, 711], ["24", 32, 813],
  ] };

function buttWeld(table: ValveTable): ValveTable[] {
  if (table.valve === "gate" && table.ratingClass === 150) return [GATE_150_BUTT];
  // Ball valves of class 150 with welded ends have a column of their own, which is not here.
  if (table.ratingClass === 150 && table.valve.startsWith("ball")) return [];
  return [{ ...table, ends: "butt" }];
}

export const VALVE_FACES: readonly ValveTable[] = [...FLANGED, ...FLANGED.flatMap(buttWeld), ...WAFER];
