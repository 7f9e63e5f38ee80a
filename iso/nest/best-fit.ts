/** Best-fit-decreasing: the plan a careful hand makes, and the one the search has to beat. */
import { heatFits, patternOf, roomOf, type Pattern } from "./pattern";
import type { NestInput } from "./nest-types";

interface OpenBar {
  readonly stock: number;
  room: number;
  readonly counts: number[];
}

/** Which stock to open next among those that hold the piece. */
type Choice = (input: NestInput, stock: number) => number;

const CHEAPEST_PER_LENGTH: Choice = ({ stocks }, s) => stocks[s]!.cost / stocks[s]!.length;
const CHEAPEST: Choice = ({ stocks }, s) => stocks[s]!.cost;
const SHORTEST: Choice = ({ stocks }, s) => stocks[s]!.length;

export interface HandPlan {
  readonly patterns: readonly Pattern[];
  /** Demand by demand, pieces that found no stock. */
  readonly short: readonly number[];
}

/** The cheapest of the plans by three ways to choose the next length to open. */
export function bestFit(input: NestInput): HandPlan {
  const plans = [CHEAPEST_PER_LENGTH, CHEAPEST, SHORTEST].map((choice) => bestFitBy(input, choice));
  return plans.reduce((a, b) => (rank(b) < rank(a) ? b : a));

  function rank(plan: HandPlan): number {
    const cost = plan.patterns.reduce((sum, p) => sum + p.cost, 0);
    return plan.short.reduce((sum, n) => sum + n, 0) * shortPenalty(input) + cost;
  }
}

/** More than any plan can save by leaving a piece out. */
export function shortPenalty(input: NestInput): number {
  return 1 + 10 * input.stocks.reduce((most, s) => Math.max(most, s.cost), 0);
}

function bestFitBy(input: NestInput, choice: Choice): HandPlan {
  const left = input.stocks.map((s) => s.quantity ?? Number.POSITIVE_INFINITY);
  const bars: OpenBar[] = [];
  const short = input.demands.map(() => 0);
  const order = input.demands.flatMap((d, i) => d.marks.map(() => i)).sort((a, b) => input.demands[b]!.length - input.demands[a]!.length);
  for (const i of order) {
    const { length, heat } = input.demands[i]!;
    const need = length + input.kerf;
    const holds = (stock: number, room: number) => room >= need && heatFits(heat, input.stocks[stock]!.heat);
    let bar = bars.filter((b) => holds(b.stock, b.room)).reduce<OpenBar | null>((a, b) => (a && a.room <= b.room ? a : b), null);
    if (!bar) {
      const open = input.stocks.map((_, s) => s).filter((s) => left[s]! > 0 && holds(s, roomOf(input, input.stocks[s]!)));
      if (open.length === 0) {
        short[i]! += 1;
        continue;
      }
      const stock = open.reduce((a, b) => (choice(input, b) < choice(input, a) ? b : a));
      left[stock]! -= 1;
      bar = { stock, room: roomOf(input, input.stocks[stock]!), counts: input.demands.map(() => 0) };
      bars.push(bar);
    }
    bar.room -= need;
    bar.counts[i]! += 1;
  }
  return { patterns: bars.map((b) => patternOf(input, b.stock, b.counts)), short };
}

