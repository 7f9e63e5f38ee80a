/** One `npm start` per data folder: a lock file naming the process that holds it, and what that process started. */
import { linkSync, readFileSync, renameSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { dataFolder } from "./paths.mjs";
import { isSameProcess, processRecord, stopRecorded } from "./processes.mjs";
import { PlainError, say } from "./say.mjs";

const lockFile = () => path.join(dataFolder(), "lock");
const startedFile = () => path.join(dataFolder(), "started.json");

function readJson(file) {
  try {
    return JSON.parse(readFileSync(file, "utf8"));
  } catch {
    return null;
  }
}

/**
 * Takes the lock, over a dead holder's if need be.
 * @throws PlainError when a live process holds it.
 */
export function takeLock() {
  const mine = `${lockFile()}.${process.pid}`;
  writeFileSync(mine, JSON.stringify(processRecord(process.pid)), { mode: 0o600 });
  try {
    for (let attempt = 0; attempt < 5; attempt += 1) {
      try {
        linkSync(mine, lockFile());
        return;
      } catch (error) {
        if (error.code !== "EEXIST") throw error;
      }
      const holder = readJson(lockFile());
      if (isSameProcess(holder)) throw new PlainError(runningSentence(holder), 75);
      clearDeadLock(holder);
    }
    throw new PlainError("Two starts are in each other's way. Run the command again.", 75);
  } finally {
    rmSync(mine, { force: true });
  }
}

/** Moves the dead lock away; when another start was quicker and it is a live one by now, it is put back. */
function clearDeadLock(seen) {
  const aside = `${lockFile()}.dead-${process.pid}`;
  try {
    renameSync(lockFile(), aside);
    const moved = readJson(aside);
    if (isSameProcess(moved) && moved?.pid !== seen?.pid) linkSync(aside, lockFile());
  } catch (error) {
    if (error.code !== "ENOENT" && error.code !== "EEXIST") throw error;
  } finally {
    rmSync(aside, { force: true });
  }
}

function runningSentence(holder) {
  const address = readJson(startedFile())?.address;
  const where = address ? ` at ${address}` : " and still starting";
  return `Quarterline is already running here (process ${holder.pid})${where}. Stop it with Ctrl-C where it was started, or with:  kill ${holder.pid}`;
}

/** Gives the lock back. */
export function releaseLock() {
  if (readJson(lockFile())?.pid === process.pid) rmSync(lockFile(), { force: true });
}

/** Whether a live process holds the lock of the data folder. */
export function isLocked() {
  return isSameProcess(readJson(lockFile()));
}

/** Records what was started, so that the next start finds it if this one is killed. @param {{address?: string, children: Record<string, object>}} started */
export function recordStarted(started) {
  writeFileSync(`${startedFile()}.new`, JSON.stringify(started), { mode: 0o600 });
  renameSync(`${startedFile()}.new`, startedFile());
}

/** Forgets what was started, once it is stopped. */
export function forgetStarted() {
  rmSync(startedFile(), { force: true });
}

/** Stops what a killed start left running. PostgreSQL is seen to by its own start. */
export async function stopLeftBehind() {
  const children = Object.entries(readJson(startedFile())?.children ?? {});
  const alive = children.filter(([, record]) => isSameProcess(record));
  if (alive.length > 0) say(`an earlier start was killed; stopping what it left running (${alive.map(([name]) => name).join(", ")})`);
  for (const [, record] of alive) await stopRecorded(record, "SIGTERM", 4000);
  forgetStarted();
}
