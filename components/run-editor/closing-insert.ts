/** Turns a closing into points of the run: trimmed elbows between what stays, with absolute places kept. Pure. */
import { buildModel, emptyMarks } from "@/iso";
import type { CloseBetweenInput, ClosingFound, Item, Model, Offset, Point, RunDocument, UnitSystem, Vec3 } from "@/iso";
import { FROM_DRAWING, pointPlace, runOf, withPoints } from "./document-edits";
import { lengthEntryText } from "@/components/jobs/settings-text";
import { isBareEnd, sizeAfter, type ClosingForm, type EndForm } from "./closing-form";

export interface InsertStamp {
  readonly by: string;
  readonly at: string;
  /** At least four. */
  readonly ids: readonly string[];
}

export type InsertPlan =
  | { readonly ok: true; readonly document: RunDocument; readonly words: string }
  | { readonly ok: false; readonly message: string };

/** What Insert would do, in words, or why it cannot. */
export function planInsert(form: ClosingForm, found: ClosingFound, input: CloseBetweenInput, model: Model, stamp: InsertStamp): InsertPlan {
  if (form.end0.radius === "own" || form.end1.radius === "own") return no("A run takes long- or short-radius elbows; choose one of them at both ends to insert.");
  const { document } = model;
  const unlike = unlikeTheRun(form, input, model);
  const main = document.runs[0];
  const from = form.end0.pointId === "" ? null : pointPlace(document, form.end0.pointId);
  const to = form.end1.pointId === "" ? null : pointPlace(document, form.end1.pointId);
  if (!from && main && main.points.length === 0) return unlike ? no(unlike) : fromNothing(form, found, input, document, stamp);
  if (!from) return no("Take end 0 from a row of the run; the closing goes in after it.");
  const run = runOf(document, from.runId);
  if (!run) return no("That run is no longer there.");
  if (!to && from.row < run.points.length - 1) return no(`Rows follow row ${from.row + 1}: take end 1 from one of them, or end 0 from the last row.`);
  if (to && (to.runId !== from.runId || to.row <= from.row)) return no("End 1 has to be a row after end 0 in the same run.");
  return unlike ? no(unlike) : between(form, found, input, model, run.id, from.row, to?.row ?? null, stamp);
}

/** A closing is worked out for one size and one gap; in a run of another it would not fit. null when they agree. */
function unlikeTheRun(form: ClosingForm, input: CloseBetweenInput, model: Model): string | null {
  const { pipe, allowances, units } = model.document.settings;
  const size = sizeAfter(model, form.end0.pointId) ?? pipe.nps;
  if (size !== form.nps) return `The pipe is NPS ${size} there and this closing NPS ${form.nps}: take the run's size to insert it.`;
  if (Math.abs(input.rootGapMm - allowances.rootGapMm) < GAP_ALIKE_MM) return null;
  return `The line's root gap is ${lengthEntryText(allowances.rootGapMm, units)}: take it here, or change it in the line's settings, to insert.`;
}

/** Two gaps typed alike agree within this, mm. */
const GAP_ALIKE_MM = 0.01;

function no(message: string): InsertPlan {
  return { ok: false, message };
}

function between(form: ClosingForm, found: ClosingFound, input: CloseBetweenInput, model: Model, runId: string, from: number, to: number | null, stamp: InsertStamp): InsertPlan {
  const { document } = model;
  const points = runOf(document, runId)?.points ?? [];
  const keepFrom = isBareEnd(model, points[from]?.id ?? "") && from > 0 ? from : from + 1;
  const bareTo = to !== null && to < points.length - 1 && isBareEnd(model, points[to]?.id ?? "");
  const keepTo = to === null ? points.length : bareTo ? to + 1 : to;
  const branched = points.slice(keepFrom, keepTo).findIndex((point) => document.runs.some((each) => each.from === point.id));
  if (branched >= 0) return no(`Row ${keepFrom + branched + 1} carries a branch, which the closing would take away: take both ends on one side of it.`);
  const before = placeAfter(document, runId, keepFrom, input.end0.direction);
  const bends = bendPoints(form, found, before, document.settings.units, stamp);
  const last = found.points[found.points.length - 1] ?? before;
  const after = points[keepTo];
  const place = positionOf(model, after?.id);
  const rest = after && place ? [{ ...after, offset: offsetBetween(last, place, document.settings.units) }, ...points.slice(keepTo + 1)] : [];
  const tail = to === null ? [endPoint(form.end1, input, last, document.settings.units, stamp)] : [];
  const head = points.slice(0, keepFrom).map((point, i) => (i === 0 && from === 0 ? outsideEnd(model, point, "out") : point));
  const kept = rest.map((point, i) => (i === 0 && rest.length === 1 ? outsideEnd(model, point, "in") : point));
  const next = withPoints(document, runId, () => [...head, ...bends, ...tail, ...kept]);
  const gone = keepTo - keepFrom;
  return { ok: true, document: next, words: insertWords(bends.length, keepFrom + 1, gone, to === null) };
}

