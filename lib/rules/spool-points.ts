/** Which points of a line belong to a spool. Pure. */
import type { Model, Spool } from "@/iso";

/** Ids of the points where the spool's components stand, and of the ends of every leg its pipes run along. */
export function spoolPointIds(model: Model, spool: Spool): ReadonlySet<string> {
  const parts = new Set([...spool.componentIds, ...spool.pieceKeys]);
  return new Set([
    ...model.pieces.filter((piece) => parts.has(piece.key)).flatMap((piece) => piece.legIds ?? [piece.legId]),
    ...model.components.filter((component) => parts.has(component.id)).map((component) => component.pointId),
  ]);
}
