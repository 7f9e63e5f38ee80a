/** Ejection: a badly seated label may take another's place when that one finds a seat so good that both together gain. */
import { basePrice, candidateOf, TIERS, type Candidate } from "./label-candidates";
import type { FieldEntry } from "./label-field";
import { leaderPrice } from "./label-leaders";
import { entriesOf, seatAt, seatInPool, type LabelTable, type Seat } from "./label-seats";

/** Labels that cost more than this look for a place to take. */
const UNEASY = 11;
/** Places tried per uneasy label. */
const TRIES = 8;
const LEAST_GAIN = 0.5;
/** Only places this near are worth taking from another. */
const TAKEN_TIERS = Math.min(3, TIERS.length);

/** @returns whether any label changed its seat */
export function ejectAll(table: LabelTable): boolean {
  const index = new Map(table.labels.map((label, i) => [label.id, i]));
  let changed = false;
  table.seats.forEach((seat, i) => {
    if (seat && seat.cost > UNEASY && ejectFor(table, i, seat, index)) changed = true;
  });
  return changed;
}

function ejectFor(table: LabelTable, i: number, seat: Seat, index: ReadonlyMap<string, number>): boolean {
  const label = table.labels[i];
  const pool = table.pools[i];
  if (!label || !pool) return false;
  let tries = 0;
  for (let tier = 0; tier < TAKEN_TIERS; tier++) {
    const { rings, keys } = pool.clearTier(tier);
    for (const key of keys) {
      if (basePrice(key) >= seat.cost - LEAST_GAIN || tries >= TRIES) break;
      const candidate = candidateOf(label, rings, key);
      const j = onlyBlocker(table, i, candidate, index);
      if (j === null || candidate.base + leaderPrice(label, candidate, table.ink) >= seat.cost - LEAST_GAIN) continue;
      tries++;
      if (swapped(table, i, j, candidate)) return true;
    }
  }
  return false;
}

/** The one movable label that stands on a place; null when there is none, or more. */
function onlyBlocker(table: LabelTable, i: number, candidate: Candidate, index: ReadonlyMap<string, number>): number | null {
  const label = table.labels[i];
  if (!label) return null;
  const [blocker, ...more] = table.field.takers(candidate.x, candidate.y, label.halfWidth, label.halfHeight).filter((id) => id !== label.id);
  return blocker === undefined || more.length > 0 ? null : (index.get(blocker) ?? null);
}

function put(table: LabelTable, entries: readonly FieldEntry[]): void {
  for (const entry of entries) table.field.add(entry);
}

function lift(table: LabelTable, entries: readonly FieldEntry[]): void {
  for (const entry of entries) table.field.remove(entry);
}

/** Tries label i at the candidate with j moved elsewhere; puts both back when that gains nothing. */
function swapped(table: LabelTable, i: number, j: number, candidate: Candidate): boolean {
  const [one, other] = [table.labels[i], table.labels[j]];
  const [before, theirs] = [table.seats[i], table.seats[j]];
  const pool = table.pools[j];
  if (!one || !other || !before || !theirs || !pool) return false;
  lift(table, before.entries);
  lift(table, theirs.entries);
  const trial = entriesOf(one, candidate);
  put(table, trial);
  const most = before.cost + theirs.cost - LEAST_GAIN - candidate.base;
  const moved = seatInPool(other, pool, table.field, table.ink, most);
  lift(table, trial);
  if (moved) put(table, moved.entries);
  const taken = moved ? seatAt(one, candidate, table.field, table.ink) : null;
  if (moved) lift(table, moved.entries);
  if (moved && taken && moved.cost + taken.cost < before.cost + theirs.cost - LEAST_GAIN) {
    put(table, moved.entries);
    put(table, taken.entries);
    table.seats[i] = taken;
    table.seats[j] = moved;
    return true;
  }
  put(table, before.entries);
  put(table, theirs.entries);
  return false;
}
