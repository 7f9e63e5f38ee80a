/** What keeps a spool from being submitted. Pure. */
import type { Model, Spool } from "@/iso";
import { spoolPointIds } from "./spool-points";

/** Sentences of the problems that stop this spool: those at its own points, and those of the whole line. */
export function spoolStops(model: Model, spool: Spool): string[] {
  const points = spoolPointIds(model, spool);
  return model.problems.filter((p) => p.severity === "stop" && (p.pointId === null || points.has(p.pointId))).map((p) => p.text);
}
