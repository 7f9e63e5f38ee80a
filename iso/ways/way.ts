/** A draft made into a way: its corners, cut lengths, welds, weight and what it is sensitive to, checked that it closes. */
import { SAME_POINT_MM, WAYS_CLOSES_MM, WAYS_DIRECT_MM } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecDistance } from "../geometry/vec3";
import { INCH_MM } from "../units/length";
import { rulesOf, type Draft } from "./draft";
import { keepOutOf } from "./keep-out";
import { pipeAt, type StraightRule } from "./layout";
import { centreLine, centreLineMm, cornersOf } from "./path";
import type { WaysProblem, WaysReducer } from "./problem";
import type { Way, WayMitre, WaySensitivity, WayStraight, WayTurn } from "./ways-types";
import { waySensitivity } from "./way-sensitivity";
import { fittingCautions, tapeWords, wayTitle } from "./words";
import { wayWeight } from "./weight";

/** What the measurements may be off by where nothing is said: 1/16 in. */
export const USUAL_ERROR_MM = INCH_MM / 16;

/** The way a draft stands for, or null when it does not close. @param known rates of a draft whose bends give. */
export function wayOf(problem: WaysProblem, draft: Draft, known?: WaySensitivity): Way | null {
  const trims = draft.trims ?? { end0Mm: 0, end1Mm: 0 };
  const start = vecAddScaled(problem.p0, problem.d0, -trims.end0Mm);
  const end = vecAddScaled(problem.p1, problem.into1, trims.end1Mm);
  const arrived = cornersOf(draft, start);
  const closesWithinMm = vecDistance(arrived[arrived.length - 1] ?? start, end);
  if (!(closesWithinMm <= WAYS_CLOSES_MM)) return null;
  const corners = [...arrived.slice(0, -1), end];
  const rules = rulesOf(problem, draft.turns, draft.reducerAt);
  const turns = draft.turns.map((turn, i): WayTurn => ({ ...turn, corner: corners[i + 1] ?? end }));
  const straights = draft.directions.map((direction, j) => straightOf(problem, draft, rules[j], j, direction, corners));
  const cuts = straights.flatMap((s) => s.cutMm ?? []);
  const path = centreLine(draft, corners);
  const odMm = Math.max(problem.pipes[0].odMm, problem.pipes[1].odMm);
  const keepOut = keepOutOf(path, odMm, problem.input.keepOuts);
  const { units } = problem.input;
  const perMm = problem.input.toleranceMm ?? USUAL_ERROR_MM;
  const segments = mitreSegments(draft, problem.gapMm);
  return {
    id: wayId(draft, corners), kind: draft.kind, title: wayTitle(turns, straights), turns, straights, trims,
    welds: weldsOf(straights, turns), trimmedCuts: turns.filter((t) => t.fitting.make === "elbow" && !t.fitting.whole).length,
    lengthMm: centreLineMm(draft), cuts: inOrder(straights, segments, turns),
    ...wayWeight(problem, turns, straights, segments.flat()),
    minimumPupMm: cuts.length > 0 ? Math.min(...cuts) : null,
    sensitivity: known ?? waySensitivity(draft, straights.map((s) => s.cutMm !== null), perMm, units),
    keepOut, path, closesWithinMm,
    warnings: [...(draft.warnings ?? []), ...fittingCautions(turns, straights), ...pupCautions(problem, straights), ...(keepOut.clear ? [] : [keepOutCaution(keepOut.nearest, keepOut.spareMm ?? 0, units)])],
    sources: [...new Set([...turns.map((t) => t.source), ...straights.flatMap((s) => s.reducer?.source ?? [])])],
  };
}

