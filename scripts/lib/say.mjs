/** What the two commands print: one line per step, and a plain sentence when something stops them. */
import { statfsSync } from "node:fs";

/** An end the reader can do something about: printed as its sentence, without a stack trace. */
export class PlainError extends Error {
  /** @param {string} sentence @param {number} [exitCode] */
  constructor(sentence, exitCode = 1) {
    super(sentence);
    this.exitCode = exitCode;
  }
}

const quiet = process.env.QUARTERLINE_QUIET === "1";

/** Prints a progress line. @param {string} text */
export function say(text) {
  if (!quiet) console.log(`  ${text}`);
}

/** Prints a line that stands out from the progress lines. @param {string} text */
export function sayHeading(text) {
  if (!quiet) console.log(`\n${text}`);
}

/** Prints a warning line on standard error. @param {string} text */
export function warn(text) {
  console.error(`  ! ${text}`);
}

const FULL_DISK = /ENOSPC|No space left on device|EDQUOT|quota exceeded/i;

/** Whether an error, or any text that a program printed, says that the disk is full. @param {unknown} error */
export function isFullDisk(error) {
  const text = error instanceof Error ? `${error.code ?? ""} ${error.message} ${error.detail ?? ""}` : String(error);
  return FULL_DISK.test(text);
}

/** Below this a database can write neither its log nor its files. */
const ALL_BUT_FULL_BYTES = 24_000_000;

/** Whether the disk under a folder is all but full now, whatever words the last error had for it. @param {string} folder */
export function isDiskFullAt(folder) {
  try {
    const { bavail, bsize } = statfsSync(folder);
    return bavail * bsize < ALL_BUT_FULL_BYTES;
  } catch {
    return false;
  }
}

/** An error that stands for a full disk. */
export function fullDiskError() {
  return Object.assign(new Error("ENOSPC: the disk is full"), { code: "ENOSPC" });
}

/** Prints why a command ends and answers its exit code. @param {unknown} error @returns {number} */
export function sayWhy(error) {
  if (isFullDisk(error)) {
    console.error("\nThe disk is full. Free some space and run the command again; nothing that was saved is lost.");
    return 28;
  }
  if (error instanceof PlainError) {
    console.error(`\n${error.message}`);
    return error.exitCode;
  }
  console.error(`\nSomething went wrong that this command does not know: ${error instanceof Error ? error.stack : String(error)}`);
  return 1;
}
