/**
 * Names of take-outs. A key is what a shop's own word (confirmed, or measured otherwise) hangs on, so it never changes:
 * kind, then what tells its rows apart, joined by colons.
 */
import type { Nps, RatingClass } from "../run/document";
import type { SocketClass } from "./b16-11-socket";

export type ElbowName = "lr-90" | "sr-90" | "lr-45";
export type FlangeName = "weld-neck" | "slip-on" | "socket-weld" | "blind";
export type ValveName = "gate" | "globe" | "check" | "ball" | "ball-short" | "butterfly";
export type ValveEnds = "flanged" | "butt" | "socket";
export type SocketFitting = "sw-90" | "sw-45" | "tee" | "coupling" | "half-coupling" | "depth";

/** Centre to end of a butt-welding elbow. */
export function elbowKey(elbow: ElbowName, nps: Nps): string {
  return `elbow:${elbow}:${nps}`;
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

/** Length of a butt-welding cap. */
export function capKey(nps: Nps): string {
  return `cap:${nps}`;
}

/**
 * Length through hub of a flange, as tabulated: with the 1/16 in face in classes 150 and 300, without the 1/4 in face
 * from class 400 up (see weldNeckLengthMm). A slip-on's is no take-out; a blind's is its thickness.
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

/** Height of a butt-weld outlet from the run's surface to the branch weld end. */
export function outletKey(branchNps: Nps, runNps: Nps): string {
  return `outlet:${branchNps}:${runNps}`;
}

/**
 * Socket-welding fittings: centre to socket bottom (90, 45, tee), laying length (coupling: bottom to bottom; half
 * coupling: bottom to far end), least socket depth ("depth").
 */
export function socketKey(fitting: SocketFitting, socketClass: SocketClass, nps: Nps): string {
  return `socket:${fitting}:${socketClass}:${nps}`;
}
