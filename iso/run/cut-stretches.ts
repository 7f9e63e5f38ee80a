/**
 * Fourth pass: walks each run from one part to the next, and decides what lies between two of them: a piece of pipe with
 * its arithmetic, one weld (fittings welded face to face), a bolted face, or nothing that fits.
 */
import { FACE_TO_FACE_MM, ZERO_LENGTH_MM } from "../geometry/tolerances";
import { vecAddScaled } from "../geometry/vec3";
import { formatInches, formatTerm } from "../units/format";
import { sentenceStart, type BuildContext } from "./build-context";
import type { Fitting, JointDraft, PlacedPoint, PlacedRun, Rider, Side, Stretch } from "./build-types";
import { boltedJoint, gasketPart } from "./fit-flange";
import { makeJoint, reachOf } from "./fit-common";
import type { Component, Leg } from "./model-types";
import { sharedWeldKey } from "./original-side";
import { draftPiece, type PieceDraft } from "./piece-draft";

export interface Between {
  readonly components: readonly Component[];
  readonly joints: readonly JointDraft[];
  readonly piece: PieceDraft | null;
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
    const fitting = fittings.get(p.uid);
    const leg = run.legs[i];
    if (!fitting) return;
    if (leg) legs.push(leg);
    if (!fitting.in.through) {
      if (from && start && legs.length > 0) out.push({ from, to: p, legs, start, end: fitting.in, riders: [...riders, ...(p.isLast ? fitting.riders : [])], passed });
      [from, start, legs, passed] = [p, fitting.out, [], []];
      riders = p.isLast && out.length > 0 ? [] : [...fitting.riders];
    } else {
      riders.push(...fitting.riders);
      passed.push(p);
    }
  });
  return out;
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
  if (!a || !b) return { components: [], joints: [], piece: null, held: [] };
  if (a.ratingClass !== b.ratingClass) {
    ctx.report("class-mismatch", "stop", `${sentenceStart(s.from.label)} (class ${a.ratingClass}) and ${s.to.label} (class ${b.ratingClass}) are bolted together: their drilling differs. Give both one class.`, { pointId: s.to.point.id, runId: s.to.runId });
  }
  const flow = flowOf(s);
  const centre = vecAddScaled(s.from.departure, flow, reachOf(s.start.terms) + ctx.settings.allowances.gasketMm / 2);
  const gasket = gasketPart(s.to, s.to.pipeIn, `${s.to.uid}.gasket-face`, Math.max(a.ratingClass, b.ratingClass) as 150, centre, flow);
  const place = a.place !== "shop" ? a.place : b.place;
  return { components: [gasket], joints: [boltedJoint(s.to, `${s.to.uid}:bolts-face`, [a.componentId, b.componentId], gasket, place, ctx)], piece: null, held: [] };
}

/** Fittings face to face: one weld with one root gap, no pipe. */
function weldedStretch(s: Stretch, gap: number, ctx: BuildContext): Between {
  const [a, b] = [s.start.weld, s.end.weld];
  if (!a || !b) return { components: [], joints: [], piece: null, held: [] };
  const place = b.place !== "shop" ? b.place : a.place;
  if (place === "field-fit") {
    ctx.report("trim-without-pipe", "stop", `${sentenceStart(s.to.label)} has a field-fit weld between two fittings, with no pipe to leave long: choose another weld for the trim.`, { pointId: s.to.point.id, runId: s.to.runId });
  }
  const at = vecAddScaled(s.legs[0]?.from ?? s.from.departure, flowOf(s), reachOf(s.start.terms) + gap / 2);
  const joint = makeJoint(s.to, {
    key: sharedWeldKey(s, a.key, b.key), kind: "butt", place, a: s.start.componentId, b: s.end.componentId, position: at, direction: flowOf(s),
    nps: s.to.pipeIn.nps, mismatchRad: a.mismatchRad + b.mismatchRad, gapMm: gap, runId: s.to.runId,
  });
  return { components: [], joints: [joint], piece: null, held: [] };
}

