/**
 * `npm start`: everything Quarterline needs on this machine, set up where it is missing and then run until Ctrl-C.
 * Plain Node, nothing needs to be installed before.
 */
import { mkdirSync } from "node:fs";
import { interrupt } from "./lib/interrupt.mjs";
import { releaseLock, stopLeftBehind, takeLock } from "./lib/lock.mjs";
import { checkNode, checkRoom, ensureDebianPackages, ensurePackages } from "./lib/machine.mjs";
import { dataFolder } from "./lib/paths.mjs";
import { isFullDisk, PlainError, say, sayHeading, sayWhy } from "./lib/say.mjs";
import { stopSteps } from "./lib/steps.mjs";

const ROOM_MB = 300;
const DEMO_PASSWORD = "quarter-line-demo";

/** The running stack, once it is up. */
let stack = null;
let stopping = false;

/** Stops all that was started; asked a second time it does not wait for that. */
async function stopAll(exitCode) {
  if (stopping) process.exit(exitCode || 1);
  stopping = true;
  await stack.stop();
  releaseLock();
  process.exit(exitCode);
}

function stopOnSignal(code) {
  if (stack !== null) {
    if (!stopping) console.log("\nStopping.");
    return void stopAll(code);
  }
  interrupt.code = code;
  stopSteps();
}

function listenForSignals() {
  process.on("SIGINT", () => stopOnSignal(130));
  process.on("SIGTERM", () => stopOnSignal(143));
  process.on("SIGHUP", () => stopOnSignal(129));
  // Whoever reads our lines may go away first; that must not end the server.
  process.stdout.on("error", () => {});
  process.stderr.on("error", () => {});
}

function stopOnFailure(why) {
  const code = sayWhy(isFullDisk(why) ? why : new PlainError(`Stopping everything: ${why.message}. The logs in ${dataFolder()}/logs say more; nothing that was saved is lost.`, 70));
  void stopAll(code);
}

async function main() {
  sayHeading("Quarterline");
  checkNode();
  mkdirSync(dataFolder(), { recursive: true, mode: 0o711 });
  checkRoom(dataFolder(), ROOM_MB);
  takeLock();
  if (!process.env.DATABASE_URL) await ensureDebianPackages(["postgresql"]);
  interrupt.checkpoint();
  await ensurePackages();
  interrupt.checkpoint();
  await stopLeftBehind();
  // Loaded only now: it uses packages that npm ci has just brought.
  const { bringUp } = await import("./lib/stack.mjs");
  stack = await bringUp({ host: process.env.HOST || "127.0.0.1", onFailure: stopOnFailure });
  if (interrupt.code !== null) return stopOnSignal(interrupt.code);
  sayReady();
}

function sayReady() {
  sayHeading(`Quarterline is ready:  ${stack.address}`);
  const demo = stack.environment.DEMO === "1";
  const logins = demo ? (stack.settings.demoLogins ?? []) : [];
  if (logins.length > 0) say(`Demo logins, password for all: ${DEMO_PASSWORD}`);
  for (const { email, name, role } of logins) say(`  ${role.padEnd(10)} ${email.padEnd(34)} ${name}`);
  if (demo) say(`Mails go to ${stack.address}/outbox and nowhere else.`);
  say("Ctrl-C stops it.");
}

listenForSignals();
main().catch((error) => {
  const code = interrupt.code === null ? sayWhy(error) : interrupt.code;
  if (interrupt.code !== null) console.log("\nStopped.");
  releaseLock();
  process.exit(code);
});
