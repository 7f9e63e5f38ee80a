/**
 * One whole elbow and one cut to measure. The middle direction u lies on the circle turned by the whole elbow's angle from
 * its end's axis: one parameter, the roll of that elbow. The trimmed angle and all three lengths follow from u. Kept: the
 * shortest places of the family, and where two faces are welded with no pipe between, those that nothing beats. In a common
 * plane the roll is fixed and a length slides: its corners are listed.
 */
import { CLOSING_STANDARD_ANGLE, WAYS_ANGLE } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecAngle, vecCross, vecPerpendicular, vecRotate, vecScale, vecSub } from "../geometry/vec3";
import { isLegalDraft, rulesOf, stockTurn, trimmedTurn, unbeaten, type Draft, type DraftTurn } from "./draft";
import { keepOutOf } from "./keep-out";
import { pipeAt, reducerPlaces } from "./layout";
import { threeLengths } from "./lengths";
import { centreLine, cornersOf } from "./path";
import type { WaysProblem } from "./problem";
import { scanFamily, type ScanPlace } from "./scan";
import { planarLengths, planeNormal } from "./standard-search";
import { trimStock, type StockElbow } from "./stock";
import type { ElbowRadius } from "./ways-types";

/** Rolls of the whole elbow tried: one every 1.5 degrees. */
export const ROLL_STEPS = 240;
const RAD = Math.PI / 180;

interface Pairing {
  readonly problem: WaysProblem;
  readonly reducerAt: number | null;
  readonly whole: StockElbow;
  readonly radius: ElbowRadius;
  /** Which end the whole elbow stands at. */
  readonly at: 0 | 1;
}

/** Every local shortest draft of one whole and one trimmed elbow, on either side. */
export function oneTrimmedDrafts(problem: WaysProblem): Draft[] {
  const { input } = problem;
  if (input.trimMaxDeg === 0) return [];
  const radii = (["LR", "SR"] as const).filter((r) => input.radii.includes(r));
  return reducerPlaces(problem, 2).flatMap((reducerAt) => ([0, 1] as const).flatMap((at) =>
    pipeAt(problem, at, reducerAt).stock.flatMap((whole) => radii.flatMap((radius) => pairingDrafts({ problem, reducerAt, whole, radius, at }))),
  ));
}

function pairingDrafts(pairing: Pairing): Draft[] {
  const walked = Array.from({ length: ROLL_STEPS }, (_, k) => placeOf(pairing, (2 * Math.PI * k) / ROLL_STEPS));
  const scanned = scanFamily((t) => placeOf(pairing, t), walked);
  const legal = (t: number) => [draftAt(pairing, t)].filter((draft) => draft !== null && isWanted(pairing, draft)).flatMap((draft) => draft ?? []);
  const shortest = scanned.shortest.flatMap(legal);
  const planar = planarDrafts(pairing);
  const all = [...shortest, ...scanned.welded.flatMap(legal), ...planar];
  const first = all[0];
  if (!first) return [];
  const welded = unbeaten(all, (draft) => rulesOf(pairing.problem, draft.turns, draft.reducerAt));
  return [...shortest, ...welded.filter((draft) => !shortest.includes(draft))];
}

/** Legal, trimmed no further than allowed, and really trimmed: an angle of the stock is the whole elbows' search. */
function isWanted({ problem, whole, at }: Pairing, draft: Draft): boolean {
  const trimmed = draft.turns[1 - at];
  if (!trimmed || trimmed.angleRad > problem.input.trimMaxDeg * RAD + WAYS_ANGLE || trimmed.angleRad < CLOSING_STANDARD_ANGLE) return false;
  const { stock } = pipeAt(problem, 1 - at, draft.reducerAt);
  if (stock.some((elbow) => elbow.radius === whole.radius && Math.abs(elbow.angleRad - trimmed.angleRad) <= CLOSING_STANDARD_ANGLE)) return false;
  return isLegalDraft(draft, rulesOf(problem, draft.turns, draft.reducerAt));
}

function turnsOf({ problem, reducerAt, whole, radius, at }: Pairing, angleRad: number): readonly DraftTurn[] | null {
  const { nps } = pipeAt(problem, 1 - at, reducerAt);
  const stock = trimStock(radius, nps, problem.input);
  if (!stock) return null;
  const [one, other] = [stockTurn(whole, pipeAt(problem, at, reducerAt).nps), trimmedTurn(radius, stock, angleRad, nps)];
  return at === 0 ? [one, other] : [other, one];
}

function draftAt(pairing: Pairing, t: number): Draft | null {
  const { problem, whole, at, reducerAt } = pairing;
  const [about, other] = at === 0 ? [problem.d0, problem.into1] : [problem.into1, problem.d0];
  const e1 = vecPerpendicular(about);
  const e2 = vecCross(about, e1);
  const sin = Math.sin(whole.angleRad);
  const u = vecAddScaled(vecAddScaled(vecScale(about, Math.cos(whole.angleRad)), e1, sin * Math.cos(t)), e2, sin * Math.sin(t));
  const lengths = threeLengths(problem.d0, u, problem.into1, vecSub(problem.p1, problem.p0));
  const turns = lengths ? turnsOf(pairing, vecAngle(u, other)) : null;
  return lengths && turns ? { kind: "one-trimmed", turns, reducerAt, directions: [problem.d0, u, problem.into1], lengths } : null;
}

function placeOf(pairing: Pairing, t: number): ScanPlace | null {
  const { problem, at } = pairing;
  const draft = draftAt(pairing, t);
  const trimmed = draft?.turns[1 - at];
  if (!draft || !trimmed) return null;
  const rules = rulesOf(problem, draft.turns, draft.reducerAt);
  const apart = rules.map((rule, j) => (draft.lengths[j] ?? 0) - rule.baseMm);
  const reach = (problem.input.trimMaxDeg * RAD - trimmed.angleRad) * trimmed.radiusMm;
  const room = [...apart.map((x, j) => x - (rules[j]?.leastMm ?? 0)), reach];
  const bends = draft.turns.reduce((sum, turn) => sum + turn.radiusMm * (turn.angleRad - 2 * Math.tan(turn.angleRad / 2)), 0);
  const { keepOuts } = problem.input;
  const odMm = Math.max(problem.pipes[0].odMm, problem.pipes[1].odMm);
  const spare = keepOuts.length === 0 || reach < 0 ? 0 : (keepOutOf(centreLine(draft, cornersOf(draft, problem.p0)), odMm, keepOuts).spareMm ?? 0);
  return { lengthMm: draft.lengths.reduce((sum, length) => sum + length, bends), room, apart: [...apart.map((x, j) => (rules[j]?.allowsDirect ? x : NaN)), NaN], spare };
}

/** All in one plane: the whole elbow turns to one side or the other, the trimmed one takes the rest. */
function planarDrafts(pairing: Pairing): Draft[] {
  const { problem, whole, at, reducerAt } = pairing;
  const [about, other]: readonly [Vec3, Vec3] = at === 0 ? [problem.d0, problem.into1] : [problem.into1, problem.d0];
  return [1, -1].flatMap((side): Draft[] => {
    const angle = vecAngle(vecRotate(about, planeNormal(problem), side * whole.angleRad), other);
    const turns = turnsOf(pairing, angle);
    if (!turns) return [];
    const solved = planarLengths(problem, turns.map((turn) => turn.angleRad), rulesOf(problem, turns, reducerAt));
    return solved.map(([directions, lengths]): Draft => ({ kind: "one-trimmed", turns, reducerAt, directions, lengths })).filter((draft) => isWanted(pairing, draft));
  });
}
