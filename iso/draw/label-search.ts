/**
 * Seats for all labels: each takes the cheapest place free, those with the fewest good places first; then sweeps over what
 * sits uneasily. A label may put up to two others out of their seats when all of them together gain, and those may do the
 * same in their turn, a few deep; whatever gains nothing is undone from a journal. The work is bounded by counts, never by
 * the clock, so that equal input gives equal seats. Long because one journal serves all its steps.
 */
import type { Candidates, Label } from "./label-candidates";
import type { LabelGrid } from "./label-grid";
import { PRICE, TIER_COUNT } from "./label-rings";

/** Places tried at each depth at which one label puts out another. */
const TRIES = [0, 4, 10] as const;
const DEPTH = 2;
/** Tiers in which a place is worth another label's moving. */
const TAKEN_TIERS = 6;
/** More than this at one place are not moved. */
const MOST_MOVED = 2;
/** A label that costs no more sits well; one that costs more than this has no clean place. */
const EASY = 6.5 * PRICE;
const UNCLEAN = 26 * PRICE;
const LEAST_GAIN = 0.25 * PRICE;
/** From this tier on any free place will do: the label is beyond all usual rings. */
const LAST_USUAL = 11;
/** Rounds of the deep search, and of the last one, which brings labels nearer to what others left. */
const ROUNDS = 16;
const LAST_ROUNDS = 2;
/** Rings counted to tell which labels have few places. */
const NEAR_TIERS = 2;
/** A move within this of a label is worth another try for it, mm. */
const ZONE = 30;
/** Dearer than any seat. */
const MOST_COST = 1 << 29;
/** Zones are numbered row by row; drawings stay far within this many columns. */
const ZONES = 4096;
const NONE = -1;

/** What a search is given. */
export interface Effort {
  /** A label that costs more may put out others DEPTH deep. */
  readonly price: number;
  /** How deep labels that cost more than EASY may put out others at the last. */
  readonly lastDepth: number;
  /** Places looked at for each label of the sheet before what is reached is left as it is. */
  readonly looks: number;
  /** Tiers in which a label that is put out looks for another place. */
  readonly movedTiers: number;
}
export const QUICK: Effort = { price: 20 * PRICE, lastDepth: 0, looks: 1_200, movedTiers: 9 };
export const THOROUGH: Effort = { price: 24 * PRICE, lastDepth: 1, looks: 10_500, movedTiers: TIER_COUNT };

export class LabelSearch {
  private readonly locked: Uint8Array;
  private readonly journal: number[] = [];
  private readonly met: Int32Array[] = TRIES.map(() => new Int32Array(MOST_MOVED));
  private found = NONE;
  private looks = 0;
  private most = 0;
  private moves = 1;
  private movedTiers = TIER_COUNT;
  private readonly tried: Int32Array;
  /** Last move in each zone of paper. */
  private readonly zones = new Map<number, number>();

  constructor(private readonly labels: readonly Label[], private readonly candidates: Candidates, private readonly grid: LabelGrid) {
    this.locked = new Uint8Array(labels.length);
    this.tried = new Int32Array(labels.length);
  }

  /** Seats all labels; answers how many are left without a clean place. */
  run({ price, lastDepth, looks, movedTiers }: Effort): number {
    this.movedTiers = movedTiers;
    const order = this.labels.map((_, i) => i);
    const choice = order.map((i) => this.choices(i));
    order.sort((p, q) => choice[p]! - choice[q]! || p - q);
    for (const label of order) this.insert(label, MOST_COST, 0, TIER_COUNT);
    this.most = looks * this.labels.length;
    this.sweeps(order, this.candidates.leastCost(0), 0, 1);
    this.sweeps(order, price, DEPTH, ROUNDS);
    this.sweeps(order, EASY, lastDepth, LAST_ROUNDS);
    return this.uneasy(order, UNCLEAN).length;
  }

  /** Tries labels that cost more than a price, the dearest first, until none moves. */
  private sweeps(order: readonly number[], price: number, depth: number, rounds: number): void {
    for (let round = 0; round < rounds; round++) {
      let moved = false;
      for (const label of this.uneasy(order, price)) {
        if (this.looks > this.most) return;
        if (round > 0 && !this.stirred(label)) continue;
        if (this.improved(label, price, depth)) moved = true;
        else this.tried[label] = this.moves;
      }
      if (!moved) return;
    }
  }

  /** Places of a label near its anchor. */
  private choices(label: number): number {
    let count = 0;
    for (let tier = 0; tier < NEAR_TIERS; tier++) count -= this.candidates.start(label, tier) - this.candidates.end(label, tier);
    return count;
  }

  private zone(label: number): number {
    const [x, y] = this.labels[label]!.anchors[0] ?? [0, 0];
    return Math.floor(x / ZONE) + Math.floor(y / ZONE) * ZONES;
  }

  /** True when something moved near a label since it last tried in vain. */
  private stirred(label: number): boolean {
    const zone = this.zone(label);
    for (let row = -ZONES; row <= ZONES; row += ZONES) {
      for (let column = -1; column <= 1; column++) if ((this.zones.get(zone + row + column) ?? 0) > this.tried[label]!) return true;
    }
    return false;
  }

