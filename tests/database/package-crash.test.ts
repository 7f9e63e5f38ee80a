/**
 * kill -9 of the worker process at a random moment, twenty times. Each time a package of six sheets (three parts, one
 * PDF of 20 pages or so) is asked for; the worker is killed somewhere between asking and done; another goes on. Every time there
 * must be one complete package and nothing left over. The moments are drawn from a seed, told when the test fails.
 */
import { fork, type ChildProcess } from "node:child_process";
import { once } from "node:events";
import path from "node:path";
import { ListObjectsV2Command } from "@aws-sdk/client-s3";
import { afterAll, beforeAll, expect, test } from "vitest";
import { settings } from "@/lib/server/settings";
import { storageClient } from "@/lib/server/storage";
import { Package, PackagePart } from "@/models";
import { seededRandom } from "../oracle/random";
import { qpdfFindings } from "../pdf/pdf-tools";
import { pagesText } from "../pdf/pdf-text";
import { askPackage, issuedJob, packageOf, resultBytes, type IssuedJob } from "./package-support";
import { endOfFile, newShop, withClient, type TestShop } from "./support";

const KILLS = 20;
const SHEETS = 6;
const SEED = 20_261_201;
const LONGEST_WAIT_MS = 120_000;

let shop: TestShop;
let job: IssuedJob;
const alive = new Set<ChildProcess>();

beforeAll(async () => {
  shop = await newShop();
  job = await issuedJob(shop, SHEETS);
}, 180_000);

afterAll(async () => {
  for (const worker of alive) worker.kill("SIGKILL");
  await endOfFile();
});

/** A worker process that has loaded and waits for its word. */
async function standby(): Promise<ChildProcess> {
  const worker = fork(path.resolve(import.meta.dirname, "package-worker.mjs"), {
    cwd: path.resolve(import.meta.dirname, "../.."),
    env: { ...process.env, WORK_QUEUE: "1", PACKAGE_SILENCE_S: "2", PACKAGE_THREADS: "2" },
    execArgv: [],
  });
  alive.add(worker);
  worker.once("exit", () => alive.delete(worker));
  const ended = once(worker, "exit").then(() => Promise.reject(new Error("A worker ended before it had loaded.")));
  ended.catch(() => undefined);
  await Promise.race([once(worker, "message"), ended]);
  return worker;
}

async function until<T>(what: string, look: () => Promise<T | null>): Promise<T> {
  const from = Date.now();
  for (;;) {
    const seen = await look();
    if (seen !== null) return seen;
    if (Date.now() - from > LONGEST_WAIT_MS) throw new Error(`Waited in vain: ${what}`);
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
}

const ready = (packageId: string) =>
  until("the package is ready", async () => {
    const one = await packageOf(packageId, shop.owner);
    expect(one.problem).toBeNull();
    return one.state === "ready" ? one : null;
  });

/** How many objects the shop has in the store. */
async function storedObjects(): Promise<number> {
  const found = await storageClient().send(new ListObjectsV2Command({ Bucket: settings().S3_BUCKET, Prefix: `${shop.shopId}/` }));
  expect(found.IsTruncated ?? false).toBe(false);
  return found.KeyCount ?? 0;
}

async function madeEvents(packageId: string): Promise<number> {
  return withClient("super", async (client) => {
    const found = await client.query("SELECT 1 FROM audit_events WHERE type = 'package.made' AND data::text LIKE $1", [`%${packageId}%`]);
    return found.rowCount ?? 0;
  });
}

test(`a worker killed ${KILLS} times at random moments always leaves one complete package`, { timeout: 1_200_000 }, async () => {
  const random = seededRandom(SEED);
  let worker = await standby();
  worker.send("begin");
  const from = Date.now();
  const first = await ready(await askPackage(job, shop.owner));
  const longest = Date.now() - from;
  const pages = first.pages;
  let next = await standby();
  const moments: string[] = [];
  for (let kill = 1; kill <= KILLS; kill += 1) {
    const before = await storedObjects();
    const packageId = await askPackage(job, shop.owner);
    await new Promise((resolve) => setTimeout(resolve, random() * longest));
    worker.kill("SIGKILL");
    await once(worker, "exit");
    const left = await Package.findOne({ where: { id: packageId }, rejectOnEmpty: true });
    moments.push(`${left.state} ${await PackagePart.count({ where: { packageId } })}`);
    worker = next;
    worker.send("begin");
    const loading = kill < KILLS ? standby() : null;
    const one = await ready(packageId);
    if (loading) next = await loading;
    await checkPackage(packageId, pages);
    expect(one.sheets).toBe(SHEETS);
    await until("its parts are gone", async () => ((await PackagePart.count({ where: { packageId } })) === 0 ? true : null));
    expect(await storedObjects(), `objects left behind by ${kill}: ${moments.at(-1)}`).toBe(before + 1);
  }
  // The moments must have met packages in the making, or the test would have shown nothing.
  expect(moments.filter((moment) => moment.startsWith("making")).length, moments.join("; ")).toBeGreaterThanOrEqual(KILLS / 4);
});

/** One result, told once, readable, with every sheet's pages in order. */
async function checkPackage(packageId: string, pages: number | null): Promise<void> {
  const bytes = await resultBytes(packageId);
  expect(await madeEvents(packageId)).toBe(1);
  expect(qpdfFindings(bytes)).toBe("");
  const texts = await pagesText(bytes);
  expect(texts).toHaveLength(pages ?? -1);
  const numbers = texts.flatMap((text) => sheetNumberOn(text) ?? []);
  expect(numbers).toEqual([...numbers].sort());
  expect(new Set(numbers).size).toBe(SHEETS);
}

/** The sheet number in a page's title block stands on a line of its own. */
function sheetNumberOn(text: string): string | null {
  return /^(\d{4})$/m.exec(text)?.[1] ?? null;
}
