/**
 * Labels: each has anchors and a box, tried on rings of candidate places around its anchors. What a candidate costs on
 * fixed ink is counted once; the search then walks the candidates cheapest first against the labels placed so far, and
 * improves by taking labels out and putting them back. A place on another label is never taken: the rings go on outwards
 * until one is free, so labels cannot overlap.
 */
import type { PaperBox, PaperPoint } from "../geometry/types";
import type { DisplayItem, LabelReport } from "./drawing-types";
import { boxInside, type InkMap } from "./ink-map";
import { LabelField, type FieldEntry } from "./label-field";
import { boxEdgeAlong, boxesMeet, type TurnedBox } from "./plane";

export interface Label {
  readonly id: string;
  readonly anchors: readonly PaperPoint[];
  /** The leader starts this far from the anchor. */
  readonly clear: number;
  readonly halfWidth: number;
  readonly halfHeight: number;
  /** Paper directions of the pipe at the anchor: a leader along them reads as pipe. */
  readonly along: readonly PaperPoint[];
  /** A leader shorter than this is left out. */
  readonly leaderFrom: number;
  /** How far the leader runs on under the label's filled shapes. */
  readonly leaderUnder: number;
  readonly draw: (centre: PaperPoint, leader: { readonly from: PaperPoint; readonly to: PaperPoint } | null) => readonly DisplayItem[];
}

export interface LabelInk {
  readonly heavy: InkMap;
  readonly light: InkMap;
  readonly room: PaperBox;
}

interface Candidate {
  readonly centre: PaperPoint;
  readonly from: PaperPoint;
  readonly to: PaperPoint;
  readonly ring: number;
  readonly cost: number;
  readonly touches: boolean;
}

interface Seat {
  readonly candidate: Candidate;
  readonly cost: number;
  readonly entries: readonly FieldEntry[];
}

const RINGS = [1.5, 2.8, 4.5, 6.5, 9, 12, 16, 21, 27, 34] as const;
const FAR_RINGS = [42, 52, 64, 80, 100, 130, 170, 220, 290, 380, 500, 700, 1000, 1500, 2200, 3200] as const;
const ANGLES = 24;
const OFFSET_DEG = 7.5;
const SWEEPS = 3;
/** cos 9°: nearer than this to a pipe or an axis a leader reads as one of them. */
const ALONG_COSINE = Math.cos((9 * Math.PI) / 180);
const AXES_30: readonly PaperPoint[] = [[Math.cos(Math.PI / 6), 0.5], [Math.cos(Math.PI / 6), -0.5], [0, 1]];

function boxOf(label: Label, centre: PaperPoint): TurnedBox {
  return { centre, halfWidth: label.halfWidth, halfHeight: label.halfHeight, angle: 0 };
}

function candidatesOf(label: Label, rings: readonly number[], ink: LabelInk): Candidate[] {
  const list: Candidate[] = [];
  label.anchors.forEach((anchor, place) => {
    for (const ring of rings) for (let i = 0; i < ANGLES; i++) list.push(candidateAt(label, anchor, place, ring, i, ink));
  });
  return list.sort((p, q) => p.cost - q.cost);
}

function candidateAt(label: Label, anchor: PaperPoint, place: number, ring: number, i: number, ink: LabelInk): Candidate {
  const angle = ((OFFSET_DEG + (i * 360) / ANGLES) * Math.PI) / 180;
  const direction: PaperPoint = [Math.cos(angle), Math.sin(angle)];
  const edge = boxEdgeAlong(label.halfWidth, label.halfHeight, direction);
  const reach = label.clear + ring + edge;
  const centre: PaperPoint = [anchor[0] + direction[0] * reach, anchor[1] + direction[1] * reach];
  const from: PaperPoint = [anchor[0] + direction[0] * label.clear, anchor[1] + direction[1] * label.clear];
  const to: PaperPoint = [anchor[0] + direction[0] * (label.clear + ring), anchor[1] + direction[1] * (label.clear + ring)];
  const [w, h] = [label.halfWidth + 0.5, label.halfHeight + 0.5];
  const heavy = ink.heavy.inBox(centre[0] - w, centre[1] - h, centre[0] + w, centre[1] + h);
  const light = ink.light.inBox(centre[0] - w, centre[1] - h, centre[0] + w, centre[1] + h);
  const begin: PaperPoint = [from[0] + direction[0] * 0.9, from[1] + direction[1] * 0.9];
  const crossed = ring > 1.6 ? ink.heavy.along(begin, to) : 0;
  const thin = ring > 1.6 ? ink.light.along(begin, to) : 0;
  const out = boxInside(ink.room, centre[0] - w, centre[1] - h, centre[0] + w, centre[1] + h);
  const follows = label.along.some((d) => Math.abs(d[0] * direction[0] + d[1] * direction[1]) > ALONG_COSINE) ? 8 : 0;
  const axial = AXES_30.some((d) => Math.abs(d[0] * direction[0] + d[1] * direction[1]) > ALONG_COSINE) ? 1.2 : 0;
  const cost = ring * 0.7 + place * 0.6 + (heavy > 0 ? 30 + heavy * 0.5 : 0) + (light > 0 ? 9 + light * 0.25 : 0) + (crossed > 0 ? 16 + crossed : 0)
    + (thin > 0 ? 2 + thin * 0.5 : 0) + (out > 0 ? 25 + out * 3 : 0) + follows + axial;
  return { centre, from, to, ring, cost, touches: heavy > 0 || crossed > 0 };
}

