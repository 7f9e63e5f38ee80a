/** Turns a closing, of whatever fittings, into points of the run between what stays, with absolute places kept. Pure. */
import {
  buildModel, emptyMarks, wayStops,
  type CloseBetweenInput, type ClosingFound, type Item, type Model, type Nps, type Offset, type Point, type RunDocument, type UnitSystem, type Vec3, type Way, type WaysInput, type WayStop,
} from "@/iso";
import { FROM_DRAWING, pointPlace, runOf, withPoints } from "./document-edits";
import { lengthEntryText } from "@/components/jobs/settings-text";
import { isBareEnd, sizeAfter, type ClosingForm, type EndForm } from "./closing-form";

export interface InsertStamp {
  readonly by: string;
  readonly at: string;
  /** At least one; made longer where more are wanted. */
  readonly ids: readonly string[];
}

export type InsertPlan =
  | { readonly ok: true; readonly document: RunDocument; readonly words: string }
  | { readonly ok: false; readonly message: string };

/** What goes in: working points in order, and the two ends they go between. */
interface Insertion {
  readonly stops: readonly WayStop[];
  /** The ends after what is cut back there. */
  readonly start: Vec3;
  readonly end: Vec3;
  readonly rootGapMm: number;
  /** Direction out of end 0. */
  readonly out: Vec3;
  /** Sizes at end 0 and end 1. */
  readonly nps: Nps;
  readonly nps1: Nps;
  readonly trims: Way["trims"];
}

/** What Insert would do, in words, or why it cannot. */
export function planInsert(form: ClosingForm, found: ClosingFound, input: CloseBetweenInput, model: Model, stamp: InsertStamp): InsertPlan {
  if (form.end0.radius === "own" || form.end1.radius === "own") return no("A run takes long- or short-radius elbows; choose one of them at both ends to insert.");
  const stops = found.bends.map((bend): WayStop => {
    const size = (bend.end === 0 ? form.end0 : form.end1).radius === "SR" ? "sr" : "lr";
    return { position: bend.workingPoint, item: { kind: "elbow", elbow: bend.elbow === "90" ? `${size}-90` : `trimmed-${size}` } };
  });
  return planned(form, { stops, start: input.end0.position, end: input.end1.position, rootGapMm: input.rootGapMm, out: input.end0.direction, nps: form.nps, nps1: form.nps, trims: { end0Mm: 0, end1Mm: 0 } }, model, stamp);
}

/** The same for any way of the list: whole and trimmed elbows, mitres, a reducer, ends cut back. */
export function planWayInsert(form: ClosingForm, way: Way, input: WaysInput, model: Model, stamp: InsertStamp): InsertPlan {
  const fixed = [input.end0, input.end1].findIndex((end, i) => end.fixed === true && (i === 0 ? way.trims.end0Mm : way.trims.end1Mm) !== 0);
  if (fixed >= 0) return no(`End ${fixed} is a fitting of the run: nothing can be cut back there.`);
  const { stops, start, end } = wayStops(way);
  return planned(form, { stops, start, end, rootGapMm: input.rootGapMm, out: input.end0.direction, nps: input.end0.nps, nps1: input.end1.nps, trims: way.trims }, model, stamp);
}

function planned(form: ClosingForm, put: Insertion, model: Model, stamp: InsertStamp): InsertPlan {
  const { document } = model;
  const unlike = unlikeTheRun(form, put, model);
  const main = document.runs[0];
  const from = form.end0.pointId === "" ? null : pointPlace(document, form.end0.pointId);
  const to = form.end1.pointId === "" ? null : pointPlace(document, form.end1.pointId);
  if (!from && main && main.points.length === 0) return unlike ? no(unlike) : fromNothing(form, put, document, stamp);
  if (!from) return no("Take end 0 from a row of the run; the closing goes in after it.");
  const run = runOf(document, from.runId);
  if (!run) return no("That run is no longer there.");
  if (!to && from.row < run.points.length - 1) return no(`Rows follow row ${from.row + 1}: take end 1 from one of them, or end 0 from the last row.`);
  if (to && (to.runId !== from.runId || to.row <= from.row)) return no("End 1 has to be a row after end 0 in the same run.");
  return unlike ? no(unlike) : between(form, put, model, run.id, from.row, to?.row ?? null, stamp);
}

/** A closing is worked out for one size and one gap; in a run of another it would not fit. null when they agree. */
function unlikeTheRun(form: ClosingForm, put: Insertion, model: Model): string | null {
  const { pipe, allowances, units } = model.document.settings;
  const size = sizeAfter(model, form.end0.pointId) ?? pipe.nps;
  if (size !== put.nps) return `The pipe is NPS ${size} there and this closing NPS ${put.nps}: take the run's size to insert it.`;
  const onward = form.end1.pointId === "" ? null : sizeAfter(model, form.end1.pointId);
  if (onward !== null && put.nps1 !== put.nps && onward !== put.nps1) return `The pipe is NPS ${onward} at end 1 and this closing NPS ${put.nps1} there: take the run's size to insert it.`;
  if (Math.abs(put.rootGapMm - allowances.rootGapMm) < GAP_ALIKE_MM) return null;
  return `The line's root gap is ${lengthEntryText(allowances.rootGapMm, units)}: take it here, or change it in the line's settings, to insert.`;
}

/** Two gaps typed alike agree within this, mm. */
const GAP_ALIKE_MM = 0.01;

function no(message: string): InsertPlan {
  return { ok: false, message };
}

