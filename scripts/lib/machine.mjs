/** What the machine must have: a Node that is new enough, Debian packages, room on the disk, the npm packages. */
import { existsSync, mkdirSync, readFileSync, rmSync, statfsSync, writeFileSync } from "node:fs";
import path from "node:path";
import { ROOT } from "./paths.mjs";
import { postgresPrograms } from "./postgres.mjs";
import { PlainError, say } from "./say.mjs";
import { runStep } from "./steps.mjs";

const OLDEST_NODE = [20, 9];
const MB = 1_000_000;
const NO_CLUSTER_FILE = "/etc/postgresql-common/createcluster.d/quarterline.conf";

/** @throws PlainError when Node is too old. */
export function checkNode() {
  const [major, minor] = process.versions.node.split(".").map(Number);
  if (major > OLDEST_NODE[0] || (major === OLDEST_NODE[0] && minor >= OLDEST_NODE[1])) return;
  throw new PlainError(`Node ${OLDEST_NODE.join(".")} or newer is needed; this is ${process.versions.node}.`, 69);
}

function onPath(program) {
  return (process.env.PATH ?? "").split(":").some((folder) => folder !== "" && existsSync(path.join(folder, program)));
}

const PACKAGES = {
  postgresql: { why: "the database", present: () => postgresPrograms() !== null },
  chromium: { why: "the browser tests", present: () => existsSync("/usr/bin/chromium") },
  "poppler-utils": { why: "the PDF tests", present: () => onPath("pdftotext") && onPath("pdftoppm") && onPath("pdfsig") },
  qpdf: { why: "the PDF tests", present: () => onPath("qpdf") },
  openssl: { why: "the tests of signatures", present: () => onPath("openssl") },
};

/**
 * Installs the Debian packages that are missing.
 * @param {(keyof typeof PACKAGES)[]} names
 * @throws PlainError saying what to install when that is not possible here.
 */
export async function ensureDebianPackages(names) {
  const missing = names.filter((name) => !PACKAGES[name].present());
  if (missing.length === 0) return;
  const wanted = missing.map((name) => `${name} (for ${PACKAGES[name].why})`).join(", ");
  if (!onPath("apt-get")) throw new PlainError(`Missing: ${wanted}. This is not a Debian machine; install them its own way and try again.`, 69);
  if (process.getuid() !== 0) {
    throw new PlainError(`Missing: ${wanted}. Install with:  sudo apt-get install ${missing.join(" ")}\nThen run the command again, as yourself.`, 77);
  }
  say(`installing Debian packages: ${missing.join(", ")}`);
  const keepAside = missing.includes("postgresql");
  if (keepAside) leaveOutDebiansServer();
  try {
    const env = { ...process.env, DEBIAN_FRONTEND: "noninteractive" };
    await runStep("apt-get update", "apt-get", ["update", "-qq"], { env });
    await runStep("apt-get install", "apt-get", ["install", "-y", "-qq", "--no-install-recommends", ...missing], { env });
  } finally {
    if (keepAside) rmSync(NO_CLUSTER_FILE, { force: true });
  }
  const still = missing.filter((name) => !PACKAGES[name].present());
  if (still.length > 0) throw new PlainError(`Debian's ${still.join(", ")} was installed but is not usable (PostgreSQL 15 or newer is needed).`, 69);
}

/** Debian's package would make and start a server of its own on port 5432; ours is enough. */
function leaveOutDebiansServer() {
  mkdirSync(path.dirname(NO_CLUSTER_FILE), { recursive: true });
  writeFileSync(NO_CLUSTER_FILE, "create_main_cluster = off\n");
}

/**
 * Refuses to begin on a disk that is all but full. @param {string} folder @param {number} neededMb
 * @throws PlainError with both numbers.
 */
export function checkRoom(folder, neededMb) {
  const { bavail, bsize } = statfsSync(folder);
  const freeMb = Math.floor((bavail * bsize) / MB);
  if (freeMb >= neededMb) return;
  throw new PlainError(`The disk is nearly full: ${freeMb} MB are free where ${folder} is, about ${neededMb} MB are needed. Free some space and run the command again.`, 28);
}

/** Whether the installed npm packages are those of package-lock.json. */
export function arePackagesCurrent() {
  try {
    const wanted = JSON.parse(readFileSync(path.join(ROOT, "package-lock.json"), "utf8")).packages;
    const installed = JSON.parse(readFileSync(path.join(ROOT, "node_modules/.package-lock.json"), "utf8")).packages;
    return Object.entries(wanted).every(
      ([name, entry]) => name === "" || entry.optional || entry.devOptional || entry.peer || installed[name]?.version === entry.version,
    );
  } catch {
    return false;
  }
}

/** Runs npm ci when the installed packages are not those of package-lock.json. */
export async function ensurePackages() {
  if (arePackagesCurrent()) return;
  if (!onPath("npm")) throw new PlainError("npm is not on the PATH; it comes with Node.", 69);
  checkRoom(ROOT, 1500);
  say("installing npm packages (npm ci, a minute or two)");
  await runStep("npm ci", "npm", ["ci", "--include=dev", "--no-audit", "--no-fund"], { cwd: ROOT });
}

