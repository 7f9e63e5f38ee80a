/** One cut piece with its arithmetic: centre to centre, less take-outs, gaps and pull-backs, plus trim. */
import { vecAddScaled } from "../geometry/vec3";
import { pipeOdMm, pipeWall } from "../catalogue/pipe";
import type { BuildContext } from "./build-context";
import type { PieceDraft, PlacedPoint, Side, Stretch } from "./build-types";
import { reachOf } from "./fit-common";
import type { CutTerm, PieceBend, PieceEnd } from "./model-types";
import { bendOf, type Bend } from "./pipe-bend";
import { formatAngleDeg, formatTerm } from "../units/format";
import { workingPointWord } from "./words";

export type { PieceDraft } from "./build-types";

/** The piece of a stretch. Its key is that of the leg it ends in, so that a support put on the way changes no mark. */
export function draftPiece(s: Stretch, ctx: BuildContext): PieceDraft {
  const last = s.legs[s.legs.length - 1];
  const first = s.legs[0];
  if (!first || !last) throw new Error("a stretch has at least one leg");
  const pipe = s.to.pipeIn;
  const wall = pipeWall(pipe.nps, pipe.schedule, ctx.units);
  const bends = s.passed.flatMap((p) => bendOf(p) ?? []);
  const terms = [...legTerms(s), ...sideTerms(s.start), ...bends.map((bend) => bendTerm(bend, ctx)), ...sideTerms(s.end)];
  const cutLengthMm = terms.reduce((sum, t) => sum + t.valueMm, 0);
  const reach = (side: Side) => reachOf(side.terms) + (side.gap?.mm ?? 0);
  return {
    key: `${last.id}:1`, legId: last.id, legIds: s.legs.map((leg) => leg.id), runId: last.runId, nps: pipe.nps, schedule: pipe.schedule, material: pipe.material,
    odMm: wall?.odMm ?? pipeOdMm(pipe.nps, ctx.units) ?? 0, wallMm: wall?.wallMm ?? 0,
    start: vecAddScaled(first.from, first.direction, reach(s.start)), end: vecAddScaled(last.to, last.direction, -reach(s.end)),
    direction: first.direction, terms, cutLengthMm, ends: [pieceEnd(s.start), pieceEnd(s.end)],
    weightKg: wall ? (wall.kgPerM * Math.max(cutLengthMm, 0)) / 1000 : null,
    weightSource: wall ? `cut length x ${wall.source}` : "not known",
    ...(bends.length > 0 ? { bends: pieceBends(s, reach(s.start)) } : {}),
  };
}

/** One centre-to-centre term per leg, named by what stands at its ends ("face to centre"). */
function legTerms(s: Stretch): CutTerm[] {
  const words = [s.from, ...s.passed, s.to].map((p) => pointWord(p));
  return s.legs.map((leg, i) => ({
    kind: "centre-to-centre", label: `${words[i] ?? "point"} to ${words[i + 1] ?? "point"}`, valueMm: leg.lengthMm,
    componentId: null, source: null, unconfirmed: false,
  }));
}

/** What a bend takes off the sum of its corner-to-corner lengths. */
function bendTerm({ point, angleRad, radiusMm, tangentMm, developedMm }: Bend, ctx: BuildContext): CutTerm {
  const label = `bend ${formatAngleDeg(angleRad)}, radius ${formatTerm(radiusMm, ctx.units)}`;
  return { kind: "bend", label, valueMm: developedMm - 2 * tangentMm, componentId: null, source: `geometry of the bend at ${point.label}`, unconfirmed: false };
}

/** Where each bend begins along the cut pipe, measured from its start (field trim there included). */
function pieceBends(s: Stretch, startReachMm: number): PieceBend[] {
  let along = s.start.trimMm - startReachMm;
  let taken = 0;
  return s.legs.slice(0, -1).flatMap((leg, i) => {
    along += leg.lengthMm;
    const passed = s.passed[i];
    const bend = passed ? bendOf(passed) : null;
    if (!bend) return [];
    const startMm = along - taken - bend.tangentMm;
    taken += 2 * bend.tangentMm - bend.developedMm;
    return [{ pointId: bend.point.point.id, angleRad: bend.angleRad, radiusMm: bend.radiusMm, startMm, developedMm: bend.developedMm }];
  });
}

function pointWord(p: PlacedPoint): string {
  const isPlainEnd = (p.isFirst || p.isLast) && (p.point.item.kind === "none" || p.point.item.kind === "joint");
  return isPlainEnd ? "end" : workingPointWord(p.point.item, p.turnRad > 0);
}

function sideTerms(side: Side): CutTerm[] {
  const own: CutTerm[] = [...side.terms];
  const { gap } = side;
  if (gap && gap.mm !== 0) {
    own.push({ kind: gap.kind, label: gap.label, valueMm: -gap.mm, componentId: side.componentId, source: gap.source ?? null, unconfirmed: gap.unconfirmed ?? false });
  }
  if (side.trimMm > 0) own.push({ kind: "trim", label: "field trim", valueMm: side.trimMm, componentId: null, source: null, unconfirmed: false });
  return own;
}

function pieceEnd(side: Side): PieceEnd {
  const jointKey = side.weld?.key ?? null;
  switch (side.weld?.kind) {
    case "socket":
    case "slip-on":
      return { prep: "square", jointKey };
    case "threaded":
      return { prep: "thread", jointKey };
    case "branch":
      return { prep: "saddle", jointKey };
    case "mitre":
      return { prep: "mitre", cutAngleDeg: ((side.weld.cutRad ?? 0) * 180) / Math.PI, jointKey };
    default:
      return { prep: "bevel", jointKey };
  }
}
