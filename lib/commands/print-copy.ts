/** Makes a marked copy of a stored sheet for printing. The stored bytes are never touched; the copy's hash is kept. */
import { copyWord } from "@/lib/rules/copy-words";
import { markCopy } from "@/pdf/mark-copy";
import type { StoredSheet } from "@/lib/queries/stored-sheet";
import type { CommandContext } from "@/lib/server/command";
import { inShop } from "@/lib/server/scope";
import { sha256Hex } from "@/lib/server/storage";
import { SheetCopy } from "@/models";

/** @returns the bytes of the copy: the state across it when it is not one to work from, and who printed it when, at its foot. */
export async function printCopy(context: CommandContext, sheet: StoredSheet): Promise<Uint8Array> {
  const { viewer, tx, now } = context;
  const word = copyWord(sheet.state, sheet.hold);
  const bytes = await markCopy(sheet.bytes, { word, printedAt: now.toISOString(), printedBy: viewer.name });
  const sha256 = sha256Hex(bytes);
  const marked = word ?? "UNCONTROLLED COPY";
  await inShop(viewer).add(SheetCopy, { sheetId: sheet.sheetId, sha256, marked, at: now, by: viewer.personId }, tx);
  const { revisionId, sheetNumber, code, kind } = sheet;
  context.audit({ type: "sheet.copied", data: { revisionId, sheetNumber, code, kind, sha256, marked } });
  return bytes;
}
