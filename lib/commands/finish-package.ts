/**
 * What the queue does with a package's rows around the making. One worker has it at a time, for as long as it keeps
 * saying so; when it falls silent another takes over and goes on from the parts that are stored. The result is written once,
 * by whoever has it then. Times are the database's, so that the clocks of several machines need not agree.
 */
import { QueryTypes, type Transaction } from "sequelize";
import { packageSource } from "@/lib/queries/package-rows";
import type { PackageSource } from "@/lib/rules/packages";
import { runCommand, type CommandContext } from "@/lib/server/command";
import { getDb } from "@/lib/server/database";
import { enqueue } from "@/lib/server/queue";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { settings } from "@/lib/server/settings";
import { deleteObject, type StoredObject } from "@/lib/server/storage";
import { Package, PackagePart } from "@/models";

/** How long a worker is believed to be at it after its last word, as PostgreSQL writes it. */
const believed = () => `interval '${settings().PACKAGE_SILENCE_S} seconds'`;
/** Workers that may die over one package before it is given up. */
export const MOST_TAKES = 60;
/** An object put by a worker that died may arrive in the store this long after, ms: the longest a put is waited for, and some. */
const ON_ITS_WAY_MS = 330_000;

/** One worker's hold on a package. */
export interface PackageHold extends ShopMember {
  readonly packageId: string;
  readonly worker: string;
}

export type TakenUp =
  | { readonly kind: "mine"; readonly source: PackageSource; readonly takes: number }
  /** Another worker is at it. */
  | { readonly kind: "busy" }
  | { readonly kind: "ended" };

/** Takes a package up, also one whose worker fell silent. */
export async function takeUpPackage(hold: PackageHold): Promise<TakenUp> {
  return runCommand(null, "unlogged", async ({ tx }) => {
    const taken = await updateRow(hold, tx,
      `state = 'making', worker = $worker, worker_until = now() + ${believed()}, takes = takes + 1`,
      `(state = 'waiting' OR (state = 'making' AND worker_until < now()))`);
    const one = await inShop(hold).one(Package, hold.packageId, tx);
    if (taken) return { kind: "mine", source: packageSource(one), takes: one.takes };
    return { kind: one.state === "waiting" || one.state === "making" ? "busy" : "ended" };
  });
}

/** Says that the worker is still at it. @returns false when it is not its any more: cancelled, or taken over. */
export async function keepPackage(hold: PackageHold): Promise<boolean> {
  return runCommand(null, "unlogged", ({ tx }) => updateRow(hold, tx, `state = 'making', worker = $worker, worker_until = now() + ${believed()}`, MINE_STILL));
}

const MINE = `state = 'making' AND worker = $worker`;
/** A worker that was slow to say a word has it still, as long as nobody else took it up. */
const MINE_STILL = `((${MINE}) OR state = 'waiting')`;

async function updateRow({ shopId, packageId, worker }: PackageHold, transaction: Transaction, set: string, where: string): Promise<boolean> {
  const bind = { shopId, packageId, ...(/\$worker/.test(set + where) ? { worker } : {}) };
  const rows = await getDb().query<{ id: string }>(`UPDATE packages SET ${set} WHERE shop_id = $shopId AND id = $packageId AND ${where} RETURNING id`, { bind, type: QueryTypes.SELECT, transaction });
  return rows.length > 0;
}

/** Gives it back to be taken up again, after trouble that may pass. */
export async function releasePackage(hold: PackageHold): Promise<void> {
  await runCommand(null, "unlogged", ({ tx }) => updateRow(hold, tx, "state = 'waiting', worker = NULL, worker_until = NULL", MINE));
}

/** Runs with the row locked when the package is still this worker's; null otherwise. */
async function whileMine<R>(hold: PackageHold, work: (one: Package, context: CommandContext<null>) => Promise<R>): Promise<R | null> {
  return runCommand<null, R | null>(null, "unlogged", async (context) => {
    const isMine = await updateRow(hold, context.tx, `state = 'making', worker = $worker, worker_until = now() + ${believed()}`, MINE_STILL);
    return isMine ? work(await inShop(hold).locked(Package, hold.packageId, context.tx), context) : null;
  });
}

/** Parts that are stored, in order. */
export async function storedParts(hold: ShopMember & { readonly packageId: string }): Promise<PackagePart[]> {
  const parts = await inShop(hold).all(PackagePart, { packageId: hold.packageId }, null, { order: [["ordinal", "ASC"]] });
  return parts.filter((part) => part.storedAt !== null);
}

export interface MadePart {
  readonly ordinal: number;
  readonly sheets: number;
  readonly pages: number;
  readonly objectKey: string;
}

