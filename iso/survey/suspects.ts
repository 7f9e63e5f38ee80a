/** Which reading of an adjustment is off: the one with the largest standardised residual, and any that explains it as well. */
import { SURVEY_EQUAL_SHARE } from "../geometry/tolerances";
import { OUTLIER_LIMIT } from "./chi-square";
import type { Adjustment, ObservationResult } from "./survey-types";

/** Observations under suspicion, the worst first; empty when every |w| stays under the limit. */
export function suspectsOf({ observations }: Pick<Adjustment, "observations">): ObservationResult[] {
  const size = (each: ObservationResult) => Math.abs(each.standardised);
  const worst = observations.reduce((most, each) => Math.max(most, size(each)), 0);
  if (worst <= OUTLIER_LIMIT) return [];
  return observations.filter((each) => size(each) >= worst * (1 - SURVEY_EQUAL_SHARE)).sort((a, b) => size(b) - size(a));
}
