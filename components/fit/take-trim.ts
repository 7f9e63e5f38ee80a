/** The field-fit weld of a fit taken over into the run: the elbow's point says so, with the trim to leave on. Pure. */
import type { ClosingFound, FitTrim, RunDocument } from "@/iso";

/** A field-fit weld as it goes into the run. */
export interface TakenTrim {
  readonly jointId: string;
  readonly trimMm: number;
}

/** Whether a joint is one of the elbows', whose point can carry it. */
export function canTake({ jointId }: Pick<FitTrim, "jointId">): boolean {
  return jointId === "elbow0" || jointId === "elbow1";
}

/**
 * The document with that weld made to fit in the field.
 * @param bendIds ids of the inserted elbows' points, in the order of the closing's bends.
 */
export function withFieldFit(document: RunDocument, answer: Pick<ClosingFound, "bends">, bendIds: readonly string[], { jointId, trimMm }: TakenTrim): RunDocument {
  const at = answer.bends.findIndex(({ end }) => jointId === `elbow${end}`);
  const id = bendIds[at];
  if (at < 0 || id === undefined) return document;
  const side = jointId === "elbow0" ? "out" : "in";
  const runs = document.runs.map((run) => ({
    ...run,
    points: run.points.map((point) => (point.id === id ? { ...point, places: { ...point.places, [side]: "field-fit" as const }, trimMm } : point)),
  }));
  return { ...document, runs };
}