/** Notes where a part is about to lie. @returns the row's id; null when the package is not this worker's any more. */
export async function announcePart(hold: PackageHold, part: MadePart): Promise<string | null> {
  return whileMine(hold, async (one, { tx }) => {
    const { ordinal, objectKey } = part;
    const known = await inShop(hold).first(PackagePart, { packageId: one.id, ordinal, objectKey }, tx);
    return (known ?? (await inShop(hold).add(PackagePart, { packageId: one.id, ...part }, tx))).id;
  });
}

/** Says that a part lies where it was announced. */
export async function confirmPart(hold: PackageHold, partId: string): Promise<boolean> {
  const done = await whileMine(hold, async (_, { tx, now }) => {
    const part = await inShop(hold).one(PackagePart, partId, tx);
    if (part.storedAt === null) await part.update({ storedAt: now }, { transaction: tx });
    return true;
  });
  return done ?? false;
}

/** Notes where the result is about to lie. @returns false when the package is not this worker's any more. */
export async function announceResult(hold: PackageHold, { key }: StoredObject): Promise<boolean> {
  const done = await whileMine(hold, async (one, { tx }) => {
    await one.update({ objectKey: key }, { transaction: tx });
    return true;
  });
  return done ?? false;
}

/** The one result. @returns false when the package is not this worker's any more: then nothing is written. */
export async function finishPackage(hold: PackageHold, { key, sha256, bytes }: StoredObject, pages: number | null): Promise<boolean> {
  const done = await whileMine(hold, async (one, { tx, now, audit }) => {
    await one.update({ state: "ready", worker: null, workerUntil: null, objectKey: key, sha256, bytes, pages, doneAt: now }, { transaction: tx });
    audit({ type: "package.made", data: { packageId: one.id, title: one.title, count: packageSource(one).sheets.length, sha256 } }, { shopId: hold.shopId, actor: one.askedBy });
    return true;
  });
  return done ?? false;
}

/** Ends a package that cannot be made, with the sentence its page shows. */
export async function failPackage(hold: PackageHold, problem: string): Promise<void> {
  await whileMine(hold, async (one, { tx, now, audit }) => {
    await one.update({ state: "failed", problem, worker: null, workerUntil: null, doneAt: now }, { transaction: tx });
    audit({ type: "package.stopped", data: { packageId: one.id, title: one.title, reason: problem } }, { shopId: hold.shopId, actor: one.askedBy });
    return true;
  });
}

/**
 * Removes what an ended package left in the store: its parts, and a result that was announced and is none. Safe to run twice.
 * @param isOwn nobody but the caller put anything there lately.
 * @returns false when a dead worker's object may still arrive: to be run again later.
 */
export async function cleanPackage(member: ShopMember, packageId: string, isOwn: boolean): Promise<boolean> {
  const one = await inShop(member).one(Package, packageId);
  if (one.doneAt === null) return true;
  const isSettled = isOwn || Date.now() - one.doneAt.getTime() > ON_ITS_WAY_MS;
  const parts = await inShop(member).all(PackagePart, { packageId });
  const resultKey = one.state === "ready" ? null : one.objectKey;
  for (const part of parts) {
    await deleteObject(part.objectKey);
    if (isSettled || part.storedAt !== null) await part.destroy();
  }
  if (resultKey !== null) await deleteObject(resultKey);
  return isSettled || (resultKey === null && parts.every((part) => part.storedAt !== null));
}

/**
 * Puts packages whose worker fell silent back into the queue, of every shop, and those that ended without being cleaned up after.
 * @returns how many.
 */
export async function requeueSilentPackages(): Promise<number> {
  return runCommand(null, "unlogged", async ({ tx }) => {
    const silent = await getDb().query<PackageName>(
      `UPDATE packages SET state = 'waiting', worker = NULL, worker_until = NULL WHERE state = 'making' AND worker_until < now() RETURNING shop_id AS "shopId", id AS "packageId"`,
      { type: QueryTypes.SELECT, transaction: tx },
    );
    const unclean = await getDb().query<PackageName>(
      `SELECT DISTINCT p.shop_id AS "shopId", p.id AS "packageId" FROM package_parts t JOIN packages p ON p.shop_id = t.shop_id AND p.id = t.package_id
       WHERE p.done_at < now() - ${believed()} AND (t.stored_at IS NOT NULL OR p.done_at < now() - interval '${ON_ITS_WAY_MS} milliseconds')`,
      { type: QueryTypes.SELECT, transaction: tx },
    );
    for (const row of [...silent, ...unclean]) await enqueue("package", row, tx);
    return silent.length;
  });
}

interface PackageName {
  readonly shopId: string;
  readonly packageId: string;
}
