/**
 * ASME B16.11 threaded fittings, classes 2000, 3000 and 6000, and socket-welding caps: all from memory (no table could be
 * reached), so a shop confirms what it uses. Inches as exact fractions, millimetres. Couplings and caps begin at class
 * 3000; a half coupling is half as long as a coupling.
 */
import type { Nps } from "../run/document";
import type { ForgedClass } from "./keys";

export const THREADED_SOURCE = "ASME B16.11 (from memory)";

type Length = readonly [inches: number, mm: number];

/** NPS, then centre to end in classes 2000, 3000, 6000. */
type ByClass = readonly [Nps, Length, Length, Length];

/** 90, tee and cross. */
export const THREADED_CENTRES: readonly ByClass[] = [
  ["1/2", [1.125, 28], [1.3125, 33], [1.5, 38]],
  ["3/4", [1.3125, 33], [1.5, 38], [1.75, 44]],
  ["1", [1.5, 38], [1.75, 44], [2, 51]],
  ["1-1/4", [1.75, 44], [2, 51], [2.375, 60]],
  ["1-1/2", [2, 51], [2.375, 60], [2.5, 64]],
  ["2", [2.375, 60], [2.5, 64], [3.25, 83]],
  ["2-1/2", [3, 76], [3.25, 83], [3.75, 95]],
  ["3", [3.375, 86], [3.75, 95], [4.1875, 106]],
  ["4", [4.1875, 106], [4.5, 114], [4.5, 114]],
];

/** 45. */
export const THREADED_45S: readonly ByClass[] = [
  ["1/2", [0.875, 22], [1, 25], [1.125, 28]],
  ["3/4", [1, 25], [1.125, 28], [1.3125, 33]],
  ["1", [1.125, 28], [1.3125, 33], [1.375, 35]],
  ["1-1/4", [1.3125, 33], [1.375, 35], [1.6875, 43]],
  ["1-1/2", [1.375, 35], [1.6875, 43], [1.71875, 44]],
  ["2", [1.6875, 43], [1.71875, 44], [2.0625, 52]],
  ["2-1/2", [2.0625, 52], [2.0625, 52], [2.5, 64]],
  ["3", [2.5, 64], [2.5, 64], [3.125, 79]],
  ["4", [3.125, 79], [3.125, 79], [3.125, 79]],
];

export const THREADED_CLASSES: readonly ForgedClass[] = [2000, 3000, 6000];

/** NPS, coupling end to end (classes 3000 and 6000), cap class 3000, cap class 6000. */
export const THREADED_ENDS: readonly (readonly [Nps, Length, Length, Length])[] = [
  ["1/2", [1.875, 48], [1.25, 32], [1.3125, 33]],
  ["3/4", [2, 51], [1.4375, 37], [1.5, 38]],
  ["1", [2.375, 60], [1.625, 41], [1.6875, 43]],
  ["1-1/4", [2.625, 67], [1.75, 44], [1.8125, 46]],
  ["1-1/2", [3.125, 79], [1.75, 44], [1.875, 48]],
  ["2", [3.375, 86], [1.875, 48], [2, 51]],
  ["2-1/2", [3.625, 92], [2.375, 60], [2.5, 64]],
  ["3", [4.25, 108], [2.5625, 65], [2.6875, 68]],
  ["4", [4.75, 121], [2.6875, 68], [2.9375, 75]],
];

/** Socket-welding cap, least thickness of its end wall: NPS, class 3000, class 6000. A cap in hand may be thicker. */
export const SOCKET_CAP_ENDS: readonly (readonly [Nps, Length, Length])[] = [
  ["1/2", [0.25, 6.5], [0.3125, 8]],
  ["3/4", [0.25, 6.5], [0.3125, 8]],
  ["1", [0.375, 9.5], [0.4375, 11]],
  ["1-1/4", [0.375, 9.5], [0.4375, 11]],
  ["1-1/2", [0.4375, 11], [0.5, 12.5]],
  ["2", [0.5, 12.5], [0.625, 16]],
  ["2-1/2", [0.625, 16], [0.75, 19]],
  ["3", [0.75, 19], [0.875, 22]],
  ["4", [0.875, 22], [1.125, 28.5]],
];
