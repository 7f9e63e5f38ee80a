/** One cut piece with its arithmetic: centre to centre, less take-outs, gaps and pull-backs, plus trim. */
import { vecAddScaled } from "../geometry/vec3";
import { pipeOdMm, pipeWall } from "../catalogue/pipe";
import type { BuildContext } from "./build-context";
import type { PlacedPoint, Side, Stretch } from "./build-types";
import { reachOf } from "./fit-common";
import type { CutTerm, Piece, PieceEnd } from "./model-types";
import { workingPointWord } from "./words";

/** A piece before its mark and spool are known. */
export type PieceDraft = Omit<Piece, "mark" | "spool">;

/** The piece of a stretch. Its key is that of the leg it ends in, so that a support put on the way changes no mark. */
export function draftPiece(s: Stretch, ctx: BuildContext): PieceDraft {
  const last = s.legs[s.legs.length - 1];
  const first = s.legs[0];
  if (!first || !last) throw new Error("a stretch has at least one leg");
  const pipe = s.to.pipeIn;
  const wall = pipeWall(pipe.nps, pipe.schedule, ctx.units);
  const terms = [...legTerms(s), ...sideTerms(s.start), ...sideTerms(s.end)];
  const cutLengthMm = terms.reduce((sum, t) => sum + t.valueMm, 0);
  const reach = (side: Side) => reachOf(side.terms) + (side.gap?.mm ?? 0);
  return {
    key: `${last.id}:1`, legId: last.id, legIds: s.legs.map((leg) => leg.id), runId: last.runId, nps: pipe.nps, schedule: pipe.schedule, material: pipe.material,
    odMm: wall?.odMm ?? pipeOdMm(pipe.nps, ctx.units) ?? 0, wallMm: wall?.wallMm ?? 0,
    start: vecAddScaled(first.from, first.direction, reach(s.start)), end: vecAddScaled(last.to, last.direction, -reach(s.end)),
    direction: first.direction, terms, cutLengthMm, ends: [pieceEnd(s.start), pieceEnd(s.end)],
    weightKg: wall ? (wall.kgPerM * Math.max(cutLengthMm, 0)) / 1000 : null,
    weightSource: wall ? `cut length x ${wall.source}` : "not known",
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

function pointWord(p: PlacedPoint): string {
  const isPlainEnd = (p.isFirst || p.isLast) && (p.point.item.kind === "none" || p.point.item.kind === "joint");
  return isPlainEnd ? "end" : workingPointWord(p.point.item, p.turnRad > 0);
}

function sideTerms(side: Side): CutTerm[] {
  const own: CutTerm[] = [...side.terms];
  if (side.gap && side.gap.mm > 0) {
    own.push({ kind: side.gap.kind, label: side.gap.label, valueMm: -side.gap.mm, componentId: side.componentId, source: null, unconfirmed: false });
  }
  if (side.trimMm > 0) own.push({ kind: "trim", label: "field trim", valueMm: side.trimMm, componentId: null, source: null, unconfirmed: false });
  return own;
}

function pieceEnd(side: Side): PieceEnd {
  const square = side.weld?.kind === "socket" || side.weld?.kind === "slip-on";
  return { prep: square ? "square" : "bevel", jointKey: side.weld?.key ?? null };
}
