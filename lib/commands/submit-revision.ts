/**
 * Submits a spool for review: freezes the sheet input, gives the spool its sheet number once, renders the PDF with its
 * state across it and mails those who may sign. From here on the line's marks stick.
 */
import { QueryTypes } from "sequelize";
import { measureText } from "@/fonts/widths";
import { buildModel, nextMarks, proposeView, type Model, type SheetInput, type Spool as ModelSpool } from "@/iso";
import { changedPointIds, sheetChanges } from "@/lib/rules/document-diff";
import type { SubmitForm } from "@/lib/rules/forms";
import { isLive, revisionCodeNext, submitRefusal } from "@/lib/rules/revision-rules";
import { submittedMail } from "@/lib/rules/revision-mails";
import { spoolStops } from "@/lib/rules/spool-stops";
import { dateOf, frozenInput, revisionBlock, revisionsOf, statusUrlOf } from "@/lib/queries/revision-facts";
import { sheetInputOf, sheetSourceOf, type SheetSource } from "@/lib/queries/sheet-input";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import type { CommandContext } from "@/lib/server/command";
import { getDb } from "@/lib/server/database";
import { refuseConflict } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { newStatusToken, sha256Text } from "@/lib/server/tokens";
import { Line, Revision, Spool } from "@/models";
import { keepSheet, mailFacts, namedIn, tell } from "./revision-desk";

/**
 * @throws Refusal 404 for another shop's spool, 409 when a revision is open already, nothing changed since the live
 * one, or a problem of the spool stops it.
 */
export async function submitRevision(context: CommandContext, spoolId: string, form: SubmitForm): Promise<{ revisionId: string; code: string; sheetNumber: string }> {
  const { viewer, tx } = context;
  const shop = inShop(viewer);
  const spool = await shop.locked(Spool, spoolId, tx);
  const line = await shop.locked(Line, spool.lineId, tx);
  const before = await revisionsOf(viewer, spoolId, tx);
  const source = await stickySource(context, line);
  const model = buildModel(source.document, source.marks, source.takeOuts);
  const content = submittable(context, model, spool, before);
  const live = before.find((revision) => isLive(revision.state));
  const old = live === undefined ? null : (await frozenInput(viewer, live.id, tx)).input;
  const contentSha256 = sha256Text(content.content);
  if (live !== undefined && old !== null) assertChanged(live, contentSha256, old, source);
  await giveSheetNumber(context, spool);
  const revision = await addRevision(context, { spool, line, before, form, contentSha256 });
  const desk = { revision, spool, line };
  const head = await logSubmission(context, desk, contentSha256);
  const changed = changedPointIds(sheetChanges(old, sheetInputOf(source, spool.letter, form.size, BLANK)));
  const facts = await revisionFacts(context, desk, before, changed);
  await keepSheet(context, desk, "review", sheetInputOf(source, spool.letter, form.size, facts), content.content, head);
  const mail = submittedMail(mailFacts(context, desk, `/review/${revision.id}`), form.description);
  await tell(context, ["inspector", "owner"], [], mail);
  return { revisionId: revision.id, code: revision.code, sheetNumber: sheetNumberText(spool.sheetNumber) };
}

/** Stands where a comparison needs an input but reads nothing of its revision. */
const BLANK: SheetInput["revision"] = {
  sheetNumber: "", code: "", state: "draft", hold: false, rows: [], drawnBy: "", checkedBy: "", issuedAt: "", statusUrl: "", auditHead: "", changedPointIds: [], accepted: [],
};

/** The line's source with marks that stick and a view that stays from now on, kept with the line. */
async function stickySource({ viewer, tx }: CommandContext, line: Line): Promise<SheetSource> {
  const source = await sheetSourceOf(viewer, line, tx);
  const marks = nextMarks(source.document, { ...nextMarks(source.document, source.marks, source.takeOuts), sticky: true }, source.takeOuts);
  const view = source.document.view ?? proposeView(buildModel(source.document, marks, source.takeOuts), measureText);
  const document = { ...source.document, view };
  await line.update({ marks: JSON.stringify(marks), document: JSON.stringify(document) }, { transaction: tx });
  return { ...source, document, marks };
}

