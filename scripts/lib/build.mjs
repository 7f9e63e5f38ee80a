/** The built pages: made again only when a source changed, and never under the feet of a server that runs on them. */
import { createHash } from "node:crypto";
import { existsSync, mkdirSync, readFileSync, readdirSync, rmSync, statSync, writeFileSync } from "node:fs";
import path from "node:path";
import { checkRoom } from "./machine.mjs";
import { ROOT } from "./paths.mjs";
import { isSameProcess, processRecord } from "./processes.mjs";
import { PlainError, say } from "./say.mjs";
import { runStep } from "./steps.mjs";

const SOURCES = [
  "app", "components", "fonts", "iso", "lib", "models", "pdf", "public", "proxy.ts", "instrumentation.ts", "next.config.ts",
  "postcss.config.mjs", "tailwind.config.ts", "tsconfig.json", "package.json", "package-lock.json",
];
const BUILD = path.join(ROOT, ".next");
const STAMP = path.join(BUILD, "quarterline-sources");
/** Who uses the build now, one file per process; kept where git and the build leave it alone. */
const USERS = path.join(ROOT, "node_modules/.cache/quarterline-build-users");

/** SHA-256 over the names and bytes of all sources of the pages. @returns {string} */
export function sourcesHash() {
  const hash = createHash("sha256").update(process.versions.node.split(".")[0]);
  for (const file of SOURCES.flatMap((name) => filesUnder(path.join(ROOT, name)))) {
    hash.update(`\0${path.relative(ROOT, file)}\0`).update(readFileSync(file));
  }
  return hash.digest("hex");
}

function filesUnder(place) {
  if (!existsSync(place)) return [];
  if (!statSync(place).isDirectory()) return [place];
  return readdirSync(place).sort().flatMap((name) => filesUnder(path.join(place, name)));
}

/** Whether the build is of the sources as they are now. */
export function isBuildCurrent() {
  return existsSync(path.join(BUILD, "BUILD_ID")) && existsSync(STAMP) && readFileSync(STAMP, "utf8") === sourcesHash();
}

/** Builds when the sources changed, and marks this process as a user of the build. @throws PlainError */
export async function ensureBuild() {
  if (!isBuildCurrent()) await build();
  markBuildUsed();
}

async function build() {
  const other = otherUser();
  if (other !== null) throw new PlainError(`The sources changed, and Quarterline is running on the pages built before (process ${other}). Stop that one first.`, 75);
  checkRoom(ROOT, 300);
  say("building the pages (a minute or two, only when sources changed)");
  markBuildUsed();
  const hash = sourcesHash();
  rmSync(STAMP, { force: true });
  await runStep("Building the pages", process.execPath, [path.join(ROOT, "node_modules/next/dist/bin/next"), "build"], {
    cwd: ROOT,
    env: { PATH: process.env.PATH, HOME: process.env.HOME, NODE_ENV: "production", NEXT_TELEMETRY_DISABLED: "1" },
  });
  writeFileSync(STAMP, hash);
}

function markBuildUsed() {
  mkdirSync(USERS, { recursive: true });
  writeFileSync(path.join(USERS, String(process.pid)), JSON.stringify(processRecord(process.pid)));
}

/** This process no longer uses the build. */
export function leaveBuild() {
  rmSync(path.join(USERS, String(process.pid)), { force: true });
}

function otherUser() {
  if (!existsSync(USERS)) return null;
  for (const name of readdirSync(USERS)) {
    const record = JSON.parse(readFileSync(path.join(USERS, name), "utf8") || "null");
    if (Number(name) !== process.pid && isSameProcess(record)) return Number(name);
    if (Number(name) !== process.pid) rmSync(path.join(USERS, name), { force: true });
  }
  return null;
}
