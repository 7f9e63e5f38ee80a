/** New lines: an empty one with the job's defaults, or a copy of another. */
import { col, fn, Op, where, type Transaction } from "sequelize";
import { emptyMarks, newRunDocument, type RunDocument } from "@/iso";
import type { LineNewForm } from "@/lib/rules/forms";
import { storedDocument } from "@/lib/queries/stored-line";
import type { Actor, CommandContext } from "@/lib/server/command";
import { refuseConflict } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { Job, Line } from "@/models";
import { computeLine, documentFacts, noteTouch } from "./write-document";
import { syncSpools } from "./sync-spools";

/** A line with no points yet. @throws Refusal 404 without the job, 409 when the number is taken in it. */
export async function addLine(context: CommandContext, jobId: string, form: LineNewForm): Promise<{ id: string }> {
  const job = await inShop(context.viewer).one(Job, jobId, context.tx);
  const document = { ...newRunDocument(form.number, job.settings.defaults), title: form.title };
  return storeLine(context, jobId, document, null);
}

/** A copy of a line in the same job: same run, fresh marks. @throws Refusal 404, 409. */
export async function copyLine(context: CommandContext, lineId: string, form: LineNewForm): Promise<{ id: string }> {
  const line = await inShop(context.viewer).one(Line, lineId, context.tx);
  return storeLine(context, line.jobId, { ...storedDocument(line), number: form.number, title: form.title }, lineId);
}

/** Stores a checked document as a new line. */
export async function storeLine(context: CommandContext, jobId: string, document: RunDocument, copiedFrom: string | null): Promise<{ id: string }> {
  const { viewer, tx, now } = context;
  await assertLineNumberFree(viewer, jobId, document.number, null, tx);
  const { marks, model } = await computeLine(context, document, emptyMarks());
  const values = {
    ...documentFacts(document),
    jobId,
    marks: JSON.stringify(marks),
    version: 1,
    createdAt: now,
    createdBy: viewer.personId,
    updatedAt: now,
    updatedBy: viewer.personId,
  };
  const line = await inShop(viewer).add(Line, values, tx);
  await syncSpools(context, line.id, model);
  await noteTouch(context, line.id, 1);
  context.audit({ type: "line.created", data: { lineId: line.id, number: document.number, jobId, copiedFrom } });
  return { id: line.id };
}

/** @throws Refusal 409 when another line of the job has the number. */
export async function assertLineNumberFree(viewer: Actor, jobId: string, number: string, exceptId: string | null, tx: Transaction): Promise<void> {
  const taken = await Line.findOne({
    where: {
      shopId: viewer.shopId,
      jobId,
      archivedAt: null,
      [Op.and]: [where(fn("lower", col("number")), number.toLowerCase())],
      ...(exceptId === null ? {} : { id: { [Op.ne]: exceptId } }),
    },
    transaction: tx,
  });
  if (taken !== null) throw refuseConflict(`This job has a line ${taken.number} already.`, { fields: { number: "This number is taken." } });
}
