/**
 * Ways to close. The list that stands at once (pipe alone, one and two whole elbows, trimmed, mitred, field trims) and the search
 * of three whole elbows, each for a shop of LR 90s and 45s, against 1 000 closings solved in the same run; and the search's best
 * against a grid ten times finer, by another program, on more cases than the tests take: never more than 2 % longer.
 */
import { quickWays, solveClosing, standardWays, threeElbowWays, WALK_STEPS, type ClosingInput } from "../../iso";
import { question, randomEnds, walkedEnds } from "../iso/ways/cases";
import { threeElbowGrid, type Ends } from "../oracle/elbow-search";
import { seededRandom } from "../oracle/random";
import { medianTimesUs, timeText, type BenchRow } from "./stopwatch";

const ROUNDS = 9;
const CASES = 6;
const COMPARED = 60;
const IN = 25.4;
const ANGLES = [90, 45].flatMap((a) => [90, 45].flatMap((b) => [90, 45].map((c) => [a, b, c] as const)));

function cases(count: number): Ends[] {
  const random = seededRandom(991);
  return Array.from({ length: count }, (_, i) => {
    const angles = ANGLES[i % ANGLES.length]!;
    return i % 5 === 4 ? randomEnds(random) : walkedEnds(random, angles, [0, 1, 2, 3].map(() => (random() < 0.3 ? 0 : 6 + 24 * random())));
  });
}

function closing({ p0, d0, p1, d1, gap }: Ends): ClosingInput {
  return { p0, p1, d0, d1, r0: 6, r1: 6, a: 0, b: 0, gap, thetaMax: Math.PI / 2 };
}

/** Longest of the search's best over the grid's best, and how many were compared. */
function worstRatio(): { readonly worst: number; readonly compared: number } {
  let [worst, compared] = [0, 0];
  for (const ends of cases(COMPARED)) {
    const { ways } = threeElbowWays(question(ends));
    for (const angles of ANGLES) {
      const grid = threeElbowGrid(ends, angles, 10 * WALK_STEPS);
      if (!grid) continue;
      const own = ways.filter((way) => way.turns.every((turn, k) => turn.fitting.name === `LR ${angles[k]}`)).map((way) => way.lengthMm / IN);
      worst = Math.max(worst, Math.min(...own) / grid.length);
      compared += 1;
    }
  }
  return { worst, compared };
}

export async function measure(): Promise<BenchRow[]> {
  const ends = cases(CASES);
  const closings = ends.map(closing);
  const [closingUs = NaN, twoUs = NaN, quickUs = NaN, threeUs = NaN] = await medianTimesUs(
    [
      { name: "1 000 closings", times: 1, work: () => Array.from({ length: 1_000 }, (_, i) => solveClosing(closings[i % CASES]!)) },
      { name: "two elbows", times: 1, work: () => ends.forEach((each) => standardWays(question(each))) },
      { name: "quick list", times: 1, work: () => ends.forEach((each) => quickWays(question(each))) },
      { name: "three elbows", times: 1, work: () => ends.forEach((each) => threeElbowWays(question(each))) },
    ],
    ROUNDS,
  );
  const { worst, compared } = worstRatio();
  const row = (name: string, us: number, budget: number): BenchRow => ({ name: `${name} : 1 000 closings`, figure: us / CASES / closingUs, budget, detail: `${timeText(us / CASES)} : ${timeText(closingUs)}, ${CASES} cases` });
  return [
    row("one list of whole elbows, up to two", twoUs, 1),
    row("one list without three elbows", quickUs, 12),
    row("one search of three elbows", threeUs, 60),
    { name: "three elbows : a grid ten times finer, length", figure: worst, budget: 1.02, detail: `${compared} choices of elbows that close, ${COMPARED} cases` },
  ];
}
