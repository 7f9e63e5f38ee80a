/**
 * Starting places, since a fitter gives none. From what is known (fixed marks, the datum, else a triangle of tapes) one
 * mark after the other is placed by everything that ties it to marks already placed, each on whichever side fits best.
 */
import { SURVEY_STEP_MM } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecAdd, vecAddScaled, vecScale } from "../geometry/vec3";
import { minimiseSquares } from "./minimise";
import { DATUM, type Observation, type SurveyNetwork } from "./survey-types";

const ROUNDS = 30;
/** Ways to look for a single mark from the middle of what it is tied to: both sides of every plane through it. */
const LOOKS: readonly Vec3[] = [[1, 1, 1], [1, 1, -1], [1, -1, 1], [1, -1, -1], [-1, 1, 1], [-1, 1, -1], [-1, -1, 1], [-1, -1, -1]];
const SQUARE_ROOT_3 = Math.sqrt(3);

/** One place for every mark. Deterministic; good to a few readings' tolerance where readings suffice. */
export function startPlaces(network: SurveyNetwork): Map<string, Vec3> {
  const places = new Map(network.fixed);
  if (!network.observations.some((o) => isKnown(o.from, places) !== isKnown(o.to, places))) seedPlaces(network, places);
  const waiting = new Set(network.marks.filter((mark) => !places.has(mark)));
  while (waiting.size > 0) {
    const next = mostTied(network.observations, waiting, places);
    places.set(next, placeMark(next, tiesOf(network.observations, next, places), places));
    waiting.delete(next);
  }
  return places;
}

function isKnown(mark: string, places: ReadonlyMap<string, Vec3>): boolean {
  return mark === DATUM || places.has(mark);
}

function tiesOf(observations: readonly Observation[], mark: string, places: ReadonlyMap<string, Vec3>): Observation[] {
  return observations.filter((o) => (o.to === mark && isKnown(o.from, places)) || (o.from === mark && isKnown(o.to, places)));
}

/** Marks tied by readings of different kinds or to different marks come first: three such hold a mark. */
function mostTied(observations: readonly Observation[], waiting: ReadonlySet<string>, places: ReadonlyMap<string, Vec3>): string {
  let best = "";
  let most = -1;
  for (const mark of waiting) {
    const ties = tiesOf(observations, mark, places);
    const kinds = new Set(ties.map((o) => (o.type === "distance" ? `d${o.from}|${o.to}` : o.type === "along" ? `a${o.axis}` : o.type)));
    if (kinds.size > most) [best, most] = [mark, kinds.size];
  }
  return best;
}

function placeMark(mark: string, ties: readonly Observation[], places: ReadonlyMap<string, Vec3>): Vec3 {
  const others = ties.map((o) => places.get(o.to === mark ? o.from : o.to) ?? ([0, 0, 0] as Vec3));
  const middle = others.length === 0 ? ([0, 0, 0] as Vec3) : vecScale(others.reduce(vecAdd), 1 / others.length);
  const reach = Math.max(...ties.map((o) => (o.type === "distance" || o.type === "along" ? Math.abs(o.value) : 0)), 1);
  let best: Vec3 = middle;
  let least = Number.POSITIVE_INFINITY;
  for (const look of LOOKS) {
    const start = new Map(places).set(mark, vecAddScaled(middle, look, reach / SQUARE_ROOT_3));
    const found = minimiseSquares(ties, [mark], start, ROUNDS);
    if (found.squares < least - SURVEY_STEP_MM) [best, least] = [found.places.get(mark) ?? middle, found.squares];
  }
  return best;
}

/** Nothing is tied to the datum: the largest triangle of tapes lies level, or the first mark is zero. */
function seedPlaces(network: SurveyNetwork, places: Map<string, Vec3>): void {
  const triangle = largestTriangle(network);
  if (triangle === null) {
    if (network.marks[0] !== undefined) places.set(network.marks[0], [0, 0, 0]);
    return;
  }
  const { marks: [a, b, c], ab, bc, ca } = triangle;
  const along = (ab ** 2 + ca ** 2 - bc ** 2) / (2 * ab);
  places.set(a, [0, 0, 0]);
  if (network.observations.some((o) => o.type !== "distance")) return;
  places.set(b, [ab, 0, 0]);
  places.set(c, [along, Math.sqrt(Math.max(ca ** 2 - along ** 2, 0)), 0]);
}

interface Triangle {
  readonly marks: readonly [string, string, string];
  readonly ab: number;
  readonly bc: number;
  readonly ca: number;
}

function largestTriangle(network: SurveyNetwork): Triangle | null {
  const lengths = new Map<string, number>();
  for (const o of network.observations) {
    if (o.type === "distance") lengths.set([o.from, o.to].sort().join("\n"), o.value);
  }
  const length = (a: string, b: string) => lengths.get([a, b].sort().join("\n"));
  let best: Triangle | null = null;
  let most = 0;
  network.marks.forEach((a, i) => network.marks.slice(i + 1).forEach((b, j) => network.marks.slice(i + j + 2).forEach((c) => {
    const [ab, bc, ca] = [length(a, b), length(b, c), length(c, a)];
    if (ab === undefined || bc === undefined || ca === undefined) return;
    const s = (ab + bc + ca) / 2;
    const area = s * (s - ab) * (s - bc) * (s - ca);
    if (area > most) [best, most] = [{ marks: [a, b, c], ab, bc, ca }, area];
  })));
  return best;
}
