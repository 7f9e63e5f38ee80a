/** Edits of a run document the grid makes: each takes a document and gives a new one, sharing all that stays. */
import type { Item, Point, Provenance, Run, RunDocument } from "@/iso";
import { isBranchItem } from "./item-text";

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
  return withPoints(document, runId, (points) => [...points.slice(0, row), ...added, ...points.slice(row)]);
}

/** Takes a point out, with the branches that leave from it and from theirs. */
export function withPointRemoved(document: RunDocument, pointId: string): RunDocument {
  const place = pointPlace(document, pointId);
  if (!place) return document;
  const without = withPoints(document, place.runId, (points) => points.filter((point) => point.id !== pointId));
  return withoutBranches(without, pointId);
}

function withoutBranches(document: RunDocument, pointId: string): RunDocument {
  const gone = document.runs.filter((run) => run.from === pointId);
  if (gone.length === 0) return document;
  const rest = { ...document, runs: document.runs.filter((run) => run.from !== pointId) };
  return gone.flatMap((run) => run.points).reduce((now, point) => withoutBranches(now, point.id), rest);
}

/** Swaps a point with the row above (-1) or below (+1) it; unchanged at the run's ends. */
export function withPointMoved(document: RunDocument, runId: string, row: number, by: -1 | 1): RunDocument {
  const run = runOf(document, runId);
  const [point, other] = [run?.points[row], run?.points[row + by]];
  if (!point || !other) return document;
  return withPoints(document, runId, (points) => points.map((each, i) => (i === row ? other : i === row + by ? point : each)));
}

/**
 * Sets a point's item. A branch item gets its branch run at once; the empty branch of an item that is none any more
 * goes with it (one with points stays, and the problem list says so).
 */
export function withItem(document: RunDocument, pointId: string, item: Item, branchId: string): RunDocument {
  const set = withPoint(document, pointId, (point) => ({ ...point, item: mergedItem(point.item, item) }));
  const branch = set.runs.find((run) => run.from === pointId);
  if (isBranchItem(item)) {
    return branch ? set : { ...set, runs: [...set.runs, { id: branchId, name: "", from: pointId, pipe: null, points: [] }] };
  }
  return branch && branch.points.length === 0 ? { ...set, runs: set.runs.filter((run) => run !== branch) } : set;
}

/** Keeps what the detail strip set (bolt holes, stem, gasket side) when the same kind of item is typed again. */
function mergedItem(before: Item, after: Item): Item {
  if (before.kind === "flange" && after.kind === "flange") {
    const goes = after.goes === "open" && before.goes !== "nozzle" ? before.goes : after.goes;
    return { ...after, boltHoles: before.boltHoles, gasketSide: before.gasketSide, goes };
  }
  if (before.kind === "valve" && after.kind === "valve") return { ...after, stem: before.stem, faceToFaceMm: before.faceToFaceMm };
  return after;
}
