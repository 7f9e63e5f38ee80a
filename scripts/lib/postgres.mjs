/**
 * A PostgreSQL server of our own on loopback, run by an ordinary user. Its folder holds the cluster; nothing of
 * Debian's own server is touched. Loopback TCP with passwords, no socket file, checksums and fsync on.
 */
import { spawn, spawnSync } from "node:child_process";
import { chmodSync, chownSync, closeSync, existsSync, mkdirSync, openSync, readFileSync, readdirSync, renameSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { setTimeout as sleep } from "node:timers/promises";
import { PlainError } from "./say.mjs";
import { endingWithParent, processRecord, processesIn, signalOne, stopRecorded, waitUntil } from "./processes.mjs";

export const SUPERUSER = "quarterline_super";
const OLDEST_VERSION = 15;
const START_LIMIT_MS = 60_000;

/** Folder with initdb, postgres, pg_dump, or null when PostgreSQL 15 or newer is not installed. @returns {string | null} */
export function postgresPrograms() {
  const base = "/usr/lib/postgresql";
  const versions = existsSync(base) ? readdirSync(base).filter((name) => /^\d+$/.test(name)).map(Number) : [];
  const usable = versions
    .filter((version) => version >= OLDEST_VERSION && existsSync(path.join(base, String(version), "bin", "postgres")))
    .sort((a, b) => a - b);
  return usable.length > 0 ? path.join(base, String(usable[0]), "bin") : null;
}

/** As `postgresPrograms`, for an existing cluster the programs of its own version. @param {string} [clusterDir] */
export function programsFor(clusterDir) {
  const found = postgresPrograms();
  if (found === null) throw new PlainError("PostgreSQL 15 is not installed. Install Debian's package postgresql-15 and try again.", 69);
  if (clusterDir === undefined || !existsSync(path.join(clusterDir, "PG_VERSION"))) return found;
  const version = readFileSync(path.join(clusterDir, "PG_VERSION"), "utf8").trim();
  const own = path.join("/usr/lib/postgresql", version, "bin");
  if (!existsSync(own)) throw new PlainError(`The data in ${clusterDir} is of PostgreSQL ${version}, which is not installed.`, 69);
  return own;
}

/**
 * Whom the server runs as: the caller, or the user `postgres` when the caller is root (PostgreSQL refuses root).
 * @returns {{uid: number, gid: number} | null} null for the caller.
 */
export function serverUser() {
  if (process.getuid() !== 0) return null;
  const line = readFileSync("/etc/passwd", "utf8").split("\n").find((entry) => entry.startsWith("postgres:"));
  if (line) return { uid: Number(line.split(":")[2]), gid: Number(line.split(":")[3]) };
  const made = spawnSync("useradd", ["--system", "--user-group", "--no-create-home", "--shell", "/usr/sbin/nologin", "postgres"]);
  if (made.status !== 0) throw new PlainError("PostgreSQL will not run as root, and the user `postgres` could not be made.", 77);
  return serverUser();
}

/** Whether the server's user can work in a folder, which it must own already. @param {string} folder */
export function canServerUse(folder) {
  const user = serverUser();
  const probe = spawnSync("/bin/sh", ["-c", 'cd "$1" && test -w .', "sh", folder], { ...(user ?? {}), cwd: "/", stdio: "ignore" });
  return probe.status === 0;
}

/** Makes the folder a cluster lives in, owned by the server's user and closed to others. @param {string} folder */
export function makeServerFolder(folder) {
  mkdirSync(folder, { recursive: true });
  const user = serverUser();
  if (user) chownSync(folder, user.uid, user.gid);
  chmodSync(folder, 0o700);
}

/**
 * Makes a cluster in `home`/cluster unless there is one. It is made aside and renamed, so an interrupted making is
 * never taken for a cluster.
 * @param {string} home @param {string} superPassword @returns {boolean} whether one was made.
 */
export function initCluster(home, superPassword) {
  const cluster = path.join(home, "cluster");
  if (existsSync(path.join(cluster, "PG_VERSION"))) return false;
  const fresh = path.join(home, "cluster.new");
  const passwordFile = path.join(home, "password.new");
  rmSync(fresh, { recursive: true, force: true });
  writeFileSync(passwordFile, superPassword, { mode: 0o600 });
  const user = serverUser();
  if (user) chownSync(passwordFile, user.uid, user.gid);
  const made = spawnSync(
    path.join(programsFor(), "initdb"),
    ["-D", fresh, "-U", SUPERUSER, `--pwfile=${passwordFile}`, "--auth=scram-sha-256", "--data-checksums", "-E", "UTF8", "--locale=C.UTF-8"],
    { ...(user ?? {}), cwd: home, encoding: "utf8", env: plainEnvironment() },
  );
  rmSync(passwordFile, { force: true });
  if (made.status !== 0) throw new PlainError(`PostgreSQL could not make its data folder: ${lastLines(made.stderr)}`);
  renameSync(fresh, cluster);
  return true;
}

/** What the server's programs may know of our environment: no PG* settings of the caller's. */
function plainEnvironment() {
  return { PATH: process.env.PATH ?? "/usr/bin:/bin", LANG: "C.UTF-8", LC_ALL: "C.UTF-8" };
}

function lastLines(text) {
  return String(text ?? "").trim().split("\n").slice(-4).join(" / ");
}

/**
 * Ends what is left of a server in this cluster (its starter was killed) and clears a stale lock file.
 * @param {string} cluster
 */
export async function clearLeftovers(cluster) {
  const lockFile = path.join(cluster, "postmaster.pid");
  if (processesIn(cluster).length > 0) {
    const postmaster = existsSync(lockFile) ? Number(readFileSync(lockFile, "utf8").split("\n")[0]) : 0;
    if (processesIn(cluster).includes(postmaster)) signalOne(postmaster, "SIGINT");
    if (!(await waitUntil(() => processesIn(cluster).length === 0, 15_000))) {
      for (const pid of processesIn(cluster)) signalOne(pid, "SIGKILL");
      await waitUntil(() => processesIn(cluster).length === 0, 5_000);
    }
  }
  // No process works in this cluster, so whatever now bears the number in the lock file is somebody else.
  rmSync(lockFile, { force: true });
}

/**
 * Starts the server and waits until it takes connections.
 * @param {{home: string, port: number, logFile: string, extra?: string[]}} options
 * @returns {Promise<import("./postgres.d.mts").RunningPostgres>}
 */
export async function startPostgres({ home, port, logFile, extra = [] }) {
  const cluster = path.join(home, "cluster");
  await clearLeftovers(cluster);
  const log = openSync(logFile, "a", 0o600);
  const settings = [
    "listen_addresses=127.0.0.1", `port=${port}`, "unix_socket_directories=", "fsync=on", "full_page_writes=on",
    "synchronous_commit=on", "max_connections=80", "shared_buffers=96MB", "password_encryption=scram-sha-256",
    "logging_collector=off", "log_min_messages=warning", "log_min_error_statement=panic", "log_parameter_max_length_on_error=0", "log_checkpoints=off",
  ];
  const child = spawn(
    ...endingWithParent("INT", path.join(programsFor(cluster), "postgres"), ["-D", cluster, ...[...settings, ...extra].flatMap((setting) => ["-c", setting])]),
    { ...(serverUser() ?? {}), cwd: home, env: plainEnvironment(), detached: true, stdio: ["ignore", log, log] },
  );
  closeSync(log);
  const exited = new Promise((resolve) => child.once("exit", (code, signal) => resolve({ code, signal })));
  child.once("error", () => {});
  await waitForReady(child, cluster, port, logFile);
  const record = processRecord(child.pid);
  return {
    port,
    pid: child.pid,
    record,
    exited,
    stop: async () => {
      // SIGINT is PostgreSQL's "fast" stop: sessions are ended, everything is written out.
      signalOne(child.pid, "SIGINT");
      if (!(await waitUntil(() => child.exitCode !== null || child.signalCode !== null, 20_000))) await stopRecorded(record, "SIGQUIT");
    },
    crash: async () => {
      signalOne(child.pid, "SIGKILL");
      await exited;
    },
  };
}

async function waitForReady(child, cluster, port, logFile) {
  const end = Date.now() + START_LIMIT_MS;
  const statusFile = path.join(cluster, "postmaster.pid");
  while (Date.now() < end) {
    if (child.exitCode !== null || child.signalCode !== null || child.pid === undefined) {
      throw new PlainError(`PostgreSQL did not start: ${lastLines(readFileSync(logFile, "utf8"))}`);
    }
    const lines = existsSync(statusFile) ? readFileSync(statusFile, "utf8").split("\n") : [];
    if (Number(lines[0]) === child.pid && lines[7]?.trim() === "ready") return;
    await sleep(30);
  }
  signalOne(child.pid, "SIGQUIT");
  throw new PlainError(`PostgreSQL on port ${port} was not ready after a minute; see ${logFile}.`);
}
