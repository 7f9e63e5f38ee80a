/** Rows of revisions as pages show them, and as the revision block of a sheet prints them. */
import { Op, type Transaction } from "sequelize";
import type { RevisionRow, SheetInput } from "@/iso";
import type { RevisionSummary } from "@/lib/rules/api-types";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { settings } from "@/lib/server/settings";
import { LineTouch, Revision, RevisionInput, RevisionSheet } from "@/models";
import { peopleNames } from "./people-names";

/** Path of a revision's public status page. */
export function statusPathOf(revision: Pick<Revision, "statusToken">): string {
  return `/status/${revision.statusToken}`;
}

/** Its absolute address, as the QR code carries it. */
export function statusUrlOf(statusToken: string): string {
  return `${settings().BASE_URL}/status/${statusToken}`;
}

/** All revisions of a spool, oldest first. */
export function revisionsOf(member: ShopMember, spoolId: string, tx: Transaction | null = null): Promise<Revision[]> {
  return inShop(member).all(Revision, { spoolId }, tx, { order: [["ordinal", "ASC"]] });
}

/** The summaries of revisions, in the order given. */
export async function revisionSummaries(member: ShopMember, revisions: readonly Revision[], tx: Transaction | null = null): Promise<RevisionSummary[]> {
  if (revisions.length === 0) return [];
  const ids = revisions.map((revision) => revision.id);
  const sheets = await inShop(member).all(RevisionSheet, { revisionId: { [Op.in]: ids } }, tx, { order: [["at", "ASC"]] });
  const name = await peopleNames(revisions.flatMap((revision) => [revision.submittedBy, revision.signedBy]), tx);
  return revisions.map((revision) => ({
    id: revision.id,
    spoolId: revision.spoolId,
    code: revision.code,
    state: revision.state,
    hold: revision.hold,
    description: revision.description,
    submittedBy: name(revision.submittedBy),
    submittedAt: revision.submittedAt.toISOString(),
    signedBy: revision.signedBy === null ? null : name(revision.signedBy),
    signedAt: revision.signedAt?.toISOString() ?? null,
    returnReason: revision.returnReason,
    holdReason: revision.holdReason,
    sheets: sheets
      .filter((sheet) => sheet.revisionId === revision.id)
      .map((sheet) => ({ id: sheet.id, kind: sheet.kind, sha256: sheet.sha256, bytes: sheet.bytes, at: sheet.at.toISOString() })),
    statusPath: statusPathOf(revision),
  }));
}

/** Earlier signed revisions as rows of the revision block, oldest first. */
export async function revisionBlock(revisions: readonly Revision[], tx: Transaction | null = null): Promise<RevisionRow[]> {
  const signed = revisions.filter((revision) => revision.signedBy !== null);
  const name = await peopleNames(signed.flatMap((revision) => [revision.submittedBy, revision.signedBy]), tx);
  return signed.map((revision) => ({
    code: revision.code,
    description: revision.description,
    date: dateOf(revision.signedAt ?? revision.submittedAt),
    by: name(revision.submittedBy),
    checked: name(revision.signedBy),
    approved: name(revision.signedBy),
  }));
}

/** YYYY-MM-DD of a time. */
export function dateOf(time: Date): string {
  return time.toISOString().slice(0, 10);
}

/** The frozen input of a revision: as signed when it was, else as submitted. @throws when none is stored. */
export async function frozenInput(member: ShopMember, revisionId: string, tx: Transaction | null = null): Promise<{ input: SheetInput; sha256: string }> {
  const rows = await inShop(member).all(RevisionInput, { revisionId }, tx);
  const row = rows.find((r) => r.kind === "fabrication") ?? rows.find((r) => r.kind === "review");
  if (row === undefined) throw new Error("A revision without its frozen input.");
  return { input: JSON.parse(row.input) as SheetInput, sha256: row.sha256 };
}

/** Everyone who touched the line after the version of the spool's last signed revision, up to this one's. */
export async function touchedBy(member: ShopMember, lineId: string, revisions: readonly Revision[], upTo: number, tx: Transaction | null = null): Promise<string[]> {
  const signed = revisions.filter((revision) => revision.signedBy !== null && revision.lineVersion < upTo);
  const since = Math.max(0, ...signed.map((revision) => revision.lineVersion));
  const touches = await inShop(member).all(LineTouch, { lineId, version: { [Op.gt]: since, [Op.lte]: upTo } }, tx);
  return [...new Set(touches.map((touch) => touch.personId))];
}
