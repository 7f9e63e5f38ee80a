/** Records what the bench or the inspector did: a cut, a fit-up, a weld, a visual examination, a measured length. Insert-only. */
import { buildModel, type SheetInput } from "@/iso";
import type { WorkForm } from "@/lib/rules/forms";
import { canRecord, workRefusalOf } from "@/lib/rules/permissions";
import { isLive } from "@/lib/rules/revision-rules";
import { frozenInput, revisionsOf } from "@/lib/queries/revision-facts";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict, refuseForbidden, refuseInvalid } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { Spool, WorkEntry } from "@/models";

/** @throws Refusal 403 for a kind that is not the role's, 404, 409 when there is no live revision or it is held, 400 for a mark that is not on it. */
export async function recordWork(context: CommandContext, spoolId: string, form: WorkForm): Promise<{ id: string }> {
  const { viewer, tx, now } = context;
  if (!canRecord(viewer.role, form.kind)) throw refuseForbidden(workRefusalOf(form.kind));
  const spool = await inShop(viewer).locked(Spool, spoolId, tx);
  const live = (await revisionsOf(viewer, spoolId, tx)).find((revision) => isLive(revision.state));
  if (live === undefined) throw refuseConflict("Work is recorded against a revision FOR FABRICATION; this spool has none.");
  if (live.state === "as-built") throw refuseConflict(`Revision ${live.code} is closed AS-BUILT. Submit a new revision before more work is recorded.`);
  if (live.hold) throw refuseConflict(`Revision ${live.code} is on HOLD. Stop work until it is released.`);
  const { input } = await frozenInput(viewer, live.id, tx);
  if (!isOnSheet(input, form)) throw refuseInvalid(`There is no ${form.mark} on revision ${live.code}. Load the page again.`, { mark: "Not on this revision." });
  const { kind, mark, key } = form;
  const entry = await inShop(viewer).add(WorkEntry, { spoolId, revisionId: live.id, kind, mark, key, entryValues: JSON.stringify(form.values), by: viewer.personId, at: now }, tx);
  context.audit({ type: "work.recorded", data: { revisionId: live.id, sheetNumber: sheetNumberText(spool.sheetNumber), code: live.code, entryId: entry.id, kind, mark } });
  return { id: entry.id };
}

/** A cut names a piece, the other entries a weld, each by key and mark; a measured dimension is named by who measured it. */
function isOnSheet(input: SheetInput, { kind, mark, key }: WorkForm): boolean {
  if (kind === "actual") return true;
  const model = buildModel(input.document, input.marks, input.takeOuts);
  return kind === "cut"
    ? model.pieces.some((p) => p.spool === input.spool && p.key === key && p.mark === mark)
    : model.joints.some((j) => j.spool === input.spool && j.key === key && j.number === mark);
}
