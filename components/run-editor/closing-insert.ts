/** Turns a closing into points of the run: trimmed elbows between what stays, with absolute places kept. Pure. */
import type { CloseBetweenInput, ClosingFound, Item, Model, Offset, Point, RunDocument, UnitSystem, Vec3 } from "@/iso";
import { FROM_DRAWING, pointPlace, runOf, withPoints } from "./document-edits";
import { lengthEntryText } from "@/components/jobs/settings-text";
import { isBareEnd, type ClosingForm, type EndForm } from "./closing-form";

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
  const main = document.runs[0];
  const from = form.end0.pointId === "" ? null : pointPlace(document, form.end0.pointId);
  const to = form.end1.pointId === "" ? null : pointPlace(document, form.end1.pointId);
  if (!from && main && main.points.length === 0) return fromNothing(form, found, input, document, stamp);
  if (!from) return no("Take end 0 from a row of the run; the closing goes in after it.");
  const run = runOf(document, from.runId);
  if (!run) return no("That run is no longer there.");
  if (!to && from.row < run.points.length - 1) return no(`Rows follow row ${from.row + 1}: take end 1 from one of them, or end 0 from the last row.`);
  if (to && (to.runId !== from.runId || to.row <= from.row)) return no("End 1 has to be a row after end 0 in the same run.");
  return between(form, found, input, model, run.id, from.row, to?.row ?? null, stamp);
}

function no(message: string): InsertPlan {
  return { ok: false, message };
}

function between(form: ClosingForm, found: ClosingFound, input: CloseBetweenInput, model: Model, runId: string, from: number, to: number | null, stamp: InsertStamp): InsertPlan {
  const { document } = model;
  const points = runOf(document, runId)?.points ?? [];
  const keepFrom = isBareEnd(model, points[from]?.id ?? "") && from > 0 ? from : from + 1;
  const bareTo = to !== null && to < points.length - 1 && isBareEnd(model, points[to]?.id ?? "");
  const keepTo = to === null ? points.length : bareTo ? to + 1 : to;
  const before = positionOf(model, points[keepFrom - 1]?.id) ?? [0, 0, 0];
  const bends = bendPoints(form, found, before, document.settings.units, stamp);
  const last = found.points[found.points.length - 1] ?? before;
  const after = points[keepTo];
  const place = positionOf(model, after?.id);
  const rest = after && place ? [{ ...after, offset: offsetBetween(last, place, document.settings.units) }, ...points.slice(keepTo + 1)] : [];
  const tail = to === null ? [endPoint(input, last, document.settings.units, stamp)] : [];
  const next = withPoints(document, runId, () => [...points.slice(0, keepFrom), ...bends, ...tail, ...rest]);
  const gone = keepTo - keepFrom;
  return { ok: true, document: next, words: insertWords(bends.length, gone, to === null) };
}

function insertWords(bends: number, gone: number, atEnd: boolean): string {
  const what = bends === 0 ? "No elbow is needed" : `${bends === 1 ? "One elbow goes" : "Two elbows go"} in${atEnd ? " at the end of the run" : ""}`;
  return gone > 0 ? `${what}; ${gone === 1 ? "one row" : `${gone} rows`} between the ends ${gone === 1 ? "gives" : "give"} way. Undo brings ${gone === 1 ? "it" : "them"} back.` : `${what}.`;
}

/** A closing typed into an empty run: end 0 is where it starts. */
function fromNothing(form: ClosingForm, found: ClosingFound, input: CloseBetweenInput, document: RunDocument, stamp: InsertStamp): InsertPlan {
  const { units } = document.settings;
  const main = document.runs[0];
  if (!main) return no("This line has no run.");
  const start = input.end0.position;
  const first = newPoint(stamp.ids[2] ?? "closing-start", offsetBetween([0, 0, 0], start, units), { kind: "end", goes: "existing", text: "" }, stamp);
  const last = found.points[found.points.length - 1] ?? start;
  const points = [first, ...bendPoints(form, found, start, units, stamp), endPoint(input, last, units, stamp)];
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

function endPoint(input: CloseBetweenInput, from: Vec3, units: UnitSystem, stamp: InsertStamp): Point {
  return newPoint(stamp.ids[3] ?? "closing-end", offsetBetween(from, input.end1.position, units), { kind: "end", goes: "existing", text: "" }, stamp);
}

function newPoint(id: string, offset: Offset, item: Item, stamp: InsertStamp): Point {
  const provenance = { ...FROM_DRAWING, kind: "calculated" as const, by: stamp.by, at: stamp.at };
  return { id, offset, item, places: {}, trimMm: null, provenance, note: "" };
}

function positionOf(model: Model, pointId: string | undefined): Vec3 | null {
  return model.nodes.find((node) => node.pointId === pointId)?.position ?? null;
}

/** East, north and up from one place to another, as texts that read back to the same numbers. */
export function offsetBetween(from: Vec3, to: Vec3, units: UnitSystem): Offset {
  const entry = (axis: 0 | 1 | 2) => {
    const mm = to[axis] - from[axis];
    const text = lengthEntryText(Math.abs(mm), units);
    if (text === "0" || text === "0mm") return { text: "0", mm: 0 };
    return { text: mm < 0 ? `-${text}` : text, mm };
  };
  return { kind: "enu", e: entry(0), n: entry(1), u: entry(2) };
}
