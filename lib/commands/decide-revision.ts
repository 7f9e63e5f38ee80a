/** The other decisions about a revision: return, hold, release, void, close as built. Each with a reason, logged and mailed. */
import type { MailText } from "@/lib/rules/mail-texts";
import { asBuiltMail, heldMail, releasedMail, returnedMail, voidedMail, type SheetFacts } from "@/lib/rules/revision-mails";
import { STATE_WORDS } from "@/iso";
import { frozenInput } from "@/lib/queries/revision-facts";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { SignOff } from "@/models";
import { assertStep, deskCase, mailFacts, namedIn, tell, type DeskCase } from "./revision-desk";
import { assertMayDecide } from "./sign-revision";

/** Sends it back to the one who submitted it. @throws Refusal 403, 404, 409. */
export async function returnRevision(context: CommandContext, revisionId: string, reason: string): Promise<void> {
  const { viewer, tx, now } = context;
  const desk = await deskCase(context, revisionId);
  await assertMayDecide(context, desk);
  assertStep(desk.revision, "returned");
  await desk.revision.update({ state: "returned", returnReason: reason, hold: false, stateAt: now, stateBy: viewer.personId }, { transaction: tx });
  const { sha256 } = await frozenInput(viewer, revisionId, tx);
  await inShop(viewer).add(SignOff, { revisionId, personId: viewer.personId, decision: "returned", reason, accepted: "[]", inputSha256: sha256, at: now }, tx);
  context.audit({ type: "revision.returned", data: { ...namedIn(desk), reason } });
  await tell(context, [], [desk.revision.submittedBy], returnedMail(mailFacts(context, desk, `/spools/${desk.spool.id}`), reason));
}

/** Stops work on it. @throws Refusal 404, 409 when it is dead or held already. */
export async function holdRevision(context: CommandContext, revisionId: string, reason: string): Promise<void> {
  const desk = await deskCase(context, revisionId);
  assertHoldable(desk);
  if (desk.revision.hold) throw refuseConflict(`Revision ${desk.revision.code} is on HOLD already.`);
  await desk.revision.update({ hold: true, holdReason: reason }, { transaction: context.tx });
  context.audit({ type: "revision.held", data: { ...namedIn(desk), reason } });
  await tellBench(context, desk, (facts) => heldMail(facts, reason), revisionId);
}

/** Lets work go on. @throws Refusal 404, 409 when it is not held. */
export async function releaseRevision(context: CommandContext, revisionId: string, reason: string): Promise<void> {
  const desk = await deskCase(context, revisionId);
  if (!desk.revision.hold) throw refuseConflict(`Revision ${desk.revision.code} is not on hold.`);
  await desk.revision.update({ hold: false, holdReason: null }, { transaction: context.tx });
  context.audit({ type: "revision.released", data: { ...namedIn(desk), reason } });
  await tellBench(context, desk, (facts) => releasedMail(facts, reason));
}

/** Kills it. @throws Refusal 404, 409. */
export async function voidRevision(context: CommandContext, revisionId: string, reason: string): Promise<void> {
  const { viewer, tx, now } = context;
  const desk = await deskCase(context, revisionId);
  assertStep(desk.revision, "void");
  await desk.revision.update({ state: "void", voidReason: reason, hold: false, stateAt: now, stateBy: viewer.personId }, { transaction: tx });
  context.audit({ type: "revision.voided", data: { ...namedIn(desk), reason } });
  await tellBench(context, desk, (facts) => voidedMail(facts, reason), revisionId);
}

/** Closes it as built. @throws Refusal 404, 409 when it is not for fabrication, or held. */
export async function closeAsBuilt(context: CommandContext, revisionId: string, remark: string): Promise<void> {
  const { viewer, tx, now } = context;
  const desk = await deskCase(context, revisionId);
  assertStep(desk.revision, "as-built");
  if (desk.revision.hold) throw refuseConflict("This revision is on HOLD. Release it first.");
  await desk.revision.update({ state: "as-built", stateAt: now, stateBy: viewer.personId }, { transaction: tx });
  context.audit({ type: "revision.as-built", data: { ...namedIn(desk), remark } });
  await tell(context, ["detailer", "fitter"], [], asBuiltMail(mailFacts(context, desk, `/spools/${desk.spool.id}`), remark));
}

function assertHoldable({ revision }: DeskCase): void {
  if (["returned", "superseded", "void"].includes(revision.state)) {
    throw refuseConflict(`Revision ${revision.code} is ${STATE_WORDS[revision.state]} and not worked on; there is nothing to hold.`);
  }
}

/** Those who detail it, those who work from it, and those who hold copies of `heldId`. */
async function tellBench(context: CommandContext, desk: DeskCase, mail: (facts: SheetFacts) => MailText, heldId: string | null = null): Promise<void> {
  await tell(context, ["fitter"], [desk.revision.submittedBy], mail(mailFacts(context, desk, `/spools/${desk.spool.id}`)), heldId);
}