function between(form: ClosingForm, put: Insertion, model: Model, runId: string, from: number, to: number | null, stamp: InsertStamp): InsertPlan {
  const { document } = model;
  const { units } = document.settings;
  const points = runOf(document, runId)?.points ?? [];
  const keepFrom = isBareEnd(model, points[from]?.id ?? "") && from > 0 ? from : from + 1;
  const bareTo = to !== null && to < points.length - 1 && isBareEnd(model, points[to]?.id ?? "");
  const keepTo = to === null ? points.length : bareTo ? to + 1 : to;
  const branched = points.slice(keepFrom, keepTo).findIndex((point) => document.runs.some((each) => each.from === point.id));
  if (branched >= 0) return no(`Row ${keepFrom + branched + 1} carries a branch, which the closing would take away: take both ends on one side of it.`);
  const cut = withStartCut(document, runId, from, put);
  const before = placeAfter(cut, runId, keepFrom, put);
  const stops = stopPoints(put, before, units, stamp);
  const last = put.stops[put.stops.length - 1]?.position ?? before;
  const after = points[keepTo];
  const place = keepTo === to && put.trims.end1Mm !== 0 ? put.end : positionOf(model, after?.id);
  const rest = after && place ? [{ ...after, offset: offsetBetween(last, place, units) }, ...points.slice(keepTo + 1)] : [];
  const tail = to === null ? [endPoint(form.end1, put, last, units, stamp)] : [];
  const head = (runOf(cut, runId)?.points ?? []).slice(0, keepFrom).map((point, i) => (i === 0 && from === 0 ? outsideEnd(model, point, "out") : point));
  const kept = rest.map((point, i) => (i === 0 && rest.length === 1 ? outsideEnd(model, point, "in") : point));
  const next = withPoints(document, runId, () => [...head, ...stops, ...tail, ...kept]);
  return { ok: true, document: next, words: insertWords(put, keepFrom + 1, keepTo - keepFrom, to === null) };
}

/** The run's own first end moved to where it is cut back to; everything after it is measured anew anyway. */
function withStartCut(document: RunDocument, runId: string, from: number, { start, trims }: Insertion): RunDocument {
  if (from !== 0 || trims.end0Mm === 0) return document;
  return withPoints(document, runId, (points) => points.map((point, i) => (i === 0 ? { ...point, offset: offsetBetween([0, 0, 0], start, document.settings.units) } : point)));
}

function insertWords({ stops }: Insertion, row: number, gone: number, atEnd: boolean): string {
  const count = ["No fitting is", "One fitting goes", "Two fittings go", "Three fittings go", "Four fittings go"][stops.length] ?? `${stops.length} fittings go`;
  const elbows = stops.every((stop) => stop.item.kind === "elbow") ? count.replace("fitting", "elbow") : count;
  const what = stops.length === 0 ? "No elbow is needed" : `${elbows} in${atEnd ? " at the end of the run" : ""}`;
  if (gone === 0) return `${what}.`;
  return gone === 1 ? `${what}. Row ${row} goes out; Undo brings it back.` : `${what}. Rows ${row} to ${row + gone - 1} go out; Undo brings them back.`;
}

/**
 * Where the offset of a point in this row starts from. Not always the place of the point before it: an eccentric
 * reducer moves the centre line. So a point a known way along is placed by the model and taken back.
 */
function placeAfter(document: RunDocument, runId: string, row: number, { out: direction }: Insertion): Vec3 {
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

const PROBE_MM = 1_000;

/** A bare end of the run that an elbow is welded to is pipe that stands there already: a field weld to it. */
function outsideEnd(model: Model, point: Point, side: "in" | "out"): Point {
  if (!isBareEnd(model, point.id)) return point;
  const item: Item = point.item.kind !== "end" ? EXISTING : point.item.goes === "existing" ? { ...point.item, gapped: true } : point.item;
  return { ...point, item, places: { ...point.places, [side]: point.places[side] ?? "field" } };
}

/** What stands there already ends at the point: new pipe is cut one root gap short of it. */
const EXISTING: Item = { kind: "end", goes: "existing", text: "", gapped: true };

/** A closing typed into an empty run: end 0 is where it starts. */
function fromNothing(form: ClosingForm, put: Insertion, document: RunDocument, stamp: InsertStamp): InsertPlan {
  const { units } = document.settings;
  const main = document.runs[0];
  if (!main) return no("This line has no run.");
  const first = { ...asMeasured(newPoint(idOf(stamp, 0), offsetBetween([0, 0, 0], put.start, units), EXISTING, stamp), form.end0), places: { out: "field" as const } };
  const points = [first, ...stopPoints(put, put.start, units, stamp), endPoint(form.end1, put, put.stops[put.stops.length - 1]?.position ?? put.start, units, stamp)];
  return { ok: true, document: withPoints(document, main.id, () => points), words: "The closing becomes this line's run, between two existing ends." };
}

/** Ids of the first end, the last end and the stops, in this order. */
function idOf(stamp: InsertStamp, i: number): string {
  return stamp.ids[i] ?? `${stamp.ids[0] ?? "closing"}-${i}`;
}

function stopPoints(put: Insertion, before: Vec3, units: UnitSystem, stamp: InsertStamp): Point[] {
  return put.stops.map((stop, i) => newPoint(idOf(stamp, 2 + i), offsetBetween(i === 0 ? before : (put.stops[i - 1]?.position ?? before), stop.position, units), stop.item, stamp));
}

function endPoint(end: EndForm, put: Insertion, from: Vec3, units: UnitSystem, stamp: InsertStamp): Point {
  return { ...asMeasured(newPoint(idOf(stamp, 1), offsetBetween(from, put.end, units), EXISTING, stamp), end), places: { in: "field" as const } };
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
