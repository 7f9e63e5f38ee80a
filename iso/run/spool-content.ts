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
}

export function spoolContent(parts: ContentParts, document: RunDocument): string {
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
  });
}

function componentContent(c: Component, parts: ContentParts): unknown[] {
  const item = parts.points.get(c.pointId)?.item;
  const holes = item?.kind === "flange" ? item.boltHoles : null;
  return [
    c.kind, c.valve, c.nps, c.nps2, c.schedule, c.ratingClass, c.description, c.material, c.text, holes, parts.loose.has(c.id),
    c.aside && direction(c.aside), c.angleRad === null ? null : fine(c.angleRad), c.radiusMm === null ? null : steps(c.radiusMm), c.unconfirmedKey !== null,
    ...c.ports.map((p) => `${p.id} ${steps(vecDistance(p.position, c.centre))} ${direction(p.direction)}`),
  ];
}

function pieceContent(p: PieceDraft, legs: readonly Leg[]): unknown[] {
  return [
    p.nps, p.schedule, p.material, steps(p.odMm), steps(p.wallMm), direction(p.direction), legs.map((leg) => `${leg.provenance.kind}${leg.unverified ? " unverified" : ""}`),
    ...p.terms.map((t) => `${t.label} ${steps(t.valueMm)}${t.unconfirmed ? " unconfirmed" : ""}`), p.ends[0].prep, p.ends[1].prep,
  ];
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
