/**
 * Fourth pass: walks each run from one part to the next, and decides what lies between two of them: a piece of pipe with
 * its arithmetic, one weld (fittings welded face to face), a bolted face, or nothing that fits.
 */
import { FACE_TO_FACE_MM } from "../geometry/tolerances";
import { vecAddScaled, vecDot, vecSub } from "../geometry/vec3";
import { sentenceStart, type BuildContext } from "./build-context";
import type { Fitting, JointDraft, LoopEnd, PieceDraft, PlacedPoint, PlacedRun, Rider, Side, Stretch } from "./build-types";
import { boltedParts } from "./bolted-face";
import { endSide, fittingOf, makeJoint, reachOf } from "./fit-common";
import { checkPiece } from "./check-piece";
import type { RatingClass } from "./document";
import type { Component, Leg } from "./model-types";
import { sharedWeldKey } from "./original-side";
import { draftPiece } from "./piece-draft";
import { splitStock } from "./split-stock";

export interface Between {
  readonly components: readonly Component[];
  readonly joints: readonly JointDraft[];
  /** In flow order; more than one where the stock is too short for a single pipe. */
  readonly pieces: readonly PieceDraft[];
  /** Parts that hang together without a joint of their own: a stub-in and its header. */
  readonly held: readonly (readonly [string, string])[];
}

/** The stretches of a run in flow order; for a branch the first one starts at the fitting it leaves from. */
export function runStretches(run: PlacedRun, fittings: ReadonlyMap<string, Fitting>, byUid: ReadonlyMap<string, PlacedPoint>): Stretch[] {
  const out: Stretch[] = [];
  const parent = run.parentUid === null ? undefined : byUid.get(run.parentUid);
  let from = parent;
  let start = parent && fittings.get(parent.uid)?.branches[run.branchIndex];
  let legs: Leg[] = [];
  let riders: Rider[] = [];
  let passed: PlacedPoint[] = [];
  run.points.forEach((p, i) => {
    const fitting = p.closesLoop && run.loop ? loopFitting(run.loop, fittings) : fittings.get(p.uid);
    const leg = run.legs[i];
    if (!fitting) return;
    if (leg) legs.push(leg);
    if (!fitting.in.through) {
      if (from && start && legs.length > 0) out.push({ from, to: p, legs, start, end: fitting.in, riders: [...riders, ...(ridesBack(p) ? fitting.riders : [])], passed });
      [from, start, legs, passed] = [p, fitting.out, [], []];
      riders = ridesBack(p) && out.length > 0 ? [] : [...fitting.riders];
    } else {
      riders.push(...fitting.riders);
      passed.push(p);
    }
  });
  return out;
}

/** What the last leg of a loop meets: the free port of the fitting it comes back to; nothing when it does not close. */
function loopFitting({ targetUid, port, branchIndex, closes }: LoopEnd, fittings: ReadonlyMap<string, Fitting>): Fitting {
  const met = closes ? fittings.get(targetUid) : undefined;
  return fittingOf({ in: (port === "branch" ? met?.branches[branchIndex] : met?.[port]) ?? endSide(), out: endSide() });
}

/** What rides on a point where the pipe is cut sits on the pipe after it; before it at a run's end, and in a run turned round. */
function ridesBack(p: PlacedPoint): boolean {
  return p.isLast || (p.point.flipped === true && !p.isFirst);
}

/** What lies in one stretch. */
export function fillStretch(s: Stretch, ctx: BuildContext): Between {
  if (s.start.bolted && s.end.bolted) return boltedStretch(s, ctx);
  const reach = reachOf(s.start.terms) + reachOf(s.end.terms);
  const total = s.legs.reduce((sum, leg) => sum + leg.lengthMm, 0);
  const gap = ctx.settings.allowances.rootGapMm;
  const bothButt = s.start.weld?.kind === "butt" && s.end.weld?.kind === "butt" && facesAreParts(s);
  if (bothButt && s.riders.length === 0 && Math.abs(total - reach - gap) <= FACE_TO_FACE_MM) return weldedStretch(s, gap, ctx);
  return pipeStretch(s, total, ctx);
}

/** Whether each face belongs to a fitting, or one of them to the pipe outside that a run's first or last point is welded to. */
function facesAreParts({ start, end, from, to }: Stretch): boolean {
  const [startPart, endPart] = [start.componentId !== null, end.componentId !== null];
  return (startPart && (endPart || to.isLast)) || (endPart && from.isFirst);
}

function flowOf(s: Stretch) {
  return s.legs[0]?.direction ?? [1, 0, 0] as const;
}

