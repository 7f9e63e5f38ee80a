/** Where ink under a leader begins to count: what it names, and the pipe it starts from, are no foreign ink. */
import type { PaperPoint } from "../geometry/types";

/** A leader no longer than this has no room to touch anything. */
const LEADER_NONE = 1.6;
/** Half the pipe's width on the ink map and a hair: so far beside its pipe a leader has left it, mm. */
const PIPE_LEFT = 1.25;
/** A little beyond the anchor nothing counts, mm. */
const NEAR_ANCHOR = 0.9;
/** cos 9°: nearer than this to a pipe or an axis a leader reads as one of them. */
export const ALONG_COSINE = Math.cos((9 * Math.PI) / 180);
/** Nearer to the pipe than this (cosine) a leader could run over the next weld instead of its own symbol. */
const BESIDE_COSINE = 0.85;

/**
 * Length of a leader's start that counts for nothing, by its direction.
 * @param along paper directions of the pipe at the anchor
 * @param clear the leader starts this far from the anchor, mm
 * @param own so far from the anchor it runs over the symbol it names, mm
 */
export function leaderSkip(along: readonly PaperPoint[], clear: number, own: number, dx: number, dy: number): number {
  let beside = 0;
  for (const way of along) beside = Math.max(beside, Math.abs(way[0] * dx + way[1] * dy));
  const left = along.length === 0 || beside > ALONG_COSINE ? 0 : PIPE_LEFT / Math.sqrt(1 - beside * beside);
  return Math.max(NEAR_ANCHOR, left - clear, beside < BESIDE_COSINE ? own - clear : 0);
}

/** True when a leader is too short to run over anything. */
export const leaderIsShort = (lengthMm: number): boolean => lengthMm <= LEADER_NONE;
