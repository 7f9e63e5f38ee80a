/** From a sheet input to PDF bytes: composed and painted by the same code as the preview; and kept, for a revision. */
import { measureText } from "@/fonts/widths";
import { composeSheet, STATE_WORDS, type SheetInput } from "@/iso";
import { checkedWords } from "@/lib/rules/sign-off-words";
import type { ChainHead } from "@/lib/rules/audit-chain";
import { headText } from "@/lib/server/audit";
import type { CommandContext } from "@/lib/server/command";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { getObject, objectKey, putObject } from "@/lib/server/storage";
import { sha256Text } from "@/lib/server/tokens";
import { RevisionInput, RevisionSheet, type Revision } from "@/models";
import { paintSheet, type PaintInput } from "@/pdf/paint-sheet";
import { signatureRoom, signSheet } from "@/pdf/sign-sheet";
import type { SigningCertificate } from "./keep-certificate";

/** Equal inputs give equal bytes. The logo is read from the shop's store; one that is gone leaves its box empty. */
export async function renderSheet(member: ShopMember, input: SheetInput): Promise<Uint8Array> {
  return paintSheet(await paintInput(member, input));
}

/** The same sheet with the shop's signature in it, as of its time of issue. Equal inputs and certificates give equal bytes. */
async function renderSigned(member: ShopMember, input: SheetInput, { key, subject }: SigningCertificate): Promise<Uint8Array> {
  const signedAt = new Date(input.revision.issuedAt);
  const signature = { name: subject, reason: signatureReason(input), signedAt, roomBytes: signatureRoom(key) };
  return signSheet(await paintSheet({ ...(await paintInput(member, input)), signature }), key, signedAt);
}

/** What the signature says it stands for: the seal is the shop's, the approval a person's. */
function signatureReason({ revision }: SheetInput): string {
  return `Sheet ${revision.sheetNumber} revision ${revision.code} approved for fabrication by ${checkedWords(revision)}`;
}

async function paintInput({ shopId }: ShopMember, input: SheetInput): Promise<PaintInput> {
  const { logo } = input.titleBlock;
  return {
    pages: composeSheet(input, measureText),
    issuedAt: input.revision.issuedAt,
    title: sheetTitle(input),
    logo: logo === null ? null : await getObject(objectKey(shopId, logo.key)),
    author: input.titleBlock.shopName,
    subject: `Spool sheet, job ${input.titleBlock.jobNumber}, ${STATE_WORDS[input.revision.state]}`,
    keywords: input.revision.auditHead,
  };
}

/** "0007 4-CWS-1101 spool A revision B", as the PDF's title and file name carry it. */
export function sheetTitle({ document, spool, revision }: SheetInput): string {
  return [revision.sheetNumber || "DRAFT", document.number, `spool ${spool}`, `revision ${revision.code}`].join(" ");
}

/**
 * Freezes what a revision's sheet is made from, with the log's head in it, renders it once and keeps the bytes.
 * @param contentKey what a bench would notice of the spool; equal keys mean the same spool.
 * @param certificate signs the bytes that are kept; null for a sheet for review. @returns SHA-256 of the stored PDF.
 */
export async function storeSheet(
  context: CommandContext,
  revision: Revision,
  kind: "review" | "fabrication",
  input: SheetInput,
  contentKey: string,
  head: ChainHead,
  certificate: SigningCertificate | null,
): Promise<string> {
  const { viewer, tx, now } = context;
  const frozen: SheetInput = { ...input, revision: { ...input.revision, auditHead: headText(head) } };
  const text = JSON.stringify(frozen);
  const shop = inShop(viewer);
  await shop.add(RevisionInput, { revisionId: revision.id, kind, input: text, sha256: sha256Text(text), contentKey, at: now }, tx);
  const bytes = certificate === null ? await renderSheet(viewer, frozen) : await renderSigned(viewer, frozen, certificate);
  const stored = await putObject(viewer.shopId, bytes, "application/pdf");
  const values = { certificateId: certificate?.id ?? null, revisionId: revision.id, kind, sha256: stored.sha256, bytes: stored.bytes, objectKey: stored.key, auditSeq: head.seq, auditHash: head.hash, at: now };
  await shop.add(RevisionSheet, values, tx);
  return stored.sha256;
}
