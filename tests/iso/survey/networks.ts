/** Random survey networks with known truth, for tests. */
import { seededRandom } from "../../oracle/random";
import { oracleValue, type OraclePoint, type OracleReading } from "../../oracle/network";
import type { Vec3 } from "@/iso";
import type { Observation, SurveyNetwork } from "@/iso/survey/survey-types";

export interface Made {
  readonly truth: readonly OraclePoint[];
  readonly readings: readonly OracleReading[];
  readonly fixed: readonly number[];
  /** No reading ties it to the datum. */
  readonly floating: boolean;
}

const name = (mark: number) => (mark < 0 ? "" : String.fromCharCode(65 + mark));

/** Standard normal numbers from even ones (Box and Muller). */
export function normalRandom(random: () => number): number {
  return Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
}

/**
 * Marks strewn over a pipe rack's bay with tapes between most of them; on every second one offsets, bearings and levels
 * too. Errors are drawn from each reading's own standard deviation.
 */
export function randomNetwork(seed: number): Made {
  for (let draw = seed; ; draw += 100_000) {
    const made = drawNetwork(draw);
    const tied = made.truth.every((_, mark) => made.fixed.includes(mark) || made.readings.filter((r) => r.from === mark || r.to === mark).length >= 4);
    // Three fixed marks and tapes alone leave the rest free to stand mirrored on the other side of their plane.
    const handed = made.floating || made.readings.filter((r) => r.kind !== "distance" && r.to > 2).length >= 2;
    if (tied && handed) return made;
  }
}

function drawNetwork(seed: number): Made {
  const random = seededRandom(seed);
  const count = 6 + Math.floor(random() * 3);
  const truth = Array.from({ length: count }, () => [random() * 6000 - 1000, random() * 4000 + 500, random() * 3000] as OraclePoint);
  const floating = seed % 2 === 0;
  const readings: OracleReading[] = [];
  const read = (reading: Omit<OracleReading, "value">) => readings.push({ ...reading, value: oracleValue({ ...reading, value: 0 }, truth) + reading.sigma * normalRandom(random) });
  for (let a = 0; a < count; a += 1) for (let b = a + 1; b < count; b += 1) {
    if (random() < 0.92) read({ kind: "distance", from: a, to: b, sigma: 0.8 + random() * 0.8 });
    if (!floating && random() < 0.15) read({ kind: "along", axis: Math.floor(random() * 3), from: a, to: b, sigma: 1.5 });
    if (!floating && random() < 0.08) read({ kind: "azimuth", from: a, to: b, sigma: 0.002 });
    if (!floating && random() < 0.08) read({ kind: "elevation", from: a, to: b, sigma: 0.002 });
  }
  return { truth, readings, fixed: floating ? [] : [0, 1, 2], floating };
}

export function asNetwork({ truth, readings, fixed }: Made): SurveyNetwork {
  return {
    marks: truth.map((_, mark) => name(mark)),
    fixed: new Map(fixed.map((mark) => [name(mark), [...truth[mark]!] as unknown as Vec3])),
    observations: readings.map((r, at) => ({ readingId: String(at), from: name(r.from), to: name(r.to), sigma: r.sigma, value: r.value, ...(r.kind === "along" ? { type: "along", axis: r.axis as 0 | 1 | 2 } : { type: r.kind }) }) as Observation),
  };
}

/** Numbers the oracle holds: the fixed marks, or six that hold a floating network still. */
export function heldNumbers({ fixed, floating }: Made): [number, number][] {
  if (floating) return [[0, 0], [0, 1], [0, 2], [1, 1], [1, 2], [2, 2]];
  return fixed.flatMap((mark) => [0, 1, 2].map((axis) => [mark, axis] as [number, number]));
}
