/**
 * Every sensible way to close between two ends, as far as it is found at once: pipe alone, one and two whole elbows, a
 * trimmed pair, one trimmed, mitres, field trims. Three elbows take longer: three-elbow.ts.
 */
import type { Draft } from "./draft";
import { fieldTrimDrafts, trimWords } from "./field-trims";
import { mitreWays } from "./mitres";
import { oneTrimmedDrafts } from "./one-trimmed";
import { uniqueWays } from "./order";
import { waysProblem, type WaysProblem } from "./problem";
import { oneTrimmedRefusal, standardRefusal } from "./refusals";
import { standardDrafts } from "./standard-search";
import { refusedPair, trimmedPairs } from "./trimmed-pair";
import { wayOf } from "./way";
import type { Way, WayRefusal, WaysInput, WaysResult } from "./ways-types";

/** The ways that need no long search, each kind's refusal where it has none. Never throws on user data. */
export function quickWays(input: WaysInput): WaysResult {
  const problem = waysProblem(input);
  if (typeof problem === "string") return { ok: false, sentence: problem };
  const made = (drafts: readonly Draft[]) => drafts.flatMap((draft) => wayOf(problem, draft) ?? []);
  const standard = pairsOfWhole(problem);
  const pairs = trimmedPairs(problem);
  const one = made(oneTrimmedDrafts(problem));
  const path = pairs.paths[0] ?? refusedPair(problem);
  const mitred = path ? mitreWays(problem, path) : [];
  const trims = made(fieldTrimDrafts(problem).map((draft) => withTrimWords(problem, draft)));
  const trimmed = pairs.ways.filter((way) => way.trimmedCuts > 0 || !standard.some((other) => sameCorners(way, other)));
  const refusals: WayRefusal[] = [
    ...(standard.length === 0 ? [standardRefusal(problem)] : []),
    ...(pairs.refusal ? [pairs.refusal] : []),
    ...(one.length === 0 && input.trimMaxDeg > 0 ? [oneTrimmedRefusal()] : []),
    ...(mitred.length === 0 ? [{ about: "mitre" as const, sentence: "No mitre: it takes the turns of a trimmed pair, and those do not close or leave a piece no length.", whatWouldWork: null }] : []),
  ];
  return { ok: true, ways: uniqueWays([...standard, ...trimmed, ...one, ...mitred, ...trims]), refusals, notes: notesOf(problem, standard) };
}

/** Pipe alone and every way of one or two whole elbows; none for a question that is wrong. */
export function standardWays(input: WaysInput): readonly Way[] {
  const problem = waysProblem(input);
  return typeof problem === "string" ? [] : uniqueWays(pairsOfWhole(problem));
}

function pairsOfWhole(problem: WaysProblem): Way[] {
  return ([0, 1, 2] as const).flatMap((k) => standardDrafts(problem, k).flatMap((draft) => wayOf(problem, draft) ?? []));
}

function withTrimWords({ input }: WaysProblem, draft: Draft): Draft {
  const words = trimWords(draft.trims, input.units);
  return { ...draft, warnings: [`${words.charAt(0).toUpperCase()}${words.slice(1)}. Finished and supplied lengths of that end change with it.`] };
}

function sameCorners(a: Way, b: Way): boolean {
  return a.turns.length === b.turns.length && a.turns.every((turn, i) => turn.corner.every((part, axis) => Math.abs(part - (b.turns[i]?.corner[axis] ?? Infinity)) < SAME_CORNER_MM));
}

/** Two corners nearer than this are one on paper and on the bench, mm. */
const SAME_CORNER_MM = 0.01;

function notesOf(problem: WaysProblem, standard: readonly Way[]): string[] {
  const planar = standard.filter((way) => way.turns.length === 2 && isPlanar(way)).length > 1;
  return [
    ...(planar ? ["In one plane a straight may slide: between two of the listed ways of the same elbows every position closes, none shorter than the shortest listed."] : []),
    ...(problem.input.keepOuts.length > 0 ? ["Keep-out is judged for the ways found; a family is searched with one straight held at its shortest."] : []),
    ...(problem.reducer ? ["The reducer is concentric, welded to the fitting or end before it."] : []),
  ];
}

function isPlanar({ straights }: Way): boolean {
  const [a, b, c] = straights.map((s) => s.direction);
  if (!a || !b || !c) return false;
  const triple = a[0] * (b[1] * c[2] - b[2] * c[1]) + a[1] * (b[2] * c[0] - b[0] * c[2]) + a[2] * (b[0] * c[1] - b[1] * c[0]);
  return Math.abs(triple) < SAME_CORNER_MM;
}
