/** One job of the nesting queue: a worker thread searches while this one notes how far it is and hears of a cancel. */
import path from "node:path";
import { Worker } from "node:worker_threads";
import { finishNest, noteNest, takeUpNest } from "@/lib/commands/finish-nest";
import { log } from "@/lib/server/log";
import type { QueueData } from "@/lib/server/queue";

type Source = NonNullable<Awaited<ReturnType<typeof takeUpNest>>>;
type Found = Parameters<typeof finishNest>[2];
type Progress = Parameters<typeof noteNest>[2];

export interface NestThreadData {
  readonly source: Source;
  /** 1 in the first place = stop. */
  readonly stop: Int32Array;
}

const NOTE_EVERY_MS = 500;
/** A thread that is this much over its time is ended, ms. */
const GRACE_MS = 60_000;
/** The thread begins at a plain file outside the bundle, which brings in lib/jobs/nest-thread.ts. */
const THREAD = ["scripts", "nest-thread.mjs"] as const;

/** Safe to run twice: a plan that has ended is left as it is. */
export async function runNestJob({ shopId, nestId }: QueueData["nest"]): Promise<void> {
  const source = await takeUpNest({ shopId }, nestId);
  if (source === null) return;
  const found = await searchInThread(source, (progress) => noteNest({ shopId }, nestId, progress)).catch((error: unknown): Found => {
    log.warn({ nestId, error }, "a cutting plan could not be searched");
    return { failed: "The search ended without a plan." };
  });
  await finishNest({ shopId }, nestId, found);
}

function searchInThread(source: Source, note: (progress: Progress) => Promise<boolean>): Promise<Found> {
  return new Promise((resolve, reject) => {
    const stop = new Int32Array(new SharedArrayBuffer(Int32Array.BYTES_PER_ELEMENT));
    const data: NestThreadData = { source, stop };
    const file = path.join(/* turbopackIgnore: true */ process.cwd(), ...THREAD);
    const thread = new Worker(/* turbopackIgnore: true */ file, { workerData: data, execArgv: [] });
    let latest: Progress = null;
    const notes = setInterval(() => {
      note(latest).then((wanted) => { if (!wanted) Atomics.store(stop, 0, 1); }, () => undefined);
      latest = null;
    }, NOTE_EVERY_MS);
    const limit = setTimeout(() => void thread.terminate(), source.seconds * 1000 + GRACE_MS);
    const end = () => {
      clearInterval(notes);
      clearTimeout(limit);
    };
    thread.on("message", (message: { progress?: Progress; result?: Found }) => {
      if (message.progress) latest = message.progress;
      if (message.result) resolve(message.result);
    });
    thread.on("error", reject);
    thread.on("exit", () => {
      end();
      reject(new Error("The thread ended without a plan."));
    });
  });
}
