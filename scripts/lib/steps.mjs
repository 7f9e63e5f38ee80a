/** Programs that a command runs to their end, one after another; a stop signal ends the one that runs. */
import { spawn } from "node:child_process";
import { isFullDisk, PlainError } from "./say.mjs";
import { endingWithParent, signalGroup } from "./processes.mjs";

const KEPT_CHARACTERS = 20_000;
const running = new Set();

/**
 * Runs a program to its end, keeping its output back unless it fails.
 * @param {string} what its name in messages @param {string} program @param {string[]} args
 * @param {{cwd?: string, env?: NodeJS.ProcessEnv, show?: boolean, uid?: number, gid?: number}} [options]
 * @returns {Promise<string>} what it printed
 * @throws PlainError with the end of its output.
 */
export async function runStep(what, program, args, { show = false, ...options } = {}) {
  const { code, signal, output } = await runProgram(program, args, { show, ...options });
  if (code === 0) return output;
  if (isFullDisk(output)) throw Object.assign(new Error("ENOSPC"), { code: "ENOSPC" });
  const tail = output.trim().split("\n").slice(-25).join("\n");
  throw new PlainError(`${what} failed (${signal ?? `exit code ${code}`}):\n${tail}`);
}

/**
 * Runs a program to its end. @returns {Promise<{code: number | null, signal: string | null, output: string}>}
 */
export function runProgram(program, args, { show = false, ...options } = {}) {
  return new Promise((resolve) => {
    const child = spawn(...commandLine(program, args), { ...options, detached: true, stdio: ["ignore", "pipe", "pipe"] });
    running.add(child);
    let output = "";
    const keep = (target) => (part) => {
      output = (output + part).slice(-KEPT_CHARACTERS);
      if (show) target.write(part);
    };
    child.stdout.setEncoding("utf8").on("data", keep(process.stdout));
    child.stderr.setEncoding("utf8").on("data", keep(process.stderr));
    const end = (code, signal) => {
      running.delete(child);
      resolve({ code, signal, output });
    };
    child.once("error", (error) => {
      output += error.message;
      end(127, null);
    });
    child.once("close", end);
  });
}

/** A step ends with us, except Debian's package tools: those are left to finish, since half an installation is worse. */
function commandLine(program, args) {
  return program.startsWith("apt") ? [program, args] : endingWithParent("TERM", program, args);
}

/** Ends whatever step runs now. */
export function stopSteps() {
  for (const child of running) if (child.pid) signalGroup(child.pid, "SIGTERM");
}
