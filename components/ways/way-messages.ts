/** What the page and the worker that searches three elbows say to each other. Pure. */
import { sortWays, uniqueWays, type Way, type WayPreference, type WaysInput } from "@/iso";

export interface WaySearchRequest {
  readonly id: number;
  readonly input: WaysInput;
}

export interface WaySearchNews {
  readonly id: number;
  readonly done: number;
  readonly total: number;
  /** Best ways so far by every preference. */
  readonly ways: readonly Way[];
  /** How many ways were found in all. */
  readonly found: number;
  readonly finished: boolean;
}

const PREFERENCES: readonly WayPreference[] = ["fewest-welds", "least-trimmed", "shortest", "standard-first"];
/** Kept of each preference's order, besides the first of every row of fittings. */
const KEPT = 40;

/** What of a long list is worth showing: the best by each preference, and by each the best of every row of fittings. */
export function bestOf(ways: readonly Way[]): Way[] {
  const kept = PREFERENCES.flatMap((preference) => {
    const sorted = sortWays(ways, preference);
    const seen = new Set<string>();
    const firsts = sorted.filter(({ title }) => !seen.has(title) && seen.add(title) !== undefined);
    return [...sorted.slice(0, KEPT), ...firsts];
  });
  return uniqueWays(kept);
}