  /** Labels that cost more than a price now, the dearest first. */
  private uneasy(order: readonly number[], price: number): readonly number[] {
    const now = new Int32Array(order.length);
    for (const label of order) {
      const seat = this.grid.seats[label]!;
      now[label] = seat === NONE ? 0 : this.price(label, seat);
    }
    return order.filter((label) => now[label]! > price).sort((p, q) => now[q]! - now[p]! || p - q);
  }

  /** Price of a label on a candidate, among the labels seated. */
  private price(label: number, candidate: number): number {
    return this.candidates.cost(label, candidate) + this.grid.meets(label, candidate);
  }

  private move(label: number, candidate: number): void {
    this.journal.push(label, this.grid.seats[label]!);
    this.grid.seat(label, candidate);
  }

  private undoTo(mark: number): void {
    while (this.journal.length > mark) {
      const seat = this.journal.pop()!;
      this.grid.seat(this.journal.pop()!, seat);
    }
  }

  /** @param price a label that costs no more by now does not put out others */
  private improved(label: number, price: number, depth: number): boolean {
    const { seats } = this.grid;
    const before = seats[label]!;
    if (before === NONE) return false;
    this.journal.length = 0;
    this.move(label, NONE);
    const today = this.price(label, before);
    const net = today <= this.candidates.leastCost(0) ? MOST_COST : this.insert(label, today - LEAST_GAIN, today > price ? depth : 0, TIER_COUNT);
    if (net < MOST_COST) {
      this.moves++;
      for (let i = 0; i < this.journal.length; i += 2) this.zones.set(this.zone(this.journal[i]!), this.moves);
      return true;
    }
    this.undoTo(0);
    return false;
  }

  /**
   * Seats a lifted label, moving others when that gains.
   * @returns what the seats of all moved cost more than before; MOST_COST, with nothing changed, when that is not under the limit
   */
  private insert(label: number, limit: number, depth: number, tiers: number): number {
    const direct = this.best(label, limit, tiers);
    const place = this.found;
    if (depth > 0 && direct > EASY) {
      const net = this.insertMoving(label, Math.min(limit, direct), depth);
      if (net < MOST_COST) return net;
    }
    if (place === NONE) return MOST_COST;
    this.move(label, place);
    return direct;
  }

  /** The cheapest free place under the limit; `found` says where. */
  private best(label: number, limit: number, tiers: number): number {
    const { candidates, grid } = this;
    let best = limit;
    this.found = NONE;
    for (let tier = 0; tier < tiers; tier++) {
      if (candidates.leastCost(tier) >= best || (tier >= LAST_USUAL && this.found !== NONE)) break;
      const start = candidates.start(label, tier);
      const end = candidates.end(label, tier);
      for (let k = start; k < end; k++) {
        const candidate = candidates.order[k]!;
        if (candidates.base[candidate]! >= best) break;
        this.looks++;
        if (grid.taken(label, candidate)) continue;
        const cost = candidates.cost(label, candidate);
        const whole = cost >= best ? cost : cost + grid.meets(label, candidate, best - cost);
        if (whole < best) {
          best = whole;
          this.found = candidate;
        }
      }
    }
    return this.found === NONE ? MOST_COST : best;
  }

  private insertMoving(label: number, limit: number, depth: number): number {
    const { candidates } = this;
    let tries = 0;
    this.locked[label] = 1;
    for (let tier = 0; tier < TAKEN_TIERS && candidates.leastCost(tier) < limit - LEAST_GAIN; tier++) {
      const start = candidates.start(label, tier);
      const end = candidates.end(label, tier);
      for (let k = start; k < end && tries < TRIES[depth]!; k++) {
        const candidate = candidates.order[k]!;
        if (candidates.base[candidate]! >= limit - LEAST_GAIN) break;
        this.looks++;
        if (this.grid.heldBy(candidate, this.locked)) continue;
        const met = this.met[depth]!;
        const count = this.grid.metLabels(label, candidate, met);
        if (count === 0 || count > MOST_MOVED || this.anyLocked(met, count) || candidates.cost(label, candidate) >= limit - LEAST_GAIN) continue;
        tries++;
        const net = this.trial(label, candidate, met, count, limit - LEAST_GAIN, depth);
        if (net < MOST_COST) {
          this.locked[label] = 0;
          return net;
        }
      }
    }
    this.locked[label] = 0;
    return MOST_COST;
  }

  private anyLocked(met: Int32Array, count: number): boolean {
    for (let i = 0; i < count; i++) if (this.locked[met[i]!]) return true;
    return false;
  }

  /** Seats the label on the candidate and those it meets elsewhere; undone when that costs the limit or more. */
  private trial(label: number, candidate: number, met: Int32Array, count: number, limit: number, depth: number): number {
    const { seats } = this.grid;
    const mark = this.journal.length;
    let credit = 0;
    for (let i = 0; i < count; i++) {
      const other = met[i]!;
      const seat = seats[other]!;
      this.move(other, NONE);
      credit += this.price(other, seat);
    }
    let net = this.price(label, candidate) - credit;
    this.move(label, candidate);
    for (let i = 0; i < count && net < limit; i++) net += this.insert(met[i]!, limit - net, depth - 1, this.movedTiers);
    if (net < limit) return net;
    this.undoTo(mark);
    return MOST_COST;
  }
}
