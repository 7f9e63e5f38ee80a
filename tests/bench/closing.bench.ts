/**
 * The closing solver against a fixed small workload: 1 000 times three cross products of vectors. The mix: OF_EACH seeded cases
 * of each family of tests/iso/closing/closing-families.ts that closes, one after another; and the ends of the last family that no
 * path joins, each of which costs a proof. Budgets: what the design tells of these machines (3 µs and 150 µs to about 0.1 ms),
 * and a third on top for one that is busy.
 */
import { solveClosing, type ClosingInput, type Vec3 } from "../../iso";
import { FAMILIES } from "../iso/closing/closing-families";
import { seededRandom } from "../oracle/random";
import { medianTimesUs, timeText, type BenchRow } from "./stopwatch";

const ROUNDS = 60;
const CROSSES = 1000;

const OF_EACH = 40;

function cross([ax, ay, az]: Vec3, [bx, by, bz]: Vec3): Vec3 {
  return [ay * bz - az * by, az * bx - ax * bz, ax * by - ay * bx];
}

/** Each go uses what the one before gave, so that none can be left out by the engine. */
function crossProducts(): number {
  let carried: Vec3 = [1, 0.2, 0.3];
  for (let go = 0; go < CROSSES; go += 1) {
    const first = cross(carried, [0.1, 1, 0.4]);
    const second = cross(first, [0.5, 0.6, 1]);
    const [x, y, z] = cross(second, [0.3, 0.2, 0.9]);
    const size = Math.abs(x) + Math.abs(y) + Math.abs(z);
    carried = [x / size, y / size, z / size + 0.5];
  }
  return carried[0];
}

/** The cases of all families that were made for such a reason, null = to close. */
function casesOf(wanted: (reason: string | null) => boolean): ClosingInput[] {
  const random = seededRandom(7);
  return Object.values(FAMILIES).flatMap((family) => Array.from({ length: OF_EACH }, (_, index) => family(random, index)).filter(({ reason }) => wanted(reason)).map(({ input }) => input));
}

export async function measure(): Promise<BenchRow[]> {
  const closing = casesOf((reason) => reason === null);
  const searched = casesOf((reason) => reason === "no-root");
  const all = (list: readonly ClosingInput[]) => () => list.forEach((input) => solveClosing(input));
  const [crossUs = NaN, closingUs = NaN, searchedUs = NaN] = await medianTimesUs(
    [
      { name: "cross products", times: 10, work: crossProducts },
      { name: "closings", times: 2, work: all(closing) },
      { name: "refusals", times: 1, work: all(searched) },
    ],
    ROUNDS,
  );
  const one = closingUs / closing.length;
  const proof = searchedUs / Math.max(searched.length, 1);
  return [
    { name: "one closing : 1 000 x three cross products", figure: one / crossUs, budget: 0.04, detail: `${timeText(one)} : ${timeText(crossUs)}, ${closing.length} cases of ${Object.keys(FAMILIES).length - 1} families` },
    { name: "one proven refusal : the same", figure: proof / crossUs, budget: 2, detail: `${timeText(proof)}, ${searched.length} cases` },
  ];
}
