/** Two sheets of one spool to compare: any two of its revisions, or one of them and the sheet as it would be now. */
import type { SheetInput } from "@/iso";
import { chosenPair, type CompareAsked, type CompareChoice, type CompareDetail } from "@/lib/rules/compare-types";
import { canDo, refusalOf } from "@/lib/rules/permissions";
import { revisionCodeNext } from "@/lib/rules/revision-rules";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import { refuseForbidden, refuseInvalid, refuseNotFound } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import type { SessionViewer } from "@/lib/server/session";
import { Job } from "@/models";
import { draftSheetInput, spoolCase, type SpoolCase } from "./draft-sheet";
import { frozenInput } from "./revision-facts";
import { shownInput } from "./spool-detail";

const SAME = "Choose two different revisions: a revision does not differ from itself.";
const NO_TWO = "There are no two revisions of this spool to compare yet.";

type Asked = Pick<CompareAsked, "from" | "to" | "size">;

/**
 * What the comparison's page shows. Those who see issued sheets only choose among signed revisions.
 * @throws Refusal 404 for a spool or revision they have none of, 403 for a draft they may not see, 400 for one twice.
 */
export async function compareDetail(viewer: SessionViewer, spoolId: string, { from, to, size }: Asked, now: Date): Promise<CompareDetail> {
  const found = await spoolCase(viewer, spoolId);
  const choices = choicesFor(viewer, found);
  if (choices.length === 0) throw refuseNotFound();
  if ((from === "draft" || to === "draft") && !canDo(viewer.role, "lines.read")) throw refuseForbidden(refusalOf("lines.read"));
  if ([from, to].some((id) => id !== null && !choices.some((choice) => choice.id === id))) throw refuseNotFound();
  if (from !== null && from === to) throw refuseInvalid(SAME);
  const pair = chosenPair(choices, from, to);
  const job = await inShop(viewer).one(Job, found.line.jobId);
  return {
    spool: { id: found.spool.id, letter: found.spool.letter, sheetNumber: sheetNumberText(found.spool.sheetNumber) },
    line: { id: found.line.id, number: found.line.number },
    job: { id: job.id, number: job.number },
    choices,
    pair: pair && { ...pair, before: await inputOf(viewer, found, pair.from, size, now), after: await inputOf(viewer, found, pair.to, size, now) },
  };
}

/** The two inputs that pages are made from. @throws Refusal as compareDetail, and 400 while there are no two. */
export async function compareInputs(viewer: SessionViewer, spoolId: string, asked: Asked, now: Date): Promise<{ readonly before: SheetInput; readonly after: SheetInput }> {
  const { pair } = await compareDetail(viewer, spoolId, asked, now);
  if (pair === null) throw refuseInvalid(NO_TWO);
  const { before, after } = pair;
  return { before, after: asked.size === null ? after : { ...after, size: asked.size } };
}

function choicesFor(viewer: SessionViewer, { revisions }: SpoolCase): CompareChoice[] {
  const seesDrafts = canDo(viewer.role, "lines.read");
  const seen = seesDrafts ? revisions : revisions.filter((revision) => revision.signedBy !== null);
  const rows = seen.map(({ id, code, state, hold, description, submittedAt }): CompareChoice => ({ id, code, state, hold, description, at: submittedAt.toISOString() }));
  if (!seesDrafts) return rows;
  const code = revisionCodeNext(revisions[revisions.length - 1]?.code ?? null);
  return [...rows, { id: "draft", code, state: "draft", hold: false, description: "As it would be now", at: "" }];
}

async function inputOf(viewer: SessionViewer, found: SpoolCase, id: string, size: Asked["size"], now: Date): Promise<SheetInput> {
  const revision = found.revisions.find((one) => one.id === id);
  return revision === undefined ? draftSheetInput(viewer, found, size, now) : shownInput((await frozenInput(viewer, revision.id)).input, revision);
}
