/** The whole of Quarterline on this machine: database, stand-ins, migrations, demo shop, pages. */
import { existsSync, readFileSync, renameSync, statSync } from "node:fs";
import path from "node:path";
import { setTimeout as sleep } from "node:timers/promises";
import { ensureBuild, leaveBuild } from "./build.mjs";
import { lastLine, startNode } from "./children.mjs";
import { interrupt } from "./interrupt.mjs";
import { forgetStarted, recordStarted } from "./lock.mjs";
import { dataFolder, ROOT } from "./paths.mjs";
import { clearLeftovers, initCluster, startPostgres } from "./postgres.mjs";
import { ensureDatabase } from "./roles.mjs";
import { fullDiskError, isDiskFullAt, isFullDisk, PlainError, say } from "./say.mjs";
import { seedDemo } from "./seeding.mjs";
import { assignPorts, assignWebPort, DATABASE, databaseHome, ensureSettings, environmentOf, superUrlOf } from "./settings-file.mjs";
import { startMailCatcher, startObjectStore } from "./stand-ins.mjs";
import { supervise } from "./supervise.mjs";

const LONGEST_LOG = 20_000_000;
const SERVER_LIMIT_MS = 120_000;

const logs = () => path.join(dataFolder(), "logs");
const logFile = (name) => path.join(logs(), `${name}.log`);

/**
 * Brings everything up, in order. Parts that the environment names (DATABASE_URL, S3_BUCKET, SMTP_URL) are not started.
 * @param {{host: string, onFailure: (why: Error) => void}} options
 */
export async function bringUp({ host, onFailure }) {
  const settings = ensureSettings();
  for (const name of ["postgres", "object-store", "mail", "server"]) trimLog(name);
  const stack = new Stack(settings, onFailure);
  try {
    for (const step of [
      () => stack.startServices(),
      () => assignWebPort(settings, host),
      () => stack.prepareData(),
      () => ensureBuild(),
      () => stack.startServer(host),
    ]) {
      interrupt.checkpoint();
      await step();
    }
    return stack;
  } catch (error) {
    await stack.stop();
    throw stack.isDiskFull() ? fullDiskError() : error;
  }
}

/**
 * Runs `work` with the local services up and no pages: for backup and restore while Quarterline is stopped.
 * @template T @param {(stack: Stack) => Promise<T>} work @returns {Promise<T>}
 */
export async function withServices(work) {
  const stack = new Stack(ensureSettings(), () => {});
  try {
    await stack.startServices();
    return await work(stack);
  } finally {
    await stack.stop();
  }
}

/** Keeps one older log beside a long one. */
function trimLog(name) {
  if (existsSync(logFile(name)) && statSync(logFile(name)).size > LONGEST_LOG) renameSync(logFile(name), `${logFile(name)}.1`);
}

class Stack {
  /** @type {Map<string, {part: any, stop: (part: any) => Promise<void>}>} in the order they were started */
  #parts = new Map();
  #stopping = false;
  address = "";

  constructor(settings, onFailure) {
    this.settings = settings;
    this.onFailure = onFailure;
  }

  /** What the application's processes are told. */
  get environment() {
    return { ...environmentOf(this.settings), AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: "true" };
  }

  /** Whether the disk under the data or the database is all but full. */
  isDiskFull() {
    return [dataFolder(), this.settings.databaseHome].some((folder) => folder && isDiskFullAt(folder));
  }

  async startServices() {
    const { settings } = this;
    const local = [!process.env.DATABASE_URL && "database", !process.env.S3_BUCKET && "objects", !process.env.SMTP_URL && "mail"].filter(Boolean);
    if (local.includes("database")) await this.#startDatabase();
    await assignPorts(settings, local.filter((part) => part !== "database"));
    const common = { root: ROOT, logs: logs() };
    if (local.includes("objects")) {
      const options = { ...common, folder: path.join(dataFolder(), "objects"), port: settings.objectsPort, accessKeyId: settings.s3AccessKeyId };
      await this.#keep("object store", () => startObjectStore(options));
    }
    if (local.includes("mail")) {
      await this.#keep("mail catcher", () => startMailCatcher({ ...common, folder: path.join(dataFolder(), "outbox"), port: settings.mailPort }));
    }
  }

