/** Keeps what was started running: a part that dies is started again, more slowly each time; when that is no use, all stops. */
import { setTimeout as sleep } from "node:timers/promises";
import { isFullDisk, say, warn } from "./say.mjs";

const FIRST_WAIT_MS = 500;
const LONGEST_WAIT_MS = 20_000;
/** A part that ran this long had started well, so its next death counts as its first. */
const STEADY_MS = 60_000;
const TRIES = 6;

/**
 * Watches one part.
 * @param {{name: string, part: {exited: Promise<{code: number | null, signal: string | null}>},
 *   startAgain: () => Promise<any>, isStopping: () => boolean, started: (part: any) => void, giveUp: (why: Error) => void}} watched
 */
export async function supervise({ name, part, startAgain, isStopping, started, giveUp }) {
  let current = part;
  let tries = 0;
  for (;;) {
    const began = Date.now();
    const { code, signal } = await current.exited;
    if (isStopping()) return;
    if (Date.now() - began > STEADY_MS) tries = 0;
    warn(`the ${name} stopped unexpectedly (${signal ?? `exit code ${code}`}); starting it again`);
    current = null;
    while (current === null) {
      tries += 1;
      if (tries > TRIES) return giveUp(new Error(`the ${name} does not stay up`));
      await sleep(Math.min(FIRST_WAIT_MS * 2 ** (tries - 1), LONGEST_WAIT_MS));
      if (isStopping()) return;
      try {
        current = await startAgain();
      } catch (error) {
        if (isFullDisk(error)) return giveUp(error);
        warn(error.message);
      }
    }
    started(current);
    say(`the ${name} is up again`);
  }
}
