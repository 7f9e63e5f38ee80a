/**
 * What a row of fittings asks of the straights between them. Along straight j the corners stand s apart; what is left
 * between the two faces beyond one root gap is x = s - T - T' - g (less the reducer and its gap where it stands here).
 * x = 0: the faces are welded to each other. Else a pipe stands between: x = g + cut, and the cut is a pup at least.
 */
import { WAYS_DIRECT_MM } from "../geometry/tolerances";
import type { WaysPipe, WaysProblem } from "./problem";

/** A turn before it has a place. */
export interface TurnSpec {
  readonly takeOutMm: number;
  readonly angleRad: number;
}

/** What is asked of one straight. */
export interface StraightRule {
  /** Corner-to-corner length at which the faces are welded to each other. */
  readonly baseMm: number;
  /** Least x with a pipe in between. */
  readonly leastMm: number;
  readonly allowsDirect: boolean;
}

/** Pipe of straight j when the reducer stands in straight r (null = one size throughout): the size after the reducer. */
export function pipeAt({ pipes }: WaysProblem, j: number, reducerAt: number | null): WaysPipe {
  return reducerAt !== null && j >= reducerAt ? pipes[1] : pipes[0];
}

/** Places the reducer may stand in among k + 1 straights. */
export function reducerPlaces({ reducer }: WaysProblem, k: number): readonly (number | null)[] {
  return reducer === null ? [null] : Array.from({ length: k + 1 }, (_, j) => j);
}

/** Rules of the straights before, between and after the take-outs, in order. */
export function straightRules(problem: WaysProblem, takeOuts: readonly number[], reducerAt: number | null): StraightRule[] {
  const { gapMm, reducer, input } = problem;
  return Array.from({ length: takeOuts.length + 1 }, (_, j) => {
    const reducing = reducerAt === j && reducer ? reducer.lengthMm + gapMm : 0;
    const asked = Math.max(j === 0 ? input.end0.straightMm : 0, j === takeOuts.length ? input.end1.straightMm : 0);
    return {
      baseMm: (takeOuts[j - 1] ?? 0) + (takeOuts[j] ?? 0) + gapMm + reducing,
      leastMm: Math.max(gapMm + pipeAt(problem, j, reducerAt).leastPupMm, asked),
      allowsDirect: asked === 0,
    };
  });
}

/** Whether x leaves the faces welded to each other or room for a pipe. */
export function isLegal(xMm: number, { leastMm, allowsDirect }: StraightRule): boolean {
  return xMm >= leastMm - WAYS_DIRECT_MM || (allowsDirect && Math.abs(xMm) <= WAYS_DIRECT_MM);
}

/** The values of x at which a straight may not give way any further. */
export function boundsOf({ leastMm, allowsDirect }: StraightRule): readonly number[] {
  return allowsDirect ? [0, leastMm] : [leastMm];
}
