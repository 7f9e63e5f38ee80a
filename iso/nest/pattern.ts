/** One way to cut one length: how many of each demand, and what it costs. */
import type { NestInput, NestStock } from "./nest-types";

export interface Pattern {
  readonly stock: number;
  /** Count per demand. */
  readonly counts: readonly number[];
  readonly cost: number;
}

/** What a rest is worth: nothing under the least length that goes back. */
export function restValue(input: NestInput, rest: number): number {
  return rest >= input.leastOffcut && rest > 0 ? rest * input.offcutValue : 0;
}

/** Left after the last cut of a bar with this much used, each piece with its cut. */
export function restOf(input: NestInput, stock: NestStock, used: number): number {
  return Math.max(0, stock.length - input.endTrim - used);
}

/** Room for pieces, each counted with its cut: the last needs none when it ends where the far trim begins. */
export function roomOf(input: NestInput, stock: NestStock): number {
  return stock.length - 2 * input.endTrim + input.kerf;
}

/** Room that leaves a rest to go back. */
export function roomLeavingOffcut(input: NestInput, stock: NestStock): number {
  return stock.length - input.endTrim - Math.max(1, input.leastOffcut);
}

export function patternOf(input: NestInput, stock: number, counts: readonly number[]): Pattern {
  const used = counts.reduce((sum, count, i) => sum + count * (input.demands[i]!.length + input.kerf), 0);
  return { stock, counts, cost: input.stocks[stock]!.cost - restValue(input, restOf(input, input.stocks[stock]!, used)) };
}

export function patternKey({ stock, counts }: Pattern): string {
  return `${stock}:${counts.join(",")}`;
}

/** Whether the stock's heat will do for the demand. */
export function heatFits(demandHeat: string | null, stockHeat: string | null): boolean {
  return demandHeat === null || demandHeat === stockHeat;
}