function pipeStretch(s: Stretch, total: number, ctx: BuildContext): Between {
  const piece = draftPiece(s, ctx);
  checkPiece(s, piece, total, ctx);
  const joints: JointDraft[] = [];
  const firstLeg = s.legs[0];
  const lastLeg = s.legs[s.legs.length - 1];
  if (s.start.weld && firstLeg) {
    const reach = reachOf(s.start.terms);
    joints.push(pieceJoint(s.from, s.start, { a: s.start.componentId, b: piece.key }, vecAddScaled(firstLeg.from, firstLeg.direction, reach + (s.start.gap?.mm ?? 0) / 2), firstLeg, piece));
  }
  if (s.end.weld && lastLeg) {
    const reach = reachOf(s.end.terms);
    joints.push(pieceJoint(s.to, s.end, { a: piece.key, b: s.end.componentId }, vecAddScaled(lastLeg.to, lastLeg.direction, -reach - (s.end.gap?.mm ?? 0) / 2), lastLeg, piece));
  }
  const riding = s.riders.flatMap((r) => (r.joint ? [{ ...r.joint, a: piece.key }] : []));
  const held = s.riders.flatMap((r) => (r.joint ? [] : [[piece.key, r.componentId] as const]));
  return { components: [], joints: [...joints.slice(0, s.start.weld ? 1 : 0), ...riding, ...joints.slice(s.start.weld ? 1 : 0)], piece, held };
}

function pieceJoint(p: PlacedPoint, side: Side, ends: { a: string | null; b: string | null }, position: Leg["from"], leg: Leg, piece: PieceDraft): JointDraft {
  const weld = side.weld ?? { key: `${p.uid}:end`, kind: "butt" as const, place: "shop" as const, mismatchRad: 0 };
  return makeJoint(p, {
    key: weld.key, kind: weld.kind, place: weld.place, position, direction: leg.direction, nps: piece.nps,
    mismatchRad: weld.mismatchRad, gapMm: side.gap?.mm ?? 0, runId: piece.runId, ...ends,
  });
}

/** Findings about one piece: it does not fit, or it is a short pup. */
function checkPiece(s: Stretch, piece: PieceDraft, total: number, ctx: BuildContext): void {
  const where = { pointId: s.to.point.id, runId: s.to.runId };
  if (total <= ZERO_LENGTH_MM) return; // said already, leg by leg
  const unit = ctx.units === "metric" ? "mm" : "in";
  const finished = piece.cutLengthMm - piece.terms.filter((t) => t.kind === "trim").reduce((sum, t) => sum + t.valueMm, 0);
  if (finished <= 0) {
    const say = finished < 0 ? `overlap by ${formatTerm(-finished, ctx.units)} ${unit}` : "leave no length for the pipe";
    ctx.report("negative-length", "stop", `Between ${s.from.label} and ${s.to.label} the fittings and gaps ${say}: lengthen the leg, or choose shorter fittings.`, where);
    return;
  }
  const least = ctx.settings.minimumPupMm ?? Math.max(1.5 * piece.odMm, SHORTEST_PUP_MM);
  const bothWelded = s.start.weld !== null && s.end.weld !== null;
  if (bothWelded && finished < least) {
    const [is, want] = ctx.units === "metric" ? [formatTerm(finished, "metric"), formatTerm(least, "metric")] : [formatInches(finished), formatInches(least)];
    ctx.report("short-pup", "warning", `The pipe between ${s.from.label} and ${s.to.label} is a short pup of ${is} ${unit}, under ${want} ${unit} between welds: lengthen the leg, or weld the fittings together.`, where);
  }
}

/** Least pipe between two weld toes whatever the size, mm (common practice; no code sets it). */
const SHORTEST_PUP_MM = 50;
