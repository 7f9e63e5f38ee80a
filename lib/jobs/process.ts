/** The life of one server process: what it does besides answering requests, and how it ends. */
import { closeDb } from "@/lib/server/database";
import { log } from "@/lib/server/log";
import { stopQueues, workQueues } from "@/lib/server/queue";
import { settings } from "@/lib/server/settings";
import { queueHandlers } from "./handlers";
import { watchPackages } from "./package-watch";

const FIRST_WAIT_MS = 1_000;
const LONGEST_WAIT_MS = 30_000;

/**
 * Starts what a web process runs beside its pages. The queue is begun in the background and tried again while the
 * database is away, so that pages and the health route answer meanwhile.
 * @throws when a setting is missing or malformed.
 */
export async function startProcess(): Promise<void> {
  const { WORK_QUEUE } = settings();
  if (WORK_QUEUE) void beginQueues(FIRST_WAIT_MS);
  endInOrder();
  log.info({ workQueue: WORK_QUEUE }, "process started");
}

/** Begins working the queues, again and again until it succeeds. */
export async function beginQueues(waitMs: number): Promise<void> {
  try {
    await workQueues(queueHandlers);
    watchPackages();
  } catch (error) {
    log.warn({ error, waitMs }, "the queue cannot be worked yet");
    await stopQueues().catch(() => undefined);
    setTimeout(() => void beginQueues(Math.min(waitMs * 2, LONGEST_WAIT_MS)), waitMs).unref();
  }
}

/** On a stop signal running jobs finish and the pool is closed, while the server ends its open requests. */
function endInOrder(): void {
  const end = async () => {
    log.info("process stopping");
    await stopQueues().catch((error: unknown) => log.warn({ error }, "queue did not stop in order"));
    await closeDb().catch((error: unknown) => log.warn({ error }, "pool did not close in order"));
  };
  for (const signal of ["SIGTERM", "SIGINT"] as const) process.once(signal, () => void end());
}
