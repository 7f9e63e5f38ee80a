/**
 * ASME B16.11 socket-welding fittings, classes 3000 and 6000: centre to socket bottom of 90, 45 and tee, laying length
 * of couplings, least depth of socket. Class 6000 90s and tees are from memory; NPS 4 class 3000 socket depth is 3/4 in
 * (two pages give 16 mm, three 19 mm).
 */
import type { Nps } from "../run/document";

/** Socket-welding fittings start at class 3000. */
export type SocketClass = 3000 | 6000;

export const SOCKET_SOURCES: Readonly<Record<SocketClass, string>> = {
  3000: "ASME B16.11 (vdocuments.net q-tees-size PF-2.17 (class 3000 SW tee submittal, in and mm) [tee, depth, inches]; creativepiping.com/asme-b16-11-45-degree-elbow-dimensions [45]; vaibhavfitting.com/full-coupling.php [coupling]; zcpipefittings.com/3000-socket-weld-90-degree-elbow.html [90]; hardhatengineer.com/pipe-coupling-dimensions/ and mumbadevisteel.in/pipe-coupling-dimensions.html [coupling, half coupling])",
  6000: "ASME B16.11 (creativepiping.com/asme-b16-11-45-degree-elbow-dimensions [45, depth]; vaibhavfitting.com/full-coupling.php [coupling, depth])",
};

/** Class, NPS, 90 in, 90 mm, 45 in, 45 mm, tee in, coupling in, coupling mm, half coupling mm, depth in, depth mm. */
type SocketTuple = readonly [
  SocketClass, Nps, number, number | null, number, number | null, number, number, number | null, number | null, number, number | null,
];

export const SOCKET_TUPLES: readonly SocketTuple[] = [
  [3000, "1/2", 0.625, 15.5, 0.4375, 11, 0.625, 0.375, 9.5, 22.5, 0.375, 9.5],
  [3000, "3/4", 0.75, 19, 0.5, 13, 0.75, 0.375, 9.5, 24, 0.5, 12.5],
  [3000, "1", 0.875, 22.5, 0.5625, 14, 0.875, 0.5, 12.5, 28.5, 0.5, 12.5],
  [3000, "1-1/4", 1.0625, 27, 0.6875, 17.5, 1.0625, 0.5, 12.5, 30, 0.5, 12.5],
  [3000, "1-1/2", 1.25, 32, 0.8125, 20.5, 1.25, 0.5, 12.5, 32, 0.5, 12.5],
  [3000, "2", 1.5, 38, 1, 25.5, 1.5, 0.75, 19, 41, 0.625, 16],
  [3000, "2-1/2", 1.625, 41, 1.125, 28.5, 1.625, 0.75, 19, 43, 0.625, 16],
  [3000, "3", 2.25, 57, 1.25, 32, 2.25, 0.75, 19, 44.5, 0.625, 16],
  [3000, "4", 2.625, 66.5, 1.625, 41, 2.625, 0.75, 19, 48, 0.75, 19],
  [6000, "1/2", 0.75, null, 0.5, 12.5, 0.75, 0.375, 9.5, null, 0.375, 9.5],
  [6000, "3/4", 0.875, null, 0.5625, 14, 0.875, 0.375, 9.5, null, 0.5, 12.5],
  [6000, "1", 1.0625, null, 0.6875, 17.5, 1.0625, 0.5, 12.5, null, 0.5, 12.5],
  [6000, "1-1/4", 1.25, null, 0.8125, 20.5, 1.25, 0.5, 12.5, null, 0.5, 12.5],
  [6000, "1-1/2", 1.5, null, 1, 25.5, 1.5, 0.5, 12.5, null, 0.5, 12.5],
  [6000, "2", 1.625, null, 1.125, 28.5, 1.625, 0.75, 19, null, 0.625, 16],
];
