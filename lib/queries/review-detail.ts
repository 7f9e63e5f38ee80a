/** Everything the review desk shows of one revision. */
import type { SheetInput } from "@/iso";
import type { ReviewDetail } from "@/lib/rules/api-types";
import { sheetChanges } from "@/lib/rules/document-diff";
import { canDo } from "@/lib/rules/permissions";
import { isTransition } from "@/lib/rules/revision-rules";
import { unverifiedDimensions } from "@/lib/rules/unverified";
import { inShop } from "@/lib/server/scope";
import type { SessionViewer } from "@/lib/server/session";
import { Job, Line, Revision, Spool } from "@/models";
import { decideRefusal } from "./may-decide";
import { frozenInput, revisionSummaries, revisionsOf } from "./revision-facts";
import { shownInput } from "./spool-detail";
import { workEntries } from "./work-entries";

/** @throws Refusal 404. */
export async function reviewDetail(viewer: SessionViewer, revisionId: string): Promise<ReviewDetail> {
  const shop = inShop(viewer);
  const revision = await shop.one(Revision, revisionId);
  const spool = await shop.one(Spool, revision.spoolId);
  const line = await shop.one(Line, spool.lineId);
  const job = await shop.one(Job, line.jobId);
  const all = await revisionsOf(viewer, spool.id);
  const { input } = await frozenInput(viewer, revisionId);
  const before = await inputBefore(viewer, all, revision);
  const why = await decideRefusal(viewer, line.id, all, revision);
  const [summary] = await revisionSummaries(viewer, [revision]);
  const mayHold = canDo(viewer.role, "revisions.hold");
  return {
    revision: summary!,
    spool: { id: spool.id, letter: spool.letter, sheetNumber: input.revision.sheetNumber },
    line: { id: line.id, number: line.number },
    job: { id: job.id, number: job.number },
    input: shownInput(input, revision),
    before,
    changes: sheetChanges(before, input),
    unverified: unverifiedDimensions(input),
    impact: before === null ? [] : await workImpact(viewer, spool.id),
    can: { sign: why === null, return: why === null, hold: mayHold && !["returned", "superseded", "void"].includes(revision.state), void: mayHold && isTransition(revision.state, "void") },
    why,
  };
}

/** The input of the newest signed revision before this one. */
async function inputBefore(viewer: SessionViewer, all: readonly Revision[], revision: Revision): Promise<SheetInput | null> {
  const signed = all.filter((r) => r.ordinal < revision.ordinal && r.signedBy !== null);
  const last = signed[signed.length - 1];
  return last === undefined ? null : (await frozenInput(viewer, last.id)).input;
}

const WORK_WORDS = { cut: "cut", "fit-up": "fitted up", weld: "welded", visual: "examined", actual: "measured" } as const;

/** What was already done, so that whoever signs knows what a change undoes. */
async function workImpact(viewer: SessionViewer, spoolId: string): Promise<string[]> {
  const entries = await workEntries(viewer, spoolId);
  return entries.map((entry) => `${entry.kind === "cut" ? "Piece" : entry.kind === "actual" ? "Length" : "Weld"} ${entry.mark} was ${WORK_WORDS[entry.kind]} by ${entry.by} on ${entry.at.slice(0, 10)} (revision ${entry.revisionCode}).`);
}
