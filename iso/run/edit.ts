/**
 * What an editor does to a run document: pure operations that give a new document and share all that stays. New ids are
 * handed in, so that nothing here is random. An operation on a point, run or row that is not there returns the document
 * as it was.
 */
import { formatLength } from "../units/format";
import type { Item, Offset, Point, Run, RunDocument, UnitSystem } from "./document";

const ZERO = { text: "0", mm: 0 } as const;

/** A point at its forerunner's place with nothing named, its number from the drawing. */
export function newPoint(id: string): Point {
  return {
    id, offset: { kind: "enu", e: ZERO, n: ZERO, u: ZERO }, item: { kind: "none" }, places: {}, trimMm: null,
    provenance: { kind: "from-drawing", toleranceMm: null, by: null, at: null, second: null }, note: "",
  };
}

/** Puts a point before the row `index` (0 to the number of points; beyond it, at the end). */
export function pointInsert(document: RunDocument, runId: string, index: number, point: Point): RunDocument {
  return runUpdate(document, runId, (points) => {
    const row = Math.max(0, Math.min(Math.trunc(index) || 0, points.length));
    return [...points.slice(0, row), point, ...points.slice(row)];
  });
}

/** Takes a point out, with the branches that leave from it, and from theirs. */
export function pointRemove(document: RunDocument, pointId: string): RunDocument {
  const run = document.runs.find((r) => r.points.some((p) => p.id === pointId));
  if (!run) return document;
  const gonePoints = new Set([pointId]);
  const goneRuns = new Set<Run>();
  for (let grew = true; grew; ) {
    grew = false;
    for (const branch of document.runs) {
      if (branch.from === null || goneRuns.has(branch) || !gonePoints.has(branch.from)) continue;
      goneRuns.add(branch);
      branch.points.forEach((p) => gonePoints.add(p.id));
      grew = true;
    }
  }
  const left = document.runs.filter((r) => !goneRuns.has(r)).map((r) => (r.to !== undefined && gonePoints.has(r.to) ? withoutLoop(r) : r));
  return { ...document, runs: left.map((r) => (r.id === run.id ? { ...r, points: r.points.filter((p) => p.id !== pointId) } : r)) };
}

/** A run that came back to a point that is gone ends by itself. */
function withoutLoop(run: Run): Run {
  const open = { ...run };
  delete open.to;
  return open;
}

/** Moves the point in row `from` to row `to` of the same run. */
export function pointMove(document: RunDocument, runId: string, from: number, to: number): RunDocument {
  return runUpdate(document, runId, (points) => {
    const moved = points[from];
    if (!moved || from === to || to < 0 || to >= points.length) return points;
    const rest = points.filter((_, i) => i !== from);
    return [...rest.slice(0, to), moved, ...rest.slice(to)];
  });
}

/** Changes parts of a point; its id stays. */
export function pointUpdate(document: RunDocument, pointId: string, change: Partial<Omit<Point, "id">>): RunDocument {
  let found = false;
  const runs = document.runs.map((run) => {
    if (!run.points.some((p) => p.id === pointId)) return run;
    found = true;
    return { ...run, points: run.points.map((p) => (p.id === pointId ? { ...p, ...change, id: p.id } : p)) };
  });
  return found ? { ...document, runs } : document;
}

/** Starts an empty branch run at a point; its size follows from the fitting there. */
export function branchAdd(document: RunDocument, pointId: string, runId: string, name = ""): RunDocument {
  const exists = document.runs.some((r) => r.points.some((p) => p.id === pointId));
  if (!exists || document.runs.some((r) => r.id === runId)) return document;
  return { ...document, runs: [...document.runs, { id: runId, name, from: pointId, pipe: null, points: [] }] };
}

/** The same line under another number, every run and point with a new id from `idFor(oldId)`. Points keep their provenance. */
export function documentCopy(document: RunDocument, number: string, idFor: (oldId: string) => string): RunDocument {
  const ids = new Map<string, string>();
  const fresh = (old: string): string => {
    const known = ids.get(old);
    if (known !== undefined) return known;
    const made = idFor(old);
    ids.set(old, made);
    return made;
  };
  const runIds = new Map<string, string>();
  const freshRun = (old: string): string => {
    const made = runIds.get(old) ?? idFor(old);
    runIds.set(old, made);
    return made;
  };
  const runs = document.runs.map((run) => ({
    ...run, id: freshRun(run.id), points: run.points.map((p) => ({ ...p, id: fresh(p.id) })),
  }));
  return { ...document, number, runs: runs.map((run) => ({
    ...run, from: run.from === null ? null : fresh(run.from), ...(run.to === undefined ? {} : { to: fresh(run.to) }),
  })) };
}

/** A point's offset as a line of text: `E 3' 1 1/2"`, `UN 3'`, `E 10' at 1:100`, `E 42" N 2' U 18"`, `at E 100 N 0 U 0`. Typed words first. */
export function pointEntryText(point: Point, units: UnitSystem): string {
  const offset = point.offset;
  if (offset.kind === "polar") return `${offset.direction.text || "?"} ${entryText(offset.length, units)}`;
  if (offset.kind === "slope") return `${offset.direction.text || "?"} ${entryText(offset.length, units)} at ${offset.slope.text || String(offset.slope.ratio)}`;
  const parts = axisParts(offset, units);
  if (offset.kind === "absolute") return `at ${parts.map(([axis, text]) => `${axis} ${text}`).join(" ")}`;
  const moved = parts.filter(([, , mm]) => mm !== 0);
  return moved.length === 0 ? "0" : moved.map(([axis, text]) => `${axis} ${text}`).join(" ");
}

function axisParts(offset: Extract<Offset, { kind: "enu" | "absolute" }>, units: UnitSystem): (readonly [string, string, number])[] {
  return (["e", "n", "u"] as const).map((axis) => [axis.toUpperCase(), entryText(offset[axis], units), offset[axis].mm] as const);
}

function entryText(entry: { readonly text: string; readonly mm: number }, units: UnitSystem): string {
  return entry.text.trim() === "" ? formatLength(entry.mm, units) : entry.text.trim();
}

/** True for items a branch run leaves from. */
export function isBranchFitting(item: Item): boolean {
  return item.kind === "tee" || item.kind === "cross" || item.kind === "outlet" || item.kind === "stub-in";
}

function runUpdate(document: RunDocument, runId: string, edit: (points: Point[]) => Point[]): RunDocument {
  const run = document.runs.find((r) => r.id === runId);
  if (!run) return document;
  const points = edit(run.points);
  return points === run.points ? document : { ...document, runs: document.runs.map((r) => (r === run ? { ...r, points } : r)) };
}