  async #startDatabase() {
    const { settings } = this;
    const home = databaseHome(settings);
    if (initCluster(home, settings.superPassword)) say("made the database's folder");
    await clearLeftovers(path.join(home, "cluster"));
    await assignPorts(settings, ["database"]);
    say("starting PostgreSQL");
    await this.#keep("database", () => this.#postgres(home), (part) => part.stop());
    await ensureDatabase(superUrlOf(settings), { database: DATABASE, ...settings });
  }

  async #postgres(home) {
    const from = existsSync(logFile("postgres")) ? statSync(logFile("postgres")).size : 0;
    try {
      return await startPostgres({ home, port: this.settings.databasePort, logFile: logFile("postgres") });
    } catch (error) {
      if (isFullDisk(readFileSync(logFile("postgres")).subarray(from).toString())) throw fullDiskError();
      throw error;
    }
  }

  async prepareData() {
    const { MIGRATION_DATABASE_URL: url } = this.environment;
    if (!url) say("MIGRATION_DATABASE_URL is not given: the database is taken as it is");
    else {
      const { migrate } = await import("./migrations.mjs");
      const applied = await migrate(url, ROOT);
      if (applied.length > 0) say(`brought the database up to date (${applied.length} ${applied.length === 1 ? "step" : "steps"})`);
    }
    await seedDemo(this.settings, this.environment);
  }

  async startServer(host) {
    say("starting the server");
    const port = this.settings.webPort;
    const start = () =>
      startNode({
        name: "server",
        script: path.join(ROOT, "node_modules/next/dist/bin/next"),
        args: ["start", "-H", host, "-p", String(port)],
        cwd: ROOT,
        env: this.environment,
        logFile: logFile("server"),
      });
    const server = await this.#keep("server", start);
    await waitForHealth(`http://${host === "0.0.0.0" || host === "::" ? "127.0.0.1" : host}:${port}/api/health`, server);
    this.address = this.settings.baseUrl;
    this.#record();
  }

  /** Starts a part, records it for a later start to find, and starts it again when it dies. */
  async #keep(name, start, stop = (part) => part.stop()) {
    const keepIt = (part) => {
      this.#parts.set(name, { part, stop });
      this.#record();
      if (this.#stopping) void stop(part);
    };
    const part = await start();
    keepIt(part);
    void supervise({ name, part, startAgain: start, isStopping: () => this.#stopping, started: keepIt, giveUp: (why) => this.onFailure(this.isDiskFull() ? fullDiskError() : why) });
    return part;
  }

  #record() {
    if (this.#stopping) return;
    const children = Object.fromEntries([...this.#parts].filter(([name]) => name !== "database").map(([name, { part }]) => [name, part.record]));
    recordStarted({ address: this.address || undefined, children });
  }

  /** Stops everything, last started first, the database last. */
  async stop() {
    this.#stopping = true;
    for (const { part, stop } of [...this.#parts.values()].reverse()) await stop(part);
    leaveBuild();
    forgetStarted();
  }
}

/** Waits until the server answers its health question with yes. */
async function waitForHealth(url, server) {
  let ended = null;
  void server.exited.then((how) => (ended = how));
  const end = Date.now() + SERVER_LIMIT_MS;
  while (Date.now() < end) {
    interrupt.checkpoint();
    if (ended) throw new PlainError(`The server did not start: ${lastLine(logFile("server"))}`);
    const answer = await fetch(url, { signal: AbortSignal.timeout(5_000) }).catch(() => null);
    if (answer?.status === 200) return;
    await sleep(150);
  }
  throw new PlainError(`The server does not answer; see ${logFile("server")}.`);
}

