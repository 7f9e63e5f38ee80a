/** What a typed cell does to the document: reads the text by its column and applies it, or says what to type. */
import type { Point, Provenance, RunDocument, UnitSystem } from "@/iso";
import { FROM_DRAWING, runOf, withItem, withPoint, withPointsInserted } from "./document-edits";
import type { EntryResult } from "./entry-result";
import { NO_ITEM, parseItem } from "./item-entry";
import { itemEcho, itemText } from "./item-text";
import { isMeet, meetEcho, meetsAt, parseMeet, withMeet } from "./loop-entry";
import { parseMove, ZERO_OFFSET } from "./move-entry";
import { moveEcho, moveText, straightOnOf, type StraightOn } from "./move-text";
import { parsePlaces, placesEcho, placesText } from "./place-entry";
import { parseProvenance, PROVENANCE_WORD } from "./provenance-entry";
import { pointWithStarts, startsEcho, startsText } from "./starts-entry";

export type Column = "move" | "item" | "joint" | "source" | "note";
export const COLUMNS: readonly Column[] = ["move", "item", "joint", "source", "note"];

export interface CellTarget {
  readonly runId: string;
  readonly row: number;
  readonly column: Column;
}

/** Who types and when, for the provenance; ids for what the entry may create. */
export interface CommitContext {
  readonly by: string;
  /** ISO date. */
  readonly at: string;
  /** Id of the point an entry in the empty last row creates. */
  readonly pointId: string;
  readonly branchId: string;
}

const NOTE_LIMIT = 2_000;

/** The direction a bare length continues in: that of the nearest row above that has one. */
export function straightOnAt(document: RunDocument, runId: string, row: number): StraightOn | null {
  const points = runOf(document, runId)?.points ?? [];
  for (let i = Math.min(row, points.length) - 1; i >= 0; i -= 1) {
    const point = points[i];
    const direction = point ? straightOnOf(point.offset) : null;
    if (direction) return direction;
  }
  return null;
}

/** The weld a bare word in the Joint cell means. */
export function nearSideAt(document: RunDocument, runId: string, row: number): "in" | "out" {
  return row === 0 && document.runs[0]?.id === runId ? "out" : "in";
}

/** What a cell's text depends on beside its point. */
export interface RowFacts {
  readonly nearSide: "in" | "out";
  readonly units: UnitSystem;
  /** Name of the row the run's last row meets; null elsewhere. */
  readonly meets: string | null;
}

export function rowFactsAt(document: RunDocument, runId: string, row: number): RowFacts {
  return { nearSide: nearSideAt(document, runId, row), units: document.settings.units, meets: meetsAt(document, runId, row) };
}

/** The text a cell shows for a stored point. */
export function cellText(point: Point, column: Column, facts: RowFacts): string {
  switch (column) {
    case "move": return moveText(point.offset);
    case "item": return joined(" ", facts.meets ? `meet ${facts.meets}` : itemText(point.item, jointPlace(point), facts.units), startsText(point.starts));
    case "joint": return placesText(point.places, facts.nearSide);
    case "source": return PROVENANCE_WORD[point.provenance.kind];
    case "note": return point.note;
  }
}

/** The echo under a cell. */
export function cellEcho(point: Point, column: Column, facts: RowFacts): string {
  switch (column) {
    case "move": return moveEcho(point.offset, facts.units);
    case "item": return joined("; ", facts.meets ? meetEcho(facts.meets) : itemEcho(point.item, jointPlace(point), facts.units), startsEcho(point.starts));
    case "joint": return Object.keys(point.places).length > 0 ? placesEcho(point.places) : "";
    default: return "";
  }
}

function joined(between: string, ...parts: readonly string[]): string {
  return parts.filter((part) => part !== "").join(between);
}

/** A plain weld says its place in its own word ("fw"). */
export function jointPlace(point: Point): "field" | "field-fit" | null {
  const place = point.item.kind === "joint" ? point.places.in : undefined;
  return place === "field" || place === "field-fit" ? place : null;
}

