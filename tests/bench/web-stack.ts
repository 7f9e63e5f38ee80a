/** A throw-away stack for the web's measurements: services, a shop with jobs, the built pages served, the bare server. */
import { fork, type ChildProcess } from "node:child_process";
import path from "node:path";
import { setTimeout as sleep } from "node:timers/promises";
import { Client } from "pg";
import { jobRows } from "../../lib/queries/jobs";
import { closeDb } from "../../lib/server/database";
import { requireViewer } from "../../lib/server/session";
import { settings } from "../../lib/server/settings";
import { startNode } from "../../scripts/lib/children.mjs";
import { anyFreePort } from "../../scripts/lib/ports.mjs";
import { startThrowAwayServices } from "../../scripts/lib/throw-away.mjs";
import { newLine, newShop, type TestPerson } from "../database/support";
import { ask, type Target } from "./load";

const ROOT = path.resolve(import.meta.dirname, "../..");
const JOBS = 20;
const READY_LIMIT_MS = 40_000;

export interface WebStack {
  readonly bare: Target;
  readonly json: Target;
  readonly page: Target;
  stop(): Promise<void>;
}

interface Statement {
  readonly text: string;
  readonly slots: readonly string[];
}

/** Starts everything; what was started is stopped again when a later part does not start. */
export async function startWebStack(): Promise<WebStack> {
  const stops: (() => Promise<unknown>)[] = [];
  const stop = async (): Promise<void> => {
    for (const one of stops.reverse()) await one();
  };
  try {
    const services = await startThrowAwayServices();
    stops.push(() => services.stop());
    const port = await anyFreePort();
    const address = `http://127.0.0.1:${port}`;
    const environment = { ...process.env, ...services.environment, BASE_URL: address, NEXTAUTH_URL: address, NODE_ENV: "production", NEXT_TELEMETRY_DISABLED: "1" };
    Object.assign(process.env, services.environment, { BASE_URL: address, NEXTAUTH_URL: address, PASSWORD_COST: "4" });
    const detailer = await fillShop();
    const statements = await statementsOf(detailer);
    await closeDb();
    const script = path.join(ROOT, "node_modules/next/dist/bin/next");
    const server = await startNode({ name: "server", script, args: ["start", "-H", "127.0.0.1", "-p", String(port)], cwd: ROOT, env: environment, logFile: path.join(services.folder, "logs/server.log") });
    stops.push(() => server.stop(5000));
    const barePort = await startBare(statements, stops);
    const { cookie } = detailer;
    await untilHealthy(`${address}/api/health`);
    return { bare: { url: `http://127.0.0.1:${barePort}/`, cookie }, json: { url: `${address}/api/jobs`, cookie }, page: { url: `${address}/jobs`, cookie }, stop };
  } catch (error) {
    await stop();
    throw error;
  }
}

async function fillShop(): Promise<TestPerson> {
  const shop = await newShop();
  for (let job = 0; job < JOBS; job += 1) await newLine(shop);
  return shop.detailer;
}

/** The session's statement and the list's as they reach PostgreSQL, written down while the application's own code asks. */
async function statementsOf({ cookie, sessionId, shopId }: TestPerson): Promise<{ session: Statement; list: Statement }> {
  const sent: Statement[] = [];
  const slotOf = (value: unknown): string => (value === sessionId ? "sessionId" : value === shopId ? "shopId" : typeof value === "boolean" ? "issuedOnly" : "now");
  const client = Client.prototype as unknown as { query: (...args: unknown[]) => unknown };
  const original = client.query;
  client.query = function (...args) {
    const [text, values] = args;
    if (typeof text === "string" && Array.isArray(values) && values.length > 0) sent.push({ text, slots: values.map(slotOf) });
    return original.apply(this, args);
  };
  try {
    await jobRows(await requireViewer(new Request("http://127.0.0.1/", { headers: { cookie } })));
  } finally {
    client.query = original;
  }
  const [session, list] = sent;
  if (session === undefined || list === undefined || sent.length > 2) throw new Error(`The job list is asked with ${sent.length} statements, not the two that the bare server knows.`);
  return { session, list };
}

async function startBare(statements: { session: Statement; list: Statement }, stops: (() => Promise<unknown>)[]): Promise<number> {
  const { DATABASE_URL: url, DATABASE_POOL: pool, NEXTAUTH_SECRET: secret } = settings();
  const child = fork(path.join(import.meta.dirname, "bare-server.mjs"), { execArgv: [], env: { PATH: process.env.PATH, NODE_ENV: "production", BARE_SERVER: JSON.stringify({ url, pool, secret, ...statements }) } });
  stops.push(() => ended(child));
  return new Promise((resolve, reject) => {
    child.once("message", (said: { port: number }) => resolve(said.port));
    child.once("exit", (code) => reject(new Error(`The bare server ended with exit code ${code}`)));
  });
}

async function ended(child: ChildProcess): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const exit = new Promise((resolve) => child.once("exit", resolve));
  child.kill("SIGTERM");
  await exit;
}

async function untilHealthy(url: string): Promise<void> {
  const end = Date.now() + READY_LIMIT_MS;
  while (Date.now() < end) {
    if ((await ask({ url, cookie: "" })).status === 200) return;
    await sleep(200);
  }
  throw new Error("The built pages did not start in time.");
}
