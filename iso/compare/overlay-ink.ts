/**
 * What two revisions ink in one frame, told apart by what is on paper: the same mark at the same place is in both, whatever
 * its name. Pipe is compared by stretches of its lines, since a fitting set into a leg leaves the rest of its pipe alone.
 */
import { paperDistance, paperDot, paperSub } from "../geometry/paper";
import { SAME_PAPER_MM } from "../geometry/tolerances";
import type { PaperPoint } from "../geometry/types";
import { edgePoint, type DrawnEdge, type DrawnJoint, type PassInk } from "../draw/drawn";
import type { DisplayItem, Ref } from "../draw/drawing-types";
import { lineItem } from "../draw/paths";
import { hiddenCuts, NEIGHBOUR_DASH, pipePass, type Stretch } from "../draw/pipe";
import type { Placed } from "../draw/place";
import { remainingStretches, type Segment } from "../draw/plane";
import * as size from "../draw/sizes";
import { outlineOf, symbolPass } from "../draw/symbols";
import { isWeld, weldPass } from "../draw/weld-marks";
import { addedItem, addedPipe, goneItem, gonePipe, ringItem } from "./overlay-style";

export interface InkSide {
  readonly placed: Placed;
  readonly drawn: readonly DrawnEdge[];
  readonly joints: readonly DrawnJoint[];
  readonly stretches: readonly Stretch[];
}

export interface OverlayInk {
  readonly items: readonly DisplayItem[];
  /** Nothing may touch these. */
  readonly heavy: readonly Segment[];
  /** Marks that differ: none when both sides ink the same. */
  readonly differences: number;
}

export function overlayInk(a: InkSide, b: InkSide): OverlayInk {
  const parts = [pipeInk(a, b), markInk(a, b), weldInk(a, b)];
  return {
    items: (["gone", "same", "added"] as const).flatMap((kind) => parts.flatMap((part) => part[kind])),
    heavy: parts.flatMap((part) => part.heavy),
    differences: parts.reduce((sum, part) => sum + part.differences, 0),
  };
}

/** Decimals kept of a coordinate when two marks are held against each other. */
const DECIMALS = 6;

/** Everything of an item but what it is called. */
function inkKey(item: DisplayItem): string {
  return JSON.stringify({ ...item, ref: null }, (_key, value: unknown) => (typeof value === "number" ? Number(value.toFixed(DECIMALS)) + 0 : value));
}

const isNeighbours = (item: DisplayItem): boolean => (item.type === "path" ? (item.stroke ?? item.fill) === "grey" : item.ink === "grey");

function marksOf({ placed, drawn }: InkSide): readonly DisplayItem[] {
  // With no stretches the pipe's pass inks turns and returns alone.
  return [...pipePass(placed, drawn, []).items, ...symbolPass(placed, drawn).items];
}

function markInk(a: InkSide, b: InkSide): Parts {
  const [old, now] = [marksOf(a), marksOf(b)];
  const [oldKeys, nowKeys] = [new Set(old.map(inkKey)), new Set(now.map(inkKey))];
  const gone = old.filter((item) => !isNeighbours(item) && !nowKeys.has(inkKey(item)));
  const fresh = now.filter((item) => !isNeighbours(item) && !oldKeys.has(inkKey(item)));
  const isFresh = new Set(fresh);
  return {
    gone: gone.map(goneItem), same: now.filter((item) => !isFresh.has(item)), added: fresh.map(addedItem),
    heavy: [...gone, ...now].flatMap(outlineOf), differences: gone.length + fresh.length,
  };
}

/** Paper a weld may lie off the other revision's and still be the same: the gap at its root is drawn in proportion to its leg. */
const SAME_WELD_MM = 1;

function weldInk(a: InkSide, b: InkSide): Parts {
  const among = (one: DrawnJoint, others: readonly DrawnJoint[]): boolean =>
    others.some(({ joint, at }) => joint.kind === one.joint.kind && joint.place === one.joint.place && paperDistance(at, one.at) < SAME_WELD_MM);
  const gone = a.joints.filter((one) => !among(one, b.joints));
  const fresh = b.joints.filter((one) => !among(one, a.joints));
  const isFresh = new Set(fresh);
  const [old, same, now] = [gone, b.joints.filter((one) => !isFresh.has(one)), fresh].map((joints) => weldPass(joints)) as [PassInk, PassInk, PassInk];
  const rings = fresh.filter(isWeld).map(({ joint, at }) => ringItem(at, { kind: "joint", id: joint.key }));
  return {
    gone: old.items.map(goneItem), same: same.items, added: [...now.items.map(addedItem), ...rings],
    heavy: [...old.heavy, ...same.heavy, ...now.heavy], differences: old.items.length + now.items.length,
  };
}

