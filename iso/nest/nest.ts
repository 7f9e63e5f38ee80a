/**
 * Nesting pieces into stock by column generation.
 *
 * The problem: choose how often to cut each pattern (a way to cut one length) so that every piece is cut, no stock is used more
 * often than there is, and cost of stock taken less value of rests returned is least. There are far too many patterns to list,
 * so a linear programme over a few of them says what each piece is worth now, and a knapsack finds the patterns that save most
 * at those worths (pricing.ts); when none saves anything, the programme's value is a bound that no plan can go under (Gilmore and
 * Gomory 1961). Holding the number of each bought length to whole ranges lifts that bound (bound.ts).
 *
 * Whole plans: best-fit-decreasing to start with (so never worse), then plans built bar by bar at the programme's worths and
 * improved by rebuilding a few bars at a time (improve.ts). Proof: the bound meets the cost, or every plan that beats the best
 * one uses only patterns whose reduced cost is within the gap; when those can be listed, the integer programme over all of them
 * is the answer.
 */
import { NEST_WORTH } from "../geometry/tolerances";
import { bestFit, shortPenalty } from "./best-fit";
import { generate, splitBound, type Root } from "./bound";
import { improveWhole } from "./improve";
import { Master, type Open } from "./master";
import { materialBound } from "./material-bound";
import type { Worths } from "./pricing";
import { barsOf, splitOff } from "./plan";
import { heatFits, patternOf, roomOf, type Pattern } from "./pattern";
import { better, wholeOf, type Whole } from "./whole-plan";
import type { NestInput, NestOptions, NestPlan } from "./nest-types";

/** Most patterns listed for a proof. */
const MOST_LISTED = 6_000;
/** Shares of the time after which improving, pricing, improving again and splitting end; the rest is the integer programme's. */
const [FIRST, PRICED, IMPROVED, SPLIT] = [0.5, 0.75, 0.85, 0.93];
/** An integer programme is asked for nothing in less than this, seconds. */
const LEAST_SECONDS = 0.02;

/**
 * The cheapest plan found in the time, with its bound. Pieces that no stock can hold are set aside first.
 * @throws never on user data; a solver that throws is the caller's.
 */
export function nestPieces(input: NestInput, options: NestOptions): NestPlan {
  const { cuttable, unplaced } = splitOff(input);
  if (cuttable.demands.length === 0) return { bars: [], unplaced, cost: 0, bound: 0, proven: true, method: "best-fit", patterns: 0 };
  const hand = bestFit(cuttable);
  const start = wholeOf(cuttable, hand.patterns, hand.short);
  const open: Open = { wanted: cuttable.demands.map((d) => d.marks.length), left: cuttable.stocks.map((s) => s.quantity) };
  const master = new Master(cuttable, open, options);
  master.add([...hand.patterns, ...singles(cuttable)]);
  try {
    const { best, bound } = search(cuttable, open, master, start, options);
    const placed = barsOf(cuttable, best.patterns);
    const penalty = shortPenalty(cuttable) * best.short.reduce((sum, n) => sum + n, 0);
    const cost = best.total - penalty;
    const proven = meet(best.total, bound);
    return {
      bars: placed.bars, unplaced: [...unplaced, ...placed.missing.map((mark) => ({ mark, reason: "stock-short" as const }))],
      cost, bound: proven ? cost : Math.min(cost, bound - penalty), proven,
      method: best.total < start.total - NEST_WORTH ? "column-generation" : "best-fit", patterns: master.patterns.length,
    };
  } finally {
    master.close();
  }
}

interface Found {
  readonly best: Whole;
  readonly bound: number;
}

/** Better plans at worths by length, the programme's bound, better plans, a better bound, in that order while there is a gap. */
function search(input: NestInput, open: Open, master: Master, start: Whole, options: NestOptions): Found {
  const from = options.now();
  let stopped = false;
  const used = () => (options.now() - from) / (options.seconds * 1000);
  const left = () => options.seconds * (1 - used());
  const step = costStep(input);
  const plain = byLength(input);
  let best = start;
  const material = materialBound(input);
  let bound = upTo(material.bound, step);
  const over = () => {
    stopped ||= options.progress?.({ cost: best.total, bound }) === true;
    return stopped || meet(best.total, bound);
  };
  const until = (share: number) => () => used() < share && !over();
  // The lengths chosen by sum alone, if the pieces can be made to fit them; then any.
  material.choices.forEach((left, k) => {
    const share = (FIRST * (k + 1)) / (material.choices.length + 1);
    const tried = improveWhole(input, { ...open, left }, plain, null, bound, k + 3, until(share));
    best = better(best, tried);
  });
  best = improveWhole(input, open, plain, best, bound, 1, until(FIRST)) ?? best;
  if (over()) return { best, bound };
  master.add(best.patterns);
  const root = generate(input, master, open, plain, until(PRICED));
  bound = Math.max(bound, upTo(root?.bound ?? 0, step));
  if (!root || over()) return { best, bound };
  const early = provenByList(input, open, root, { best, bound }, options, options.seconds * IMPROVED - options.seconds * used());
  ({ best, bound } = early.found);
  if (over()) return { best, bound };
  best = improveWhole(input, open, root.worths, best, bound, 2, until(IMPROVED)) ?? best;
  if (root.exact && !early.listed) bound = Math.max(bound, upTo(splitBound(input, master, open, root, best.total, until(SPLIT)), step));
  if (over() || left() < LEAST_SECONDS) return { best, bound };
  const late = provenByList(input, open, root, { best, bound }, options, left());
  if (late.listed) return late.found;
  const answer = left() < LEAST_SECONDS ? null : wholeOver(input, open, master, best, left());
  return { best: better(best, answer?.whole ?? null), bound };
}