function insertWords(bends: number, row: number, gone: number, atEnd: boolean): string {
  const what = bends === 0 ? "No elbow is needed" : `${bends === 1 ? "One elbow goes" : "Two elbows go"} in${atEnd ? " at the end of the run" : ""}`;
  if (gone === 0) return `${what}.`;
  return gone === 1 ? `${what}. Row ${row} goes out; Undo brings it back.` : `${what}. Rows ${row} to ${row + gone - 1} go out; Undo brings them back.`;
}

const PROBE_MM = 1_000;

/**
 * Where the offset of a point in this row starts from. Not always the place of the point before it: an eccentric
 * reducer moves the centre line. So a point a known way along is placed by the model and taken back.
 */
function placeAfter(document: RunDocument, runId: string, row: number, direction: Vec3): Vec3 {
  const size = Math.hypot(...direction) || 1;
  const [e, n, u] = direction.map((part) => (part / size) * PROBE_MM) as [number, number, number];
  const probe: Point = {
    id: "probe", item: { kind: "none" }, places: {}, trimMm: null, provenance: FROM_DRAWING, note: "",
    offset: { kind: "enu", e: { text: "", mm: e }, n: { text: "", mm: n }, u: { text: "", mm: u } },
  };
  const probed = withPoints(document, runId, (points) => [...points.slice(0, row), probe]);
  const place = positionOf(buildModel(probed, emptyMarks(), []), probe.id);
  return place ? [place[0] - e, place[1] - n, place[2] - u] : [0, 0, 0];
}

/** A bare end of the run that an elbow is welded to is pipe that stands there already: a field weld to it. */
function outsideEnd(model: Model, point: Point, side: "in" | "out"): Point {
  if (!isBareEnd(model, point.id)) return point;
  const item: Item = point.item.kind === "end" ? point.item : EXISTING;
  return { ...point, item, places: { ...point.places, [side]: point.places[side] ?? "field" } };
}

const EXISTING: Item = { kind: "end", goes: "existing", text: "" };

/** A closing typed into an empty run: end 0 is where it starts. */
function fromNothing(form: ClosingForm, found: ClosingFound, input: CloseBetweenInput, document: RunDocument, stamp: InsertStamp): InsertPlan {
  const { units } = document.settings;
  const main = document.runs[0];
  if (!main) return no("This line has no run.");
  const start = input.end0.position;
  const first = { ...asMeasured(newPoint(stamp.ids[2] ?? "closing-start", offsetBetween([0, 0, 0], start, units), EXISTING, stamp), form.end0), places: { out: "field" as const } };
  const last = found.points[found.points.length - 1] ?? start;
  const points = [first, ...bendPoints(form, found, start, units, stamp), endPoint(form.end1, input, last, units, stamp)];
  return { ok: true, document: withPoints(document, main.id, () => points), words: "The closing becomes this line's run, between two existing ends." };
}

function bendPoints(form: ClosingForm, found: ClosingFound, before: Vec3, units: UnitSystem, stamp: InsertStamp): Point[] {
  return found.bends.map((bend, i) => {
    const from = i === 0 ? before : (found.points[i - 1] ?? before);
    const end: EndForm = bend.end === 0 ? form.end0 : form.end1;
    const size = end.radius === "SR" ? "sr" : "lr";
    const elbow = bend.elbow === "90" ? (`${size}-90` as const) : (`trimmed-${size}` as const);
    return newPoint(stamp.ids[i] ?? `closing-${i}`, offsetBetween(from, bend.workingPoint, units), { kind: "elbow", elbow }, stamp);
  });
}

function endPoint(end: EndForm, input: CloseBetweenInput, from: Vec3, units: UnitSystem, stamp: InsertStamp): Point {
  return { ...asMeasured(newPoint(stamp.ids[3] ?? "closing-end", offsetBetween(from, input.end1.position, units), EXISTING, stamp), end), places: { in: "field" as const } };
}

/** A point at a surveyed end says that it was measured, and how well. */
function asMeasured(point: Point, end: EndForm): Point {
  return end.surveyed ? { ...point, provenance: { ...point.provenance, kind: "measured", toleranceMm: end.surveyed.withinMm } } : point;
}

function newPoint(id: string, offset: Offset, item: Item, stamp: InsertStamp): Point {
  const provenance = { ...FROM_DRAWING, kind: "calculated" as const, by: stamp.by, at: stamp.at };
  return { id, offset, item, places: {}, trimMm: null, provenance, note: "" };
}

function positionOf(model: Model, pointId: string | undefined): Vec3 | null {
  return model.nodes.find((node) => node.pointId === pointId)?.position ?? null;
}

/** Less than this between two places is float noise, mm. */
const FLOAT_DUST_MM = 1e-6;

/** East, north and up from one place to another, as texts that read back to the same numbers. */
export function offsetBetween(from: Vec3, to: Vec3, units: UnitSystem): Offset {
  const entry = (axis: 0 | 1 | 2) => {
    const mm = to[axis] - from[axis];
    if (Math.abs(mm) < FLOAT_DUST_MM) return { text: "0", mm: 0 };
    const text = lengthEntryText(Math.abs(mm), units);
    return { text: mm < 0 ? `-${text}` : text, mm };
  };
  return { kind: "enu", e: entry(0), n: entry(1), u: entry(2) };
}
