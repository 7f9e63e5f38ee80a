/**
 * The differences of two frozen sheets as numbered rows of a comparison: sheetChanges (document-diff.ts) says what differs;
 * here a changed point is told apart into what moved, what got another length and what stands there now, and each row gets
 * what the two drawings show of it. Pure.
 */
import { buildModel, LOOP_CLOSES_MM, NEARLY_ALONG, vecCross, vecDistance, vecDot, vecLength, vecSub, type CompareRow, type Model, type Ref, type SheetInput, type Spool, type Vec3 } from "@/iso";
import type { Change } from "./api-types";
import { materialMark, sheetChanges } from "./document-diff";
import { pointParts, type PointParts } from "./point-words";

type Draft = Omit<CompareRow, "no" | "refsBefore" | "refsAfter">;

interface Side {
  readonly input: SheetInput;
  readonly model: Model;
  readonly spool: Spool | null;
  readonly positions: ReadonlyMap<string, Vec3>;
  /** Point before each point on its run. */
  readonly previous: ReadonlyMap<string, string>;
}

function sideOf(input: SheetInput): Side {
  const model = buildModel(input.document, input.marks, input.takeOuts);
  return {
    input, model,
    spool: model.spools.find((spool) => spool.letter === input.spool) ?? null,
    positions: new Map(model.nodes.map((node) => [node.pointId, node.position])),
    previous: new Map(input.document.runs.flatMap((run) => run.points.map((point, i) => [point.id, run.points[i - 1]?.id ?? run.from ?? ""] as const))),
  };
}

/** Every difference from one sheet to the other, in the order point, piece, weld, material, setting, note; empty when there is none. */
export function compareRows(before: SheetInput, after: SheetInput): CompareRow[] {
  const sides: Sides = { a: sideOf(before), b: sideOf(after) };
  const changes = sheetChanges(before, after);
  const drafts = changes.flatMap((change) => (change.what === "point" && change.kind === "changed" ? pointRows(change, changes, sides) : [plainRow(change, sides)]));
  return drafts.map((row, index) => ({ no: index + 1, ...row, refsBefore: refsOf(row, sides.a), refsAfter: refsOf(row, sides.b) }));
}

interface Sides {
  readonly a: Side;
  readonly b: Side;
}

function plainRow({ kind, what, mark, text, before, after, pointId }: Change, sides: Sides): Draft {
  const row = { kind, what, mark, text, before, after };
  if (what === "point") return { ...row, at: pointRef(pointId) };
  if (what === "piece") return { ...row, at: pointId === null ? null : { kind: "leg", id: pointId } };
  const side = kind === "removed" ? sides.a : sides.b;
  return { ...row, at: what === "weld" ? jointRef(side, mark) : null };
}

const pointRef = (id: string | null): Ref | null => (id === null ? null : { kind: "point", id });

function jointRef({ model }: Side, number: string): Ref | null {
  const joint = model.joints.find((one) => one.number === number);
  return joint ? { kind: "joint", id: joint.key } : null;
}

/** A changed point by its parts: each that differs is one row. */
function pointRows(change: Change, changes: readonly Change[], sides: Sides): Draft[] {
  const id = change.pointId!;
  const [then, now] = [partsOf(sides.a, id), partsOf(sides.b, id)];
  if (then === null || now === null) return [plainRow(change, sides)];
  const { mark } = change;
  const at = pointRef(id);
  const rows: Draft[] = [];
  if (then.offset !== now.offset) rows.push(placeRow(id, mark, then.offset, now.offset, sides));
  if (then.item !== now.item) rows.push({ kind: "changed", what: "fitting", mark, text: `At point ${mark}: ${then.item || NOTHING} is now ${now.item || NOTHING}`, before: then.item || NOTHING, after: now.item || NOTHING, at });
  const weldSaysIt = changes.some((other) => other.what === "weld" && other.pointId === id);
  const [old, fresh] = [factsOf(then, now, weldSaysIt), factsOf(now, then, weldSaysIt)];
  if (old !== fresh) rows.push({ kind: "changed", what: "point", mark, text: `Point ${mark}: ${old || NONE} is now ${fresh || NONE}`, before: old || NONE, after: fresh || NONE, at });
  if (then.note !== now.note) rows.push(noteRow(mark, then.note, now.note, at));
  return rows;
}

const NOTHING = "nothing named";
const NONE = "none";

function partsOf(side: Side, id: string): PointParts | null {
  const point = side.input.document.runs.flatMap((run) => run.points).find((one) => one.id === id);
  return point ? pointParts(point, side.input.units) : null;
}

