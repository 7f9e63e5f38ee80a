/** Which parts of a model a sketch holds: pieces by leg, what belongs to a spool and a sheet, where runs come back to their line. */
import type { Joint, Leg, Model, Piece } from "../run/model-types";
import { vecDot, vecLength, vecReject, vecSub } from "../geometry/vec3";
import * as size from "./sizes";

/** The part of a line or spool that one sheet shows in full when it is drawn on several (draw-sheets.ts). */
export interface SheetShare {
  readonly points: ReadonlySet<string>;
  readonly legs: ReadonlySet<string>;
}

export function groupBy<T>(items: readonly T[], key: (item: T) => string): Map<string, T[]> {
  const groups = new Map<string, T[]>();
  for (const item of items) {
    const group = groups.get(key(item));
    if (group) group.push(item);
    else groups.set(key(item), [item]);
  }
  return groups;
}

export function jointIsOwn(joint: Joint, own: ReadonlySet<string>, spool: string | null, share: SheetShare | null): boolean {
  if (own.has(joint.a ?? "") || own.has(joint.b ?? "")) return true;
  if (share === null) return joint.spool === spool;
  return joint.a === null && joint.b === null && share.points.has(joint.pointId) && (spool === null || joint.spool === spool);
}

/** Where a run comes back to a fitting and closes, its last point is that fitting's point on paper. */
export function meetingPoints(model: Model): ReadonlyMap<string, string> {
  const meets = new Map<string, string>();
  const open = new Set((model.loops ?? []).filter((loop) => !loop.closes).map((loop) => loop.runId));
  for (const run of model.document.runs) {
    const last = run.points[run.points.length - 1];
    if (run.to !== undefined && last && last.id !== run.to && !open.has(run.id)) meets.set(last.id, run.to);
  }
  return meets;
}

export function ownParts(model: Model, spool: string | null, share: SheetShare | null): ReadonlySet<string> {
  const own = new Set<string>();
  for (const { id, pointId, spool: letter } of model.components) if ((spool === null || letter === spool) && (share === null || share.points.has(pointId))) own.add(id);
  for (const { key, legId, spool: letter } of model.pieces) if ((spool === null || letter === spool) && (share === null || share.legs.has(legId))) own.add(key);
  return own;
}

/** The pieces of each leg; one piece may pass through several (past a support or an outlet). */
export function piecesOfLegs(model: Model): ReadonlyMap<string, readonly Piece[]> {
  const found = new Map<string, Piece[]>();
  const add = (legId: string, piece: Piece): void => {
    const there = found.get(legId);
    if (there) there.push(piece);
    else found.set(legId, [piece]);
  };
  const unsaid = groupBy(model.pieces.filter((piece) => piece.legIds === undefined), (piece) => piece.runId);
  for (const piece of model.pieces) for (const legId of piece.legIds ?? []) add(legId, piece);
  if (unsaid.size > 0) for (const leg of model.legs) for (const piece of unsaid.get(leg.runId) ?? []) if (pieceRunsAlong(piece, leg)) add(leg.id, piece);
  return found;
}

/** One piece may pass through several legs (past a support or an outlet): it counts on each leg it shares a length with. */
function pieceRunsAlong(piece: Piece, leg: Leg): boolean {
  if (vecDot(piece.direction, leg.direction) < size.PORT_COSINE) return false;
  const start = vecSub(piece.start, leg.from);
  if (vecLength(vecReject(start, leg.direction)) > size.BESIDE_MM) return false;
  const from = Math.max(0, vecDot(start, leg.direction));
  const to = Math.min(leg.lengthMm, vecDot(vecSub(piece.end, leg.from), leg.direction));
  return to - from > size.LEVEL_MM;
}