/** Applies a typed cell. @returns the new document with the echo, or one sentence that says what to type. */
export function commitCell(document: RunDocument, target: CellTarget, text: string, context: CommitContext): EntryResult<RunDocument> {
  const run = runOf(document, target.runId);
  if (!run) return { ok: false, message: "This run is no longer there." };
  const existing = run.points[target.row];
  if (!existing && text.trim() === "") return { ok: true, value: document, understood: "" };
  const facts = rowFactsAt(document, target.runId, target.row);
  if (existing && text === cellText(existing, target.column, facts)) {
    return { ok: true, value: document, understood: cellEcho(existing, target.column, facts) };
  }
  const edit = readCell(document, target, text, context);
  if (!edit.ok) return edit;
  const base = existing ? document : withPointsInserted(document, run.id, run.points.length, [newPoint(document, target.runId, context)]);
  return { ...edit, value: edit.value(base, existing?.id ?? context.pointId) };
}

type Edit = (document: RunDocument, pointId: string) => RunDocument;

function readCell(document: RunDocument, target: CellTarget, text: string, context: CommitContext): EntryResult<Edit> {
  const { runId, row, column } = target;
  if (column === "move") {
    return mapped(parseMove(text, document.settings.units, straightOnAt(document, runId, row)), (offset) => (doc, id) =>
      withPoint(doc, id, (point) => ({ ...point, offset, provenance: { ...point.provenance, by: context.by, at: context.at } })));
  }
  if (column === "item" && isMeet(text)) {
    return mapped(parseMeet(document, runId, row, text), (met) => (doc, id) => withMeet(withItem(doc, id, NO_ITEM, context.branchId), runId, met));
  }
  if (column === "item") {
    return mapped(parseItem(text, document.settings.units), ({ item, place, starts }) => (doc, id) => {
      const run = runOf(doc, runId);
      const open = run?.to && run.points[run.points.length - 1]?.id === id ? withMeet(doc, runId, null) : doc;
      const set = withPoint(withItem(open, id, item, context.branchId), id, (point) => pointWithStarts(point, starts));
      return item.kind === "joint" ? withPoint(set, id, (point) => ({ ...point, places: place ? { ...point.places, in: place } : {} })) : set;
    });
  }
  if (column === "joint") {
    return mapped(parsePlaces(text, nearSideAt(document, runId, row)), (places) => (doc, id) => withPoint(doc, id, (point) => ({ ...point, places })));
  }
  if (column === "source") {
    return mapped(parseProvenance(text), (kind) => (doc, id) =>
      withPoint(doc, id, (point) => ({ ...point, provenance: { ...point.provenance, kind, by: context.by, at: context.at } })));
  }
  if (text.length > NOTE_LIMIT) return { ok: false, message: `A note holds ${NOTE_LIMIT} characters; this one has ${text.length}.` };
  return { ok: true, understood: "", value: (doc, id) => withPoint(doc, id, (point) => ({ ...point, note: text.trim() })) };
}

function mapped<A, B>(result: EntryResult<A>, map: (value: A) => B): EntryResult<B> {
  return result.ok ? { ...result, value: map(result.value) } : result;
}

/** A new point takes over where its numbers come from, from the row above it; without a row it is the run's last. */
export function newPoint(document: RunDocument, runId: string, context: Pick<CommitContext, "by" | "at" | "pointId">, row?: number): Point {
  const points = runOf(document, runId)?.points ?? [];
  const above: Provenance = points[(row ?? points.length) - 1]?.provenance ?? FROM_DRAWING;
  const provenance = { kind: above.kind, toleranceMm: above.toleranceMm, by: context.by, at: context.at, second: null };
  return { id: context.pointId, offset: ZERO_OFFSET, item: { kind: "none" }, places: {}, trimMm: null, provenance, note: "" };
}
