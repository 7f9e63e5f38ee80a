/**
 * Pricing: the cutting patterns worth adding to the master programme, found exactly by dynamic programming. A pattern that
 * returns its rest saves the rest's value, so each stock is asked twice: with all its room and no return, and with the room that
 * leaves an offcut, where every piece also costs the value of the length it uses up.
 */
import { NEST_WORTH } from "../geometry/tolerances";
import { fillCounts, fillTable, type FillItem, type FillTable } from "./fill";
import { knapsackTable, type KnapsackTable } from "./knapsack";
import { heatFits, patternOf, restOf, restValue, roomLeavingOffcut, roomOf, type Pattern } from "./pattern";
import type { NestInput, NestStock } from "./nest-types";

export interface Worths {
  readonly piece: readonly number[];
  readonly stock: readonly number[];
}

/** Tables of the stocks that the same demands fit: for plain patterns and for those that return a rest. */
interface Tables {
  readonly plain: FillTable;
  readonly returning: FillTable;
}

export interface Pricer {
  /** The best patterns of each stock, and others of the lengths there are several of. */
  readonly found: readonly Pattern[];
  /** The greatest saving of one pattern, per stock. */
  readonly saving: readonly number[];
  /** All patterns whose reduced cost is at most `within`, without those another covers; null when more than `most`. */
  all(within: number, most: number): Pattern[] | null;
}

/** Patterns by their longest piece are taken from a stock's table until there are this many. */
const MOST_BY_LONGEST = 24;

/** @param wanted how many of each demand are still open: no pattern holds more. */
export function priceStocks(input: NestInput, worths: Worths, wanted: readonly number[]): Pricer {
  const { piece, stock } = worths;
  const asked = new Set(input.demands.map((d) => d.heat));
  // Heats that no piece asks for hold the same pieces: one pair of tables serves them all.
  const groupOf = (heat: string | null) => (heat !== null && asked.has(heat) ? `heat ${heat}` : "any");
  const itemsOf = (heat: string | null, value: number): FillItem[] => {
    const capacity = capacityOf(input, (s) => groupOf(s.heat) === groupOf(heat));
    return input.demands.flatMap((d, index) => {
      const weight = d.length + input.kerf;
      const most = Math.min(wanted[index]!, Math.floor(capacity / weight));
      return most > 0 && heatFits(d.heat, heat) ? [{ index, weight, profit: piece[index]! - value * weight, most }] : [];
    });
  };
  const grouped = <T>(make: (heat: string | null, capacity: number) => T) => {
    const made = new Map<string, T>();
    return (heat: string | null): T => {
      const group = groupOf(heat);
      const known = made.get(group) ?? make(heat, capacityOf(input, (s) => groupOf(s.heat) === group));
      made.set(group, known);
      return known;
    };
  };
  const tablesOf = grouped((heat, capacity): Tables => ({ plain: fillTable(itemsOf(heat, 0), capacity), returning: fillTable(itemsOf(heat, input.offcutValue), capacity) }));
  const fullOf = grouped((heat, capacity) => ({ plain: knapsackTable(longestFirst(itemsOf(heat, 0)), capacity), returning: knapsackTable(longestFirst(itemsOf(heat, input.offcutValue)), capacity) }));
  const found: Pattern[] = [];
  const saving = input.stocks.map((s, index) => {
    const saved = (pattern: Pattern) => worth(pattern, piece) + stock[index]! - pattern.cost;
    let best = 0;
    for (const pattern of patternsOf(input, index, tablesOf(s.heat))) {
      const more = saved(pattern);
      if (more > NEST_WORTH) found.push(pattern);
      best = Math.max(best, more);
    }
    return best;
  });
  return { found, saving, all: (within, most) => enumerate(input, worths, fullOf, within, most) };
}

function capacityOf(input: NestInput, counts: (stock: NestStock) => boolean): number {
  return input.stocks.reduce((most, s) => (counts(s) ? Math.max(most, roomOf(input, s)) : most), 0);
}

function longestFirst(items: readonly FillItem[]): FillItem[] {
  return [...items].sort((a, b) => b.weight - a.weight);
}

/** The best plain and the best returning pattern; of lengths there are several of, also the best by each longest piece. */
function patternsOf(input: NestInput, index: number, { plain, returning }: Tables): Pattern[] {
  const s = input.stocks[index]!;
  const out: Pattern[] = [];
  const take = (table: FillTable, room: number, longest?: number) => {
    const counts = room < 0 ? null : fillCounts(table, room, input.demands.length, longest);
    if (counts?.some((n) => n > 0)) out.push(patternOf(input, index, counts));
  };
  take(plain, roomOf(input, s));
  take(returning, roomLeavingOffcut(input, s));
  if (s.quantity === 1) return out;
  const step = Math.max(1, Math.floor(plain.parts.length / MOST_BY_LONGEST));
  for (let k = plain.parts.length - 1; k >= 0; k -= step) take(plain, roomOf(input, s), k);
  return out;
}

export function worth({ counts }: Pattern, piece: readonly number[]): number {
  let total = 0;
  for (let i = 0; i < counts.length; i++) if (counts[i]! > 0) total += counts[i]! * piece[i]!;
  return total;
}

interface FullTables {
  readonly plain: KnapsackTable;
  readonly returning: KnapsackTable;
}

/** Depth-first over the tables: a branch is left as soon as even its best cannot come within the limit. */
function enumerate(input: NestInput, { stock }: Worths, tablesOf: (heat: string | null) => FullTables, within: number, most: number): Pattern[] | null {
  const out: Pattern[] = [];
  for (let index = 0; index < input.stocks.length; index++) {
    const s = input.stocks[index]!;
    const { plain, returning } = tablesOf(s.heat);
    const base = s.cost - stock[index]!;
    const kept = input.offcutValue * (s.length - input.endTrim);
    const room = roomOf(input, s);
    const leaving = roomLeavingOffcut(input, s);
    // Reduced cost = base - profit <= within.
    const plainOk = walk(plain, room, base - within, (counts, left) => {
      const full = plain.items.every((item) => counts[item.index]! >= item.most || item.weight > left);
      const pattern = patternOf(input, index, counts.slice());
      return full && restValue(input, restOf(input, s, room - left)) === 0 ? pattern : null;
    });
    if (!plainOk) return null;
    const returningOk = leaving < 0 || input.offcutValue === 0 || walk(returning, leaving, base - kept - within, (counts) => patternOf(input, index, counts.slice()));
    if (!returningOk) return null;
  }
  return out;

  function walk(table: KnapsackTable, room: number, least: number, make: (counts: number[], left: number) => Pattern | null): boolean {
    const counts = new Array<number>(input.demands.length).fill(0);
    return room < 0 || step(0, room, 0);

    function step(k: number, left: number, profit: number): boolean {
      if (profit + table.best[k]![left]! < least - NEST_WORTH) return true;
      if (k === table.items.length) {
        const pattern = counts.some((n) => n > 0) ? make(counts, left) : null;
        if (pattern) out.push(pattern);
        return out.length <= most;
      }
      const item = table.items[k]!;
      for (let n = Math.min(item.most, Math.floor(left / item.weight)); n >= 0; n--) {
        counts[item.index] = n;
        if (!step(k + 1, left - n * item.weight, profit + n * item.profit)) return false;
      }
      counts[item.index] = 0;
      return true;
    }
  }
}