interface Parts {
  readonly gone: readonly DisplayItem[];
  readonly same: readonly DisplayItem[];
  readonly added: readonly DisplayItem[];
  readonly heavy: readonly Segment[];
  readonly differences: number;
}

type Kind = "gone" | "same" | "added";

function pipeInk(a: InkSide, b: InkSide): Parts {
  const own = (stretches: readonly Stretch[]) => stretches.filter((one) => !one.neighbour);
  const [old, now] = [own(a.stretches), own(b.stretches)];
  const parts: { readonly kind: Kind; readonly stretch: Stretch }[] = [
    ...old.flatMap((one) => partsBeside(one, now).alone.map((stretch) => ({ kind: "gone" as const, stretch }))),
    ...now.flatMap((one) => {
      const { alone, shared } = partsBeside(one, old);
      return [...shared.map((stretch) => ({ kind: "same" as const, stretch })), ...alone.map((stretch) => ({ kind: "added" as const, stretch }))];
    }),
    ...b.stretches.filter((one) => one.neighbour).map((stretch) => ({ kind: "same" as const, stretch })),
  ];
  const cuts = hiddenCuts(parts.map(({ stretch }) => stretch));
  const inked: Record<Kind, DisplayItem[]> = { gone: [], same: [], added: [] };
  parts.forEach(({ kind, stretch }, i) => {
    for (const [from, to] of remainingStretches(stretch.to - stretch.from, cuts[i] ?? [])) {
      inked[kind].push(...pipeItems(kind, stretch, edgePoint(stretch.drawn, stretch.from + from), edgePoint(stretch.drawn, stretch.from + to)));
    }
  });
  const heavy = parts.map(({ stretch }) => ({ from: edgePoint(stretch.drawn, stretch.from), to: edgePoint(stretch.drawn, stretch.to) }));
  return { ...inked, heavy, differences: parts.filter(({ kind }) => kind !== "same").length };
}

function pipeItems(kind: Kind, { drawn, neighbour }: Stretch, from: PaperPoint, to: PaperPoint): readonly DisplayItem[] {
  const ref: Ref = { kind: "leg", id: drawn.edge.id };
  if (kind === "gone") return gonePipe(ref, from, to);
  if (kind === "added") return [addedPipe(ref, from, to)];
  return [neighbour ? lineItem("pipe", ref, from, to, size.PIPE_WIDTH, "grey", NEIGHBOUR_DASH) : lineItem("pipe", ref, from, to, size.PIPE_WIDTH)];
}

/** Parts of a stretch that others lie upon, and those that stand alone. */
function partsBeside(one: Stretch, others: readonly Stretch[]): { readonly alone: readonly Stretch[]; readonly shared: readonly Stretch[] } {
  const length = one.to - one.from;
  const covered = others.flatMap((other) => coverOf(one, other) ?? []);
  const part = ([from, to]: readonly [number, number]): Stretch => ({ ...one, from: one.from + from, to: one.from + to });
  const alone = remainingStretches(length, covered).filter(([from, to]) => to - from > SAME_PAPER_MM);
  return { alone: alone.map(part), shared: remainingStretches(length, alone).filter(([from, to]) => to - from > SAME_PAPER_MM).map(part) };
}

/** Where along a stretch another lies upon it; null when they do not run in one line. */
function coverOf(one: Stretch, other: Stretch): readonly [readonly [number, number]] | null {
  const start = edgePoint(one.drawn, one.from);
  const { direction } = one.drawn;
  const ends = [edgePoint(other.drawn, other.from), edgePoint(other.drawn, other.to)].map((at) => paperSub(at, start));
  if (ends.some((at) => Math.abs(at[0] * direction[1] - at[1] * direction[0]) > SAME_PAPER_MM)) return null;
  const [p, q] = ends.map((at) => paperDot(at, direction)) as [number, number];
  const [from, to] = [Math.max(0, Math.min(p, q)), Math.min(one.to - one.from, Math.max(p, q))];
  return to > from ? [[from, to]] : null;
}
