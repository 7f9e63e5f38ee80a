/** Seats: the cheapest free place of one label among those placed so far. */
import { candidatesOf, labelBox, leaderPrice, OUTER_RINGS, OUTER_WORTH, type Candidate, type Label, type LabelInk } from "./label-candidates";
import type { FieldEntry, LabelField } from "./label-field";

export interface Seat {
  readonly candidate: Candidate;
  readonly cost: number;
  readonly entries: readonly FieldEntry[];
}

/** Free places weighed before the best of them is taken: far past where the ring search still gains. */
const FREE_TRIES = 48;
/** A place whose leader or box meets another label counts for this much of one, so that a whole side full of them does not end the search. */
const MET_TRY = 0.25;
const COST_OF_LEADER_ON_LABEL = 45;
const COST_OF_LEADER_CROSSING = 14;

/** Candidates of one label; the outer rings are made only when the inner ones leave something to wish for. */
export interface Pool {
  readonly near: readonly Candidate[];
  outer: readonly Candidate[] | null;
}

export function seatInPool(label: Label, pool: Pool, field: LabelField, ink: LabelInk): Seat | null {
  const near = seatFor(label, pool.near, field, ink);
  if (near && near.cost <= OUTER_WORTH) return near;
  pool.outer ??= candidatesOf(label, OUTER_RINGS, ink);
  const outer = seatFor(label, pool.outer, field, ink);
  return near && (!outer || near.cost <= outer.cost) ? near : outer;
}

export function seatFor(label: Label, candidates: readonly Candidate[], field: LabelField, ink: LabelInk): Seat | null {
  let best: Candidate | null = null;
  let bestCost = Infinity;
  let free = 0;
  for (const candidate of candidates) {
    if (candidate.base >= bestCost || free > FREE_TRIES) break;
    const box = labelBox(label, candidate.centre);
    if (field.overlapping(box)) continue;
    const led = candidate.ring >= label.leaderFrom;
    let cost = candidate.base + (led ? leaderPrice(candidate, ink) : 0);
    if (cost >= bestCost) continue;
    const met = led ? field.onLeader(candidate.from, candidate.to) : { labels: 0, leaders: 0 };
    const onLabels = met.labels + field.leadersIn(box);
    free += onLabels > 0 ? MET_TRY : 1;
    cost += onLabels * COST_OF_LEADER_ON_LABEL + met.leaders * COST_OF_LEADER_CROSSING;
    if (cost < bestCost) [best, bestCost] = [candidate, cost];
  }
  return best ? { candidate: best, cost: bestCost, entries: entriesOf(label, best) } : null;
}

export function entriesOf(label: Label, candidate: Candidate): readonly FieldEntry[] {
  const entries: FieldEntry[] = [{ id: label.id, box: labelBox(label, candidate.centre), leader: null }];
  if (candidate.ring < label.leaderFrom) return entries;
  const { from, to } = candidate;
  return [...entries, { id: label.id, box: null, leader: { from, to } }];
}

export interface LabelTable {
  readonly labels: readonly Label[];
  readonly pools: readonly Pool[];
  readonly seats: (Seat | null)[];
  readonly field: LabelField;
  readonly ink: LabelInk;
}
