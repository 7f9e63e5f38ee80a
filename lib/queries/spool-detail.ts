/** A spool with its revisions, its sheet as it would be made now, and what the viewer may do. */
import { buildModel, type SheetInput } from "@/iso";
import type { SpoolDetail } from "@/lib/rules/api-types";
import { canDo } from "@/lib/rules/permissions";
import { isLive, submitRefusal } from "@/lib/rules/revision-rules";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import { spoolStops } from "@/lib/rules/spool-stops";
import { refuseNotFound } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import type { SessionViewer } from "@/lib/server/session";
import { Job, Line, Spool, type Revision } from "@/models";
import { draftSheetInput } from "./draft-sheet";
import { frozenInput, revisionSummaries, revisionsOf } from "./revision-facts";
import { decideRefusal } from "./may-decide";
import { workEntries } from "./work-entries";

/** @throws Refusal 404; also for a fitter while nothing of the spool is issued. */
export async function spoolDetail(viewer: SessionViewer, spoolId: string): Promise<SpoolDetail> {
  const shop = inShop(viewer);
  const spool = await shop.one(Spool, spoolId);
  const line = await shop.one(Line, spool.lineId);
  const job = await shop.one(Job, line.jobId);
  const all = await revisionsOf(viewer, spoolId);
  const seesDrafts = canDo(viewer.role, "lines.read");
  const revisions = seesDrafts ? all : all.filter((revision) => revision.signedBy !== null);
  if (!seesDrafts && revisions.length === 0) throw refuseNotFound();
  const live = all.find((revision) => isLive(revision.state));
  const open = all.find((revision) => revision.state === "for-review");
  const draft = seesDrafts ? await draftSheetInput(viewer, { spool, line, revisions: all }, null, new Date()) : null;
  const submit = submitRefusal({ role: viewer.role, openRevisionCode: open?.code ?? null, stops: draft === null ? [] : stopsOf(draft) });
  const sign = open === undefined ? "Nothing of this spool is FOR REVIEW." : await decideRefusal(viewer, line.id, all, open);
  return {
    id: spool.id,
    letter: spool.letter,
    sheetNumber: sheetNumberText(spool.sheetNumber) || null,
    line: { id: line.id, number: line.number, title: line.title },
    job: { id: job.id, number: job.number, title: job.title },
    revisions: await revisionSummaries(viewer, revisions),
    draft,
    live: live === undefined ? null : { revisionId: live.id, input: shownInput((await frozenInput(viewer, live.id)).input, live) },
    work: await workEntries(viewer, spoolId),
    can: { submit: submit === null, sign: sign === null, hold: canDo(viewer.role, "revisions.hold"), log: live?.state === "for-fabrication" && !live.hold },
    why: { submit, sign },
  };
}

/** A frozen input as it is shown now: the state and the hold of today on the content of then. */
export function shownInput(input: SheetInput, revision: Pick<Revision, "state" | "hold">): SheetInput {
  return { ...input, revision: { ...input.revision, state: revision.state, hold: revision.hold } };
}

function stopsOf(input: SheetInput): string[] {
  const model = buildModel(input.document, input.marks, input.takeOuts);
  const spool = model.spools.find((s) => s.letter === input.spool);
  return spool === undefined ? [`Spool ${input.spool} is no longer part of the line.`] : spoolStops(model, spool);
}
