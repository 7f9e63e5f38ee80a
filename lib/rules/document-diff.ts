/**
 * What changed between two frozen sheet inputs of one spool, in the words of the shop: points, pieces, welds,
 * materials, settings and notes. Pure; both sides are built again from their own frozen values.
 */
import {
  buildModel,
  formatLength,
  type Joint,
  type MaterialRow,
  type Model,
  type Piece,
  type Point,
  type SheetInput,
  type Spool,
} from "@/iso";
import type { Change } from "./api-types";
import { pointText } from "./point-words";
import { runChanges } from "./run-changes";
import { spoolPointIds } from "./spool-points";

interface Side {
  readonly input: SheetInput;
  readonly model: Model;
  readonly spool: Spool | null;
  readonly points: ReadonlyMap<string, Point>;
  readonly pieces: ReadonlyMap<string, Piece>;
  readonly joints: ReadonlyMap<string, Joint>;
  readonly materials: ReadonlyMap<string, string>;
}

function sideOf(input: SheetInput): Side {
  const model = buildModel(input.document, input.marks, input.takeOuts);
  const spool = model.spools.find((s) => s.letter === input.spool) ?? null;
  const pieceKeys = new Set(spool?.pieceKeys ?? []);
  const jointKeys = new Set(spool?.jointKeys ?? []);
  const pieces = model.pieces.filter((p) => pieceKeys.has(p.key));
  const materials = spool?.materials ?? [];
  const joints = model.joints.filter((j) => jointKeys.has(j.key) && j.number !== null);
  return {
    input,
    model,
    spool,
    points: pointsOf(input, model, spool),
    pieces: new Map(pieces.map((p) => [p.key, p])),
    joints: new Map(joints.map((j) => [j.key, j])),
    materials: new Map(materials.map((m) => [materialMark(m, materials), quantityText(m.quantity, m.unit, input)])),
  };
}

/** How a row of the material list is named: with its material only where another row has the same size and description. */
export function materialMark({ size, description, material }: MaterialRow, rows: readonly MaterialRow[]): string {
  const alike = rows.filter((row) => row.size === size && row.description === description).length > 1;
  return alike ? `${size} ${description}, ${material}` : `${size} ${description}`;
}

function pointsOf(input: SheetInput, model: Model, spool: Spool | null): ReadonlyMap<string, Point> {
  const ids = spool === null ? new Set<string>() : spoolPointIds(model, spool);
  const all = input.document.runs.flatMap((run) => run.points);
  return new Map(all.filter((point) => ids.has(point.id)).map((point) => [point.id, point]));
}

function quantityText(quantity: number, unit: "ea" | "mm", input: SheetInput): string {
  return unit === "ea" ? String(quantity) : formatLength(quantity, input.units);
}

/**
 * Changes from `before` to `after`, in the order point, piece, weld, material, setting, note.
 * With no `before` (first revision) the list is empty: everything is new.
 */
export function sheetChanges(before: SheetInput | null, after: SheetInput): Change[] {
  if (before === null) return [];
  const a = sideOf(before);
  const b = sideOf(after);
  return [
    ...pointChanges(a, b),
    ...mapChanges(a.pieces, b.pieces, "piece", (p, side) => ({ mark: p.mark, text: formatLength(p.cutLengthMm, side.input.units), pointId: p.legId }), a, b),
    ...mapChanges(a.joints, b.joints, "weld", (j) => ({ mark: j.number ?? "", text: `${j.kind}, ${j.place}`, pointId: j.pointId }), a, b),
    ...mapChanges(a.materials, b.materials, "material", (text, _side, key) => ({ mark: key, text, pointId: null }), a, b),
    ...settingChanges(before.document.settings, after.document.settings),
    ...settingChanges(before.titleBlock, after.titleBlock),
    ...runChanges(before.document, after.document, new Set([...a.points.keys(), ...b.points.keys()])),
    ...noteChanges(sheetNotes(before), sheetNotes(after)),
  ];
}

/** Ids of the points a change list touches, without repeats. */
export function changedPointIds(changes: readonly Change[]): string[] {
  return [...new Set(changes.flatMap((c) => (c.pointId === null || c.kind === "removed" ? [] : [c.pointId])))];
}

type Described = { mark: string; text: string; pointId: string | null };

