/**
 * The bound: the linear programme brought to its end by pricing, then again with the number of each bought length held to whole
 * ranges, since no plan takes 7.4 lengths. The least value over the ranges that are left is a bound that no plan goes under.
 */
import { NEST_WORTH } from "../geometry/tolerances";
import { priceStocks, worth, type Pricer, type Worths } from "./pricing";
import type { Pattern } from "./pattern";
import type { Master, MasterAnswer, Open } from "./master";
import type { NestInput } from "./nest-types";

/** Halvings when the worths are scaled down to a bound. */
const SCALINGS = 8;
/** Ranges split before the bound is taken as it is. */
const MOST_SPLITS = 60;

export interface Root {
  readonly answer: MasterAnswer;
  readonly exact: boolean;
  readonly pricer: Pricer;
  readonly bound: number;
  readonly worths: Worths;
}

/** Share of the steady worths in those that are priced: the programme's own jump about while it has few patterns. */
const STEADY = 0.5;

/**
 * Solves and prices until nothing saves anything, or the time is over. Priced are worths between the programme's and the
 * steadiest known (smoothing after Wentges 1997), which needs far fewer rounds; only the programme's own end it.
 */
export function generate(input: NestInput, master: Master, open: Open, steady: Worths, time: () => boolean): Root | null {
  let centre = steady;
  let highest = Number.NEGATIVE_INFINITY;
  for (let share = STEADY; ; ) {
    const answer = master.solve();
    if (!answer) return null;
    const worths = { piece: answer.pieceWorth, stock: answer.stockWorth };
    const priced = share > 0 ? between(worths, centre, share) : worths;
    const pricer = priceStocks(input, priced, open.wanted);
    const added = master.add(pricer.found.filter((p) => saved(p, worths) > NEST_WORTH));
    if (added === 0 && share === 0) return { answer, exact: true, pricer, worths, bound: answer.objective };
    const value = roughValue(open, priced, pricer.saving, takenOf(input, master, answer));
    if (value > highest) [centre, highest] = [priced, value];
    share = added === 0 ? 0 : STEADY;
    if (!time()) return { answer, exact: false, pricer, worths, bound: open.least ? 0 : scaledBound(input, priced, open) };
  }
}

function saved(pattern: Pattern, { piece, stock }: Worths): number {
  return worth(pattern, piece) + stock[pattern.stock]! - pattern.cost;
}

function between(a: Worths, b: Worths, share: number): Worths {
  const mix = (x: readonly number[], y: readonly number[]) => x.map((v, i) => v + share * (y[i]! - v));
  return { piece: mix(a.piece, b.piece), stock: mix(a.stock, b.stock) };
}

/** About what the worths bound the cost to: which of two are steadier, no proof. */
function roughValue({ wanted, left, least }: Open, { piece, stock }: Worths, saving: readonly number[], taken: readonly number[]): number {
  const pieces = piece.reduce((sum, w, i) => sum + w * wanted[i]!, 0);
  return stock.reduce((sum, w, s) => sum + (w < 0 ? w * (left[s] ?? 0) : w * (least?.[s] ?? 0)) - saving[s]! * (left[s] ?? taken[s]! + 1), pieces);
}

/** Worths scaled down until no pattern saves anything give a bound by themselves. */
function scaledBound(input: NestInput, worths: Worths, open: Open): number {
  let [low, high] = [0, 1];
  for (let i = 0; i < SCALINGS; i++) {
    const middle = (low + high) / 2;
    const scaled = { piece: worths.piece.map((w) => w * middle), stock: worths.stock.map((w) => w * middle) };
    if (priceStocks(input, scaled, open.wanted).saving.every((s) => s <= 0)) low = middle;
    else high = middle;
  }
  const pieces = worths.piece.reduce((sum, w, i) => sum + w * open.wanted[i]!, 0);
  return low * (pieces + worths.stock.reduce((sum, w, s) => sum + (open.left[s] === null ? 0 : w * open.left[s]!), 0));
}

interface Range {
  readonly open: Open;
  readonly bound: number;
  /** Lengths of each stock the programme takes here; null = not solved yet. */
  readonly taken: readonly number[] | null;
}

/** Splits the ranges, lowest bound first, while there is time. Leaves the master held to the whole range again. */
export function splitBound(input: NestInput, master: Master, whole: Open, root: Root, best: number, time: () => boolean): number {
  const ranges: Range[] = [{ open: whole, bound: root.bound, taken: takenOf(input, master, root.answer) }];
  let settled = Number.POSITIVE_INFINITY;
  for (let splits = 0; splits < MOST_SPLITS && time(); splits++) {
    const range = ranges.reduce<Range | null>((a, b) => (a && a.bound <= b.bound ? a : b), null);
    if (!range || range.bound >= best - NEST_WORTH) break;
    const at = range.taken ? splitAt(input, range.taken) : -1;
    if (at < 0) {
      settled = Math.min(settled, range.bound);
      ranges.splice(ranges.indexOf(range), 1);
      continue;
    }
    const halves = halvesOf(range.open, at, range.taken![at]!).map((open): Range | null => {
      master.hold(open);
      const made = generate(input, master, open, root.worths, time);
      return made?.exact ? { open, bound: Math.max(range.bound, made.bound), taken: takenOf(input, master, made.answer) } : null;
    });
    if (halves.some((half) => half === null)) break;
    ranges.splice(ranges.indexOf(range), 1, ...(halves as Range[]));
  }
  master.hold(whole);
  return Math.min(best, settled, ...ranges.map((r) => r.bound));
}

function takenOf({ stocks }: NestInput, { patterns }: Master, { times }: MasterAnswer): number[] {
  const taken = stocks.map(() => 0);
  times.forEach((x, j) => { taken[patterns[j]!.stock]! += x; });
  return taken;
}

/** The stock taken least wholly: lengths there are several of before single offcuts. */
function splitAt({ stocks }: NestInput, taken: readonly number[]): number {
  const part = (x: number) => Math.min(x - Math.floor(x), Math.ceil(x) - x);
  let at = -1;
  let most = WHOLE_ENOUGH;
  taken.forEach((x, s) => {
    const amount = part(x) > WHOLE_ENOUGH ? part(x) + (stocks[s]!.quantity === 1 ? 0 : 1) : 0;
    if (amount > most) [at, most] = [s, amount];
  });
  return at;
}

/** Share of a length. Sums of the programme's answers are whole to within this. */
const WHOLE_ENOUGH = 1e-5;

function halvesOf(open: Open, s: number, taken: number): readonly [Open, Open] {
  const least = open.least ?? open.left.map(() => 0);
  const set = <T>(list: readonly T[], value: T) => list.map((x, k) => (k === s ? value : x));
  return [
    { ...open, least, left: set(open.left, Math.floor(taken)) },
    { ...open, least: set(least, Math.ceil(taken)) },
  ];
}
