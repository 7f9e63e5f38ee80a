/** Child processes of ours: started in a group of their own, logging to a file, and stopped together with it. */
import { spawn } from "node:child_process";
import { closeSync, openSync, readFileSync } from "node:fs";
import { PlainError } from "./say.mjs";
import { endingWithParent, processRecord, stopRecorded } from "./processes.mjs";

/**
 * Starts a Node script in its own process group.
 * @param {{name: string, script: string, args?: string[], env: Record<string, string | undefined>, cwd: string,
 *   logFile: string, waitForMessage?: boolean, limitMs?: number}} options
 * @returns {Promise<import("./children.d.mts").RunningChild>} once it said it is ready, when `waitForMessage`.
 */
export async function startNode({ name, script, args = [], env, cwd, logFile, waitForMessage = false, limitMs = 20_000 }) {
  const log = openSync(logFile, "a", 0o600);
  const child = spawn(...endingWithParent("TERM", process.execPath, [script, ...args]), {
    cwd,
    env,
    detached: true,
    stdio: waitForMessage ? ["ignore", log, log, "ipc"] : ["ignore", log, log],
  });
  closeSync(log);
  const exited = new Promise((resolve) => {
    child.once("exit", (code, signal) => resolve({ code, signal }));
    child.once("error", () => resolve({ code: 1, signal: null }));
  });
  const record = processRecord(child.pid ?? -1);
  if (waitForMessage) {
    const ready = new Promise((resolve) => child.once("message", () => resolve("ready")));
    const late = new Promise((resolve) => setTimeout(resolve, limitMs, "late").unref());
    if ((await Promise.race([ready, late, exited.then(() => "exited")])) !== "ready") {
      await stopRecorded(record, "SIGKILL");
      throw new PlainError(`The ${name} did not start: ${lastLine(logFile)}`);
    }
  }
  return { name, pid: child.pid, record, exited, stop: (patienceMs) => stopRecorded(record, "SIGTERM", patienceMs) };
}

/** The last line of a log that is not a stack frame. @param {string} logFile */
export function lastLine(logFile) {
  try {
    const lines = readFileSync(logFile, "utf8").trim().split("\n").filter((line) => !/^\s+at |^Node\.js v|^\s*$/.test(line));
    return lines.at(-1) ?? "no word of why";
  } catch {
    return "no word of why";
  }
}
