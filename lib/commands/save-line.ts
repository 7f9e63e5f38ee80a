/** Saves a line's document, when nobody saved another since the editor read it. */
import type { SaveLineConflict, SaveLineResult } from "@/lib/rules/api-types";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { sha256Text } from "@/lib/server/tokens";
import { Line, Person } from "@/models";
import { assertLineNumberFree } from "./add-line";
import { checkedDocument, writeDocument } from "./write-document";

/**
 * @throws Refusal 404; 400 when it is no run document; 409 SaveLineConflict when a newer version is there, which stays
 * as it is; 409 when the line is archived or its new number is taken.
 */
export async function saveLine(context: CommandContext, lineId: string, sent: { readonly version: number; readonly document: unknown }): Promise<SaveLineResult> {
  const { viewer, tx, now } = context;
  const line = await inShop(viewer).locked(Line, lineId, tx);
  const document = checkedDocument(sent.document);
  assertNotArchived(line);
  if (line.version !== sent.version) throw await conflictOf(line, context);
  if (JSON.stringify(document) === line.document) {
    context.unchanged();
    return { version: line.version, savedAt: line.updatedAt.toISOString() };
  }
  if (document.number !== line.number) await assertLineNumberFree(viewer, line.jobId, document.number, line.id, tx);
  await writeDocument(context, line, document);
  context.audit({ type: "line.saved", data: { lineId, number: line.number, version: line.version, sha256: sha256Text(line.document) } });
  return { version: line.version, savedAt: now.toISOString() };
}

/** @throws Refusal 409 for a line that was put away. */
export function assertNotArchived(line: Line): void {
  if (line.archivedAt !== null) throw refuseConflict("This line is archived. Bring it back before changing it.");
}

async function conflictOf(line: Line, { tx }: CommandContext) {
  const person = await Person.findOne({ where: { id: line.updatedBy }, transaction: tx });
  const by = person?.name ?? "Somebody";
  const at = line.updatedAt.toISOString();
  const body: Omit<SaveLineConflict, "message" | "code" | "fields"> = { currentVersion: line.version, by, at };
  return refuseConflict(`${by} saved this line in the meantime. Your version was not saved over it.`, { ...body });
}
