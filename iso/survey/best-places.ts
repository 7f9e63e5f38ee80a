/**
 * The lowest minimum a search finds. A tape cannot tell a mark from its mirror image, so a mark placed on the wrong
 * side leaves a minimum of its own. Each mark is tried on its other side, then, while the readings do not fit, a few
 * scattered starts are tried. All of it deterministic.
 */
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecCross, vecDot, vecSub, vecUnit } from "../geometry/vec3";
import { chiSquareLimit } from "./chi-square";
import { minimiseSquares, type Minimum } from "./minimise";
import { startPlaces } from "./start-places";
import type { SurveyNetwork } from "./survey-types";

/** Rounds of a try, enough to see whether it leads lower, and of the last run to the bottom. */
const TRY_ROUNDS = 15;
const LAST_ROUNDS = 80;
const SCATTERED_STARTS = 3;
/** Weighted squares per spare reading from which the marks rather than a reading may be in the wrong place: a wrong side is out by feet. */
const FAR_OFF = 300;
const PASSES = 2;
/** A minimum has to be this share lower to count as another one. */
const LOWER = 0.999;

/** The minimum the first start leads to, without looking further: for trying many variants of one network. */
export function firstPlaces(network: SurveyNetwork): Minimum {
  const free = network.marks.filter((mark) => !network.fixed.has(mark));
  return minimiseSquares(network.observations, free, startPlaces(network), TRY_ROUNDS * 2);
}

export function bestPlaces(network: SurveyNetwork): Minimum {
  const free = network.marks.filter((mark) => !network.fixed.has(mark));
  const run = (start: ReadonlyMap<string, Vec3>) => minimiseSquares(network.observations, free, start, TRY_ROUNDS);
  const enough = chiSquareLimit(Math.max(network.observations.length - free.length * 3, 1));
  let best = run(startPlaces(network));
  best = otherSides(network, free, best, enough, run);
  for (let n = 1; n <= SCATTERED_STARTS && best.squares > enough * FAR_OFF; n += 1) {
    const found = otherSides(network, free, run(scattered(network, free, best.places, n)), enough, run);
    if (found.squares < best.squares * LOWER) best = found;
  }
  return minimiseSquares(network.observations, free, best.places, LAST_ROUNDS);
}

function otherSides(network: SurveyNetwork, free: readonly string[], start: Minimum, enough: number, run: (start: ReadonlyMap<string, Vec3>) => Minimum): Minimum {
  let best = start;
  for (let pass = 0; pass < PASSES; pass += 1) {
    const before = best.squares;
    for (const mark of free) {
      const turned = mirrored(network, mark, best.places);
      const found = turned ? run(turned) : best;
      if (found.squares < best.squares * LOWER) best = found;
    }
    if (best.squares <= enough || best.squares >= before * LOWER) break;
  }
  return best;
}

/** The mark on the other side of the plane through three of the marks its tapes go to; null when there is no such plane. */
export function mirrored(network: SurveyNetwork, mark: string, places: ReadonlyMap<string, Vec3>): Map<string, Vec3> | null {
  const others = [...new Set(network.observations.flatMap((o) => (o.type !== "distance" ? [] : o.to === mark ? [o.from] : o.from === mark ? [o.to] : [])))];
  const [a, b, c] = others.map((other) => places.get(other) ?? ([0, 0, 0] as Vec3));
  const at = places.get(mark);
  if (!a || !b || !c || !at) return null;
  const normal = vecUnit(vecCross(vecSub(b, a), vecSub(c, a)));
  return normal && new Map(places).set(mark, vecAddScaled(at, normal, -2 * vecDot(vecSub(at, a), normal)));
}

/** Places strewn over the network's size by a fixed rule (golden-ratio steps), another one for each n. */
function scattered(network: SurveyNetwork, free: readonly string[], places: ReadonlyMap<string, Vec3>, n: number): Map<string, Vec3> {
  const size = Math.max(...network.observations.map((o) => (o.type === "distance" || o.type === "along" ? Math.abs(o.value) : 0)), 1);
  const middle = free.map((mark) => places.get(mark) ?? [0, 0, 0]).reduce((sum, p) => [sum[0]! + p[0]! / free.length, sum[1]! + p[1]! / free.length, sum[2]! + p[2]! / free.length], [0, 0, 0]);
  const start = new Map(places);
  free.forEach((mark, at) => {
    const part = (k: number) => ((((at + 1) * (n + 2) * k * 0.618034) % 1) - 0.5) * 2 * size;
    start.set(mark, [middle[0]! + part(1), middle[1]! + part(1.7), middle[2]! + part(2.9)]);
  });
  return start;
}
