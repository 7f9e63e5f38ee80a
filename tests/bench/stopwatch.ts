/** Times of several workloads taken turn by turn in one run, so that a slow moment of the machine touches all alike. */

export interface BenchRow {
  readonly name: string;
  /** A ratio unless it has a unit. */
  readonly figure: number;
  readonly unit?: string;
  /** The bound the figure is to keep: an upper one, or a lower one with `atLeast`. Without it the figure is only told. */
  readonly budget?: number;
  readonly atLeast?: boolean;
  /** What it was made from, for reading. */
  readonly detail: string;
}

/** A part that could not be measured here, and why, as a sentence. */
export interface SkippedRow {
  readonly name: string;
  readonly skipped: string;
}

export type BenchLine = BenchRow | SkippedRow;

export interface Workload {
  readonly name: string;
  /** How often the work is done between two looks at the clock. */
  readonly times: number;
  readonly work: () => unknown;
}

const WARM_UP_ROUNDS = 5;

/** Median time of each workload for one go, microseconds, in the order given. Awaits what a workload returns. */
export async function medianTimesUs(workloads: readonly Workload[], rounds: number): Promise<number[]> {
  const taken: number[][] = workloads.map(() => []);
  for (let round = -WARM_UP_ROUNDS; round < rounds; round += 1) {
    for (const [index, { times, work }] of workloads.entries()) {
      const from = process.hrtime.bigint();
      for (let go = 0; go < times; go += 1) await work();
      const us = Number(process.hrtime.bigint() - from) / 1000 / times;
      if (round >= 0) taken[index]?.push(us);
    }
  }
  return taken.map(median);
}

/** The upper one of the two in the middle when they are even in number; NaN of none. */
export function median(values: readonly number[]): number {
  return [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? NaN;
}

/** A time for reading: microseconds below a millisecond, else milliseconds. */
export function timeText(us: number): string {
  return us < 1000 ? `${us.toFixed(1)} µs` : `${(us / 1000).toFixed(2)} ms`;
}
