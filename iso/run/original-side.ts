/**
 * Names that outlive a reversal. A point that was turned round an odd number of times says `in` where it used to say
 * `out`; keys of joints and ids of parts are formed with the side as it was first, so that marks stay on the same steel.
 */
import type { Stretch } from "./build-types";

/** The side as the point had it when it was made; `branch` and `branch-2` have no other. */
export function originalSide<S extends string>(point: { readonly flipped?: boolean | undefined }, side: S): S | "in" | "out" {
  if (!point.flipped) return side;
  return side === "in" ? "out" : side === "out" ? "in" : side;
}

/**
 * Key of the one weld where two fittings meet face to face: each of them has a name for it, and the same one must be
 * chosen whichever way the run is walked. A branch's own point wins over the fitting it leaves from.
 */
export function sharedWeldKey(s: Stretch, startKey: string, endKey: string): string {
  const ownRun = s.legs[0]?.runId ?? s.to.runId;
  const [fromOwn, toOwn] = [s.from.runId === ownRun, s.to.runId === ownRun];
  if (fromOwn !== toOwn) return toOwn ? endKey : startKey;
  return isTurnedRound(s) ? startKey : endKey;
}

/** Whether a stretch is walked the other way than its names were given; the answer changes with every reversal of its run. */
export function isTurnedRound({ from, to, legs }: Stretch): boolean {
  const [fromFlipped, toFlipped] = [from.point.flipped === true, to.point.flipped === true];
  if (from.runId !== (legs[0]?.runId ?? to.runId)) return toFlipped;
  return fromFlipped === toFlipped ? toFlipped : from.uid < to.uid;
}