/** What of one side's other facts differs from the other's; the place of a weld only where no row of the weld says it. */
function factsOf(one: PointParts, other: PointParts, weldSaysIt: boolean): string {
  const parts = (["from", "places", "rest"] as const).filter((part) => one[part] !== other[part] && !(part === "places" && weldSaysIt));
  return parts.map((part) => one[part].replace(/^, /, "")).filter((text) => text !== "").join(", ");
}

function noteRow(mark: string, before: string, after: string, at: Ref | null): Draft {
  const kind = before === "" ? "added" : after === "" ? "removed" : "changed";
  const text = kind === "changed" ? `Note at point ${mark}: "${before}" is now "${after}"` : `Note at point ${mark} ${kind}: "${before || after}"`;
  return { kind, what: "note", mark, text, before: before || null, after: after || null, at };
}

/** A point given another way: moved, another length along the same way, or only measured from elsewhere. */
function placeRow(id: string, mark: string, before: string, after: string, { a, b }: Sides): Draft {
  const row = { mark, before, after };
  const at = pointRef(id);
  const [from, fromNow] = [a.previous.get(id) ?? "", b.previous.get(id) ?? ""];
  const [way, wayNow] = [wayOf(a, from, id), wayOf(b, fromNow, id)];
  if (from === fromNow && way && wayNow && isAlong(way, wayNow) && !isSame(way, wayNow)) {
    return { ...row, kind: "changed", what: "length", text: `Length to point ${mark}: ${before} is now ${after}`, at: { kind: "leg", id } };
  }
  const shared = sharedBefore(id, a, b);
  const [reach, reachNow] = [wayOf(a, shared, id), wayOf(b, shared, id)];
  if (shared !== "" && reach && reachNow && isSame(reach, reachNow)) {
    const text = from === fromNow ? `Point ${mark}: ${before} is now given as ${after}` : `Point ${mark}: ${before} is now ${after}, measured from another point; it stands where it did`;
    return { ...row, kind: "changed", what: "point", text, at };
  }
  return { ...row, kind: "moved", what: "point", text: `Point ${mark}: ${before} is now ${after}`, at };
}

/** The nearest point before it, along the later run, that both sheets have; "" when there is none. */
function sharedBefore(id: string, a: Side, b: Side): string {
  const seen = new Set<string>();
  for (let at = b.previous.get(id) ?? ""; at !== "" && !seen.has(at); at = b.previous.get(at) ?? "") {
    if (a.positions.has(at)) return at;
    seen.add(at);
  }
  return "";
}

function wayOf({ positions }: Side, from: string, to: string): Vec3 | null {
  const [p, q] = [positions.get(from), positions.get(to)];
  return p && q ? vecSub(q, p) : null;
}

const isSame = (p: Vec3, q: Vec3): boolean => vecDistance(p, q) < LOOP_CLOSES_MM;

const isAlong = (p: Vec3, q: Vec3): boolean => vecDot(p, q) > 0 && vecLength(vecCross(p, q)) <= NEARLY_ALONG * vecLength(p) * vecLength(q);

/** What the drawing of one side shows of a row. */
function refsOf(row: Draft, side: Side): Ref[] {
  const { model } = side;
  switch (row.what) {
    case "piece": return pieceRefs(side, (piece) => piece.mark === row.mark);
    case "weld": return model.joints.filter((joint) => joint.number === row.mark).map((joint) => ({ kind: "joint", id: joint.key }));
    case "material": return materialRefs(row.mark, side);
    case "length": return row.at ? legRefs(row.at.id) : [];
    case "point": case "fitting": return row.at ? [row.at, ...(row.what === "point" ? legRefs(row.at.id) : []), ...componentRefs(model, row.at.id)] : [];
    default: return row.at ? [row.at] : [];
  }
}

const legRefs = (id: string): Ref[] => [{ kind: "leg", id }, { kind: "dimension", id }];

const componentRefs = (model: Model, pointId: string): Ref[] => model.components.filter((one) => one.pointId === pointId).map((one) => ({ kind: "component", id: one.id }));

function pieceRefs({ model, spool }: Side, wanted: (piece: Model["pieces"][number]) => boolean): Ref[] {
  const own = new Set(spool?.pieceKeys ?? []);
  return model.pieces.filter((piece) => own.has(piece.key) && wanted(piece))
    .flatMap((piece): Ref[] => [{ kind: "piece", id: piece.key }, ...(piece.legIds ?? [piece.legId]).map((id): Ref => ({ kind: "leg", id }))]);
}

function materialRefs(mark: string, side: Side): Ref[] {
  const rows = side.spool?.materials ?? [];
  const refs = new Set(rows.filter((row) => materialMark(row, rows) === mark).flatMap((row) => row.refs));
  const components = side.model.components.filter((one) => refs.has(one.id)).map((one): Ref => ({ kind: "component", id: one.id }));
  return [...components, ...pieceRefs(side, (piece) => refs.has(piece.key))];
}
