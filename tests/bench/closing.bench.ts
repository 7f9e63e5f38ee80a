/** The closing solver against a fixed small workload: 1 000 times three cross products of vectors. */
import { readFileSync } from "node:fs";
import path from "node:path";
import { solveClosing, type ClosingInput, type Vec3 } from "../../iso";
import { medianTimesUs, timeText, type BenchRow } from "./stopwatch";

const ROUNDS = 60;
const CROSSES = 1000;

interface Vector {
  readonly input: ClosingInput;
}

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

function closingInputs(): ClosingInput[] {
  const file = path.resolve(import.meta.dirname, "../fixtures/vectors/closing.json");
  const { vectors } = JSON.parse(readFileSync(file, "utf8")) as { vectors: Vector[] };
  return vectors.map(({ input }) => input);
}

export async function measure(): Promise<BenchRow[]> {
  const inputs = closingInputs();
  const closing = inputs.filter((input) => solveClosing(input).status === "ok");
  const searched = inputs.filter((input) => solveClosing(input).reason === "no-root");
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
    { name: "one closing : 1 000 x three cross products", figure: one / crossUs, detail: `${timeText(one)} : ${timeText(crossUs)}, ${closing.length} vectors` },
    { name: "one proven refusal : the same", figure: proof / crossUs, detail: `${timeText(proof)}, ${searched.length} vectors` },
  ];
}
