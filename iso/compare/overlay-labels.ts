/** Numbers of the list's rows on the overlay: one led block for each place, saying what happened there and which rows tell it. */
import type { PaperPoint } from "../geometry/types";
import type { MeasureText, Ref } from "../draw/drawing-types";
import type { Label } from "../draw/label-candidates";
import { blockLabel } from "../draw/mark-labels";
import { edgePoint } from "../draw/drawn";
import { KIND_WORDS, type CompareKind, type CompareRow } from "./compare-types";
import type { InkSide } from "./overlay-ink";

/** Places of one row: where it stands now, and for what moved where it stood. */
interface Spot {
  readonly anchors: readonly PaperPoint[];
  readonly along: readonly PaperPoint[];
  readonly clear: number;
  readonly ref: Ref;
}

const ORDER: readonly (CompareKind | "was")[] = ["added", "removed", "moved", "changed", "was"];
/** Paper kept between a block and the fitting it is led to, mm. */
const CLEAR_OF_POINT = 3;
const CLEAR_OF_PIPE = 1.5;
/** Places along a leg where a leader may start. */
const SHARES = [0.5, 0.35, 0.65] as const;

export interface RowLabels {
  readonly labels: readonly Label[];
  /** Rows that have a place on the drawing. */
  readonly placed: ReadonlySet<number>;
}

/** @param united points that stand in one place in both revisions */
export function rowLabels(rows: readonly CompareRow[], a: InkSide, b: InkSide, united: ReadonlySet<string>, measure: MeasureText): RowLabels {
  const groups = new Map<string, { readonly spot: Spot; readonly rows: Map<CompareKind | "was", number[]> }>();
  const placed = new Set<number>();
  /** Earlier points that a word stands at. */
  const told = new Set<string>();
  const add = (spot: Spot | null, kind: CompareKind | "was", no: number): void => {
    if (!spot) return;
    const key = spot.anchors[0]!.map((c) => c.toFixed(1)).join(" ");
    const group = groups.get(key) ?? { spot, rows: new Map() };
    groups.set(key, group);
    group.rows.set(kind, [...(group.rows.get(kind) ?? []), no]);
    placed.add(no);
  };
  for (const row of rows) {
    const at = placeOf(row, rows, a, b);
    if (!at) continue;
    const now = row.kind === "removed" ? null : spotOf(at, b);
    const then = now && row.kind !== "moved" ? null : spotOf(at, a);
    add(now ?? then, row.kind, row.no);
    if (then && !now) told.add(a.placed.sketch.vertexOf(pointIdOf(at, a)));
    if (!now || row.kind !== "moved" || united.has(at.id)) continue;
    add(then, "was", row.no);
    told.add(a.placed.sketch.vertexOf(at.id));
  }
  return { placed, labels: [...[...groups].map(([key, { spot, rows: of }]) => labelOf(key, spot, of, measure)), ...carriedLabels(a, united, told, measure)] };
}

function labelOf(key: string, spot: Spot, rows: ReadonlyMap<CompareKind | "was", readonly number[]>, measure: MeasureText): Label {
  const lines = ORDER.filter((kind) => rows.has(kind)).map((kind) => ({ text: `${kind === "was" ? "WAS HERE" : KIND_WORDS[kind]} ${rangesText(rows.get(kind)!)}`, bold: true }));
  return blockLabel(lines, { id: `rows ${key}`, anchors: spot.anchors, clear: spot.clear, along: spot.along }, spot.ref, measure);
}

const pointIdOf = (at: Ref, { joints }: InkSide): string => (at.kind === "joint" ? (joints.find(({ joint }) => joint.key === at.id)?.joint.pointId ?? at.id) : at.id);

/** What was carried along by a change elsewhere has no row of its own: where it stood gets the word alone, once for what hangs together. */
function carriedLabels({ placed: { sketch, paper }, drawn }: InkSide, united: ReadonlySet<string>, told: ReadonlySet<string>, measure: MeasureText): readonly Label[] {
  const left = new Set([...sketch.vertices.values()].filter(({ id, node }) => node !== null && !united.has(id)).map(({ id }) => id));
  const labels: Label[] = [];
  for (const first of left) {
    const group = [first];
    left.delete(first);
    for (const id of group) {
      for (const edge of sketch.edgesAt.get(id) ?? []) {
        const other = edge.from === id ? edge.to : edge.from;
        if (left.delete(other)) group.push(other);
      }
    }
    const [last, at] = [group.at(-1)!, paper.get(group.at(-1)!)];
    if (!at || group.some((id) => told.has(id))) continue;
    const along = drawn.filter((d) => d.edge.from === last || d.edge.to === last).map((d) => d.direction);
    labels.push(blockLabel([{ text: "WAS HERE", bold: true }], { id: `was ${last}`, anchors: [at], clear: CLEAR_OF_POINT, along }, { kind: "point", id: last }, measure));
  }
  return labels;
}

/** A weld that came or went with its point shares the point's block. */
function placeOf({ at, kind }: CompareRow, rows: readonly CompareRow[], a: InkSide, b: InkSide): Ref | null {
  if (at?.kind !== "joint") return at;
  const pointId = [...b.joints, ...a.joints].find(({ joint }) => joint.key === at.id)?.joint.pointId;
  return rows.find((row) => row.kind === kind && row.at?.kind === "point" && row.at.id === pointId)?.at ?? at;
}

function spotOf(at: Ref, side: InkSide): Spot | null {
  if (at.kind === "joint") {
    const mark = side.joints.find(({ joint }) => joint.key === at.id);
    return mark ? { anchors: [mark.at], along: [mark.direction], clear: CLEAR_OF_POINT, ref: at } : null;
  }
  const { placed } = side;
  if (at.kind === "leg") {
    const leg = side.drawn.find((d) => d.edge.id === at.id);
    if (leg) return { anchors: SHARES.map((k) => edgePoint(leg, k * leg.length)), along: [leg.direction], clear: CLEAR_OF_PIPE, ref: at };
  }
  const vertex = placed.sketch.vertexOf(at.id);
  const point = placed.sketch.vertices.has(vertex) ? placed.paper.get(vertex) : undefined;
  const along = side.drawn.filter((d) => d.edge.from === vertex || d.edge.to === vertex).map((d) => d.direction);
  return point ? { anchors: [point], along, clear: CLEAR_OF_POINT, ref: at } : null;
}

/** "1-3, 7". */
export function rangesText(numbers: readonly number[]): string {
  const sorted = [...new Set(numbers)].sort((p, q) => p - q);
  const ranges: [number, number][] = [];
  for (const number of sorted) {
    const last = ranges.at(-1);
    if (last && last[1] === number - 1) last[1] = number;
    else ranges.push([number, number]);
  }
  return ranges.map(([from, to]) => (from === to ? String(from) : to === from + 1 ? `${from}, ${to}` : `${from}-${to}`)).join(", ");
}
