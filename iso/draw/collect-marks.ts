/** Which marks the drawing owes: every weld, component and cut piece of the sketch, with its anchors on paper. */
import { formatLength } from "../units/format";
import { componentAnchor } from "./component-anchor";
import { edgePlace, edgePoint, type DrawnEdge, type DrawnJoint } from "./drawn";
import type { Component, Piece } from "../run/model-types";
import type { DrawOptions, Ref } from "./drawing-types";
import type { Label } from "./label-candidates";
import { marksLabel, type Mark } from "./mark-labels";
import type { Placed } from "./place";
import * as size from "./sizes";
import { partFrames, type PartFrame } from "./part-frames";
import { changedGroups } from "./revision-cloud";
import { groupBy, type Sketch } from "./sketch";
import { isWeld } from "./weld-marks";

export interface Marks {
  readonly labels: readonly Label[];
  readonly shown: readonly Ref[];
}

const NO_MARKS: Marks = { labels: [], shown: [] };

interface ItemNumber {
  readonly item: number;
  readonly ref: Ref;
}
type ItemNumbers = ReadonlyMap<string, readonly ItemNumber[]>;

/** Kept while their sketch is: components and pieces both ask for them. */
const numbersOf = new WeakMap<Sketch, ItemNumbers>();

/** Item numbers of each component id and piece key, spool by spool. */
export function itemNumbers(sketch: Sketch): ItemNumbers {
  const known = numbersOf.get(sketch);
  if (known) return known;
  const numbers = new Map<string, ItemNumber[]>();
  for (const spool of sketch.model.spools) {
    if (sketch.spool !== null && spool.letter !== sketch.spool) continue;
    for (const row of spool.materials) {
      const number: ItemNumber = { item: row.item, ref: { kind: "material", id: `${spool.letter}${row.item}` } };
      for (const id of row.refs) {
        const there = numbers.get(id);
        if (there) there.push(number);
        else numbers.set(id, [number]);
      }
    }
  }
  numbersOf.set(sketch, numbers);
  return numbers;
}

export function weldMarks(placed: Placed, joints: readonly DrawnJoint[], options: DrawOptions): Marks {
  if (!options.show.welds) return NO_MARKS;
  const { units, fieldTrimMm } = placed.sketch.model.document.settings;
  const trims = new Map(placed.sketch.model.document.runs.flatMap((run) => run.points.map((point) => [point.id, point.trimMm] as const)));
  const labels: Label[] = [];
  const shown: Ref[] = [];
  for (const { joint, at, direction } of joints) {
    const ref: Ref = { kind: "joint", id: joint.key };
    const bolted = !isWeld({ joint, at, direction });
    shown.push(ref);
    if (bolted || joint.number === null) continue;
    const marks: Mark[] = [{ shape: "hexagon", text: joint.number, ref }];
    if (joint.place === "field") marks.push({ shape: "none", text: "FW", ref });
    if (joint.place === "field-fit") marks.push({ shape: "none", text: `FFW +${formatLength(trims.get(joint.pointId) ?? fieldTrimMm, units)}`, ref });
    labels.push(marksLabel(marks, { id: `weld ${joint.key}`, anchors: [at], clear: size.WELD_DOT / 2, along: [direction] }, options.measure));
  }
  return { labels, shown };
}

/** Flanges and gaskets of one arm share a leader; every other component has its own. */
export function componentMarks(placed: Placed, drawn: readonly DrawnEdge[], options: DrawOptions): Marks {
  if (!options.show.items) return NO_MARKS;
  const numbers = itemNumbers(placed.sketch);
  const frames = partFrames(placed, drawn);
  const frameOf = groupBy(frames, (frame) => frame.component.id);
  const own = placed.sketch.components.filter((component) => numbers.has(component.id));
  const groups = groupBy(own, (component) => groupKey(component, frameOf));
  const labels: Label[] = [];
  const shown: Ref[] = [];
  for (const [key, components] of groups) {
    const marks: Mark[] = components.flatMap((component) =>
      (numbers.get(component.id) ?? []).map(({ item }) => ({ shape: "circle" as const, text: String(item), ref: { kind: "component" as const, id: component.id } })),
    );
    const lead = components.find((component) => component.kind !== "gasket" && component.kind !== "bolt-set") ?? components[0];
    const at = lead ? componentAnchor(placed, lead.kind, lead.pointId, frameOf.get(lead.id) ?? []) : null;
    if (!lead || !at) continue;
    labels.push(marksLabel(marks, { id: `item ${key}`, ...at }, options.measure));
    for (const component of components) {
      shown.push({ kind: "component", id: component.id });
      for (const { ref } of numbers.get(component.id) ?? []) shown.push(ref);
    }
  }
  return { labels, shown };
}