const COST_OF_LEADER_ON_LABEL = 45;
const COST_OF_LEADER_CROSSING = 14;

function seatFor(label: Label, candidates: readonly Candidate[], field: LabelField): Seat | null {
  let best: Candidate | null = null;
  let bestCost = Infinity;
  for (const candidate of candidates) {
    if (candidate.cost >= bestCost) break;
    const box = boxOf(label, candidate.centre);
    if (field.overlapping(box)) continue;
    const met = candidate.ring >= label.leaderFrom ? field.onLeader(candidate.from, candidate.to) : { labels: 0, leaders: 0 };
    const cost = candidate.cost + met.labels * COST_OF_LEADER_ON_LABEL + met.leaders * COST_OF_LEADER_CROSSING + field.leadersIn(box) * COST_OF_LEADER_ON_LABEL;
    if (cost < bestCost) [best, bestCost] = [candidate, cost];
  }
  if (!best) return null;
  const entries: FieldEntry[] = [{ id: label.id, box: boxOf(label, best.centre), leader: null }];
  // Kept a hair short of its own box, so that only foreign leaders count as inside it.
  const short = 1 - 0.2 / Math.max(best.ring, 1);
  const end: PaperPoint = [best.from[0] + (best.to[0] - best.from[0]) * short, best.from[1] + (best.to[1] - best.from[1]) * short];
  if (best.ring >= label.leaderFrom) entries.push({ id: label.id, box: null, leader: { from: best.from, to: end } });
  return { candidate: best, cost: bestCost, entries };
}

export interface PlacedLabels {
  readonly items: readonly DisplayItem[];
  readonly boxes: readonly TurnedBox[];
  readonly report: LabelReport;
}

/** @param fixed boxes already on paper (dimension numbers, box words, north arrow) */
export function placeLabels(labels: readonly Label[], fixed: readonly TurnedBox[], ink: LabelInk): PlacedLabels {
  const field = new LabelField();
  fixed.forEach((box, i) => field.add({ id: `fixed ${i}`, box, leader: null }));
  const near = labels.map((label) => candidatesOf(label, RINGS, ink));
  const seats: (Seat | null)[] = labels.map(() => null);
  const seat = (i: number): boolean => {
    const label = labels[i];
    const candidates = near[i];
    if (!label || !candidates) return false;
    const before = seats[i];
    for (const entry of before?.entries ?? []) field.remove(entry);
    let found = seatFor(label, candidates, field);
    if (!found && !before) found = seatFor(label, candidatesOf(label, FAR_RINGS, ink), field);
    const next = found && (!before || found.cost < before.cost - 1e-9) ? found : before ? reseated(label, before, field) : null;
    for (const entry of next?.entries ?? []) field.add(entry);
    seats[i] = next;
    return next?.candidate !== before?.candidate;
  };
  labels.forEach((_, i) => seat(i));
  for (let sweep = 0; sweep < SWEEPS; sweep++) {
    let changed = false;
    for (let i = labels.length - 1; i >= 0; i--) changed = seat(i) || changed;
    if (!changed) break;
  }
  return drawnLabels(labels, seats, fixed, field);
}

/** The same place again, at what it costs among today's neighbours. */
function reseated(label: Label, before: Seat, field: LabelField): Seat {
  return seatFor(label, [before.candidate], field) ?? before;
}

function drawnLabels(labels: readonly Label[], seats: readonly (Seat | null)[], fixed: readonly TurnedBox[], field: LabelField): PlacedLabels {
  const items: DisplayItem[] = [];
  const boxes: TurnedBox[] = [];
  const leaders: number[] = [];
  let touches = 0;
  labels.forEach((label, i) => {
    const seat = seats[i];
    if (!seat) return;
    const { candidate } = seat;
    const box = boxOf(label, candidate.centre);
    const led = candidate.ring >= label.leaderFrom;
    leaders.push(candidate.ring);
    if (candidate.touches || field.leadersIn(box) > 0) touches++;
    const under = label.leaderUnder;
    const way: PaperPoint = [candidate.to[0] - candidate.from[0], candidate.to[1] - candidate.from[1]];
    const length = Math.max(Math.hypot(way[0], way[1]), 1e-9);
    const to: PaperPoint = [candidate.to[0] + (way[0] / length) * under, candidate.to[1] + (way[1] / length) * under];
    items.push(...label.draw(candidate.centre, led ? { from: candidate.from, to } : null));
    boxes.push(box);
  });
  return { items, boxes, report: reportOf(labels.length, boxes, fixed, touches, leaders) };
}

function reportOf(count: number, boxes: readonly TurnedBox[], fixed: readonly TurnedBox[], touches: number, leaders: readonly number[]): LabelReport {
  let overlaps = 0;
  boxes.forEach((a, i) => {
    for (const b of boxes.slice(i + 1)) if (boxesMeet(a, b, 0)) overlaps++;
    for (const b of fixed) if (boxesMeet(a, b, 0)) overlaps++;
  });
  const sorted = [...leaders].sort((p, q) => p - q);
  const mean = leaders.length === 0 ? 0 : leaders.reduce((sum, l) => sum + l, 0) / leaders.length;
  return { labels: count + fixed.length, clean: count + fixed.length - touches, overlaps, touches, meanLeaderMm: mean, p95LeaderMm: sorted[Math.floor(sorted.length * 0.95)] ?? 0 };
}
