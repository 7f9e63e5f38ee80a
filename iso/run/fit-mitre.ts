/**
 * Turns cut from pipe. A mitre of n pieces (its two pipes counted in) turns θ in m = n - 1 equal welds of δ = θ/m. The
 * centre lines of its segments touch the arc of radius R, so each is 2·R·tan(δ/2) long, and the pipe stops
 * R·(tan(θ/2) - tan(δ/2)) before the corner: nothing when there is one weld. Every pipe is cut δ/2 off square (geometry
 * of a polygon around an arc). Over 22.5° of cut many codes ask for the engineer's permission (from memory).
 */
import { FOLD_RAD, SQUARE_RAD } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecCross, vecNegate, vecRotate, vecUnit } from "../geometry/vec3";
import { pipeOdMm, pipeWall } from "../catalogue/pipe";
import { formatAngleDeg } from "../units/format";
import { plainTerm, sentenceStart, type BuildContext } from "./build-context";
import type { Fitting, JointDraft, PieceDraft, PlacedPoint, Side } from "./build-types";
import type { Item, Place } from "./document";
import { endSide, fittingOf, makeComponent, makeJoint, port, sideTrim } from "./fit-common";
import { nominalMm } from "./words";

type MitreItem = Extract<Item, { kind: "mitre" }>;

const CUT_LIMIT_RAD = (22.5 * Math.PI) / 180;
const SOURCE = "geometry of the mitre";

interface Mitre {
  readonly welds: number;
  readonly angleRad: number;
  readonly deltaRad: number;
  readonly radiusMm: number;
  readonly takeOutMm: number;
  /** Centre length of a segment between two cuts, mm. */
  readonly segmentMm: number;
  /** The cuts on the centre line, in flow order, and the way the pipe goes after each. */
  readonly cuts: readonly { readonly at: Vec3; readonly after: Vec3 }[];
}

export function fitMitre(p: PlacedPoint, item: MitreItem, ctx: BuildContext): Fitting {
  const where = { pointId: p.point.id, runId: p.runId };
  if (!p.arriving || !p.leaving) {
    ctx.report("elbow-at-end", "warning", `${sentenceStart(p.label)} is a mitre at the end of a run: give the next point, so that it knows where it turns.`, where);
    return fittingOf({ in: endSide(), out: endSide() });
  }
  if (p.turnRad === 0) {
    ctx.report("elbow-straight", "stop", `${sentenceStart(p.label)} names a mitre but the line runs straight on: correct the offsets or take the mitre out.`, where);
    return fittingOf({});
  }
  const mitre = mitreOf(p, item, p.arriving, p.leaving, ctx);
  checkMitre(p, mitre, ctx);
  const pieces = segments(p, mitre, ctx);
  const component = makeComponent(p, p.pipeIn, {
    kind: "mitre", ends: "butt", schedule: p.pipeIn.schedule, angleRad: mitre.angleRad, radiusMm: item.pieces === 2 ? null : mitre.radiusMm,
    ports: [port("in", p.position, vecNegate(p.arriving), mitre.takeOutMm, p.pipeIn.nps), port("out", p.position, p.leaving, mitre.takeOutMm, p.pipeIn.nps)],
    description: `Mitre of ${item.pieces} pieces, ${formatAngleDeg(mitre.angleRad)}`, weightKg: 0, weightSource: "in its pieces", source: SOURCE,
  });
  const side = (name: "in" | "out"): Side => mitreSide(p, mitre, name, pieces, ctx);
  return fittingOf({
    components: [component], pieces, joints: segmentJoints(p, mitre, pieces, ctx), in: side("in"), out: side("out"),
    held: [...pieces.map((piece) => [piece.key, p.uid] as const), [`${p.uid}:1`, p.uid] as const],
  });
}

/** 1.5 nominal sizes, as a long-radius elbow; whole millimetres on a metric line. */
function usualRadiusMm(p: PlacedPoint, ctx: BuildContext): number {
  const mm = 1.5 * nominalMm(p.pipeIn.nps);
  return ctx.units === "metric" ? Math.round(mm) : mm;
}

function mitreOf(p: PlacedPoint, item: MitreItem, arriving: Vec3, leaving: Vec3, ctx: BuildContext): Mitre {
  const welds = item.pieces - 1;
  const angleRad = Math.min(p.turnRad, Math.PI - FOLD_RAD);
  const deltaRad = angleRad / welds;
  const radiusMm = item.radiusMm ?? usualRadiusMm(p, ctx);
  const half = radiusMm * Math.tan(deltaRad / 2);
  const takeOutMm = welds === 1 ? 0 : radiusMm * Math.tan(angleRad / 2) - half;
  const axis = vecUnit(vecCross(arriving, leaving)) ?? [0, 0, 1];
  const cuts: { at: Vec3; after: Vec3 }[] = [];
  let at = vecAddScaled(p.position, arriving, -takeOutMm);
  for (let k = 1; k <= welds; k++) {
    const after = k === welds ? leaving : vecRotate(arriving, axis, k * deltaRad);
    cuts.push({ at, after });
    at = vecAddScaled(at, after, 2 * half);
  }
  return { welds, angleRad, deltaRad, radiusMm, takeOutMm, segmentMm: welds === 1 ? 0 : 2 * half, cuts };
}

