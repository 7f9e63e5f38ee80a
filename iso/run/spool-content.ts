/**
 * The content key of a spool: canonical text of everything a bench would notice, and nothing of where the spool stands
 * in the plant or what its joints are numbered. Equal keys mean equal spools; an edit elsewhere on the line leaves it.
 */
import type { Vec3 } from "../geometry/types";
import { vecDistance } from "../geometry/vec3";
import type { JointDraft } from "./build-types";
import type { Point, RunDocument } from "./document";
import type { Component, Leg } from "./model-types";
import type { PieceDraft } from "./piece-draft";

export interface ContentParts {
  readonly components: readonly Component[];
  readonly pieces: readonly PieceDraft[];
  readonly joints: readonly JointDraft[];
  readonly loose: ReadonlySet<string>;
  readonly points: ReadonlyMap<string, Point>;
  readonly legs: ReadonlyMap<string, Leg>;
  /** Letter of the spool, for the notes of its sheet. */
  readonly letter?: string;
  /** What the line carries at each point, where it changes anywhere on the line. */
  readonly services?: ReadonlyMap<string, string>;
}

/**
 * Studs follow from the flanges and gaskets, so they are left out. What a line of the first kind could not have (bends,
 * cut angles, breaks, notes of a spool's sheet) is there only where it is used: keys of lines without it stay as they were.
 */
export function spoolContent(given: ContentParts, document: RunDocument): string {
  const parts = { ...given, components: given.components.filter((c) => c.kind !== "bolt-set") };
  const place = new Map<string, number>();
  for (const id of [...parts.components.map((c) => c.id), ...parts.pieces.map((p) => p.key)]) place.set(id, place.size);
  const index = (id: string | null) => (id === null ? null : (place.get(id) ?? "beyond"));
  const points = [...new Set([...parts.components.map((c) => c.pointId), ...parts.pieces.flatMap((p) => p.legIds ?? [p.legId])])];
  return JSON.stringify({
    line: [document.settings.units, document.settings.pipe.specification, document.settings.asEntered, document.notes],
    components: parts.components.map((c) => componentContent(c, parts)),
    pieces: parts.pieces.map((p) => pieceContent(p, (p.legIds ?? [p.legId]).flatMap((id) => parts.legs.get(id) ?? []))),
    joints: parts.joints.map((j) => [j.kind, j.place, index(j.a), index(j.b), j.nps, steps(j.gapMm), fine(j.mismatchRad)]),
    notes: points.map((id) => parts.points.get(id)?.note ?? "").filter((note) => note !== ""),
    ...newerContent(parts, points, document),
  });
}

function newerContent(parts: ContentParts, points: readonly string[], document: RunDocument): object {
  const starts = points.flatMap((id, i) => (parts.points.get(id)?.starts ? [[i, parts.points.get(id)?.starts]] : []));
  const carried = [...new Set(points.flatMap((id) => parts.services?.get(id) ?? []))];
  const sheet = (document.sheetNotes ?? []).filter((note) => note.spool === parts.letter).map((note) => note.text);
  return {
    ...(starts.length > 0 ? { starts } : {}), ...(carried.length > 0 ? { carried } : {}), ...(sheet.length > 0 ? { sheet } : {}),
  };
}

function componentContent(c: Component, parts: ContentParts): unknown[] {
  const item = parts.points.get(c.pointId)?.item;
  const holes = item?.kind === "flange" ? item.boltHoles : null;
  return [
    c.kind, c.valve, c.nps, c.nps2, c.schedule, c.ratingClass, c.description, c.material, c.text, holes, parts.loose.has(c.id),
    c.aside && direction(c.aside), c.angleRad === null ? null : fine(c.angleRad), c.radiusMm === null ? null : steps(c.radiusMm), c.unconfirmedKey !== null,
    ...(item?.kind === "valve" && item.against ? ["flow against the run"] : []),
    ...c.ports.map((p) => `${p.id} ${steps(vecDistance(p.position, c.centre))} ${direction(p.direction)}`),
  ];
}

function pieceContent(p: PieceDraft, legs: readonly Leg[]): unknown[] {
  return [
    p.nps, p.schedule, p.material, steps(p.odMm), steps(p.wallMm), direction(p.direction), legs.map((leg) => `${leg.provenance.kind}${leg.unverified ? " unverified" : ""}`),
    ...p.terms.map((t) => `${t.label} ${steps(t.valueMm)}${t.unconfirmed ? " unconfirmed" : ""}`), ...p.ends.map(endContent),
    ...(p.bends ? [p.bends.map((b) => [fine(b.angleRad), steps(b.radiusMm), steps(b.startMm)])] : []),
  ];
}

/** A saddle was written as a bevel before its cut was known. */
function endContent(end: PieceDraft["ends"][number]): string {
  const prep = end.prep === "saddle" ? "bevel" : end.prep;
  return end.cutAngleDeg === undefined ? prep : `${prep} ${fine(end.cutAngleDeg)}`;
}

/**
 * Millimetres as whole thousandths. The step's edge is moved off the half so that no tape fraction (64ths of an inch are
 * eighths of a thousandth) or whole tenth lies on it, where float noise of a far end could tip it.
 */
function steps(mm: number): number {
  return Math.floor(mm * 1000 + STEP_SHIFT);
}

const STEP_SHIFT = 0.56;

/** Unit-less numbers to a millionth, edge moved likewise. */
function fine(value: number): number {
  return Math.floor(value * 1_000_000 + STEP_SHIFT);
}

function direction(d: Vec3): string {
  return `${fine(d[0])},${fine(d[1])},${fine(d[2])}`;
}
