/** A stop signal that came while things are still being set up: seen at the next step. */
import { PlainError } from "./say.mjs";

export const interrupt = {
  /** Exit code to end with, or null while nobody asked to stop. @type {number | null} */
  code: null,
  /** @throws PlainError when a stop was asked for. */
  checkpoint() {
    if (interrupt.code !== null) throw new PlainError("Stopped.", interrupt.code);
  },
};
