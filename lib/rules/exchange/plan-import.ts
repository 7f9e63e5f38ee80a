/** Puts the points of a file into a line: as the whole line, or into one run of it. Pure: fresh ids are handed in. */
import { isBranchFitting, MAX_POINTS, parseRunDocument, type Point, type Run, type RunDocument } from "@/iso";
import { withLeaves } from "./detail-cell";
import { countWords } from "./import-cell";
import type { GoodRow } from "./read-points";

export type ImportTarget =
  | { readonly kind: "line" }
  /** One run of the file into one run of the line. */
  | { readonly kind: "run"; readonly fileRun: string; readonly runId: string; readonly where: "after" | "instead" };

export interface FreshIds {
  readonly point: () => string;
  readonly run: () => string;
}

export type ImportPlan =
  | { readonly ok: true; readonly document: RunDocument; readonly points: number; readonly runs: number }
  | { readonly ok: false; readonly message: string };

/** Names of the runs in the file, in order. */
export function fileRuns(good: readonly GoodRow[]): readonly string[] {
  return [...new Set(good.map((row) => row.run))];
}

/** @returns the line with the points in it, or one sentence that says what stands against it. Never throws. */
export function planImport(document: RunDocument, good: readonly GoodRow[], target: ImportTarget, fresh: FreshIds): ImportPlan {
  if (good.length === 0) return { ok: false, message: "No row can be read, so there is nothing to bring in." };
  const made = target.kind === "line" ? wholeLine(document, good, fresh) : oneRun(document, good, target, fresh);
  if (typeof made === "string") return { ok: false, message: made };
  const next = withEmptyBranches({ ...document, runs: made.runs }, fresh);
  const total = next.runs.reduce((sum, run) => sum + run.points.length, 0);
  if (total > MAX_POINTS) {
    return { ok: false, message: `A line holds ${countWords(MAX_POINTS)} points; this would make ${countWords(total)}. Choose one run of the file or fewer rows, and put the rest into another line.` };
  }
  const checked = parseRunDocument(next);
  if (!checked.ok) return { ok: false, message: checked.messages[0] ?? "These points do not make a line." };
  return { ok: true, document: next, points: made.points, runs: made.count };
}

interface Made {
  readonly runs: Run[];
  readonly points: number;
  readonly count: number;
}

/** An id the file names is kept only where the line has it now: an id that was deleted keeps its marks for ever. */
function idKeeper(known: ReadonlySet<string>, fresh: () => string): (label: string) => string {
  const used = new Set<string>();
  return (label) => {
    const id = known.has(label) && !used.has(label) ? label : fresh();
    used.add(id);
    return id;
  };
}

function wholeLine(document: RunDocument, good: readonly GoodRow[], fresh: FreshIds): Made | string {
  const pointId = idKeeper(new Set(document.runs.flatMap((run) => run.points.map((point) => point.id))), fresh.point);
  const runId = idKeeper(new Set(document.runs.map((run) => run.id)), fresh.run);
  const ids = good.map((row) => pointId(row.label));
  const byLabel = new Map<string, string>();
  good.forEach((row, index) => row.label !== "" && !byLabel.has(row.label) && byLabel.set(row.label, ids[index]!));
  const names = fileRuns(good);
  const runs: Run[] = [];
  for (const [order, name] of names.entries()) {
    const rows = good.map((row, index) => ({ row, id: ids[index]! })).filter(({ row }) => row.run === name);
    const head = rows[0]!.row;
    const from = order === 0 ? null : byLabel.get(head.from);
    if (from === undefined) return `Row ${head.row}: no row names the point "${head.from}" that run "${name}" leaves from. Correct the name, or bring in one run at a time.`;
    const run = withLeaves({ id: runId(name), name: head.runName || (order === 0 || document.runs.some(({ id }) => id === name) ? "" : name), from, pipe: null }, head.runChanges);
    const to = typeof run.to === "string" ? byLabel.get(run.to) : undefined;
    runs.push({ ...(run as Run), ...(to === undefined ? { to: undefined } : { to }), points: rows.map(({ row, id }) => ({ id, ...row.point })) });
  }
  return { runs: runs.map(withoutEmptyTo), points: good.length, count: runs.length };
}

function withoutEmptyTo(run: Run): Run {
  return run.to === undefined ? (Object.fromEntries(Object.entries(run).filter(([key]) => key !== "to")) as Run) : run;
}

function oneRun(document: RunDocument, good: readonly GoodRow[], target: Extract<ImportTarget, { kind: "run" }>, fresh: FreshIds): Made | string {
  const run = document.runs.find((each) => each.id === target.runId);
  if (!run) return "That run is no longer there. Choose another.";
  const rows = good.filter((row) => row.run === target.fileRun);
  if (rows.length === 0) return "None of the rows to take belongs to the run chosen. Choose another run of the file.";
  const instead = target.where === "instead";
  const keep = idKeeper(new Set(instead ? run.points.map((point) => point.id) : []), fresh.point);
  const added: Point[] = rows.map((row) => ({ id: keep(row.label), ...row.point }));
  const points = instead ? added : [...run.points, ...added];
  const left = new Set(points.map((point) => point.id));
  const gone = instead ? document.runs.filter((each) => each.from !== null && run.points.some((point) => point.id === each.from) && !left.has(each.from)) : [];
  if (gone.length > 0) return `${gone.length === 1 ? "A branch leaves" : "Branches leave"} from points of this run that the file does not name. Add the points after the run, or bring in the whole line.`;
  return { runs: document.runs.map((each) => (each === run ? { ...each, points } : each)), points: rows.length, count: 1 };
}

/** A tee, cross, outlet or stub-in without its branch gets an empty one, as when it is typed. */
function withEmptyBranches(document: RunDocument, fresh: FreshIds): RunDocument {
  const added = document.runs.flatMap((run) => run.points).flatMap((point): Run[] => {
    if (!isBranchFitting(point.item)) return [];
    const wanted = point.item.kind === "cross" ? 2 : 1;
    const there = document.runs.filter((run) => run.from === point.id || run.to === point.id).length;
    return Array.from({ length: Math.max(0, wanted - there) }, () => ({ id: fresh.run(), name: "", from: point.id, pipe: null, points: [] }));
  });
  return added.length === 0 ? document : { ...document, runs: [...document.runs, ...added] };
}
