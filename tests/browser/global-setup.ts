/**
 * For the browser tests: all of Quarterline, started by the very command its users start it with, on a data folder that
 * is thrown away, with the demo shop in it. Tests find its address in BASE_URL, its mails in OUTBOX_DIR, its
 * database (as the application's role) in DATABASE_URL.
 */
import { spawn, type ChildProcess } from "node:child_process";
import { rmSync } from "node:fs";
import path from "node:path";
import { anyFreePort } from "../../scripts/lib/ports.mjs";
import { localEnvironment } from "../../scripts/lib/settings-file.mjs";
import { throwAwayFolder } from "../../scripts/lib/throw-away.mjs";

const ROOT = path.resolve(import.meta.dirname, "../..");
const START_LIMIT_MS = 8 * 60_000;
const STOP_LIMIT_MS = 30_000;
const PASSED_ON = ["DATABASE_URL", "OUTBOX_DIR", "S3_ENDPOINT", "S3_REGION", "S3_BUCKET", "S3_ACCESS_KEY_ID", "S3_SECRET_ACCESS_KEY"] as const;

/** Starts it and answers how to stop it. */
export async function setup(): Promise<() => Promise<void>> {
  const folder = throwAwayFolder();
  const port = await anyFreePort();
  const environment = { ...process.env, QUARTERLINE_DATA_DIR: folder, PORT: String(port), BASE_URL: "", DATABASE_URL: "", S3_BUCKET: "", SMTP_URL: "", DEMO: "1", QUARTERLINE_QUIET: "0" };
  const child = spawn(process.execPath, [path.join(ROOT, "scripts/start.mjs")], { cwd: ROOT, env: environment, stdio: ["ignore", "pipe", "pipe"] });
  await untilReady(child);
  process.env.QUARTERLINE_DATA_DIR = folder;
  const local = localEnvironment();
  for (const name of PASSED_ON) process.env[name] = local[name] ?? "";
  process.env.QUARTERLINE_TEST_BASE_URL = `http://127.0.0.1:${port}`;
  return async () => {
    await stop(child);
    rmSync(folder, { recursive: true, force: true });
  };
}

function untilReady(child: ChildProcess): Promise<void> {
  return new Promise((resolve, reject) => {
    let printed = "";
    const late = setTimeout(() => fail("was not ready in time"), START_LIMIT_MS);
    const fail = (why: string) => {
      clearTimeout(late);
      child.kill("SIGKILL");
      reject(new Error(`npm start ${why}:\n${printed}`));
    };
    const read = (part: Buffer) => {
      printed += part.toString();
      if (!printed.includes("Ctrl-C stops it.")) return;
      clearTimeout(late);
      resolve();
    };
    child.stdout?.on("data", read);
    child.stderr?.on("data", read);
    child.once("exit", (code) => fail(`ended with exit code ${code}`));
  });
}

async function stop(child: ChildProcess): Promise<void> {
  const ended = new Promise<void>((resolve) => child.once("exit", () => resolve()));
  child.kill("SIGTERM");
  const late = setTimeout(() => child.kill("SIGKILL"), STOP_LIMIT_MS);
  await ended;
  clearTimeout(late);
}
