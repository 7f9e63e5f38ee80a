/** Every sensible way to close: what is found at once. Three elbows out of a plane take longer: three-elbow.ts. */
import { standardDrafts } from "./standard-search";
import { uniqueWays } from "./order";
import { waysProblem } from "./problem";
import { wayOf } from "./way";
import type { Way, WayRefusal, WaysInput, WaysResult } from "./ways-types";

/** The ways that need no search. Never throws on user data. */
export function quickWays(input: WaysInput): WaysResult {
  const problem = waysProblem(input);
  if (typeof problem === "string") return { ok: false, sentence: problem };
  const standard = ([0, 1, 2, 3] as const).flatMap((k) => standardDrafts(problem, k).flatMap((draft) => wayOf(problem, draft) ?? []));
  const ways: Way[] = uniqueWays(standard);
  const refusals: WayRefusal[] = [];
  return { ok: true, ways, refusals, notes: [] };
}
