/**
 * How sure is the fit.
 *
 * A piece is made to the ends as measured; the ends are elsewhere by what the survey may be off, and the piece is not
 * quite what was asked. All of it is small, so what the piece misses end 1 by is a sum, M = Σ c·z: six numbers, of which
 * every reading and every tolerance adds its own column c times a standard normal number z. Joints made in the field
 * share M in proportion to what each can stand (share.ts), and the chance that all stay within their limits is counted
 * over evenly spread points of M's bell (probability.ts). Simulation would give the same and the same again only with
 * ten thousand times the work; the test does just that. Where the bends of the closing are so near a fold that the
 * angles mean nothing, or an axis so loosely known that sines are no longer angles, there is a flag instead of a number.
 */
import { vecDistance, vecIsFinite } from "../geometry/vec3";
import { DEVIATIONS_IN_TOLERANCE } from "../survey/survey-tools";
import { walkChain, type ChainStep } from "./chain";
import { conditionRows, conditionVariance, contributionsOf } from "./contributions";
import { fitSources, placedJoints, type FitSource, type PlacedJoint } from "./errors";
import type { FitFlag, FitInput, FitJudged, FitMismatch, FitResult } from "./fit-types";
import { adviceWords, FLAG_WORDS, verdictWords } from "./fit-words";
import { chancesOf } from "./probability";
import { shareJoints, type SharedJoint } from "./share";
import { fitTrims, jointRoles } from "./trim";
import { covarianceOf, factorOf } from "./twist";

/** How sure a chain of pieces fits between two ends. Never throws on user data. */
export function fitOfChain(input: FitInput): FitResult {
  const steps = walkChain({ at: input.start.position, along: input.start.axis, side: input.start.side }, input.pieces);
  const placed = placedJoints(steps);
  const roles = jointRoles(placed, input.fitUp, null);
  const joints = placed.length >= 2 && isSound(input, steps) ? shareJoints(roles, input.settings.limits, input.odMm, input.end.position) : null;
  if (!joints) return flagged("bad-input");
  const fitted = new Set(roles.filter(({ role }) => role !== "set").map(({ placed: each }) => each.joint.id));
  const sources = fitSources(input, steps, fitted);
  const columns = sources.flatMap((source) => source.columns);
  if (columns.every((column) => column.every((v) => v === 0))) return flagged("no-errors");
  if (isTooLoose(input, columns)) return flagged("too-loose");
  return judged(input, steps, placed, joints, sources);
}

export function flagged(flag: FitFlag): FitResult {
  return { probability: null, flag, sentence: FLAG_WORDS[flag], mismatches: [], judged: [], contributions: [], trims: [], advice: "" };
}

function judged(input: FitInput, steps: readonly ChainStep[], placed: readonly PlacedJoint[], joints: readonly SharedJoint[], sources: readonly FitSource[]): FitResult {
  const columns = sources.flatMap((source) => source.columns);
  const chances = chancesOf(joints, factorOf(covarianceOf(columns)), input.odMm);
  const each = ranked(joints, columns, chances.each);
  const worst = each[0]!;
  const trims = fitTrims(input, steps);
  const contributions = contributionsOf(sources, joints, { joint: joints.find(({ name }) => name === worst.joint)!, condition: worst.condition }, chances.probability, input.odMm);
  return {
    probability: chances.probability, flag: null,
    sentence: verdictWords(chances.probability, input.target, trims, input.units),
    mismatches: mismatchesOf(input, placed, joints, columns), judged: each, contributions, trims,
    advice: adviceWords(contributions, chances.probability),
  };
}

/** Least likely first; alike ones by how far they spread against their limit. */
function ranked(joints: readonly SharedJoint[], columns: readonly (readonly number[])[], each: readonly FitJudged[]): FitJudged[] {
  const spread = ({ joint, condition }: FitJudged): number => {
    const own = joints.find(({ name }) => name === joint)!;
    const { gapMm, hiLoMm, angleRad, holes } = own.limits;
    const limit = { gap: gapMm, "hi-lo": hiLoMm, opening: angleRad, rotation: holes?.offsetMm ?? 0 }[condition];
    return conditionVariance(conditionRows(own, condition), columns) / limit ** 2;
  };
  return each.filter(({ joint }) => joint !== "").sort((a, b) => a.probability - b.probability || spread(b) - spread(a));
}

const WHATS = ["gap", "hi-lo-level", "hi-lo-up", "opening-up", "opening-level", "rotation"] as const;

function mismatchesOf(input: FitInput, placed: readonly PlacedJoint[], joints: readonly SharedJoint[], columns: readonly (readonly number[])[]): FitMismatch[] {
  const last = placed[placed.length - 1]!;
  const alone = shareJoints([{ placed: last, role: "fitted" }], input.settings.limits, input.odMm, input.end.position)?.[0];
  const [first, end] = [joints.find(({ id }) => id === placed[0]!.joint.id), joints.find(({ id }) => id === last.joint.id)];
  return WHATS.map((what, k) => {
    const within = (joint: SharedJoint | undefined) => (joint ? DEVIATIONS_IN_TOLERANCE * Math.sqrt(conditionVariance([joint.rows[k]!], columns)) * leverOf(joint, what, input.odMm) : 0);
    const limit = (joint: SharedJoint | undefined) => (joint ? limitOf(joint, what, input.odMm) : null);
    return { what, beforeMm: within(alone), atEnd0Mm: within(first), atEnd1Mm: within(end), limitMm: { end0: limit(first), end1: limit(end) } };
  });
}

/** Angles are told as lengths: openings across the outside, rotation as an arc on the bolt circle, or on the outside. */
function leverOf({ limits }: SharedJoint, what: FitMismatch["what"], odMm: number): number {
  if (what === "rotation") return limits.holes?.radiusMm ?? odMm / 2;
  return what.startsWith("opening") ? odMm : 1;
}

function limitOf({ limits }: SharedJoint, what: FitMismatch["what"], odMm: number): number | null {
  if (what === "gap") return limits.gapMm;
  if (what === "rotation") return limits.holes?.offsetMm ?? null;
  return what.startsWith("opening") ? odMm * Math.tan(limits.angleRad) : limits.hiLoMm;
}

function isSound(input: FitInput, steps: readonly ChainStep[]): boolean {
  const numbers = [input.odMm, input.target, ...input.errors.flatMap(({ columns }) => columns.flat()), ...Object.values(input.settings.shop), ...Object.values(input.settings.limits)];
  return input.odMm > 0 && numbers.every(Number.isFinite) && steps.every(({ after }) => vecIsFinite(after.at) && vecIsFinite(after.along));
}

/** High-low limits that the bow of the sines may come to; simulation still agrees at twice as many. */
const BOW_SHARE = 2;

/** What an axis may be off by, squared, times half the reach is what the linear answer leaves out. */
function isTooLoose(input: FitInput, columns: readonly (readonly number[])[]): boolean {
  const turn = columns.reduce((sum, column) => sum + column[3]! ** 2 + column[4]! ** 2 + column[5]! ** 2, 0);
  const reach = vecDistance(input.start.position, input.end.position);
  const limit = Math.max(input.settings.limits.hiLoMm, 1);
  return (turn * reach) / 2 > BOW_SHARE * limit;
}
