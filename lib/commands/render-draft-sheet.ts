/** The sheet of a spool as it would be now, DRAFT across it. Nothing is kept of it. */
import type { SheetSize } from "@/iso";
import { draftSheetInput, spoolCase } from "@/lib/queries/draft-sheet";
import type { ShopMember } from "@/lib/server/scope";
import { renderSheet, sheetTitle } from "./render-sheet";

/** @throws Refusal 404 when the shop has no such spool. */
export async function renderDraftSheet(member: ShopMember, spoolId: string, size: SheetSize | null): Promise<{ readonly name: string; readonly bytes: Uint8Array }> {
  const input = await draftSheetInput(member, await spoolCase(member, spoolId), size, new Date());
  return { name: `${sheetTitle(input)}.pdf`, bytes: await renderSheet(member, input) };
}
