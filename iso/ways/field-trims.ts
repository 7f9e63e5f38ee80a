/**
 * What a saw at an end would open. With the turns of a whole-elbow way fixed, cutting end 0 back by t makes its straight t
 * longer and changes nothing else, because that straight runs along the end's own axis; likewise at end 1. So the nearest
 * trims need no search: for each solution of the equations whose middle is legal, each end is cut back (or its stub made
 * longer) to the nearest length that is.
 */
import { WAYS_DIRECT_MM } from "../geometry/tolerances";
import { vecAdd, vecAddScaled, vecLength } from "../geometry/vec3";
import type { Vec3 } from "../geometry/types";
import { rulesOf, stockChoices, type Draft } from "./draft";
import { isLegal, reducerPlaces, type StraightRule } from "./layout";
import type { WaysProblem } from "./problem";
import { INCH_MM } from "../units/length";
import { solutionsOf, standardDrafts } from "./standard-search";
import { tapeWords } from "./words";

/** Most of them listed: the nearest ones. */
const LISTED = 6;
/** Farthest an end is cut back, in diameters of its pipe. */
const FARTHEST_ODS = 20;

interface Candidate {
  readonly draft: Draft;
  readonly rules: readonly StraightRule[];
}

/** Solutions of one and two whole elbows by the equations alone. */
function candidates(problem: WaysProblem): Candidate[] {
  return ([1, 2] as const).flatMap((k) => reducerPlaces(problem, k).flatMap((reducerAt) => stockChoices(problem, k, reducerAt).flatMap((turns) => {
    const rules = rulesOf(problem, turns, reducerAt);
    return solutionsOf(problem, turns, reducerAt, rules).map((draft) => ({ draft, rules }));
  })));
}

/** The nearest trims of the ends that open a way of whole elbows, least change first. */
export function fieldTrimDrafts(problem: WaysProblem): Draft[] {
  const { end0, end1 } = problem.input;
  const found = candidates(problem).flatMap(({ draft, rules }) => {
    const xs = draft.lengths.map((length, j) => length - (rules[j]?.baseMm ?? 0));
    const last = xs.length - 1;
    if (xs.some((x, j) => j > 0 && j < last && !legal(x, rules[j]))) return [];
    const first = trimsFor(xs[0], rules[0], end0.fixed === true, problem.pipes[0].odMm);
    const second = trimsFor(xs[last], rules[last], end1.fixed === true, problem.pipes[1].odMm);
    return first.flatMap((t0) => second.flatMap((t1) => (t0 === 0 && t1 === 0 ? [] : [trimmed(draft, t0, t1)])));
  });
  found.sort((a, b) => changeOf(a) - changeOf(b) || (nameOf(a) < nameOf(b) ? -1 : 1));
  const seen = new Set<string>();
  return found.filter((draft) => !seen.has(nameOf(draft)) && seen.add(nameOf(draft)) !== undefined).slice(0, LISTED);
}

function legal(x: number, rule: StraightRule | undefined): boolean {
  return rule !== undefined && isLegal(x, rule);
}

/** Trims that make a straight legal: cut back (positive) to a weld or to a shortest pup, or lengthened (negative) to a weld. */
function trimsFor(x: number | undefined, rule: StraightRule | undefined, fixed: boolean, odMm: number): number[] {
  if (x === undefined || rule === undefined) return [];
  if (isLegal(x, rule)) return [0];
  if (fixed) return [];
  const direct = rule.allowsDirect ? [-x] : [];
  return [...direct, rule.leastMm - x].filter((t) => Math.abs(t) <= FARTHEST_ODS * odMm);
}

function trimmed(draft: Draft, end0Mm: number, end1Mm: number): Draft {
  const last = draft.lengths.length - 1;
  const lengths = draft.lengths.map((length, j) => length + (j === 0 ? end0Mm : 0) + (j === last ? end1Mm : 0));
  return { ...draft, kind: "field-trim", lengths, trims: { end0Mm, end1Mm } };
}

function changeOf({ trims }: Draft): number {
  return Math.round((Math.abs(trims?.end0Mm ?? 0) + Math.abs(trims?.end1Mm ?? 0)) / WAYS_DIRECT_MM);
}

function nameOf({ turns, reducerAt }: Draft): string {
  return `${turns.map((turn) => turn.fitting.name).join(", ")}|${reducerAt ?? ""}`;
}

/** What a field trim asks of the ends, in words. */
export function trimWords(trims: Draft["trims"], units: WaysProblem["input"]["units"]): string {
  const say = (mm: number, end: number) => (mm === 0 ? [] : [mm > 0 ? `end ${end} cut back by ${tapeWords(mm, units)}` : `end ${end} made ${tapeWords(-mm, units)} longer`]);
  return [...say(trims?.end0Mm ?? 0, 0), ...say(trims?.end1Mm ?? 0, 1)].join(", ");
}

/** Moves tried, the least first; how often each is tried with a little more room. */
const MOVES_TRIED = 8;
const ROOM_STEPS = 5;

export interface EndMove {
  readonly move: Vec3;
  readonly names: string;
}

/**
 * The least move of end 1 that makes some pair of whole elbows fit, in steps of a tape along the axes and tried as rounded,
 * so that it holds as it is printed; null when none was found. Moving the end along one straight changes no other.
 */
export function nearestMove(problem: WaysProblem): EndMove | null {
  const step = problem.input.units === "metric" ? 1 : INCH_MM / 16;
  const moves = candidates(problem).filter(({ draft }) => draft.turns.length === 2).flatMap((candidate) => [true, false].map((mayWeld) => ({ candidate, mayWeld, size: vecLength(moveOf(candidate, mayWeld, 0)) })));
  moves.sort((a, b) => a.size - b.size);
  for (const { candidate, mayWeld } of moves.slice(0, MOVES_TRIED)) {
    for (let k = 0; k < ROOM_STEPS; k += 1) {
      const exact = moveOf(candidate, mayWeld, k * step);
      const move = exact.map((part) => Math.round(part / step) * step) as unknown as Vec3;
      const opened = standardDrafts({ ...problem, p1: vecAdd(problem.p1, move) }, 2)[0];
      if (opened) return { move, names: opened.turns.map((turn) => turn.fitting.name).join(" and ") };
    }
  }
  return null;
}

/** What makes every straight of a candidate legal, `room` more where it was short. */
function moveOf({ draft, rules }: Candidate, mayWeld: boolean, room: number): Vec3 {
  return draft.directions.reduce<Vec3>((sum, direction, j) => {
    const [rule, x] = [rules[j], (draft.lengths[j] ?? 0) - (rules[j]?.baseMm ?? 0)];
    if (!rule || isLegal(x, rule)) return sum;
    const pup = rule.leastMm - x + room;
    return vecAddScaled(sum, direction, mayWeld && rule.allowsDirect && Math.abs(x) < Math.abs(pup) ? -x : pup);
  }, [0, 0, 0]);
}
