/**
 * Labels: each is tried on rings of candidate places (label-candidates.ts), cheapest first, against the labels placed so far,
 * and improves by being taken out and put back. A place on another label is never taken: the rings go on outwards until one
 * is free, so labels cannot overlap. Deterministic.
 */
import type { PaperPoint } from "../geometry/types";
import type { DisplayItem, LabelReport } from "./drawing-types";
import { labelBox, type Label, type LabelInk } from "./label-candidates";
import { LabelField } from "./label-field";
import { ejectAll } from "./label-ejection";
import { leaderTouches } from "./label-leaders";
import { Pool, seatAt, seatFarAway, seatInPool, type Seat } from "./label-seats";
import { boxesMeet, type TurnedBox } from "./plane";

/** Rounds of improving: small sheets can afford to be tidied longer. */
const SWEEPS = 4;
const SWEEPS_CROWDED = 3;
const CROWDED_FROM = 80;
/** More labels than this get one sweep and no ejection: such a line wants more than one sheet anyway. */
const EJECTION_MOST = 110;
/** A label on the innermost ring without a fault costs less and cannot get better. */
const BEST_COST = 1.06;
const SAME_COST = 1e-9;

export interface PlacedLabels {
  readonly items: readonly DisplayItem[];
  readonly boxes: readonly TurnedBox[];
  readonly report: LabelReport;
}

/** @param fixed boxes already on paper (dimension numbers, box words, north arrow) */
export function placeLabels(labels: readonly Label[], fixed: readonly TurnedBox[], ink: LabelInk): PlacedLabels {
  const field = new LabelField();
  fixed.forEach((box, i) => field.add({ id: `fixed ${i}`, box, leader: null }));
  const pools = labels.map((label) => new Pool(label, ink));
  const seats: (Seat | null)[] = labels.map(() => null);
  labels.forEach((label, i) => {
    const pool = pools[i];
    const seat = (pool && seatInPool(label, pool, field, ink)) ?? seatFarAway(label, field, ink);
    for (const entry of seat?.entries ?? []) field.add(entry);
    seats[i] = seat;
  });
  const sweeps = labels.length > EJECTION_MOST ? 1 : labels.length >= CROWDED_FROM ? SWEEPS_CROWDED : SWEEPS;
  for (let sweep = 0; sweep < sweeps; sweep++) {
    if (!improveAll(labels, pools, seats, field, ink) && sweep > 0) break;
    if (sweep < sweeps - 1 && labels.length <= EJECTION_MOST) ejectAll({ labels, pools, seats, field, ink });
  }
  return drawnLabels(labels, seats, fixed, field, ink);
}

/** Takes every label out once, last first, and puts it where it is cheapest now. Says whether anything moved. */
function improveAll(labels: readonly Label[], pools: readonly Pool[], seats: (Seat | null)[], field: LabelField, ink: LabelInk): boolean {
  let moved = false;
  for (let i = labels.length - 1; i >= 0; i--) {
    const label = labels[i];
    const before = seats[i];
    const pool = pools[i];
    if (!label || !pool || !before || before.cost < BEST_COST) continue;
    for (const entry of before.entries) field.remove(entry);
    const today = seatAt(label, before.candidate, field, ink) ?? before;
    const found = seatInPool(label, pool, field, ink, today.cost);
    const next = found && found.cost < today.cost - SAME_COST ? found : today;
    for (const entry of next.entries) field.add(entry);
    seats[i] = next;
    if (next.candidate !== before.candidate) moved = true;
  }
  return moved;
}

function drawnLabels(labels: readonly Label[], seats: readonly (Seat | null)[], fixed: readonly TurnedBox[], field: LabelField, ink: LabelInk): PlacedLabels {
  const items: DisplayItem[] = [];
  const boxes: TurnedBox[] = [];
  const leaders: number[] = [];
  let touches = 0;
  labels.forEach((label, i) => {
    const seat = seats[i];
    if (!seat) return;
    const { candidate, entries } = seat;
    const led = candidate.ring >= label.leaderFrom;
    const box = labelBox(label, candidate);
    for (const entry of entries) field.remove(entry);
    const foreign = field.leadersIn(box);
    for (const entry of entries) field.add(entry);
    leaders.push(candidate.ring);
    if (candidate.boxTouches || (led && leaderTouches(label, candidate, ink)) || foreign > 0) touches++;
    const leader: { from: PaperPoint; to: PaperPoint } | null = led ? { from: [candidate.fromX, candidate.fromY], to: [candidate.toX, candidate.toY] } : null;
    items.push(...label.draw([candidate.x, candidate.y], leader));
    boxes.push(box);
  });
  // A number counts as touched when a leader runs through it.
  touches += fixed.filter((box) => field.leadersIn(box) > 0).length;
  return { items, boxes, report: reportOf(boxes, fixed, touches, leaders) };
}

function reportOf(boxes: readonly TurnedBox[], fixed: readonly TurnedBox[], touches: number, leaders: readonly number[]): LabelReport {
  let overlaps = 0;
  boxes.forEach((a, i) => {
    for (let j = i + 1; j < boxes.length; j++) if (boxesMeet(a, boxes[j] ?? a, 0)) overlaps++;
    for (const b of fixed) if (boxesMeet(a, b, 0)) overlaps++;
  });
  const sorted = [...leaders].sort((p, q) => p - q);
  const mean = leaders.length === 0 ? 0 : leaders.reduce((sum, l) => sum + l, 0) / leaders.length;
  const labels = boxes.length + fixed.length;
  return { labels, clean: labels - touches, overlaps, touches, meanLeaderMm: mean, p95LeaderMm: sorted[Math.floor(sorted.length * 0.95)] ?? 0 };
}
