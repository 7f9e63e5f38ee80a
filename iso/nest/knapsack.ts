/** Bounded knapsack with every step kept, for listing all fillings near the best: see fill.ts for finding one. */
import type { FillItem } from "./fill";

/**
 * `best[k][c]` is the greatest profit of items k, k+1, ... within the room c. Items without profit are left out by the caller
 * or do no harm. Time and memory: items × capacity × log(most).
 */
export interface KnapsackTable {
  readonly items: readonly FillItem[];
  readonly best: readonly Float64Array[];
}

export function knapsackTable(items: readonly FillItem[], capacity: number): KnapsackTable {
  const best: Float64Array[] = new Array<Float64Array>(items.length + 1);
  best[items.length] = new Float64Array(Math.max(0, capacity) + 1);
  for (let k = items.length - 1; k >= 0; k--) {
    const { weight, profit, most } = items[k]!;
    const table = best[k + 1]!.slice();
    for (let left = most, part = 1; left > 0 && profit > 0; left -= part, part = Math.min(2 * part, left)) {
      const take = Math.min(part, left);
      const [w, p] = [weight * take, profit * take];
      for (let c = capacity; c >= w; c--) {
        const with_ = table[c - w]! + p;
        if (with_ > table[c]!) table[c] = with_;
      }
    }
    best[k] = table;
  }
  return { items, best };
}
