/** What anybody who holds a sheet may know of it, by the token in its QR code. */
import { Op } from "sequelize";
import type { StatusDetail } from "@/lib/rules/api-types";
import { isLive } from "@/lib/rules/revision-rules";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import { getDb } from "@/lib/server/database";
import { refuseNotFound } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { Line, Revision, RevisionSheet, SheetCopy, Shop, Spool } from "@/models";

/** @throws Refusal 404 for a token that is none. */
export async function statusDetail(token: string): Promise<StatusDetail> {
  getDb();
  const revision = await Revision.findOne({ where: { statusToken: token } });
  if (revision === null) throw refuseNotFound();
  const member = { shopId: revision.shopId };
  const shop = inShop(member);
  const spool = await shop.one(Spool, revision.spoolId);
  const line = await shop.one(Line, spool.lineId);
  const live = (await shop.all(Revision, { spoolId: spool.id })).find((r) => isLive(r.state));
  const owner = await Shop.findOne({ where: { id: revision.shopId }, rejectOnEmpty: true });
  return {
    sheetNumber: sheetNumberText(spool.sheetNumber),
    shop: owner.name,
    line: line.number,
    spool: spool.letter,
    code: revision.code,
    state: revision.state,
    hold: revision.hold,
    current: live?.id === revision.id && !revision.hold,
    issuedAt: (revision.signedAt ?? revision.submittedAt).toISOString(),
    liveCode: live === undefined || live.id === revision.id ? null : live.code,
    sheets: await hashesOf(member, revision.id),
  };
}

/** Hashes of the stored PDFs and of every marked copy of them. */
async function hashesOf(member: { shopId: string }, revisionId: string): Promise<StatusDetail["sheets"]> {
  const shop = inShop(member);
  const sheets = await shop.all(RevisionSheet, { revisionId }, null, { order: [["at", "ASC"]] });
  const copies = await shop.all(SheetCopy, { sheetId: { [Op.in]: sheets.map((sheet) => sheet.id) } });
  const kindOf = new Map(sheets.map((sheet) => [sheet.id, sheet.kind]));
  return [
    ...sheets.map(({ sha256, kind }) => ({ sha256, kind })),
    ...copies.map((copy) => ({ sha256: copy.sha256, kind: kindOf.get(copy.sheetId) ?? ("fabrication" as const) })),
  ];
}
