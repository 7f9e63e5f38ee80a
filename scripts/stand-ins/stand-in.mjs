/** What both stand-ins share: saying they are ready, and ending with their parent or when asked. */

const STOP_LIMIT_MS = 1500;

export const standIn = {
  /** Tells the parent that connections are taken. */
  ready() {
    process.send?.("ready");
  },
  /** Registers how to stop. @param {(done: () => void) => void} stop */
  onStop(stop) {
    const end = () => {
      stop(() => process.exit(0));
      setTimeout(() => process.exit(0), STOP_LIMIT_MS).unref();
    };
    process.on("SIGTERM", end);
    process.on("SIGINT", end);
    process.on("disconnect", end);
  },
};
