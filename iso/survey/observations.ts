/** What an observation should read at given coordinates, and how that changes with them. Millimetres, radians. */
import { ZERO_LENGTH_MM } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecSub } from "../geometry/vec3";
import { DATUM, type Observation, type SurveyNetwork } from "./survey-types";

export type Places = ReadonlyMap<string, Vec3>;

/** One row of the linear system, each number divided by the observation's standard deviation. */
export interface WeightedRow {
  /** Observed less predicted. */
  readonly misclosure: number;
  /** Partial derivatives to the `to` mark; to the `from` mark they are the negative. */
  readonly partials: Vec3;
}

const ORIGIN: Vec3 = [0, 0, 0];

export function placeOf(places: Places, mark: string): Vec3 {
  return mark === DATUM ? ORIGIN : (places.get(mark) ?? ORIGIN);
}

/** Prediction and partials at the places. Where a direction has no meaning (marks in one spot) the partials are zero. */
export function predictObservation(observation: Observation, places: Places): { readonly value: number; readonly partials: Vec3 } {
  const way = vecSub(placeOf(places, observation.to), placeOf(places, observation.from));
  const [e, n, u] = way;
  const length = Math.hypot(e, n, u);
  const level = Math.hypot(e, n);
  switch (observation.type) {
    case "distance":
      return { value: length, partials: length > ZERO_LENGTH_MM ? [e / length, n / length, u / length] : ORIGIN };
    case "along":
      return { value: way[observation.axis], partials: [0, 1, 2].map((axis) => (axis === observation.axis ? 1 : 0)) as unknown as Vec3 };
    case "azimuth":
      return { value: Math.atan2(e, n), partials: level > ZERO_LENGTH_MM ? [n / level ** 2, -e / level ** 2, 0] : ORIGIN };
    case "elevation":
      if (level <= ZERO_LENGTH_MM) return { value: Math.atan2(u, level), partials: ORIGIN };
      return { value: Math.atan2(u, level), partials: [(-u * e) / (level * length ** 2), (-u * n) / (level * length ** 2), level / length ** 2] };
  }
}

/** Observed less predicted; bearings the short way round. */
export function misclosureOf(observation: Observation, predicted: number): number {
  const raw = observation.value - predicted;
  return observation.type === "azimuth" ? Math.atan2(Math.sin(raw), Math.cos(raw)) : raw;
}

export function weightedRow(observation: Observation, places: Places): WeightedRow {
  const { value, partials } = predictObservation(observation, places);
  const scale = 1 / observation.sigma;
  return { misclosure: misclosureOf(observation, value) * scale, partials: [partials[0] * scale, partials[1] * scale, partials[2] * scale] };
}

/** Sum of squared weighted misclosures at the places. */
export function weightedSquares(network: Pick<SurveyNetwork, "observations">, places: Places): number {
  return network.observations.reduce((sum, observation) => {
    const off = misclosureOf(observation, predictObservation(observation, places).value) / observation.sigma;
    return sum + off * off;
  }, 0);
}