/** The integer programme over every pattern that a better plan could use, when they can be listed. */
function provenByList(input: NestInput, open: Open, root: Root, { best, bound }: Found, options: NestOptions, seconds: number): { readonly found: Found; readonly listed: boolean } {
  const listed = root.exact && seconds >= LEAST_SECONDS ? root.pricer.all(best.total - root.bound + NEST_WORTH, MOST_LISTED) : null;
  if (!listed) return { found: { best, bound }, listed: false };
  const master = new Master(input, open, options);
  try {
    master.add([...listed, ...best.patterns]);
    const answer = wholeOver(input, open, master, best, seconds);
    if (!answer) return { found: { best, bound }, listed: true };
    const next = better(best, answer.whole);
    return { found: { best: next, bound: answer.optimal ? next.total : Math.max(bound, Math.min(answer.bound, next.total)) }, listed: true };
  } finally {
    master.close();
  }
}

function wholeOver(input: NestInput, open: Open, master: Master, best: Whole, seconds: number): { readonly whole: Whole; readonly optimal: boolean; readonly bound: number } | null {
  master.add(best.patterns);
  const answer = master.solveWhole(seconds, best.patterns, best.short);
  return answer && { ...answer, whole: trimmed(input, master.patterns, answer.times, open) };
}

function meet(total: number, bound: number): boolean {
  return total - bound <= NEST_WORTH * Math.max(1, Math.abs(total));
}

/** Whole plans cost a multiple of this when rests are worth nothing: the bound may be rounded up to one. 0 = they may cost anything. */
function costStep({ stocks, offcutValue }: NestInput): number {
  const cents = stocks.map((s) => Math.round(s.cost * 100));
  if (offcutValue > 0 || stocks.some((s, i) => Math.abs(s.cost * 100 - cents[i]!) > NEST_WORTH)) return 0;
  const divisor = (a: number, b: number): number => (b === 0 ? a : divisor(b, a % b));
  return cents.reduce(divisor, 0) / 100;
}

function upTo(bound: number, step: number): number {
  return step > 0 ? Math.ceil(bound / step - NEST_WORTH) * step : bound;
}

/** Worth by length alone, at the cheapest room: where the programme's worths come to lie nearly. */
function byLength(input: NestInput): Worths {
  const { demands, stocks, kerf } = input;
  const rates = stocks.flatMap((s) => (roomOf(input, s) > 0 && s.quantity !== 1 ? [s.cost / roomOf(input, s)] : []));
  const rate = rates.length > 0 ? Math.min(...rates) : Math.max(...stocks.map((s) => s.cost / Math.max(1, roomOf(input, s))));
  return { piece: demands.map((d) => rate * (d.length + kerf)), stock: stocks.map((s) => Math.min(0, s.cost - rate * roomOf(input, s))) };
}

/** Each demand alone on its cheapest stock: something to begin with for every row. */
function singles(input: NestInput): Pattern[] {
  return input.demands.map((d, i) => {
    const fits = input.stocks.flatMap((s, index) => {
      const most = Math.min(d.marks.length, Math.floor(roomOf(input, s) / (d.length + input.kerf)));
      return most > 0 && heatFits(d.heat, s.heat) ? [{ pattern: patternOf(input, index, input.demands.map((_, k) => (k === i ? most : 0))), most }] : [];
    });
    return fits.reduce((a, b) => (b.pattern.cost / b.most < a.pattern.cost / a.most ? b : a)).pattern;
  });
}

/** A whole answer as bars: what was cut too often is left out again, the longest first, which only lengthens a rest. */
function trimmed(input: NestInput, patterns: readonly Pattern[], times: readonly number[], { wanted }: Open): Whole {
  const over = wanted.map((n) => -n);
  const bars = times.flatMap((x, j) => Array.from({ length: Math.round(x) }, () => patterns[j]!));
  for (const { counts } of bars) counts.forEach((n, i) => { over[i]! += n; });
  const lean = bars.map(({ stock, counts }) => {
    const kept = counts.map((n, i) => {
      const drop = Math.max(0, Math.min(n, over[i]!));
      over[i]! -= drop;
      return n - drop;
    });
    return patternOf(input, stock, kept);
  });
  return wholeOf(input, lean.filter((p) => p.counts.some((n) => n > 0)), over.map((n) => Math.max(0, -n)));
}
