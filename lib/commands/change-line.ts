/** A line's number and title, and putting it away or bringing it back. */
import type { z } from "zod";
import type { lineHeadSchema } from "@/lib/rules/forms";
import { storedDocument } from "@/lib/queries/stored-line";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { Line, Revision, Spool } from "@/models";
import { assertLineNumberFree } from "./add-line";
import { assertNotArchived } from "./save-line";
import { writeDocument } from "./write-document";

type LineHead = z.infer<typeof lineHeadSchema>;

/** Changes what the form names. A new number or title is a new version of the document. @throws Refusal 404, 409. */
export async function changeLine(context: CommandContext, lineId: string, form: LineHead): Promise<{ version: number }> {
  const line = await inShop(context.viewer).locked(Line, lineId, context.tx);
  context.unchanged();
  if (form.archived !== undefined && form.archived !== (line.archivedAt !== null)) await setArchived(context, line, form.archived);
  await rename(context, line, form);
  return { version: line.version };
}

async function rename(context: CommandContext, line: Line, form: LineHead): Promise<void> {
  const { number = line.number, title = line.title } = form;
  const what = [number === line.number ? [] : ["number"], title === line.title ? [] : ["title"]].flat();
  if (what.length === 0) return;
  assertNotArchived(line);
  await assertLineNumberFree(context.viewer, line.jobId, number, line.id, context.tx);
  await writeDocument(context, line, { ...storedDocument(line), number, title });
  context.audit({ type: "line.changed", data: { lineId: line.id, number, what } });
}

async function setArchived(context: CommandContext, line: Line, archived: boolean): Promise<void> {
  if (archived) await assertNothingIssued(context, line.id);
  else await assertLineNumberFree(context.viewer, line.jobId, line.number, line.id, context.tx);
  await line.update({ archivedAt: archived ? context.now : null }, { transaction: context.tx });
  context.audit({ type: "line.archived", data: { lineId: line.id, number: line.number, archived } });
}

async function assertNothingIssued({ viewer, tx }: CommandContext, lineId: string): Promise<void> {
  const shop = inShop(viewer);
  const spools = await shop.all(Spool, { lineId }, tx);
  const active = await shop.first(Revision, { spoolId: spools.map((spool) => spool.id), state: ["for-review", "for-fabrication", "as-built"] }, tx);
  if (active !== null) throw refuseConflict("This line has sheets for review or on the bench. Void or return them first.");
}
