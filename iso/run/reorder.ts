/** Several rows of the grid at once: put in, taken out, moved. Pure, like the operations on one point in edit.ts. */
import type { Point, RunDocument } from "./document";
import { pointRemove } from "./edit";

/** Puts points before the row `index` of a run. A point whose id the line has already changes nothing at all. */
export function pointsInsert(document: RunDocument, runId: string, index: number, points: readonly Point[]): RunDocument {
  const run = document.runs.find((r) => r.id === runId);
  const ids = new Set(document.runs.flatMap((r) => r.points.map((p) => p.id)));
  const fresh = points.every((p) => !ids.has(p.id)) && new Set(points.map((p) => p.id)).size === points.length;
  if (!run || points.length === 0 || !fresh) return document;
  const row = Math.max(0, Math.min(Math.trunc(index) || 0, run.points.length));
  return withRows(document, runId, [...run.points.slice(0, row), ...points, ...run.points.slice(row)]);
}

/** Takes points out, with the branches that leave from them. */
export function pointsRemove(document: RunDocument, pointIds: readonly string[]): RunDocument {
  return pointIds.reduce(pointRemove, document);
}

/** Moves `count` rows from row `from` so that the first of them ends up in row `to` of the same run. */
export function pointsMove(document: RunDocument, runId: string, from: number, count: number, to: number): RunDocument {
  const run = document.runs.find((r) => r.id === runId);
  if (!run || ![from, count, to].every(Number.isInteger)) return document;
  const last = run.points.length - count;
  if (count < 1 || from < 0 || from > last || to < 0 || to > last || from === to) return document;
  const moved = run.points.slice(from, from + count);
  const rest = [...run.points.slice(0, from), ...run.points.slice(from + count)];
  return withRows(document, runId, [...rest.slice(0, to), ...moved, ...rest.slice(to)]);
}

function withRows(document: RunDocument, runId: string, points: Point[]): RunDocument {
  return { ...document, runs: document.runs.map((r) => (r.id === runId ? { ...r, points } : r)) };
}
