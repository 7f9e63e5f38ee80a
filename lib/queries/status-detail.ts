/** What anybody who holds a sheet may know of it, by the token in its QR code. */
import { Op } from "sequelize";
import type { StatusDetail } from "@/lib/rules/api-types";
import { ORIGINAL } from "@/lib/rules/copies";
import { isLive } from "@/lib/rules/revision-rules";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import { getDb } from "@/lib/server/database";
import { refuseNotFound } from "@/lib/server/errors";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { Line, Revision, RevisionSheet, SheetCopy, Shop, ShopCertificate, Spool } from "@/models";

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
  const sheets = await shop.all(RevisionSheet, { revisionId: revision.id }, null, { order: [["at", "ASC"]] });
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
    sheets: await hashesOf(member, sheets),
    signature: await signatureOf(member, sheets),
  };
}

/** Hashes of the stored PDFs and of every marked copy of them. A download of the stored bytes is no other file. */
async function hashesOf(member: ShopMember, sheets: readonly RevisionSheet[]): Promise<StatusDetail["sheets"]> {
  const copies = await inShop(member).all(SheetCopy, { sheetId: { [Op.in]: sheets.map((sheet) => sheet.id) }, marked: { [Op.ne]: ORIGINAL } });
  const kindOf = new Map(sheets.map((sheet) => [sheet.id, sheet.kind]));
  return [
    ...sheets.map(({ sha256, kind, at }) => ({ sha256, kind, marked: null, at: at.toISOString() })),
    ...copies.map(({ sha256, sheetId, marked, at }) => ({ sha256, kind: kindOf.get(sheetId) ?? ("fabrication" as const), marked, at: at.toISOString() })),
  ];
}

async function signatureOf(member: ShopMember, sheets: readonly RevisionSheet[]): Promise<StatusDetail["signature"]> {
  const signed = sheets.find((sheet) => sheet.certificateId !== null);
  if (signed === undefined) return null;
  const { subject, fingerprint } = await inShop(member).one(ShopCertificate, signed.certificateId ?? "");
  return { sha256: signed.sha256, subject, fingerprint };
}
