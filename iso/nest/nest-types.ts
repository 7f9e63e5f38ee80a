/**
 * Nesting cut pieces into stock: what goes in and what comes out. Lengths are whole units of what the shop cuts to (a sixteenth
 * of an inch, a millimetre), so that sums are exact; costs are in any one currency.
 */

/** Pieces that are alike for the saw. */
export interface NestDemand {
  /** Marks of the pieces, one each. */
  readonly marks: readonly string[];
  readonly length: number;
  /** Only stock of this heat will do; null = any. */
  readonly heat: string | null;
}

/** Full lengths in the rack or to be bought, or one offcut. */
export interface NestStock {
  readonly id: string;
  readonly length: number;
  /** How many there are; null = as many as wanted. */
  readonly quantity: number | null;
  /** What taking one costs. */
  readonly cost: number;
  readonly heat: string | null;
}

export interface NestInput {
  readonly demands: readonly NestDemand[];
  readonly stocks: readonly NestStock[];
  /** Lost at each cut. */
  readonly kerf: number;
  /** Cut off each end of a length before use. */
  readonly endTrim: number;
  /** A rest at least this long goes back to the rack. */
  readonly leastOffcut: number;
  /** What a rest that goes back is worth, per unit of length. */
  readonly offcutValue: number;
}

/** One length of stock and what is cut from it, in order. */
export interface NestBar {
  readonly stockId: string;
  readonly stockLength: number;
  readonly heat: string | null;
  readonly pieces: readonly { readonly mark: string; readonly length: number }[];
  /** What is left after the last cut, the far end's trim included. */
  readonly rest: number;
  /** Whether the rest goes back to the rack. */
  readonly returned: boolean;
}

export interface NestPlan {
  readonly bars: readonly NestBar[];
  /** Marks with no stock: too long for all of it, or the stock ran out. */
  readonly unplaced: readonly { readonly mark: string; readonly reason: "too-long" | "no-heat" | "stock-short" }[];
  /** Cost of stock taken less value of rests returned. */
  readonly cost: number;
  /** No plan that places as many pieces can cost less. */
  readonly bound: number;
  /** True only when the bound and the cost meet. */
  readonly proven: boolean;
  readonly method: "column-generation" | "best-fit";
  /** Cutting patterns looked at. */
  readonly patterns: number;
}

/** One unknown, not under 0: its cost, and its factor in each row it stands in. */
export interface LpColumn {
  readonly cost: number;
  readonly rows: readonly number[];
  readonly values: readonly number[];
}

/** A linear programme that is kept and grown: rows first, columns as they come. Minimises. */
export interface LpModel {
  addColumns(columns: readonly LpColumn[]): void;
  setRow(row: number, least: number, most: number): void;
  /** @returns null when there is no answer. */
  solve(): { readonly objective: number; readonly values: ArrayLike<number>; readonly rowDuals: ArrayLike<number> } | null;
  /** In whole numbers, starting from a known answer; what is found and proven within the time. */
  solveWhole(seconds: number, start: readonly number[]): { readonly optimal: boolean; readonly bound: number; readonly values: ArrayLike<number> } | null;
  close(): void;
}

/** Handed in: opens a programme with these rows and no columns. */
export type OpenLp = (rows: readonly { readonly least: number; readonly most: number }[]) => LpModel;

export interface NestOptions {
  readonly openLp: OpenLp;
  /** Wall time allowed, seconds, measured by `now`. */
  readonly seconds: number;
  /** Milliseconds, handed in since nothing here reads a clock. */
  readonly now: () => number;
  /** Told now and then; true stops the search with the best plan so far. */
  readonly progress?: (state: { readonly cost: number; readonly bound: number }) => boolean;
}
