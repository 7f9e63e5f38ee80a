/** The process behind `npm run worker`. Ends when its jobs have finished after a stop signal. */
import { startProcess } from "@/lib/jobs/process";

void startProcess();
const stayAlive = setInterval(() => undefined, 60_000);
const GRACE_MS = 6_000;
for (const signal of ["SIGINT", "SIGTERM"] as const) {
  process.once(signal, () => {
    clearInterval(stayAlive);
    setTimeout(() => process.exit(0), GRACE_MS).unref();
  });
}
