/** Whole plans: bars, what is short, and their sum; and building one bar by bar at given worths. */
import { NEST_WORTH } from "../geometry/tolerances";
import { shortPenalty } from "./best-fit";
import { fillCounts, fillTable, type FillTable } from "./fill";
import { heatFits, patternOf, roomLeavingOffcut, roomOf, type Pattern } from "./pattern";
import { worth, type Worths } from "./pricing";
import type { NestInput } from "./nest-types";

export interface Whole {
  readonly patterns: readonly Pattern[];
  readonly short: readonly number[];
  /** Cost and the penalty of what is short. */
  readonly total: number;
}

export function wholeOf(input: NestInput, patterns: readonly Pattern[], short: readonly number[]): Whole {
  const penalty = shortPenalty(input) * short.reduce((sum, n) => sum + n, 0);
  return { patterns, short, total: penalty + patterns.reduce((sum, p) => sum + p.cost, 0) };
}

export function better(a: Whole, b: Whole | null): Whole {
  return b && b.total < a.total - NEST_WORTH ? b : a;
}

/** What is still to be cut, and what there is to cut it from. */
export interface Rest {
  readonly wanted: number[];
  readonly left: (number | null)[];
}

/** Fixed for one build: the worth of each piece as this build sees it. */
export interface Seen extends Worths {
  /** What choosing a bar goes by: the worths as they are. */
  readonly true: Worths;
}

/**
 * Builds a plan for the rest, bar by bar: each time the pattern that loses least per worth cut, of all stocks. Changes `rest`.
 * Where one length holds all there is, the cheapest such length ends it.
 */
export function buildWhole(input: NestInput, rest: Rest, seen: Seen): { readonly patterns: Pattern[]; readonly short: number[] } {
  const patterns: Pattern[] = [];
  while (rest.wanted.some((n) => n > 0)) {
    const pattern = lastBar(input, rest) ?? nextBar(input, rest, seen);
    if (!pattern) break;
    const fits = pattern.counts.reduce((most, n, i) => (n > 0 ? Math.min(most, Math.floor(rest.wanted[i]! / n)) : most), rest.left[pattern.stock] ?? Number.POSITIVE_INFINITY);
    // Half of what would do: the other half may find better company.
    const times = Math.max(1, Math.floor(fits / 2));
    for (let k = 0; k < times; k++) patterns.push(pattern);
    pattern.counts.forEach((n, i) => { rest.wanted[i]! -= n * times; });
    if (rest.left[pattern.stock] !== null) rest.left[pattern.stock]! -= times;
  }
  return { patterns, short: [...rest.wanted] };
}

function usable(input: NestInput, { left }: Rest): number[] {
  return input.stocks.flatMap((_, s) => (left[s] === null || left[s]! > 0 ? [s] : []));
}

/** All that is left on one bar, when one holds it. */
function lastBar(input: NestInput, rest: Rest): Pattern | null {
  const need = rest.wanted.reduce((sum, n, i) => sum + n * (input.demands[i]!.length + input.kerf), 0);
  let best: Pattern | null = null;
  for (const s of usable(input, rest)) {
    const stock = input.stocks[s]!;
    if (roomOf(input, stock) < need || rest.wanted.some((n, i) => n > 0 && !heatFits(input.demands[i]!.heat, stock.heat))) continue;
    const pattern = patternOf(input, s, rest.wanted.slice());
    if (!best || pattern.cost < best.cost) best = pattern;
  }
  return best;
}

function nextBar(input: NestInput, rest: Rest, seen: Seen): Pattern | null {
  const tables = new Map<string, { readonly plain: FillTable; readonly returning: FillTable | null }>();
  const need = rest.wanted.reduce((sum, n, i) => sum + n * (input.demands[i]!.length + input.kerf), 0);
  const stocks = usable(input, rest);
  const longest = Math.min(need, stocks.reduce((most, s) => Math.max(most, roomOf(input, input.stocks[s]!)), 0));
  const asked = new Set(input.demands.flatMap((d, i) => (rest.wanted[i]! > 0 && d.heat !== null ? [d.heat] : [])));
  let best: Pattern | null = null;
  let least = Number.POSITIVE_INFINITY;
  for (const s of stocks) {
    const stock = input.stocks[s]!;
    const group = stock.heat !== null && asked.has(stock.heat) ? stock.heat : null;
    const key = group ?? "";
    const table = tables.get(key) ?? { plain: tableOf(input, rest, seen, group, 0, longest), returning: need < 2 * longest ? tableOf(input, rest, seen, group, input.offcutValue, longest) : null };
    tables.set(key, table);
    for (const [made, room] of [[table.plain, roomOf(input, stock)], [table.returning, roomLeavingOffcut(input, stock)]] as const) {
      const counts = made && room >= 0 ? fillCounts(made, Math.min(room, longest), input.demands.length) : null;
      if (!counts?.some((n) => n > 0)) continue;
      const pattern = patternOf(input, s, counts);
      const value = worth(pattern, seen.true.piece);
      const loss = (pattern.cost - seen.true.stock[s]! - value) / Math.max(value, NEST_WORTH);
      if (loss < least) [best, least] = [pattern, loss];
    }
  }
  return best;
}

function tableOf(input: NestInput, { wanted }: Rest, { piece }: Worths, heat: string | null, value: number, capacity: number): FillTable {
  const items = input.demands.flatMap((d, index) => {
    const weight = d.length + input.kerf;
    const most = Math.min(wanted[index]!, Math.floor(capacity / weight));
    // A piece that seems worth nothing still has to be cut.
    return most > 0 && heatFits(d.heat, heat) ? [{ index, weight, profit: Math.max(piece[index]!, NEST_WORTH) - value * weight, most }] : [];
  });
  return fillTable(items, capacity);
}