/** Bolts go with the gasket they close on; a gasket with the flange on its side. */
function groupKey({ kind, id }: Component, frameOf: ReadonlyMap<string, readonly PartFrame[]>): string {
  const lead = kind === "bolt-set" ? id.replace(".bolts", ".gasket") : id;
  const frame = frameOf.get(lead)?.[0];
  if (!frame || !(kind.startsWith("flange") || kind === "stub-end" || kind === "gasket" || kind === "bolt-set")) return lead;
  return `${frame.drawn.edge.id} ${frame.component.pointId}`;
}

/** A cut piece: its item number and its mark side by side, led to anywhere along the piece. */
export function pieceMarks(placed: Placed, drawn: readonly DrawnEdge[], options: DrawOptions): Marks {
  const { items, pieces } = options.show;
  if (!items && !pieces) return NO_MARKS;
  const numbers = itemNumbers(placed.sketch);
  const labels: Label[] = [];
  const shown: Ref[] = [];
  for (const piece of placed.sketch.pieces) {
    const spans = pieceSpans(piece, drawn);
    if (spans.length === 0) continue;
    const ref: Ref = { kind: "piece", id: piece.key };
    const marks: Mark[] = [];
    if (pieces) marks.push({ shape: "stadium", text: piece.mark, ref });
    if (items) for (const { item } of numbers.get(piece.key) ?? []) marks.push({ shape: "circle", text: String(item), ref });
    if (marks.length === 0) continue;
    const anchors = spans.flatMap(({ d, from, to }, i) => (i === 0 ? anchorsAlong(d) : [0.5]).map((t) => edgePoint(d, from + (to - from) * t)));
    labels.push(marksLabel(marks, { id: `piece ${piece.key}`, anchors: anchors.slice(0, MOST_ANCHORS), clear: 0.5, along: spans.map(({ d }) => d.direction) }, options.measure));
    shown.push(ref);
    if (items) for (const { ref: material } of numbers.get(piece.key) ?? []) shown.push(material);
  }
  return { labels, shown };
}

/** Places of a piece mark on its first leg; on an off-axis leg the travel stands in the middle, so its ends are tried too. */
const anchorsAlong = (d: DrawnEdge): readonly number[] => (d.edge.kind === "offset" ? [0.36, 0.64, 0.5, 0.84, 0.16] : [0.36, 0.64, 0.5]);
const MOST_ANCHORS = 5;

/** The triangle of the latest revision at each of its clouds. */
export function revisionMarks(placed: Placed, options: DrawOptions): readonly Label[] {
  const { changed } = options;
  if (!changed) return [];
  return changedGroups(placed, changed.pointIds).map(({ ids, outline }) => {
    const ref: Ref = { kind: "point", id: ids[0] ?? "" };
    return marksLabel([{ shape: "triangle", text: changed.code, ref }], { id: `revision ${ref.id}`, anchors: outline, clear: 1.4, along: [] }, options.measure);
  });
}

interface PieceSpan {
  readonly d: DrawnEdge;
  readonly from: number;
  readonly to: number;
}

/** Where a piece lies on the drawn legs it passes through, the longest first. */
function pieceSpans(piece: Piece, drawn: readonly DrawnEdge[]): readonly PieceSpan[] {
  return drawn
    .filter((d) => d.edge.pieces.includes(piece))
    .map((d) => ({ d, from: edgePlace(d, piece.start), to: edgePlace(d, piece.end) }))
    .sort((p, q) => q.to - q.from - (p.to - p.from));
}
