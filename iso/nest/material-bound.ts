/**
 * A bound by length alone: whatever is cut from what, the lengths taken must together hold all pieces and their cuts. The
 * cheapest choice of whole lengths that does, every rest valued as if it went back, is found by dynamic programming over the
 * total length. With many pieces this is close to the best plan; with few and long ones the linear programme's bound is higher.
 */
import { shortPenalty } from "./best-fit";
import { roomOf } from "./pattern";
import type { NestInput } from "./nest-types";

/** Longest total that is worked out; longer ones are left to the linear programme. */
const LONGEST_TOTAL = 1_500_000;

/** Most bytes kept to tell which lengths were chosen. */
const MOST_KEPT = 30_000_000;
/** Room over the need, as shares of it, for which the cheapest choices are told too: pieces seldom fill every length exactly. */
const SLACKS = [0, 0.002, 0.006, 0.015] as const;

export interface Material {
  /** Cost that no plan goes under, pieces left out counted at their penalty; 0 where nothing can be said. */
  readonly bound: number;
  /** How many of each stock the cheapest choices take, the barest first. */
  readonly choices: readonly (readonly number[])[];
}

interface Part {
  readonly stock: number;
  readonly count: number;
  readonly room: number;
  readonly cost: number;
}

const NOTHING: Material = { bound: 0, choices: [] };

export function materialBound(input: NestInput): Material {
  const value = valuePerRoom(input);
  const total = input.demands.reduce((sum, d) => sum + d.marks.length * (d.length + input.kerf), 0);
  if (value === null || total > LONGEST_TOTAL) return NOTHING;
  const always = input.stocks.map(() => 0);
  const parts: Part[] = [];
  for (const [stock, s] of input.stocks.entries()) {
    const room = roomOf(input, s);
    if (room <= 0) continue;
    const cost = s.cost - value * room;
    if (cost < 0 && s.quantity === null) return NOTHING;
    if (cost < 0) always[stock] = s.quantity!;
    else parts.push(...partsOf(stock, room, cost, Math.min(s.quantity ?? Number.POSITIVE_INFINITY, Math.ceil(total / room))));
  }
  const taken = always.reduce((sum, n, s) => sum + n * (input.stocks[s]!.cost - value * roomOf(input, input.stocks[s]!)), 0);
  const need = Math.max(0, total - always.reduce((sum, n, s) => sum + n * roomOf(input, input.stocks[s]!), 0));
  const { least, choices } = leastCover(parts, need, input.stocks.length);
  const covered = total * value + taken + least;
  const bound = Math.max(0, alwaysHeld(input) ? covered : Math.min(covered, shortPenalty(input)));
  return { bound, choices: choices.map((counts) => counts.map((n, s) => n + always[s]!)) };
}

function partsOf(stock: number, room: number, cost: number, most: number): Part[] {
  const parts: Part[] = [];
  for (let left = most, size = 1; left > 0; left -= size, size *= 2) {
    const count = Math.min(size, left);
    parts.push({ stock, count, room: room * count, cost: cost * count });
  }
  return parts;
}

/**
 * What a unit of room not used is worth at most. A rest counts the far end's trim too, which is spread over the least rest
 * that goes back. null when rests so short go back that this says nothing.
 */
function valuePerRoom({ offcutValue, leastOffcut, endTrim, kerf }: NestInput): number | null {
  const extra = Math.max(0, endTrim - kerf);
  if (offcutValue === 0 || extra === 0) return offcutValue;
  return leastOffcut > 2 * extra ? offcutValue * (1 + extra / (leastOffcut - extra)) : null;
}

function leastCover(parts: readonly Part[], need: number, stocks: number): { readonly least: number; readonly choices: number[][] } {
  const most = Math.ceil(need * (1 + SLACKS[SLACKS.length - 1]!));
  const width = most + 1;
  const least = new Float64Array(width).fill(Number.POSITIVE_INFINITY);
  least[0] = 0;
  const took = width * parts.length <= MOST_KEPT ? new Uint8Array(width * parts.length) : null;
  parts.forEach(({ room, cost }, k) => {
    for (let c = most; c > 0; c--) {
      const value = least[c > room ? c - room : 0]! + cost;
      if (value >= least[c]!) continue;
      least[c] = value;
      if (took) took[k * width + c] = 1;
    }
  });
  const choices = new Map<string, number[]>();
  for (const slack of took ? SLACKS : []) {
    const counts = new Array<number>(stocks).fill(0);
    let c = Math.ceil(need * (1 + slack));
    if (!Number.isFinite(least[c]!)) continue;
    for (let k = parts.length - 1; k >= 0; k--) {
      if (took![k * width + c] === 0) continue;
      counts[parts[k]!.stock]! += parts[k]!.count;
      c = Math.max(0, c - parts[k]!.room);
    }
    choices.set(counts.join(), counts);
  }
  return { least: least[need]!, choices: [...choices.values()] };
}

/** Whether some length there is no end of holds every piece: then none is left out to save. */
function alwaysHeld(input: NestInput): boolean {
  return input.demands.every((d) => input.stocks.some((s) => s.quantity === null && roomOf(input, s) >= d.length + input.kerf && (d.heat === null || d.heat === s.heat)));
}
