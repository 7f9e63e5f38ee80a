/**
 * `npm run worker`: works the queue in a process of its own, beside web processes that run with WORK_QUEUE=0 or along
 * with them. Takes the settings of the environment, else those of the local stack.
 */
import path from "node:path";
import { spawn } from "node:child_process";
import { ROOT } from "./lib/paths.mjs";
import { sayWhy } from "./lib/say.mjs";
import { localEnvironment } from "./lib/settings-file.mjs";

/** A worker's objects are few and short-lived: room for new ones, MB, that would only lie idle is left to the threads. */
const SMALL_NURSERY = "--max-semi-space-size=2";

try {
  const worker = spawn(process.execPath, [SMALL_NURSERY, "--import", "tsx", path.join(ROOT, "scripts/worker-process.ts")], {
    cwd: ROOT,
    env: { ...localEnvironment(), WORK_QUEUE: "1" },
    stdio: "inherit",
  });
  for (const signal of ["SIGINT", "SIGTERM"]) process.on(signal, () => worker.kill(signal));
  worker.once("exit", (code, signal) => process.exit(signal ? 0 : (code ?? 1)));
} catch (error) {
  process.exitCode = sayWhy(error);
}