function checkMitre(p: PlacedPoint, { welds, deltaRad, radiusMm }: Mitre, ctx: BuildContext): void {
  const where = { pointId: p.point.id, runId: p.runId };
  const od = pipeOdMm(p.pipeIn.nps, ctx.units) ?? 0;
  if (deltaRad / 2 > CUT_LIMIT_RAD + SQUARE_RAD) {
    ctx.report("mitre-angle", "warning", `${sentenceStart(p.label)} is cut ${formatAngleDeg(deltaRad / 2)} off square at each mitre weld, over 22.5°: use more pieces, or have the engineer's permission.`, where);
  }
  if (welds > 1 && radiusMm <= od / 2) {
    ctx.report("mitre-radius", "stop", `${sentenceStart(p.label)}: the mitre's radius is no more than half the pipe's OD, so its segments have no throat. Give a larger radius.`, where);
  }
}

/** Key of the k-th weld (from 1, along flow); the same steel keeps its key when the run is turned round. */
function weldKey(p: PlacedPoint, k: number, welds: number): string {
  return `${p.uid}:mitre-${p.point.flipped ? welds + 1 - k : k}`;
}

function segmentKey(p: PlacedPoint, k: number, welds: number): string {
  return `${p.uid}:segment-${p.point.flipped ? welds - k : k}`;
}

function weldPlace(p: PlacedPoint, k: number, welds: number): Place {
  const { places } = p.point;
  if (welds === 1) return places.in ?? places.out ?? "shop";
  return (k === 1 ? places.in : k === welds ? places.out : undefined) ?? "shop";
}

function segments(p: PlacedPoint, mitre: Mitre, ctx: BuildContext): PieceDraft[] {
  const { welds, segmentMm, cuts } = mitre;
  const pipe = p.pipeIn;
  const wall = pipeWall(pipe.nps, pipe.schedule, ctx.units);
  const halfGap = ctx.settings.allowances.rootGapMm / 2;
  const gap = plainTerm("root-gap", "half the root gap", halfGap);
  const cutLengthMm = segmentMm - 2 * halfGap;
  const cutAngleDeg = (mitre.deltaRad * 90) / Math.PI;
  const cutEnd = (k: number) => ({ prep: "mitre" as const, cutAngleDeg, jointKey: weldKey(p, k, welds) });
  return cuts.slice(0, -1).map(({ at, after }, i): PieceDraft => ({
    key: segmentKey(p, i + 1, welds), legId: p.uid, legIds: [p.uid], runId: p.runId, nps: pipe.nps, schedule: pipe.schedule, material: pipe.material,
    odMm: wall?.odMm ?? pipeOdMm(pipe.nps, ctx.units) ?? 0, wallMm: wall?.wallMm ?? 0,
    start: vecAddScaled(at, after, halfGap), end: vecAddScaled(at, after, segmentMm - halfGap), direction: after,
    terms: [{ kind: "centre-to-centre", label: "cut to cut", valueMm: segmentMm, componentId: p.uid, source: SOURCE, unconfirmed: false }, ...(halfGap > 0 ? [gap, gap] : [])],
    cutLengthMm, ends: [cutEnd(i + 1), cutEnd(i + 2)],
    weightKg: wall ? (wall.kgPerM * Math.max(cutLengthMm, 0)) / 1000 : null, weightSource: wall ? `cut length x ${wall.source}` : "not known",
  }));
}

/** What the two pipes meet: their cut, at the first and at the last weld. */
function mitreSide(p: PlacedPoint, mitre: Mitre, name: "in" | "out", pieces: readonly PieceDraft[], ctx: BuildContext): Side {
  const k = name === "in" ? 1 : mitre.welds;
  const place = weldPlace(p, k, mitre.welds);
  const trimmed = p.point.places.in === undefined && p.point.places.out === "field-fit" ? "out" : "in";
  const neighbour = name === "in" ? pieces[0] : pieces[pieces.length - 1];
  return {
    through: false, componentId: null, bolted: null, ...(neighbour ? { neighbourKey: neighbour.key } : {}),
    trimMm: mitre.welds > 1 || name === trimmed ? sideTrim(p, place, ctx) : 0,
    terms: mitre.takeOutMm === 0 ? [] : [plainTerm("take-out", name === "in" ? "corner to the first cut" : "corner to the last cut", mitre.takeOutMm, p.uid, SOURCE)],
    weld: { key: weldKey(p, k, mitre.welds), kind: "mitre", place, mismatchRad: mitre.deltaRad, cutRad: mitre.deltaRad / 2 },
    gap: { kind: "root-gap", mm: ctx.settings.allowances.rootGapMm / 2, label: "half the root gap" },
  };
}

/** Welds as the segments see them; at the first and last one the pipe brings the other half. */
function segmentJoints(p: PlacedPoint, mitre: Mitre, pieces: readonly PieceDraft[], ctx: BuildContext): JointDraft[] {
  if (pieces.length === 0) return [];
  const { welds, cuts, deltaRad } = mitre;
  const halfGap = ctx.settings.allowances.rootGapMm / 2;
  return cuts.map(({ at }, i) => {
    const [a, b] = [pieces[i - 1]?.key ?? null, pieces[i]?.key ?? null];
    return makeJoint(p, {
      key: weldKey(p, i + 1, welds), kind: "mitre", place: weldPlace(p, i + 1, welds), a, b, position: at,
      direction: cuts[i - 1]?.after ?? p.arriving ?? [1, 0, 0], mismatchRad: deltaRad, gapMm: a !== null && b !== null ? 2 * halfGap : halfGap,
    });
  });
}
