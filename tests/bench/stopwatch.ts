/** Times of several workloads taken turn by turn in one run, so that a slow moment of the machine touches all alike. */

export interface BenchRow {
  readonly name: string;
  readonly ratio: number;
  /** The bound the ratio is to keep: an upper one, or a lower one with `atLeast`. Without it the ratio is only told. */
  readonly budget?: number;
  readonly atLeast?: boolean;
  readonly detail: string;
}

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
  return taken.map((times) => times.sort((a, b) => a - b)[Math.floor(times.length / 2)] ?? NaN);
}

/** A time for reading: microseconds below a millisecond, else milliseconds. */
export function timeText(us: number): string {
  return us < 1000 ? `${us.toFixed(1)} µs` : `${(us / 1000).toFixed(2)} ms`;
}