function straightOf(problem: WaysProblem, draft: Draft, rule: StraightRule | undefined, j: number, direction: Vec3, corners: readonly Vec3[]): WayStraight {
  const [from, to] = [corners[j] ?? problem.p0, corners[j + 1] ?? problem.p1];
  const lengthMm = draft.lengths[j] ?? 0;
  const before = draft.turns[j - 1];
  const after = draft.turns[j];
  const x = lengthMm - (rule?.baseMm ?? 0);
  const isMitred = before?.fitting.make === "mitre" || after?.fitting.make === "mitre";
  // At a mitre each pipe brings half a gap to its weld: there is always pipe.
  const halves = (before?.fitting.make === "mitre" ? 0.5 : 0) + (after?.fitting.make === "mitre" ? 0.5 : 0);
  const isWelded = Math.abs(x) <= WAYS_DIRECT_MM || draft.ground === j;
  const cutMm = isMitred ? x - (1 - halves) * problem.gapMm : isWelded ? null : x - problem.gapMm;
  const reducing = draft.reducerAt === j ? problem.reducer : null;
  const reachMm = (before?.takeOutMm ?? 0) + problem.gapMm;
  return {
    from, to, direction, lengthMm, cutMm, nps: pipeAt(problem, j, draft.reducerAt).nps,
    reducer: reducing ? placed(reducing, vecAddScaled(from, direction, reachMm + (reducing.down ? 0 : reducing.lengthMm))) : null,
  };
}

function placed({ large, small, lengthMm, source, unverified }: WaysReducer, largeEnd: Vec3): WayStraight["reducer"] {
  return { largeNps: large, smallNps: small, lengthMm, largeEnd, source, unverified };
}

/** One weld between two faces, two where a pipe stands between, one more for a reducer; those of mitres within the turn. */
function weldsOf(straights: readonly WayStraight[], turns: readonly WayTurn[]): number {
  const mitred = (j: number) => turns[j]?.fitting.make === "mitre";
  const between = straights.reduce((sum, { cutMm, reducer }, j) => {
    if (mitred(j - 1) || mitred(j)) return sum + (mitred(j - 1) ? 0 : 1) + (mitred(j) ? 0 : 1) + (reducer ? 1 : 0);
    return sum + (cutMm === null ? 1 : 2) + (reducer ? 1 : 0);
  }, 0);
  return turns.reduce((sum, { fitting }) => sum + (fitting.make === "mitre" ? fitting.pieces - 1 : 0), between);
}

/** Segments between the cuts of each turn, one gap short of cut to cut. */
function mitreSegments({ turns }: Draft, gapMm: number): { readonly nps: WayTurn["nps"]; readonly mm: number }[][] {
  return turns.map(({ fitting, angleRad, radiusMm, nps }) => {
    const welds = fitting.make === "mitre" ? (fitting satisfies WayMitre).pieces - 1 : 0;
    return Array.from({ length: Math.max(0, welds - 1) }, () => ({ nps, mm: 2 * radiusMm * Math.tan(angleRad / welds / 2) - gapMm }));
  });
}

function inOrder(straights: readonly WayStraight[], segments: readonly (readonly { readonly mm: number }[])[], turns: readonly WayTurn[]): number[] {
  return straights.flatMap(({ cutMm }, j) => [...(cutMm === null ? [] : [cutMm]), ...(turns[j] ? (segments[j] ?? []).map((s) => s.mm) : [])]);
}

function pupCautions(problem: WaysProblem, straights: readonly WayStraight[]): string[] {
  const { units } = problem.input;
  return straights.flatMap(({ cutMm, nps }) => {
    const least = (problem.pipes.find((pipe) => pipe.nps === nps) ?? problem.pipes[0]).leastPupMm;
    return cutMm === null || cutMm >= least - SAME_POINT_MM ? [] : [`A pup of ${tapeWords(cutMm, units)} is under the shortest one set, ${tapeWords(least, units)} between welds.`];
  });
}

function keepOutCaution(name: string | null, spareMm: number, units: WaysProblem["input"]["units"]): string {
  return `Comes ${tapeWords(-spareMm, units)} too near ${name ?? "a keep-out"}.`;
}

/** Kind, fittings and corners to a hundredth of a millimetre. */
function wayId({ kind, turns, reducerAt, trims }: Draft, corners: readonly Vec3[]): string {
  const hundredth = (mm: number) => Math.round(mm * 100) + 0;
  const places = corners.slice(1, -1).map((c) => c.map(hundredth).join(","));
  const cut = trims ? `${hundredth(trims.end0Mm)}/${hundredth(trims.end1Mm)}` : "";
  return [kind, turns.map((t) => t.fitting.name).join("+"), reducerAt ?? "", cut, ...places].join("|");
}

