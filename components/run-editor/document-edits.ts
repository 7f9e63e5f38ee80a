/** Edits of a run document the grid makes: each takes a document and gives a new one, sharing all that stays. */
import { branchAdd, isBranchFitting, pointInsert, type Item, type Point, type Provenance, type Run, type RunDocument } from "@/iso";

export const FROM_DRAWING: Provenance = { kind: "from-drawing", toleranceMm: null, by: null, at: null, second: null };

export function runOf(document: RunDocument, runId: string): Run | null {
  return document.runs.find((run) => run.id === runId) ?? null;
}

/** The run and row of a point; null when it is not there. */
export function pointPlace(document: RunDocument, pointId: string): { readonly runId: string; readonly row: number } | null {
  for (const run of document.runs) {
    const row = run.points.findIndex((point) => point.id === pointId);
    if (row >= 0) return { runId: run.id, row };
  }
  return null;
}

export function withPoints(document: RunDocument, runId: string, edit: (points: readonly Point[]) => readonly Point[]): RunDocument {
  const runs = document.runs.map((run) => (run.id === runId ? { ...run, points: [...edit(run.points)] } : run));
  return { ...document, runs };
}

export function withPoint(document: RunDocument, pointId: string, edit: (point: Point) => Point): RunDocument {
  const place = pointPlace(document, pointId);
  if (!place) return document;
  return withPoints(document, place.runId, (points) => points.map((point) => (point.id === pointId ? edit(point) : point)));
}

export function withPointsInserted(document: RunDocument, runId: string, row: number, added: readonly Point[]): RunDocument {
  return added.reduce((now, point, i) => pointInsert(now, runId, row + i, point), document);
}

/**
 * Sets a point's item, as typed. A branch item gets its branch run at once (a cross two); an empty branch of an item that
 * takes none any more goes with it (one with points stays, and the problem list says so).
 */
export function withItem(document: RunDocument, pointId: string, item: Item, branchId: string): RunDocument {
  const set = withPoint(document, pointId, (point) => ({ ...point, item }));
  const wanted = !isBranchFitting(item) ? 0 : item.kind === "cross" ? 2 : 1;
  const branches = set.runs.filter((run) => run.from === pointId);
  const spare = branches.filter((run) => run.points.length === 0).slice(Math.max(0, wanted - branches.filter((run) => run.points.length > 0).length));
  const kept = spare.length === 0 ? set : { ...set, runs: set.runs.filter((run) => !spare.includes(run)) };
  const missing = Math.max(0, wanted - (branches.length - spare.length));
  return Array.from({ length: missing }, (_, n) => (n === 0 ? branchId : `${branchId}b`)).reduce((now, id) => branchAdd(now, pointId, id), kept);
}
