/** Keeps a measurement of a finished spool against its live revision, with what it came to. Insert-only. */
import { buildModel, compareAsFitted, parseAsFitted, sheetFacts, spoolNominalInches } from "@/iso";
import { frozenInput, revisionsOf } from "@/lib/queries/revision-facts";
import { isLive } from "@/lib/rules/revision-rules";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict, refuseInvalid } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { Spool, SpoolMeasurement } from "@/models";

/** @throws Refusal 404; 409 when no revision is live, or it is held or closed; 400 for what is no measurement or places nothing. */
export async function recordMeasurement(context: CommandContext, spoolId: string, sent: { readonly document: unknown }): Promise<{ id: string }> {
  const { viewer, tx, now } = context;
  const document = parseAsFitted(sent.document);
  if (document === null) throw refuseInvalid("This is not a measurement as this site keeps it.", { document: "This is not a measurement as this site keeps it." });
  const spool = await inShop(viewer).locked(Spool, spoolId, tx);
  const live = (await revisionsOf(viewer, spoolId, tx)).find((revision) => isLive(revision.state));
  if (live === undefined) throw refuseConflict("A spool is measured against a revision FOR FABRICATION; this one has none.");
  if (live.state === "as-built") throw refuseConflict(`Revision ${live.code} is closed AS-BUILT. Submit a new revision before more is recorded.`);
  if (live.hold) throw refuseConflict(`Revision ${live.code} is on HOLD. Stop work until it is released.`);
  const { input } = await frozenInput(viewer, live.id, tx);
  const facts = sheetFacts(input, buildModel(input.document, input.marks, input.takeOuts));
  if (facts.spool === null) throw refuseConflict(`Revision ${live.code} has no spool ${input.spool} to measure.`);
  const { verdict, headline, pairs, motion } = compareAsFitted(facts.model, facts.spool, document, spoolNominalInches(facts));
  if (motion === null && pairs.length === 0) throw refuseInvalid("Two faces at least are needed before there is anything to keep.", { document: "Measure two faces or more." });
  const { id } = await inShop(viewer).add(SpoolMeasurement, { spoolId, revisionId: live.id, document: JSON.stringify(document), verdict, headline: headline.slice(0, 4_000), by: viewer.personId, at: now }, tx);
  context.audit({ type: "spool.measured", data: { revisionId: live.id, sheetNumber: sheetNumberText(spool.sheetNumber), code: live.code, measurementId: id, verdict } });
  return { id };
}
