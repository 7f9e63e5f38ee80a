/** What people do with a package once it is asked for: cancel it, take it, note that its recipient acknowledged it. */
import { randomUUID } from "node:crypto";
import { Op } from "sequelize";
import { packageSource } from "@/lib/queries/package-rows";
import { ORIGINAL, UNCONTROLLED } from "@/lib/rules/copies";
import { copyWord } from "@/lib/rules/copy-words";
import type { PackageReceiptForm } from "@/lib/rules/package-forms";
import { isOpenPackage, type PackageSource } from "@/lib/rules/packages";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict } from "@/lib/server/errors";
import { enqueue } from "@/lib/server/queue";
import { inShop } from "@/lib/server/scope";
import { CopyWithdrawal, Package, PackageReceipt, SheetCopy } from "@/models";

/** Whoever makes it stops and cleans up; the queue does so when nobody does. @throws Refusal 404, 409 when it has ended. */
export async function cancelPackage(context: CommandContext, packageId: string): Promise<void> {
  const { viewer, tx, now } = context;
  const one = await inShop(viewer).locked(Package, packageId, tx);
  if (!isOpenPackage(one.state)) throw refuseConflict("This package has ended. There is nothing to cancel.");
  await one.update({ state: "cancelled", worker: null, workerUntil: null, doneAt: now }, { transaction: tx });
  await enqueue("package", { shopId: viewer.shopId, packageId }, tx);
  context.audit({ type: "package.stopped", data: { packageId, title: one.title, reason: "Cancelled." } });
}

/**
 * Notes that the viewer takes the package: every sheet in it counts as printed by them, all or none. Who takes the same
 * file again while its copies are out in their name holds no more copies than before.
 * @param isBeginning false for a part of the file after its beginning, which is told once.
 */
export async function takePackage(context: CommandContext, one: Package, isBeginning: boolean): Promise<void> {
  const { viewer, tx, now } = context;
  const source = packageSource(one);
  const held = await heldSheets(context, one.id);
  const rows = copiesOf(source, one.sha256 ?? "").filter((copy) => !held.has(copy.sheetId));
  if (!isBeginning && rows.length === 0) return context.unchanged();
  await SheetCopy.bulkCreate(rows.map((copy) => ({ ...copy, shopId: viewer.shopId, id: randomUUID(), packageId: one.id, at: now, by: viewer.personId })), { transaction: tx });
  context.audit({ type: "package.downloaded", data: { packageId: one.id, title: one.title, count: source.sheets.length, sha256: one.sha256 ?? "" } });
}

/** The hash a copy is known by: that of the file it came in, or of the original itself. */
function copiesOf({ form, copies, sheets }: PackageSource, sha256: string) {
  const areOriginals = form === "zip" && copies === "originals";
  return sheets.map((sheet) => ({
    sheetId: sheet.sheetId,
    sha256: areOriginals ? sheet.sha256 : sha256,
    marked: areOriginals ? ORIGINAL : (copyWord(sheet.state, sheet.hold) ?? UNCONTROLLED),
  }));
}

async function heldSheets({ viewer, tx }: CommandContext, packageId: string): Promise<ReadonlySet<string>> {
  const copies = await inShop(viewer).all(SheetCopy, { packageId, by: viewer.personId }, tx);
  const back = new Set((await inShop(viewer).all(CopyWithdrawal, { copyId: { [Op.in]: copies.map((copy) => copy.id) } }, tx)).map((row) => row.copyId));
  return new Set(copies.filter((copy) => !back.has(copy.id)).map((copy) => copy.sheetId));
}

/** @throws Refusal 404; 409 when it is no transmittal, not ready, or acknowledged already. */
export async function noteReceipt(context: CommandContext, packageId: string, form: PackageReceiptForm): Promise<void> {
  const { viewer, tx, now } = context;
  const one = await inShop(viewer).locked(Package, packageId, tx);
  if (one.transmittal === null || one.state !== "ready") throw refuseConflict("Only a transmittal that was made can be acknowledged.");
  if ((await inShop(viewer).first(PackageReceipt, { packageId }, tx)) !== null) throw refuseConflict("This transmittal is acknowledged already.");
  await inShop(viewer).add(PackageReceipt, { packageId, ...form, by: viewer.personId, at: now }, tx);
  context.audit({ type: "package.acknowledged", data: { packageId, title: one.title, receivedBy: form.receivedBy, receivedOn: form.receivedOn } });
}
