/**
 * Names of take-outs. A key is what a shop's own word (confirmed, or measured otherwise) hangs on, so it never changes:
 * kind, then what tells its rows apart, joined by colons.
 */
import type { Nps, RatingClass } from "../run/document";

/** Classes of forged fittings (B16.11): socket-weld come in 3000 and 6000, threaded in all three. */
export type ForgedClass = 2000 | 3000 | 6000;
export type ElbowName = "lr-90" | "sr-90" | "lr-45" | "sr-45";
export type FlangeName = "weld-neck" | "slip-on" | "socket-weld" | "threaded" | "lap-joint" | "blind";
/** "ball" is the long pattern, "ball-short" the short one; "butterfly" the concentric wafer, "butterfly-offset" the high-performance one. */
export type ValveName = "gate" | "globe" | "check" | "ball" | "ball-short" | "butterfly" | "butterfly-offset";
export type ValveEnds = "flanged" | "butt" | "socket" | "threaded";
export type SocketFitting = "sw-90" | "sw-45" | "tee" | "cross" | "coupling" | "half-coupling" | "cap" | "union" | "depth";
export type ThreadedFitting = "th-90" | "th-45" | "tee" | "cross" | "coupling" | "half-coupling" | "cap" | "union";

/** Centre to end of a butt-welding elbow. No standard tabulates a short-radius 45: that key waits for the shop's own measure. */
export function elbowKey(elbow: ElbowName, nps: Nps): string {
  return `elbow:${elbow}:${nps}`;
}

/** 180 degree return: "centres" is O, centre to centre of its two ends; "back" is K, from the ends' plane to the outside of the back. */
export function returnKey(radius: "LR" | "SR", part: "centres" | "back", nps: Nps): string {
  return `return:${radius.toLowerCase()}:${part}:${nps}`;
}

/** Centre to run end of a butt-welding cross (B16.9 gives tees and crosses one table). */
export function crossRunKey(runNps: Nps, branchNps: Nps = runNps): string {
  return `cross-run:${runNps}:${branchNps}`;
}

/** Centre to branch end of a butt-welding cross, either side. */
export function crossBranchKey(runNps: Nps, branchNps: Nps = runNps): string {
  return `cross-branch:${runNps}:${branchNps}`;
}

/** Lap-joint stub end: F, from the lap's contact face to the weld end (the lap included). */
export function stubEndKey(pattern: "long" | "short", nps: Nps): string {
  return `stub-end:${pattern}:${nps}`;
}

/** Centre to run end of a butt-welding tee; a straight tee when the branch is left out. */
export function teeRunKey(runNps: Nps, branchNps: Nps = runNps): string {
  return `tee-run:${runNps}:${branchNps}`;
}

/** Centre to branch end of a butt-welding tee. */
export function teeBranchKey(runNps: Nps, branchNps: Nps = runNps): string {
  return `tee-branch:${runNps}:${branchNps}`;
}

/** End to end of a butt-welding reducer, either way round. */
export function reducerKey(largeNps: Nps, smallNps: Nps): string {
  return `reducer:${largeNps}:${smallNps}`;
}

/** Length of a butt-welding cap; the longer E1 for walls over the table's limit (see capLimitWallMm). */
export function capKey(nps: Nps, isHeavy = false): string {
  return isHeavy ? `cap-heavy:${nps}` : `cap:${nps}`;
}

/**
 * Length through hub of a flange, as tabulated: with the 1/16 in face in classes 150 and 300, without the 1/4 in face
 * from class 400 up (see weldNeckLengthMm). A slip-on's and a lap-joint's are no take-outs; a blind's is its thickness.
 */
export function flangeHubKey(flange: FlangeName, ratingClass: RatingClass, nps: Nps): string {
  return flange === "blind" ? flangeThicknessKey(ratingClass, nps) : `flange-hub:${flange}:${ratingClass}:${nps}`;
}

/** Thickness of a flange (and of a blind), as tabulated: faces as for the hub. */
export function flangeThicknessKey(ratingClass: RatingClass, nps: Nps): string {
  return `flange-thickness:${ratingClass}:${nps}`;
}

/** Face to face (or end to end) of a valve: the WHOLE length, of which a centre takes half. */
export function valveKey(valve: ValveName, ratingClass: RatingClass, nps: Nps, ends: ValveEnds): string {
  return `valve:${valve}:${ratingClass}:${nps}:${ends}`;
}

/** Height of an outlet from the run's surface to the branch weld end; to the socket's bottom, or the threaded end, where no table was read. */
export function outletKey(branchNps: Nps, runNps: Nps, ends: "butt" | "socket" | "threaded" = "butt"): string {
  return `${ends === "butt" ? "" : `${ends}-`}outlet:${branchNps}:${runNps}`;
}

/**
 * Socket-welding fittings: centre to socket bottom (90, 45, tee, cross), laying length (coupling and union: bottom to
 * bottom; half coupling: bottom to far end), cap: socket bottom to outside end, least socket depth ("depth").
 */
export function socketKey(fitting: SocketFitting, forgedClass: ForgedClass, nps: Nps): string {
  return `socket:${fitting}:${forgedClass}:${nps}`;
}

/** Depth of the socket in a socket-weld flange (B16.5), the same in every class. */
export function socketFlangeDepthKey(nps: Nps): string {
  return `flange-socket:depth:${nps}`;
}

/**
 * Threaded fittings, to the END of the fitting: centre to end (90, 45, tee, cross), end to end (coupling, union), open
 * end to far end (half coupling, cap). The pipe goes in from there by the thread's engagement.
 */
export function threadedKey(fitting: ThreadedFitting, forgedClass: ForgedClass, nps: Nps): string {
  return `threaded:${fitting}:${forgedClass}:${nps}`;
}

/** Normal engagement of a taper pipe thread, hand-tight plus wrench make-up: what a pipe goes into a threaded fitting. */
export function threadEngagementKey(nps: Nps): string {
  return `thread:engagement:${nps}`;
}

/** The shop's own weight of a part in KILOGRAMS (its word's number is kg, not mm), by what tells one part from another. */
export function weightKey(part: string): string {
  return `weight:${part}`;
}
