/**
 * Two elbows cut to measure: the closing of iso/closing/solver.ts, which is the only one for its radii and straights. With a
 * change of size the reducer is welded to an end, or to the first elbow's face in the middle.
 */
import { CLOSING_STANDARD_ANGLE } from "../geometry/tolerances";
import { vecNegate } from "../geometry/vec3";
import { closingAdvice } from "../closing/advice";
import type { ClosingInput, ClosingSolution } from "../closing/closing-types";
import { closingSensitivity } from "../closing/sensitivity";
import { solveClosing } from "../closing/solver";
import { INCH_MM } from "../units/length";
import { trimmedTurn, type Draft, type DraftTurn } from "./draft";
import { pipeAt, reducerPlaces } from "./layout";
import type { WaysProblem } from "./problem";
import { trimStock } from "./stock";
import { told } from "./way-sensitivity";
import { USUAL_ERROR_MM, wayOf } from "./way";
import type { ElbowRadius, Way, WayRefusal, WaySensitivity } from "./ways-types";

/** How far the gap of an elbow ground to an elbow may be from the root gap (common practice). */
const GROUND_WITHIN_MM = INCH_MM / 64;
const DEG = 180 / Math.PI;

interface Asked {
  readonly radii: readonly [ElbowRadius, ElbowRadius];
  readonly reducerAt: number | null;
  readonly closing: ClosingInput;
}

/** A path of two cut turns, and what an error at an end does to it. */
export interface CutPath {
  readonly draft: Draft;
  readonly rates: WaySensitivity | undefined;
}

export interface TrimmedPairs {
  readonly ways: readonly Way[];
  readonly paths: readonly CutPath[];
  readonly refusal: WayRefusal | null;
}

/** The trimmed pair of each choice of radii, and why there is none where none of them closes. */
export function trimmedPairs(problem: WaysProblem): TrimmedPairs {
  if (problem.input.trimMaxDeg === 0) return { ways: [], paths: [], refusal: { about: "trimmed-pair", sentence: "No elbow is trimmed here.", whatWouldWork: "Allow trimming, with the engineer's permission." } };
  const asked = reducerPlaces(problem, 2).flatMap((reducerAt) => radiiPairs(problem).flatMap((radii) => askedOf(problem, radii, reducerAt) ?? []));
  const paths: CutPath[] = [];
  const ways: Way[] = [];
  for (const each of asked) {
    const solution = solveClosing(each.closing).solutions[0];
    const draft = solution ? draftOf(problem, each, solution) : null;
    if (!solution || !draft) continue;
    const path = { draft, rates: ratesOf(problem, each.closing, solution) };
    paths.push(path);
    ways.push(...[wayOf(problem, draft, path.rates)].filter((way) => way !== null));
  }
  return { ways, paths, refusal: ways.length > 0 ? null : refusalOf(problem, asked) };
}

/** The only path there is where it was refused for bending an elbow too far: a mitre may still take it. */
export function refusedPair(problem: WaysProblem): CutPath | null {
  const radius = problem.input.radii[0] ?? "LR";
  const asked = askedOf({ ...problem, input: { ...problem.input, trimMaxDeg: problem.input.trimMaxDeg || 90 } }, [radius, radius], problem.reducer ? 0 : null);
  const result = asked ? solveClosing(asked.closing) : null;
  const path = result?.solutions[0] ?? (result?.reason === "theta-max" ? result.nearest : null);
  const draft = asked && path ? draftOf(problem, asked, path) : null;
  return asked && path && draft ? { draft, rates: ratesOf(problem, asked.closing, path) } : null;
}

function radiiPairs({ input }: WaysProblem): (readonly [ElbowRadius, ElbowRadius])[] {
  const radii = (["LR", "SR"] as const).filter((r) => input.radii.includes(r));
  return radii.flatMap((first) => radii.map((second) => [first, second] as const));
}

function askedOf(problem: WaysProblem, radii: Asked["radii"], reducerAt: number | null): Asked | null {
  const { input, gapMm, reducer } = problem;
  const [first, second] = radii.map((radius, i) => trimStock(radius, pipeAt(problem, i, reducerAt).nps, input));
  if (!first || !second) return null;
  const reducing = (j: number) => (reducerAt === j && reducer ? reducer.lengthMm + gapMm : 0);
  return {
    radii, reducerAt,
    closing: {
      p0: problem.p0, p1: problem.p1, d0: problem.d0, d1: vecNegate(problem.into1), r0: first.mm, r1: second.mm,
      a: input.end0.straightMm + reducing(0), b: input.end1.straightMm + reducing(2), gap: gapMm, thetaMax: input.trimMaxDeg / DEG,
      tolerance: input.toleranceMm ?? USUAL_ERROR_MM, elbowToElbowWithin: GROUND_WITHIN_MM,
    },
  };
}

