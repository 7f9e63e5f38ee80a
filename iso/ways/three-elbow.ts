/**
 * Three whole elbows. For every choice of angles the directions form loops (families.ts); along a loop the four lengths
 * have one freedom left, in which the sum is linear, so that the shortest member always has one straight at a bound: its
 * faces welded, or its pup the shortest. For each of these the other three lengths follow from the three equations of the
 * way (Cramer's rule), and the loop is walked (scan.ts). Kept: every local shortest, and every member with faces welded at
 * two straights. Three elbows in one plane are corners of their own families: standard-search.ts.
 *
 * The grid: WALK_STEPS places round each loop. A search ten times finer, done by another program, is the test.
 */
import { WAYS_AT_BOUND_MM, WAYS_BESIDE_RAD, WAYS_CLOSES_MM, WAYS_DIRECT_MM } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecSub } from "../geometry/vec3";
import { isLegalDraft, rulesOf, stockChoices, totalOf, unbeaten, type Draft, type DraftTurn } from "./draft";
import { directionLoops, type DirectionLoop, type ThreeAngles } from "./families";
import { keepOutOf } from "./keep-out";
import { boundsOf, reducerPlaces, type StraightRule } from "./layout";
import { threeLengths } from "./lengths";
import { centreLine, cornersOf } from "./path";
import { waysProblem, type WaysProblem } from "./problem";
import { scanFamily, type PlaceAt, type ScanPlace } from "./scan";
import { standardDrafts } from "./standard-search";
import { uniqueWays } from "./order";
import { wayOf } from "./way";
import type { Way, WaysInput, WaysTick } from "./ways-types";

/** Places round each loop of directions: one every 1.5 degrees of its parameter. */
export const WALK_STEPS = 240;

export interface ThreeElbowResult {
  readonly ways: readonly Way[];
  /** False when the search was stopped before its end. */
  readonly complete: boolean;
}

/** A choice of three elbows and the place of the reducer, as the search takes them one after the other. */
interface Task {
  readonly turns: readonly DraftTurn[];
  readonly reducerAt: number | null;
}

/**
 * Every local shortest way of three whole elbows. Deterministic. @param tick called after each choice of elbows; true stops.
 * @param found hears each new way as it comes.
 */
export function threeElbowWays(input: WaysInput, tick: WaysTick = () => false, found: (ways: readonly Way[]) => void = () => undefined): ThreeElbowResult {
  const problem = waysProblem(input);
  if (typeof problem === "string") return { ways: [], complete: true };
  const tasks = reducerPlaces(problem, 3).flatMap((reducerAt) => stockChoices(problem, 3, reducerAt).map((turns): Task => ({ turns, reducerAt })));
  let ways: readonly Way[] = standardDrafts(problem, 3).flatMap((draft) => wayOf(problem, draft) ?? []);
  if (ways.length > 0) found(ways);
  for (const [i, task] of tasks.entries()) {
    const more = spatialDrafts(problem, task).flatMap((draft) => wayOf(problem, draft) ?? []);
    if (more.length > 0) found(more);
    ways = [...ways, ...more];
    if (tick(i + 1, tasks.length)) return { ways: uniqueWays(ways), complete: i + 1 === tasks.length };
  }
  return { ways: uniqueWays(ways), complete: true };
}

/** Members of one choice of elbows: every local shortest, and of those with two pairs of faces welded the ones nothing beats. */
function spatialDrafts(problem: WaysProblem, { turns, reducerAt }: Task): Draft[] {
  const rules = rulesOf(problem, turns, reducerAt);
  const angles = turns.map((t) => t.angleRad) as unknown as ThreeAngles;
  const found = directionLoops(problem.d0, problem.into1, angles).flatMap((loop) => {
    const walked = Array.from({ length: WALK_STEPS }, (_, k) => loop((2 * Math.PI * k) / WALK_STEPS));
    return rules.flatMap((rule, pinned) => boundsOf(rule).map((x) => pinnedDrafts({ problem, task: { turns, reducerAt }, rules, loop, pinned, x }, walked)));
  });
  const shortest = found.flatMap((each) => each.shortest);
  const welded = unbeaten([...shortest, ...found.flatMap((each) => each.welded)], () => rules);
  return [...shortest, ...welded.filter((draft) => !shortest.includes(draft))];
}

/** A loop with one straight held at a bound. */
interface Pinned {
  readonly problem: WaysProblem;
  readonly task: Task;
  readonly rules: readonly StraightRule[];
  readonly loop: DirectionLoop;
  readonly pinned: number;
  readonly x: number;
}

