/** The order a shop prefers its ways in. Ties go on to the next wish and at last to the id, so that no order is by chance. */
import { WAYS_SAME_LENGTH } from "../geometry/tolerances";
import type { Way, WayKind, WayPreference } from "./ways-types";

/** Whole fittings, then one trimmed, then trimmed, then cut from pipe. */
const RANK: Readonly<Record<WayKind, number>> = {
  straight: 0, "one-standard": 0, "two-standard": 0, "three-standard": 0, "field-trim": 1, "one-trimmed": 2, "trimmed-pair": 3, mitre: 4,
};

type Wish = (way: Way) => number;

const welds: Wish = (way) => way.welds;
const cuts: Wish = (way) => way.trimmedCuts;
const rank: Wish = (way) => RANK[way.kind];
const mitred: Wish = (way) => Number(way.kind === "mitre");
const fittings: Wish = (way) => way.turns.length;
const WISHES: Readonly<Record<WayPreference, readonly (Wish | "length")[]>> = {
  "fewest-welds": [welds, mitred, cuts, "length"],
  "least-trimmed": [mitred, cuts, rank, welds, "length"],
  shortest: ["length", mitred, welds, cuts],
  "standard-first": [rank, fittings, welds, "length"],
};

/** The ways by preference; what comes too near a keep-out stands last, what needs an end changed before those. */
export function sortWays(ways: readonly Way[], preference: WayPreference): Way[] {
  return [...ways].sort((a, b) => compareWays(a, b, preference));
}

function compareWays(a: Way, b: Way, preference: WayPreference): number {
  const first = Number(!a.keepOut.clear) - Number(!b.keepOut.clear) || Number(isTrimmedEnd(a)) - Number(isTrimmedEnd(b));
  if (first !== 0) return first;
  for (const wish of WISHES[preference]) {
    const order = wish === "length" ? byLength(a, b) : wish(a) - wish(b);
    if (order !== 0) return order;
  }
  return a.id < b.id ? -1 : a.id > b.id ? 1 : 0;
}

/** Lengths are compared in steps, which keeps the order transitive where nearly equal ones meet. */
function byLength(a: Way, b: Way): number {
  const step = (way: Way) => Math.round(way.lengthMm / WAYS_SAME_LENGTH / LENGTH_UNIT_MM);
  return step(a) - step(b);
}

const LENGTH_UNIT_MM = 1_000;

function isTrimmedEnd({ trims }: Way): boolean {
  return trims.end0Mm !== 0 || trims.end1Mm !== 0;
}

/** The ways without repeats: the first of each id stays. */
export function uniqueWays(ways: readonly Way[]): Way[] {
  const seen = new Set<string>();
  return ways.filter((way) => !seen.has(way.id) && seen.add(way.id) !== undefined);
}
