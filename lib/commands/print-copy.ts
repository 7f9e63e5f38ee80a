/** Makes a marked copy of a stored sheet for printing. The stored bytes are never touched; the copy's hash is kept. */
import { SHEET_PART_WORDS, type SheetPart } from "@/iso";
import { ORIGINAL, UNCONTROLLED } from "@/lib/rules/copies";
import { copyWord } from "@/lib/rules/copy-words";
import { markCopy } from "@/pdf/mark-copy";
import type { StoredSheet } from "@/lib/queries/stored-sheet";
import type { CommandContext } from "@/lib/server/command";
import { inShop } from "@/lib/server/scope";
import { sha256Hex } from "@/lib/server/storage";
import { SheetCopy } from "@/models";

/** @returns the bytes of the copy: the state across it when it is not one to work from, and who printed it when, at its foot. */
export async function printCopy(context: CommandContext, sheet: StoredSheet): Promise<Uint8Array> {
  const { viewer, now } = context;
  const word = copyWord(sheet.state, sheet.hold);
  const original = { sha256: sheet.sha256, signed: sheet.signed };
  const bytes = await markCopy(sheet.bytes, { word, printedAt: now.toISOString(), printedBy: viewer.name, original });
  const sha256 = sha256Hex(bytes);
  const marked = word ?? UNCONTROLLED;
  await keepCopy(context, sheet, sha256, marked);
  context.audit({ type: "sheet.copied", data: { ...namesOf(sheet), sha256, marked } });
  return bytes;
}

/** Notes that the viewer printed parts of an issued sheet's set: they are as good as a copy of it, and have to come back like one. */
export async function keepSet(context: CommandContext, sheet: StoredSheet, parts: readonly SheetPart[], bytes: Uint8Array): Promise<void> {
  const sha256 = sha256Hex(bytes);
  const marked = copyWord(sheet.state, sheet.hold) ?? UNCONTROLLED;
  await keepCopy(context, sheet, sha256, marked);
  const { revisionId, sheetNumber, code } = sheet;
  context.audit({ type: "set.printed", data: { revisionId, sheetNumber, code, parts: parts.map((part) => SHEET_PART_WORDS[part]), sha256, marked } });
}

/** Notes that the viewer takes the stored bytes, which carry no mark. @returns them as they are. */
export async function downloadOriginal(context: CommandContext, sheet: StoredSheet): Promise<Uint8Array> {
  await keepCopy(context, sheet, sheet.sha256, ORIGINAL);
  context.audit({ type: "sheet.downloaded", data: { ...namesOf(sheet), sha256: sheet.sha256 } });
  return sheet.bytes;
}

async function keepCopy({ viewer, tx, now }: CommandContext, sheet: StoredSheet, sha256: string, marked: string): Promise<void> {
  await inShop(viewer).add(SheetCopy, { sheetId: sheet.sheetId, sha256, marked, at: now, by: viewer.personId }, tx);
}

function namesOf({ revisionId, sheetNumber, code, kind }: StoredSheet) {
  return { revisionId, sheetNumber, code, kind };
}
