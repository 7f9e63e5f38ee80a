/**
 * Better whole plans from a first one: a few bars are taken out and built again with their stock and what is still in the rack,
 * over and over, at worths shaken a little each time; a change is kept when it costs no more. Small pieces of the problem are
 * filled nearly exactly by the knapsack, which is where hand plans lose.
 */
import { NEST_WORTH } from "../geometry/tolerances";
import { repeatableRandom } from "./random";
import { buildWhole, wholeOf, type Rest, type Seen, type Whole } from "./whole-plan";
import type { Worths } from "./pricing";
import type { NestInput } from "./nest-types";
import type { Open } from "./master";
import type { Pattern } from "./pattern";

/** Rebuilds after which nothing more is expected. */
const MOST_TRIES = 1_500;
/** Whole builds from nothing, each at other worths. */
const STARTS = 4;
/** Largest share by which a worth is shaken. */
const SHAKE = 0.08;
/** Bars taken out at once. */
const [FEWEST_OUT, MOST_OUT] = [2, 5];

/** The best whole plan found while there is `time`, not dearer than `start`; null when there was time for none. */
export function improveWhole(input: NestInput, open: Open, worths: Worths, start: Whole | null, target: number, seed: number, time: () => boolean): Whole | null {
  const random = repeatableRandom(seed);
  let best = start;
  for (let k = 0; k < STARTS && time(); k++) {
    const { patterns, short } = buildWhole(input, { wanted: [...open.wanted], left: [...open.left] }, shaken(input, worths, k === 0 ? 0 : SHAKE, random));
    const built = wholeOf(input, patterns, short);
    if (!best || built.total < best.total) best = built;
  }
  for (let tries = 0; best && tries < MOST_TRIES && best.total - target > NEST_WORTH && time(); tries++) {
    const next = rebuilt(input, open, shaken(input, worths, SHAKE * random(), random), best, random);
    if (next.total <= best.total) best = next;
  }
  return best;
}

/** Longer pieces a little dearer, since they are harder to place later, and all of them by chance. */
function shaken({ demands }: NestInput, worths: Worths, share: number, random: () => number): Seen {
  const longest = demands.reduce((most, d) => Math.max(most, d.length), 1);
  const lean = share * random();
  return { piece: worths.piece.map((w, i) => w * (1 + share * random() + (lean * demands[i]!.length) / longest)), stock: worths.stock, true: worths };
}

function rebuilt(input: NestInput, open: Open, seen: Seen, whole: Whole, random: () => number): Whole {
  const many = Math.min(whole.patterns.length, FEWEST_OUT + Math.floor(random() * (MOST_OUT - FEWEST_OUT + 1)));
  const out = new Set<number>();
  while (out.size < many) out.add(Math.floor(random() * whole.patterns.length));
  const kept = whole.patterns.filter((_, k) => !out.has(k));
  const rest = restOver(open, kept);
  const { patterns, short } = buildWhole(input, rest, seen);
  return wholeOf(input, [...kept, ...patterns], short);
}

function restOver({ wanted, left }: Open, kept: readonly Pattern[]): Rest {
  const rest: Rest = { wanted: [...wanted], left: [...left] };
  for (const { stock, counts } of kept) {
    counts.forEach((n, i) => { rest.wanted[i]! -= n; });
    if (rest.left[stock] !== null) rest.left[stock]! -= 1;
  }
  return rest;
}
