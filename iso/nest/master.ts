/** The master programme: how often each pattern is cut, kept warm while patterns are added and stock is held to a range. */
import { shortPenalty } from "./best-fit";
import { patternKey, type Pattern } from "./pattern";
import type { LpModel, NestInput, NestOptions } from "./nest-types";

/** Pieces wanted of each demand; how many of each stock may be taken, and must be. */
export interface Open {
  readonly wanted: readonly number[];
  readonly left: readonly (number | null)[];
  readonly least?: readonly number[];
}

export interface MasterAnswer {
  readonly objective: number;
  /** Times each pattern is cut. */
  readonly times: readonly number[];
  /** Worth of one more piece of each demand, and of one more length of each stock (under 0 where stock is scarce). */
  readonly pieceWorth: readonly number[];
  readonly stockWorth: readonly number[];
}

export interface WholeAnswer {
  readonly optimal: boolean;
  readonly bound: number;
  readonly times: readonly number[];
}

const FREE = Number.POSITIVE_INFINITY;

/** Columns: one per demand for what is left out, at the penalty; then one per pattern. Rows: demands, then stocks. */
export class Master {
  readonly patterns: Pattern[] = [];
  private readonly keys = new Set<string>();
  private readonly lp: LpModel;

  constructor(private readonly input: NestInput, open: Open, { openLp }: Pick<NestOptions, "openLp">) {
    this.lp = openLp([...open.wanted.map((n) => ({ least: n, most: FREE })), ...open.left.map((n) => ({ least: -FREE, most: n ?? FREE }))]);
    this.lp.addColumns(input.demands.map((_, i) => ({ cost: shortPenalty(input), rows: [i], values: [1] })));
  }

  /** @returns how many were new and not empty. */
  add(patterns: readonly Pattern[]): number {
    const fresh = patterns.filter((pattern) => {
      const key = patternKey(pattern);
      if (this.keys.has(key) || pattern.counts.every((n) => n === 0)) return false;
      this.keys.add(key);
      return true;
    });
    if (fresh.length === 0) return 0;
    this.patterns.push(...fresh);
    this.lp.addColumns(
      fresh.map(({ cost, counts, stock }) => {
        const rows = counts.flatMap((n, i) => (n > 0 ? [i] : []));
        return { cost, rows: [...rows, this.input.demands.length + stock], values: [...rows.map((i) => counts[i]!), 1] };
      }),
    );
    return fresh.length;
  }

  /** Holds how many of each stock are taken to a range. */
  hold({ left, least }: Open): void {
    left.forEach((most, s) => this.lp.setRow(this.input.demands.length + s, least?.[s] ? least[s] : -FREE, most ?? FREE));
  }

  solve(): MasterAnswer | null {
    const answer = this.lp.solve();
    if (!answer) return null;
    const { demands, stocks } = this.input;
    return {
      objective: answer.objective,
      times: this.patterns.map((_, j) => answer.values[demands.length + j] ?? 0),
      pieceWorth: demands.map((_, i) => Math.max(0, answer.rowDuals[i] ?? 0)),
      stockWorth: stocks.map((_, s) => answer.rowDuals[demands.length + s] ?? 0),
    };
  }

  /** The best whole plan over the patterns there are, from `start` on; `short` is what `start` leaves out. */
  solveWhole(seconds: number, start: readonly Pattern[], short: readonly number[]): WholeAnswer | null {
    const times = new Map<string, number>();
    for (const pattern of start) times.set(patternKey(pattern), (times.get(patternKey(pattern)) ?? 0) + 1);
    const answer = this.lp.solveWhole(seconds, [...short, ...this.patterns.map((p) => times.get(patternKey(p)) ?? 0)]);
    const shift = this.input.demands.length;
    return answer && { optimal: answer.optimal, bound: answer.bound, times: this.patterns.map((_, j) => answer.values[shift + j] ?? 0) };
  }

  close(): void {
    this.lp.close();
  }
}