function pinnedDrafts(pin: Pinned, walked: readonly ReturnType<DirectionLoop>[]): { shortest: Draft[]; welded: Draft[] } {
  const { problem, task, rules, loop, pinned } = pin;
  const way = vecSub(problem.p1, problem.p0);
  const lengthsFor = (directions: ReturnType<DirectionLoop>) => (directions ? fourLengths(directions, pinned, (rules[pinned]?.baseMm ?? 0) + pin.x, way) : null);
  const placeFor = (directions: ReturnType<DirectionLoop>): ScanPlace | null => placeOf(problem, task, rules, directions, lengthsFor(directions), pinned);
  const at: PlaceAt = (t) => placeFor(loop(t));
  const scanned = scanFamily(at, walked.map(placeFor));
  const legal = (t: number): Draft[] => {
    const directions = loop(t);
    const lengths = lengthsFor(directions);
    if (!directions || !lengths) return [];
    const draft: Draft = { kind: "three-standard", ...task, directions, lengths };
    return isLegalDraft(draft, rules) ? [draft] : [];
  };
  return {
    shortest: scanned.shortest.flatMap((t) => legal(t).filter((draft) => isBest(draft, t, pin))),
    welded: scanned.welded.flatMap(legal),
  };
}

/** The four lengths with one of them given; null where the other three directions lie in one plane. */
function fourLengths(directions: readonly Vec3[], pinned: number, length: number, way: Vec3): number[] | null {
  const others = directions.filter((_, j) => j !== pinned);
  const [a, b, c] = others;
  const given = directions[pinned];
  if (!a || !b || !c || !given) return null;
  const three = threeLengths(a, b, c, vecAddScaled(way, given, -length));
  if (!three) return null;
  let k = 0;
  return directions.map((_, j) => (j === pinned ? length : (three[k++] ?? 0)));
}

function placeOf(problem: WaysProblem, task: Task, rules: readonly StraightRule[], directions: readonly Vec3[] | null, lengths: readonly number[] | null, pinned: number): ScanPlace | null {
  if (!directions || !lengths) return null;
  const room: number[] = [];
  const apart: number[] = [];
  let lengthMm = 0;
  rules.forEach((rule, j) => {
    const length = lengths[j] ?? 0;
    lengthMm += length;
    if (j === pinned) return;
    const x = length - rule.baseMm;
    room.push(x - rule.leastMm);
    apart.push(rule.allowsDirect ? x : NaN);
  });
  return { lengthMm, room, apart, spare: spareOf(problem, task, directions, lengths, room) };
}

/** Clearance is asked only where the lengths are near enough to legal to matter. */
function spareOf(problem: WaysProblem, { turns, reducerAt }: Task, directions: readonly Vec3[], lengths: readonly number[], room: readonly number[]): number {
  const { keepOuts } = problem.input;
  if (keepOuts.length === 0 || room.some((r) => !(r > -LENGTH_OF_INTEREST_MM))) return 0;
  const draft: Draft = { kind: "three-standard", turns, reducerAt, directions, lengths };
  const odMm = Math.max(problem.pipes[0].odMm, problem.pipes[1].odMm);
  return keepOutOf(centreLine(draft, cornersOf(draft, problem.p0)), odMm, keepOuts).spareMm ?? 0;
}

/** Farther than this from legal, a member's clearance is not asked. */
const LENGTH_OF_INTEREST_MM = 2_000;

/**
 * Whether a shortest place along one bound is a shortest place of the whole family: no member beside it is shorter, neither
 * with the pinned pup longer nor along the bound of another straight that stands at its own. Welded faces have no beside.
 */
function isBest({ lengths }: Draft, t: number, { problem, task, rules, loop, pinned, x }: Pinned): boolean {
  if (x === 0) return true;
  const way = vecSub(problem.p1, problem.p0);
  const least = totalOf(lengths);
  const atBound = rules.flatMap((rule, j) => (Math.abs((lengths[j] ?? 0) - rule.baseMm - rule.leastMm) <= WAYS_AT_BOUND_MM ? [j] : []));
  const shorter = (directions: ReturnType<DirectionLoop>, j: number, more: number): boolean => {
    const rule = rules[j];
    const beside = directions && rule ? fourLengths(directions, j, rule.baseMm + rule.leastMm + more, way) : null;
    if (!beside || totalOf(beside) >= least - WAYS_CLOSES_MM) return false;
    return beside.every((length, k) => length - (rules[k]?.baseMm ?? 0) >= (rules[k]?.leastMm ?? 0) - WAYS_DIRECT_MM / 10) && (placeOf(problem, task, rules, directions, beside, j)?.spare ?? 0) >= 0;
  };
  return ![loop(t), loop(t - WAYS_BESIDE_RAD), loop(t + WAYS_BESIDE_RAD)].some((directions, side) => [...new Set([pinned, ...atBound])].some((j) => (side > 0 && shorter(directions, j, 0)) || shorter(directions, j, WAYS_AT_BOUND_MM)));
}
