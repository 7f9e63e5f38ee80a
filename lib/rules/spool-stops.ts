/** What keeps a spool from being submitted. Pure. */
import type { Model, Spool } from "@/iso";

/** Sentences of the problems that stop this spool: those at its own points, and those of the whole line. */
export function spoolStops(model: Model, spool: Spool): string[] {
  const parts = new Set([...spool.componentIds, ...spool.pieceKeys]);
  const points = new Set([
    ...model.components.filter((c) => parts.has(c.id)).map((c) => c.pointId),
    ...model.pieces.filter((p) => parts.has(p.key)).map((p) => p.legId),
  ]);
  return model.problems.filter((p) => p.severity === "stop" && (p.pointId === null || points.has(p.pointId))).map((p) => p.text);
}
