/** A stored PDF of a revision, checked against its hash before it is handed out. */
import type { RevisionState } from "@/iso";
import { canDo } from "@/lib/rules/permissions";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import { refuseNotFound } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import type { SessionViewer } from "@/lib/server/session";
import { getObject } from "@/lib/server/storage";
import { Revision, RevisionSheet, Spool } from "@/models";

export interface StoredSheet {
  readonly sheetId: string;
  readonly revisionId: string;
  readonly sheetNumber: string;
  readonly code: string;
  readonly state: RevisionState;
  readonly hold: boolean;
  readonly kind: "review" | "fabrication";
  readonly sha256: string;
  /** Whether the bytes carry the shop's signature. */
  readonly signed: boolean;
  readonly bytes: Uint8Array;
  /** A file name for downloads: "sheet-0012-rev-B.pdf". */
  readonly fileName: string;
}

/**
 * The stored sheet of a revision.
 * @param kind null = the signed one, or the one for review when it was never signed. Those who may see issued sheets
 *   only never get one for review. @throws Refusal 404.
 */
export async function storedSheet(viewer: SessionViewer, revisionId: string, kind: "review" | "fabrication" | null): Promise<StoredSheet> {
  const shop = inShop(viewer);
  const revision = await shop.one(Revision, revisionId);
  const spool = await shop.one(Spool, revision.spoolId);
  const sheets = await shop.all(RevisionSheet, { revisionId });
  const wanted = kind ?? (sheets.some((sheet) => sheet.kind === "fabrication") ? "fabrication" : "review");
  const sheet = sheets.find((s) => s.kind === wanted);
  if (sheet === undefined || (wanted === "review" && !canDo(viewer.role, "revisions.review"))) throw refuseNotFound();
  const bytes = await getObject(sheet.objectKey);
  if (bytes === null) throw new Error("A stored sheet is missing from the object store.");
  const sheetNumber = sheetNumberText(spool.sheetNumber);
  const { code, state, hold } = revision;
  const fileName = `sheet-${sheetNumber}-rev-${code}${wanted === "review" ? "-review" : ""}.pdf`;
  return { sheetId: sheet.id, revisionId, sheetNumber, code, state, hold, kind: wanted, sha256: sheet.sha256, signed: sheet.certificateId !== null, bytes, fileName };
}