function mapChanges<T>(
  before: ReadonlyMap<string, T>,
  after: ReadonlyMap<string, T>,
  what: Change["what"],
  describe: (value: T, side: Side, key: string) => Described,
  a: Side,
  b: Side,
): Change[] {
  const changes: Change[] = [];
  for (const [key, old] of before) {
    const then = describe(old, a, key);
    const next = after.get(key);
    if (next === undefined) {
      changes.push({ kind: "removed", what, mark: then.mark, text: `${label(what)} ${then.mark} removed`, before: then.text, after: null, pointId: then.pointId });
      continue;
    }
    const now = describe(next, b, key);
    if (now.text !== then.text) {
      changes.push({ kind: "changed", what, mark: now.mark, text: `${label(what)} ${now.mark}: ${then.text} is now ${now.text}`, before: then.text, after: now.text, pointId: now.pointId });
    }
  }
  for (const [key, value] of after) {
    if (before.has(key)) continue;
    const now = describe(value, b, key);
    changes.push({ kind: "added", what, mark: now.mark, text: `${label(what)} ${now.mark} added: ${now.text}`, before: null, after: now.text, pointId: now.pointId });
  }
  return changes;
}

function label(what: Change["what"]): string {
  return what.charAt(0).toUpperCase() + what.slice(1);
}

function pointChanges(a: Side, b: Side): Change[] {
  const number = (side: Side, id: string) => {
    const ids = side.input.document.runs.flatMap((run) => run.points.map((p) => p.id));
    return String(ids.indexOf(id) + 1);
  };
  return mapChanges(a.points, b.points, "point", (p, side) => ({ mark: number(side, p.id), text: pointText(p, side.input.units), pointId: p.id }), a, b);
}

function settingChanges(before: object, after: object): Change[] {
  const flatBefore = flatten(before);
  const flatAfter = flatten(after);
  const keys = [...new Set([...flatBefore.keys(), ...flatAfter.keys()])];
  return keys
    .filter((key) => flatBefore.get(key) !== flatAfter.get(key))
    .map((key) => {
      const then = flatBefore.get(key) || null;
      const now = flatAfter.get(key) || null;
      return { kind: "changed", what: "setting", mark: key, text: `${key}: ${then ?? "none"} is now ${now ?? "none"}`, before: then, after: now, pointId: null } as const;
    });
}

function flatten(value: object, path: readonly string[] = []): Map<string, string> {
  const flat = new Map<string, string>();
  for (const [key, inner] of Object.entries(value)) {
    const here = [...path, words(key)];
    if (inner !== null && typeof inner === "object" && !Array.isArray(inner)) flatten(inner, here).forEach((v, k) => flat.set(k, v));
    else if (inner !== null) flat.set(here.join(", "), Array.isArray(inner) ? inner.map(plainValue).join(" x ") : plainValue(inner));
  }
  return flat;
}

/** As a reader wants it: nothing finer than a thousandth, parts of a row side by side. */
function plainValue(value: unknown): string {
  if (typeof value === "number") return String(Number(value.toFixed(3)));
  return value !== null && typeof value === "object" ? Object.values(value).join(" ") : String(value);
}

/** "rootGapMm" -> "root gap (mm)". */
function words(key: string): string {
  return key
    .replace(/(Mm|Deg)$/, (unit) => ` (${unit.toLowerCase()})`)
    .replace(/([a-z])([A-Z])/g, (_all, left: string, right: string) => `${left} ${right.toLowerCase()}`);
}

function sheetNotes(input: SheetInput): string[] {
  return [...input.document.notes, ...(input.document.sheetNotes ?? []).filter((note) => note.spool === input.spool).map((note) => note.text)];
}

/** Notes of the line, and those of this spool's sheet. */
function noteChanges(before: readonly string[], after: readonly string[]): Change[] {
  const gone = before.filter((note) => !after.includes(note));
  const fresh = after.filter((note) => !before.includes(note));
  return [
    ...gone.map((note) => ({ kind: "removed", what: "note", mark: "", text: `Note removed: ${note}`, before: note, after: null, pointId: null }) as const),
    ...fresh.map((note) => ({ kind: "added", what: "note", mark: "", text: `Note added: ${note}`, before: null, after: note, pointId: null }) as const),
  ];
}