/** Lengths from corner to corner; null where a reducer in the middle has no room. */
function draftOf(problem: WaysProblem, { radii, reducerAt, closing }: Asked, solution: ClosingSolution): Draft | null {
  const has = [solution.kind !== "single1" && solution.kind !== "straight", solution.kind !== "single0" && solution.kind !== "straight"];
  const all = ([0, 1] as const).map((i) => turnOf(problem, radii[i], i === 0 ? solution.theta0 : solution.theta1, i, reducerAt));
  const turns = all.filter((turn, i): turn is DraftTurn => has[i] === true && turn !== null);
  const [t0, t1] = [has[0] ? solution.takeoff0 : 0, has[1] ? solution.takeoff1 : 0];
  const parts = [closing.a + closing.gap + t0, solution.length + 2 * closing.gap + t0 + t1, closing.b + closing.gap + t1];
  const room = solution.length - closing.gap - (reducerAt === 1 && problem.reducer ? problem.reducer.lengthMm + closing.gap : -closing.gap);
  if (reducerAt === 1 && (room < 0 || turns.length < 2)) return null;
  const directions = [...(has[0] ? [problem.d0] : []), solution.u, ...(has[1] ? [problem.into1] : [])];
  const lengths = has[0] && has[1] ? parts : has[0] ? [parts[0] ?? 0, (parts[1] ?? 0) + (parts[2] ?? 0)] : has[1] ? [(parts[0] ?? 0) + (parts[1] ?? 0), parts[2] ?? 0] : [parts.reduce((sum, part) => sum + part, 0)];
  const shaky = solveClosing(closing).warnings.includes("ill-conditioned");
  return {
    kind: "trimmed-pair", turns, directions, lengths, reducerAt: reducerAt === null ? null : Math.min(reducerAt, turns.length),
    ...(solution.kind === "elbow-to-elbow" ? { ground: 1 } : {}),
    ...(shaky ? { warnings: ["The error of the measurements turns a bend by more than 1°: measure again, twice, or leave room for a longer pipe."] } : {}),
  };
}

function turnOf(problem: WaysProblem, radius: ElbowRadius, angleRad: number, i: number, reducerAt: number | null): DraftTurn | null {
  const { nps } = pipeAt(problem, i, reducerAt);
  const stock = trimStock(radius, nps, problem.input);
  if (!stock) return null;
  const turn = trimmedTurn(radius, stock, angleRad, nps);
  const isWhole = Math.abs(angleRad - Math.PI / 2) <= CLOSING_STANDARD_ANGLE;
  return isWhole ? { ...turn, fitting: { make: "elbow", name: `${radius} 90`, radius, whole: true, tabulated: true }, source: stock.source } : turn;
}

function ratesOf({ input }: WaysProblem, closing: ClosingInput, solution: ClosingSolution): WaySensitivity | undefined {
  const rates = closingSensitivity(closing, solution);
  if (!rates) return undefined;
  const perMm = input.toleranceMm ?? USUAL_ERROR_MM;
  const most = (column: readonly number[]) => Math.max(Math.hypot(...column.slice(0, 3)), Math.hypot(...column.slice(6, 9))) * perMm;
  const bendDeg = Math.max(most(rates.theta0), most(rates.theta1), most(rates.roll)) * DEG;
  return told({ bendDeg, lengthMm: most(rates.length), perMm, takenBy: "bends" }, input.units);
}

function refusalOf(problem: WaysProblem, asked: readonly Asked[]): WayRefusal {
  const first = asked[0];
  if (!first) return { about: "trimmed-pair", sentence: "The tables have no elbow of these radii in this size to trim.", whatWouldWork: null };
  const result = solveClosing(first.closing);
  const sentence = result.sentence ?? "The reducer finds no room between the two elbows.";
  return { about: "trimmed-pair", sentence, whatWouldWork: closingAdvice(first.closing, result, problem.input.units) };
}
