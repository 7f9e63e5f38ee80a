/**
 * One job of the package queue. Sheets are prepared part by part in threads, each part stored as soon as it is made; a
 * worker that is killed leaves its parts, and the next goes on from there. Whatever happens, one result is written at most.
 */
import { randomUUID } from "node:crypto";
import { announcePart, cleanPackage, confirmPart, failPackage, finishPackage, keepPackage, MOST_TAKES, releasePackage, storedParts, takeUpPackage, type PackageHold, type TakenUp } from "@/lib/commands/finish-package";
import { storePackage } from "@/lib/commands/store-package";
import { sheetWorks } from "@/lib/queries/package-work";
import { log } from "@/lib/server/log";
import type { QueueData } from "@/lib/server/queue";
import { settings } from "@/lib/server/settings";
import { deleteObject, objectKey, putObject, sha256Hex } from "@/lib/server/storage";
import { packageThreads } from "./package-threads";

type PackageSource = Extract<TakenUp, { kind: "mine" }>["source"];

/** Words to the others that this worker is at it, in the time it is believed without one. */
const WORDS_IN_SILENCE = 4;
/** Trouble this often in a row ends a package. */
const MOST_TROUBLES = 8;

/** Safe to run twice, also at once: one worker has a package at a time, and one that has ended stays as it is. */
export async function runPackageJob({ shopId, packageId }: QueueData["package"]): Promise<void> {
  const hold: PackageHold = { shopId, packageId, worker: randomUUID() };
  const taken = await takeUpPackage(hold);
  if (taken.kind === "busy") return;
  if (taken.kind === "mine") {
    if (taken.takes > MOST_TAKES) await failPackage(hold, "It was begun again and again and never finished.");
    else await make(hold, taken.source, taken.takes);
  }
  if (!(await cleanPackage(hold, packageId, taken.kind === "mine"))) throw new Error("Something of a package may still be on its way into the store.");
}

async function make(hold: PackageHold, source: PackageSource, takes: number): Promise<void> {
  const wanted = new AbortController();
  const words = setInterval(() => {
    keepPackage(hold).then((mine) => {
      if (!mine) wanted.abort();
    }, () => undefined);
  }, (settings().PACKAGE_SILENCE_S * 1000) / WORDS_IN_SILENCE);
  try {
    await prepareParts(hold, source, wanted);
    if (wanted.signal.aborted) return;
    await packageThreads().keepOne();
    await join(hold, source);
  } catch (error) {
    log.warn({ packageId: hold.packageId, takes, error }, "a package could not be made");
    if (takes >= MOST_TROUBLES) return await failPackage(hold, "Its sheets could not be put together. Ask for it again; if it stays so, tell the owner of your shop.");
    await releasePackage(hold);
    throw error;
  } finally {
    clearInterval(words);
  }
}

/** Prepares what is not stored yet, as many parts at once as there are threads. */
async function prepareParts(hold: PackageHold, source: PackageSource, wanted: AbortController): Promise<void> {
  const stored = new Set((await storedParts(hold)).map((part) => part.ordinal));
  const open = Array.from({ length: Math.ceil(source.sheets.length / source.partSheets) }, (_, ordinal) => ordinal).filter((ordinal) => !stored.has(ordinal));
  const lane = async () => {
    while (!wanted.signal.aborted) {
      const ordinal = open.shift();
      if (ordinal === undefined) return;
      if (!(await preparePart(hold, source, ordinal))) wanted.abort();
    }
  };
  await Promise.all(Array.from({ length: packageThreads().most }, lane));
}

/** @returns false when the package is not this worker's any more. */
async function preparePart(hold: PackageHold, source: PackageSource, ordinal: number): Promise<boolean> {
  const first = ordinal * source.partSheets;
  const sheets = await sheetWorks(hold, source, first, Math.min(first + source.partSheets, source.sheets.length));
  const { sheets: _all, ...facts } = source;
  const { bytes, pages } = await packageThreads().run({ kind: "part", packageId: hold.packageId, source: facts, sheets }, sheets.map(({ stored }) => stored.buffer as ArrayBuffer));
  const key = objectKey(hold.shopId, sha256Hex(bytes));
  const partId = await announcePart(hold, { ordinal, sheets: sheets.length, pages, objectKey: key });
  if (partId === null) return false;
  await putObject(hold.shopId, bytes, "application/octet-stream");
  const isKept = await confirmPart(hold, partId);
  if (!isKept) await deleteObject(key);
  return isKept;
}

async function join(hold: PackageHold, source: PackageSource): Promise<void> {
  const stored = await storePackage(hold, source, (task, transfer) => packageThreads().run(task, transfer));
  if (stored === null) return;
  const isDone = await finishPackage(hold, stored.object, stored.pages);
  if (!isDone) await deleteObject(stored.object.key);
}