function boltedStretch(s: Stretch, ctx: BuildContext): Between {
  const [a, b] = [s.start.bolted, s.end.bolted];
  if (!a || !b) return { components: [], joints: [], pieces: [], held: [] };
  if (a.ratingClass !== b.ratingClass) {
    ctx.report("class-mismatch", "stop", `${sentenceStart(s.from.label)} (class ${a.ratingClass}) and ${s.to.label} (class ${b.ratingClass}) are bolted together: their drilling differs. Give both one class.`, { pointId: s.to.point.id, runId: s.to.runId });
  }
  const flow = flowOf(s);
  const gasketMm = a.gasketMm ?? b.gasketMm ?? ctx.settings.allowances.gasketMm;
  const bolted = boltedParts(s.to, {
    key: `${s.to.uid}:bolts-face`, gasketId: `${s.to.uid}.gasket-face`, pipe: s.to.pipeIn, ratingClass: Math.max(a.ratingClass, b.ratingClass) as RatingClass,
    centre: vecAddScaled(s.from.departure, flow, reachOf(s.start.terms) + gasketMm / 2), flow, sides: [a.componentId, b.componentId],
    place: a.place !== "shop" ? a.place : b.place, gasketMm, shares: [a.studs ?? null, b.studs ?? null],
  }, ctx);
  return { components: bolted.components, joints: [bolted.joint], pieces: [], held: bolted.held };
}

/** Fittings face to face: one weld with one root gap, no pipe. */
function weldedStretch(s: Stretch, gap: number, ctx: BuildContext): Between {
  const [a, b] = [s.start.weld, s.end.weld];
  if (!a || !b) return { components: [], joints: [], pieces: [], held: [] };
  const place = b.place !== "shop" ? b.place : a.place;
  if (place === "field-fit") {
    ctx.report("trim-without-pipe", "stop", `${sentenceStart(s.to.label)} has a field-fit weld between two fittings, with no pipe to leave long: choose another weld for the trim.`, { pointId: s.to.point.id, runId: s.to.runId });
  }
  const at = vecAddScaled(s.legs[0]?.from ?? s.from.departure, flowOf(s), reachOf(s.start.terms) + gap / 2);
  const joint = makeJoint(s.to, {
    key: sharedWeldKey(s, a.key, b.key), kind: "butt", place, a: s.start.componentId, b: s.end.componentId, position: at, direction: flowOf(s),
    nps: s.to.pipeIn.nps, mismatchRad: a.mismatchRad + b.mismatchRad, gapMm: gap, runId: s.to.runId,
  });
  return { components: [], joints: [joint], pieces: [], held: [] };
}

function pipeStretch(s: Stretch, total: number, ctx: BuildContext): Between {
  const whole = draftPiece(s, ctx);
  checkPiece(s, whole, total, ctx);
  const { pieces, joints: splits, pieceAt } = splitStock(s, whole, ctx);
  const [first, last] = [pieces[0] ?? whole, pieces[pieces.length - 1] ?? whole];
  const joints: JointDraft[] = [];
  const firstLeg = s.legs[0];
  const lastLeg = s.legs[s.legs.length - 1];
  if (s.start.weld && firstLeg) {
    const reach = reachOf(s.start.terms);
    joints.push(pieceJoint(s.from, s.start, { a: outside(s.start), b: first.key }, vecAddScaled(firstLeg.from, firstLeg.direction, reach + (s.start.gap?.mm ?? 0) / 2), firstLeg, first));
  }
  const riding = s.riders.flatMap((r) => (r.joint ? [{ ...r.joint, a: pieceAt(r.joint.position) }] : []));
  const held = s.riders.flatMap((r) => (r.joint ? [] : [[pieceAt(r.at ?? first.start), r.componentId] as const]));
  joints.push(...inFlow([...riding, ...splits], s));
  if (s.end.weld && lastLeg) {
    const reach = reachOf(s.end.terms);
    joints.push(pieceJoint(s.to, s.end, { a: last.key, b: outside(s.end) }, vecAddScaled(lastLeg.to, lastLeg.direction, -reach - (s.end.gap?.mm ?? 0) / 2), lastLeg, last));
  }
  return { components: [], joints, pieces, held };
}

/** What the pipe is welded to on a side. */
function outside(side: Side): string | null {
  return side.neighbourKey ?? side.componentId;
}

/** Joints on the way, in the order flow meets them; those of bent pipe as they were put. */
function inFlow(joints: readonly JointDraft[], s: Stretch): JointDraft[] {
  const first = s.legs[0];
  if (!first || s.passed.some((p) => p.turnRad > 0)) return [...joints];
  const along = (j: JointDraft) => vecDot(vecSub(j.position, first.from), first.direction);
  return [...joints].sort((a, b) => along(a) - along(b));
}

function pieceJoint(p: PlacedPoint, side: Side, ends: { a: string | null; b: string | null }, position: Leg["from"], leg: Leg, piece: PieceDraft): JointDraft {
  const weld = side.weld ?? { key: `${p.uid}:end`, kind: "butt" as const, place: "shop" as const, mismatchRad: 0 };
  return makeJoint(p, {
    key: weld.key, kind: weld.kind, place: weld.place, position, direction: leg.direction, nps: piece.nps,
    mismatchRad: weld.mismatchRad, gapMm: side.gap?.mm ?? 0, runId: piece.runId, ...ends,
  });
}
