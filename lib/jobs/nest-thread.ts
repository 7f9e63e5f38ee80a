/** Runs in a worker thread of its own: looks for one cutting plan and tells how far it is. */
import { parentPort, workerData } from "node:worker_threads";
import { searchNest } from "@/lib/commands/search-nest";
import type { NestThreadData } from "./nest-job";

/** Time between two tellings, ms. */
const TELL_EVERY_MS = 400;

async function run(): Promise<void> {
  const { source, stop } = workerData as NestThreadData;
  let told = 0;
  const result = await searchNest(source, {
    now: () => performance.now(),
    progress: (state) => {
      const now = performance.now();
      if (now - told > TELL_EVERY_MS) {
        told = now;
        parentPort?.postMessage({ progress: state });
      }
      return Atomics.load(stop, 0) === 1;
    },
  });
  parentPort?.postMessage({ result });
}

void run();
