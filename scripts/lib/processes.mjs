/** Processes on this machine, read from /proc: is it alive, is it still the same one, what works in a folder. */
import { existsSync, readFileSync, readdirSync, readlinkSync, realpathSync } from "node:fs";
import { setTimeout as sleep } from "node:timers/promises";

/**
 * When a process started, in clock ticks since boot, so that a process number used again is told from the old one.
 * @param {number} pid @returns {string | null} null when there is no such process, or only its remains.
 */
export function processStart(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, "utf8");
    const fields = stat.slice(stat.lastIndexOf(")") + 2).split(" ");
    return fields[0] === "Z" || fields[0] === "X" ? null : (fields[19] ?? null);
  } catch {
    return null;
  }
}

/** Whether the recorded process still runs. @param {{pid: number, started: string} | null | undefined} record */
export function isSameProcess(record) {
  return Boolean(record) && record.started !== null && processStart(record.pid) === record.started;
}

/** A record by which a process can be recognised later. @param {number} pid */
export function processRecord(pid) {
  return { pid, started: processStart(pid) };
}

const SETPRIV = "/usr/bin/setpriv";

/**
 * A command line whose process gets `signal` from the kernel when its parent dies, even by kill -9.
 * @param {"INT" | "TERM"} signal @param {string} program @param {string[]} args @returns {[string, string[]]}
 */
export function endingWithParent(signal, program, args) {
  return existsSync(SETPRIV) ? [SETPRIV, [`--pdeathsig=${signal}`, "--", program, ...args]] : [program, args];
}

/** Sends a signal to a process group, or to the process alone when it leads none. @param {number} pid @param {NodeJS.Signals} signal */
export function signalGroup(pid, signal) {
  try {
    process.kill(-pid, signal);
  } catch {
    signalOne(pid, signal);
  }
}

/** @param {number} pid @param {NodeJS.Signals} signal */
export function signalOne(pid, signal) {
  try {
    process.kill(pid, signal);
  } catch {
    // Gone already, which is what was wanted.
  }
}

/** Waits until `done` answers true. @param {() => boolean} done @param {number} limitMs @returns {Promise<boolean>} */
export async function waitUntil(done, limitMs) {
  const end = Date.now() + limitMs;
  while (!done()) {
    if (Date.now() > end) return false;
    await sleep(50);
  }
  return true;
}

/**
 * Stops a recorded process group: asks with `signal`, then insists.
 * @param {{pid: number, started: string}} record @param {NodeJS.Signals} signal @param {number} patienceMs
 */
export async function stopRecorded(record, signal = "SIGTERM", patienceMs = 8000) {
  if (!isSameProcess(record)) return;
  signalGroup(record.pid, signal);
  if (await waitUntil(() => !isSameProcess(record), patienceMs)) return;
  signalGroup(record.pid, "SIGKILL");
  await waitUntil(() => !isSameProcess(record), 5000);
}

/** Numbers of the processes whose working folder is `folder`. @param {string} folder @returns {number[]} */
export function processesIn(folder) {
  const real = realPathOrSame(folder);
  return readdirSync("/proc")
    .filter((name) => /^\d+$/.test(name))
    .filter((name) => {
      try {
        return readlinkSync(`/proc/${name}/cwd`) === real;
      } catch {
        return false;
      }
    })
    .map(Number);
}

function realPathOrSame(folder) {
  try {
    return realpathSync(folder);
  } catch {
    return folder;
  }
}
