/**
 * Ways of whole elbows only.
 *
 * One or two elbows. With the angles fixed the middle direction is one of at most two (directions.ts); with the directions
 * fixed the three lengths follow from s0·d0 + s1·u + s2·d = D, three equations for three unknowns. So outside a common
 * plane the ways are isolated, and this list is complete. In a common plane (planar offsets, parallel ends) one equation
 * falls away and a length slides: the ways listed are the corners of that family, where one straight is a weld or a
 * shortest pup; every other member lies between two of them, and none is shorter than the shortest of them.
 *
 * Three elbows in one plane have two lengths that slide: the corners that no other beats in welds and length are listed. Out of a plane they are families.ts' matter.
 */
import { WAYS_ANGLE } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecCross, vecLength, vecPerpendicular, vecSub, vecUnit } from "../geometry/vec3";
import { directionsBetween, planarTurns } from "./directions";
import { isLegalDraft, rulesOf, stockChoices, unbeaten, type Draft, type DraftTurn } from "./draft";
import { boundsOf, reducerPlaces, type StraightRule } from "./layout";
import { threeLengths, twoLengths } from "./lengths";
import type { WaysProblem } from "./problem";
import type { WayKind } from "./ways-types";

const KINDS: readonly WayKind[] = ["straight", "one-standard", "two-standard", "three-standard"];

/** Every legal draft of up to two whole elbows, and of three in one plane. */
export function standardDrafts(problem: WaysProblem, k: 0 | 1 | 2 | 3): Draft[] {
  return reducerPlaces(problem, k).flatMap((reducerAt) =>
    stockChoices(problem, k, reducerAt).flatMap((turns) => {
      const rules = rulesOf(problem, turns, reducerAt);
      const legal = solutionsOf(problem, turns, reducerAt, rules).filter((draft) => isLegalDraft(draft, rules));
      return k < 3 ? legal : [...new Set(legal.map((draft) => draft.directions))].flatMap((same) => unbeaten(legal.filter((draft) => draft.directions === same), () => rules));
    }),
  );
}

/** What the equations alone allow, lengths of any sign: legal or not is asked by others. */
export function solutionsOf(problem: WaysProblem, turns: readonly DraftTurn[], reducerAt: number | null, rules: readonly StraightRule[]): Draft[] {
  const kind = KINDS[turns.length] ?? "three-standard";
  const draft = (directions: readonly Vec3[], lengths: readonly number[]): Draft => ({ kind, turns, reducerAt, directions, lengths });
  const spatial = turns.length === 2 ? spatialPairs(problem, turns) : [];
  return [...spatial, ...planarLengths(problem, turns.map((t) => t.angleRad), rules)].map(([directions, lengths]) => draft(directions, lengths));
}

type Solved = readonly [directions: readonly Vec3[], lengths: readonly number[]];

function spatialPairs({ p0, p1, d0, into1 }: WaysProblem, turns: readonly DraftTurn[]): Solved[] {
  const [first, second] = turns;
  if (!first || !second) return [];
  const way = vecSub(p1, p0);
  return directionsBetween(d0, into1, first.angleRad, second.angleRad).flatMap((u): Solved[] => {
    const lengths = threeLengths(d0, u, into1, way);
    return lengths ? [[[d0, u, into1], lengths]] : [];
  });
}

/** Turns all in one plane: every choice of two straights to be solved for, the others at a bound. */
export function planarLengths(problem: WaysProblem, angles: readonly number[], rules: readonly StraightRule[]): Solved[] {
  const way = vecSub(problem.p1, problem.p0);
  return planarTurns(problem.d0, problem.into1, angles, planeNormal(problem)).flatMap((directions) => {
    const [only] = directions;
    if (directions.length === 1 && only) return straightLength(only, way);
    return freePairs(directions.length).flatMap((pair) => boundChoices(rules, pair).flatMap((fixed) => planarSolved(directions, pair, fixed, way) ?? []));
  });
}

function straightLength(direction: Vec3, way: Vec3): Solved[] {
  const side = vecUnit(vecPerpendicular(direction));
  const lengths = side ? twoLengths(direction, side, way) : null;
  return lengths && Math.abs(lengths[1]) <= WAYS_ANGLE * Math.abs(lengths[0]) ? [[[direction], [lengths[0]]]] : [];
}

function planarSolved(directions: readonly Vec3[], [i, j]: readonly [number, number], fixed: ReadonlyMap<number, number>, way: Vec3): Solved[] | null {
  const [a, b] = [directions[i], directions[j]];
  if (!a || !b) return null;
  let rest = way;
  for (const [k, length] of fixed) rest = vecAddScaled(rest, directions[k] ?? a, -length);
  const pair = twoLengths(a, b, rest);
  return pair ? [[directions, directions.map((_, k) => (k === i ? pair[0] : k === j ? pair[1] : (fixed.get(k) ?? 0)))]] : null;
}

function freePairs(count: number): (readonly [number, number])[] {
  return Array.from({ length: count }, (_, i) => i).flatMap((i) => Array.from({ length: count - i - 1 }, (_, d) => [i, i + 1 + d] as const));
}

/** Lengths of the straights that are not solved for, each at one of its bounds. */
function boundChoices(rules: readonly StraightRule[], pair: readonly [number, number]): ReadonlyMap<number, number>[] {
  let choices: ReadonlyMap<number, number>[] = [new Map()];
  rules.forEach((rule, k) => {
    if (pair.includes(k)) return;
    choices = choices.flatMap((before) => boundsOf(rule).map((x) => new Map([...before, [k, rule.baseMm + x]])));
  });
  return choices;
}

/** The plane of both axes; of the axis and the other end where the axes are parallel; any where all is on one line. */
export function planeNormal({ d0, into1, p0, p1 }: WaysProblem): Vec3 {
  const ofAxes = vecCross(d0, into1);
  if (vecLength(ofAxes) > WAYS_ANGLE) return vecUnit(ofAxes) ?? vecPerpendicular(d0);
  const towards = vecUnit(vecSub(p1, p0));
  const ofWay = towards ? vecCross(d0, towards) : d0;
  return towards && vecLength(ofWay) > WAYS_ANGLE ? (vecUnit(ofWay) ?? vecPerpendicular(d0)) : vecPerpendicular(d0);
}