function submittable({ viewer }: CommandContext, model: Model, spool: Spool, before: readonly Revision[]): ModelSpool {
  const content = model.spools.find((s) => s.letter === spool.letter);
  if (content === undefined) throw refuseConflict(`Spool ${spool.letter} is no longer part of the line.`);
  const open = before.find((revision) => revision.state === "for-review");
  const stops = spoolStops(model, content);
  const refusal = submitRefusal({ role: viewer.role, openRevisionCode: open?.code ?? null, stops });
  if (refusal !== null) throw refuseConflict(refusal, { problems: stops });
  return content;
}

function assertChanged(live: Revision, contentSha256: string, old: SheetInput, source: SheetSource): void {
  const same = live.contentSha256 === contentSha256 && JSON.stringify(old.titleBlock) === JSON.stringify(source.titleBlock);
  if (same) throw refuseConflict(`Nothing of this spool changed since revision ${live.code}. Change the run or the title block first.`);
}

const COUNT = `
INSERT INTO counters (shop_id, name, value) VALUES ($shopId, 'sheet', 1)
ON CONFLICT (shop_id, name) DO UPDATE SET value = counters.value + 1
RETURNING value`;

/** The spool's sheet number, counted in this transaction: one that is undone leaves no gap. */
async function giveSheetNumber({ viewer, tx }: CommandContext, spool: Spool): Promise<void> {
  if (spool.sheetNumber !== null) return;
  const [row] = await getDb().query<{ value: string }>(COUNT, { bind: { shopId: viewer.shopId }, type: QueryTypes.SELECT, transaction: tx });
  await spool.update({ sheetNumber: Number(row?.value) }, { transaction: tx });
}

interface Submission {
  readonly spool: Spool;
  readonly line: Line;
  readonly before: readonly Revision[];
  readonly form: SubmitForm;
  readonly contentSha256: string;
}

function addRevision({ viewer, tx, now }: CommandContext, { spool, line, before, form, contentSha256 }: Submission): Promise<Revision> {
  const last = before[before.length - 1] ?? null;
  const values = {
    spoolId: spool.id,
    code: revisionCodeNext(last?.code ?? null),
    ordinal: (last?.ordinal ?? 0) + 1,
    state: "for-review" as const,
    hold: false,
    description: form.description,
    lineVersion: line.version,
    contentSha256,
    statusToken: newStatusToken(),
    submittedBy: viewer.personId,
    submittedAt: now,
    stateAt: now,
    stateBy: viewer.personId,
  };
  return inShop(viewer).add(Revision, values, tx);
}

function logSubmission(context: CommandContext, desk: { revision: Revision; spool: Spool; line: Line }, contentSha256: string) {
  const data = { ...namedIn(desk), spoolId: desk.spool.id, contentSha256 };
  context.audit({ type: "revision.submitted", data });
  return context.auditNow();
}

async function revisionFacts(context: CommandContext, { revision, spool }: { revision: Revision; spool: Spool }, before: readonly Revision[], changed: readonly string[]): Promise<SheetInput["revision"]> {
  const { viewer, tx, now } = context;
  const own = { code: revision.code, description: revision.description, date: dateOf(now), by: viewer.name, checked: "", approved: "" };
  return {
    sheetNumber: sheetNumberText(spool.sheetNumber),
    code: revision.code,
    state: "for-review",
    hold: false,
    rows: [...(await revisionBlock(before, tx)), own],
    drawnBy: viewer.name,
    checkedBy: "",
    issuedAt: now.toISOString(),
    statusUrl: statusUrlOf(revision.statusToken),
    auditHead: "",
    changedPointIds: changed,
    accepted: [],
  };
}
