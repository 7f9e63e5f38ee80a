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
 * @param before the document without the closing: its elbows are those that were not there.
 */
export function withFieldFit(document: RunDocument, before: RunDocument, answer: Pick<ClosingFound, "bends">, { jointId, trimMm }: TakenTrim): RunDocument {
  const known = new Set(before.runs.flatMap((run) => run.points.map(({ id }) => id)));
  const elbows = document.runs.flatMap((run) => run.points.filter(({ id, item }) => item.kind === "elbow" && !known.has(id)));
  const elbow = elbows[answer.bends.findIndex(({ end }) => jointId === `elbow${end}`)];
  if (!elbow) return document;
  const side = jointId === "elbow0" ? "out" : "in";
  const runs = document.runs.map((run) => ({
    ...run,
    points: run.points.map((point) => (point === elbow ? { ...point, places: { ...point.places, [side]: "field-fit" as const }, trimMm } : point)),
  }));
  return { ...document, runs };
}
