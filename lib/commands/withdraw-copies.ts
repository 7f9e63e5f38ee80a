/** Somebody says that copies are out of use: taken off the bench, or deleted. Insert-only; said twice changes nothing. */
import { randomUUID } from "node:crypto";
import { Op } from "sequelize";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import type { CommandContext } from "@/lib/server/command";
import { refuseForbidden, refuseNotFound } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { CopyWithdrawal, Revision, RevisionSheet, SheetCopy, Spool } from "@/models";

/** @throws Refusal 404 when one of them is not the shop's, 403 for a fitter who marks another's. */
export async function withdrawCopies(context: CommandContext, copyIds: readonly string[]): Promise<void> {
  const { viewer, tx, now } = context;
  const shop = inShop(viewer);
  const ids = [...new Set(copyIds)];
  const copies = await shop.all(SheetCopy, { id: { [Op.in]: ids } }, tx);
  if (copies.length < ids.length) throw refuseNotFound();
  if (viewer.role === "fitter" && copies.some((copy) => copy.by !== viewer.personId)) {
    throw refuseForbidden("Fitters mark their own copies as withdrawn. An inspector, a detailer or the owner marks any.");
  }
  const done = new Set((await shop.all(CopyWithdrawal, { copyId: { [Op.in]: ids } }, tx)).map((one) => one.copyId));
  const open = copies.filter((copy) => !done.has(copy.id));
  if (open.length === 0) return context.unchanged();
  const rows = open.map((copy) => ({ shopId: viewer.shopId, id: randomUUID(), copyId: copy.id, at: now, by: viewer.personId }));
  await CopyWithdrawal.bulkCreate(rows, { ignoreDuplicates: true, transaction: tx });
  context.audit({ type: "copies.withdrawn", data: { copyIds: open.map((copy) => copy.id), sheets: await sheetsOf(context, open) } });
}

/** "0007 revision B", once each. */
async function sheetsOf({ viewer, tx }: CommandContext, copies: readonly SheetCopy[]): Promise<string[]> {
  const shop = inShop(viewer);
  const sheets = await shop.all(RevisionSheet, { id: { [Op.in]: copies.map((copy) => copy.sheetId) } }, tx);
  const revisions = await shop.all(Revision, { id: { [Op.in]: sheets.map((sheet) => sheet.revisionId) } }, tx);
  const spools = await shop.all(Spool, { id: { [Op.in]: revisions.map((revision) => revision.spoolId) } }, tx);
  const numbers = new Map(spools.map((spool) => [spool.id, sheetNumberText(spool.sheetNumber)]));
  return revisions.map((revision) => `sheet ${numbers.get(revision.spoolId) ?? ""} revision ${revision.code}`);
}
