/**
 * ASME B1.20.1 taper pipe thread: how far a pipe normally goes into a fitting, hand-tight length L1 plus wrench make-up
 * L3 (three threads to NPS 2, two above it). Inches, from memory; the sum agrees with the rounded "normal engagement" of
 * trade handbooks (1/2 in for NPS 1/2, 3/4 for NPS 2, 1 1/8 for NPS 4) to 1/32. NPS, L1, threads per inch, threads of L3.
 */
import type { Nps } from "../run/document";

export const THREAD_SOURCE = "ASME B1.20.1 (from memory)";

export const THREADS: readonly (readonly [Nps, number, number, number])[] = [
  ["1/2", 0.32, 14, 3], ["3/4", 0.339, 14, 3], ["1", 0.4, 11.5, 3], ["1-1/4", 0.42, 11.5, 3], ["1-1/2", 0.42, 11.5, 3], ["2", 0.436, 11.5, 3],
  ["2-1/2", 0.682, 8, 2], ["3", 0.766, 8, 2], ["3-1/2", 0.821, 8, 2], ["4", 0.844, 8, 2], ["5", 0.937, 8, 2], ["6", 0.958, 8, 2],
  ["8", 1.063, 8, 2], ["10", 1.21, 8, 2], ["12", 1.36, 8, 2],
];

/** Engagement in inches, to the thousandth the table's own lengths have. */
export function engagementIn([, handTight, perInch, wrenchThreads]: (typeof THREADS)[number]): number {
  return Math.round((handTight + wrenchThreads / perInch) * 1000) / 1000;
}
