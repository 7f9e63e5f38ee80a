/** Seats: the cheapest free place of one label among those placed so far. */
import { basePrice, candidateOf, candidatesOf, COST_PER_MM, FAR_TIERS, labelBox, middleInto, POOR_FROM, TIERS, type Candidate, type Candidates, type Label, type LabelInk } from "./label-candidates";
import type { FieldEntry, LabelField } from "./label-field";
import { leaderPrice } from "./label-leaders";

export interface Seat {
  readonly candidate: Candidate;
  readonly cost: number;
  readonly entries: readonly FieldEntry[];
}

/** Free places weighed on a tier before the best of them is taken: far past where the ring search still gains. */
const FREE_TRIES = 30;
/** A place whose leader or box meets another label counts for this much of one, so that a whole side full of them does not end the search. */
const MET_TRY = 0.25;
const COST_OF_LEADER_ON_LABEL = 45;
const COST_OF_LEADER_CROSSING = 14;

/** Candidates of one label by tiers of rings, made when first looked at. */
export class Pool {
  private readonly clear: Candidates[] = [];
  private readonly poor: Candidates[] = [];

  constructor(private readonly label: Label, private readonly ink: LabelInk) {}

  clearTier(tier: number): Candidates {
    return (this.clear[tier] ??= candidatesOf(this.label, TIERS[tier] ?? [], "clear", this.ink));
  }

  poorTier(tier: number): Candidates {
    return (this.poor[tier] ??= candidatesOf(this.label, TIERS[tier] ?? [], "poor", this.ink));
  }
}

/** No place of a tier is cheaper. */
const leastOf = (tier: number): number => (TIERS[tier]?.[0] ?? 0) * COST_PER_MM;

/** The better of the best so far and the best of a list below the limit; null when neither has a free place. */
function better(label: Label, candidates: Candidates, field: LabelField, ink: LabelInk, before: Choice | null, limit: number): Choice | null {
  return cheapest(label, candidates, field, ink, before?.cost ?? limit) ?? before;
}

/**
 * Nearest tiers first, clear places before those on a pipe or outside the room; null when all of them are taken, or none is
 * cheaper than the limit.
 */
export function seatInPool(label: Label, pool: Pool, field: LabelField, ink: LabelInk, limit = Infinity): Seat | null {
  let best: Choice | null = null;
  for (let tier = 0; tier < TIERS.length; tier++) {
    if ((best?.cost ?? limit) <= leastOf(tier)) break;
    best = better(label, pool.clearTier(tier), field, ink, best, limit);
  }
  for (let tier = 0; tier < TIERS.length; tier++) {
    if ((best?.cost ?? limit) <= POOR_FROM + leastOf(tier)) break;
    best = better(label, pool.poorTier(tier), field, ink, best, limit);
  }
  return best ? seatOf(label, best) : null;
}

/** A place beyond all usual rings: the first tier that has a free one. */
export function seatFarAway(label: Label, field: LabelField, ink: LabelInk): Seat | null {
  for (const rings of FAR_TIERS) {
    const clear = better(label, candidatesOf(label, rings, "clear", ink), field, ink, null, Infinity);
    const found = clear && clear.cost <= POOR_FROM ? clear : better(label, candidatesOf(label, rings, "poor", ink), field, ink, clear, Infinity);
    if (found) return seatOf(label, found);
  }
  return null;
}

/** The seat a candidate makes among today's neighbours; null when another label stands on it. */
export function seatAt(label: Label, candidate: Candidate, field: LabelField, ink: LabelInk): Seat | null {
  if (field.isTaken(candidate.x, candidate.y, label.halfWidth, label.halfHeight)) return null;
  const cost = candidate.base + (candidate.ring >= label.leaderFrom ? leaderPrice(label, candidate, ink) : 0) + meetings(label, candidate, field).cost;
  return seatOf(label, { candidate, cost });
}

/** Price of labels under the leader, and of leaders under the label or across its leader. */
function meetings(label: Label, candidate: Candidate, field: LabelField): { readonly labels: number; readonly cost: number } {
  const { x, y, fromX, fromY, toX, toY } = candidate;
  const led = candidate.ring >= label.leaderFrom;
  const labels = field.leadersUnder(x, y, label.halfWidth, label.halfHeight) + (led ? field.labelsOn(fromX, fromY, toX, toY) : 0);
  const across = led ? field.leadersAcross(fromX, fromY, toX, toY) : 0;
  return { labels, cost: labels * COST_OF_LEADER_ON_LABEL + across * COST_OF_LEADER_CROSSING };
}

interface Choice {
  readonly candidate: Candidate;
  readonly cost: number;
}

const middle = new Float64Array(2);

/** The cheapest free candidate below a limit. */
function cheapest(label: Label, { rings, keys }: Candidates, field: LabelField, ink: LabelInk, limit: number): Choice | null {
  let best: Candidate | null = null;
  let bestCost = limit;
  let free = 0;
  for (const key of keys) {
    if (basePrice(key) >= bestCost || free > FREE_TRIES) break;
    middleInto(middle, label, rings, key);
    if (field.isTaken(middle[0] ?? 0, middle[1] ?? 0, label.halfWidth, label.halfHeight)) continue;
    const candidate = candidateOf(label, rings, key);
    const fixed = candidate.base + (candidate.ring >= label.leaderFrom ? leaderPrice(label, candidate, ink) : 0);
    if (fixed >= bestCost) continue;
    const met = meetings(label, candidate, field);
    free += met.labels > 0 ? MET_TRY : 1;
    if (fixed + met.cost < bestCost) [best, bestCost] = [candidate, fixed + met.cost];
  }
  return best ? { candidate: best, cost: bestCost } : null;
}

function seatOf(label: Label, { candidate, cost }: Choice): Seat {
  return { candidate, cost, entries: entriesOf(label, candidate) };
}

export function entriesOf(label: Label, candidate: Candidate): readonly FieldEntry[] {
  const entries: FieldEntry[] = [{ id: label.id, box: labelBox(label, candidate), leader: null }];
  if (candidate.ring < label.leaderFrom) return entries;
  const { fromX, fromY, toX, toY } = candidate;
  return [...entries, { id: label.id, box: null, leader: { from: [fromX, fromY], to: [toX, toY] } }];
}

export interface LabelTable {
  readonly labels: readonly Label[];
  readonly pools: readonly Pool[];
  readonly seats: (Seat | null)[];
  readonly field: LabelField;
  readonly ink: LabelInk;
}
