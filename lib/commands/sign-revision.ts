/**
 * Signs a revision for fabrication: a second person, their password again (checked before this runs), every unverified
 * dimension accepted by name. Freezes and renders the signed sheet, supersedes the one before and tells the bench.
 */
import { buildModel, type SheetInput } from "@/iso";
import type { SignForm } from "@/lib/rules/forms";
import { signedMail } from "@/lib/rules/revision-mails";
import { isLive } from "@/lib/rules/revision-rules";
import { unverifiedDimensions } from "@/lib/rules/unverified";
import { decideRefusal } from "@/lib/queries/may-decide";
import { dateOf, frozenInput, revisionsOf } from "@/lib/queries/revision-facts";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict, refuseForbidden, refuseInvalid } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { passwordAgainLimit, countTry, forgetTries } from "@/lib/server/throttle";
import { isPassword } from "@/lib/server/passwords";
import { Person, SignOff, WorkEntry, type Revision } from "@/models";
import { signingCertificate } from "./keep-certificate";
import { assertStep, deskCase, keepSheet, mailFacts, namedIn, tell, type DeskCase } from "./revision-desk";

/** Counts and checks the password given again. Runs outside the transaction, so that tries are never undone. @throws Refusal 400, 429. */
export async function checkPasswordAgain(viewer: { readonly personId: string }, password: string): Promise<void> {
  const limit = passwordAgainLimit(viewer.personId);
  await countTry([limit], new Date());
  const person = await Person.findOne({ where: { id: viewer.personId } });
  if (!(await isPassword(password, person?.passwordHash ?? null))) {
    throw refuseInvalid("That is not your password. Nothing was signed.", { password: "That is not your password." });
  }
  await forgetTries(limit);
}

/** @throws Refusal 403 for one's own work, 404, 409 when it is not for review (any longer) or dimensions are not accepted. */
export async function signRevision(context: CommandContext, revisionId: string, form: Pick<SignForm, "accepted">): Promise<{ state: "for-fabrication" }> {
  const { viewer, tx, now } = context;
  const desk = await deskCase(context, revisionId);
  await assertMayDecide(context, desk);
  assertStep(desk.revision, "for-fabrication");
  const frozen = await frozenInput(viewer, revisionId, tx);
  const certificate = await signingCertificate(context);
  const accepted = acceptedAll(frozen.input, form.accepted, viewer.name);
  const superseded = await supersedeLive(context, desk);
  await desk.revision.update({ state: "for-fabrication", signedBy: viewer.personId, signedAt: now, stateAt: now, stateBy: viewer.personId }, { transaction: tx });
  const names = accepted.map((a) => a.text);
  context.audit({ type: "revision.signed", data: { ...namedIn(desk), inputSha256: frozen.sha256, accepted: names, superseded: superseded?.code ?? null } });
  const head = await context.auditNow();
  const signed = signedInput(context, frozen.input, desk.revision, accepted.map(({ pointId }) => ({ pointId, by: viewer.name })));
  await keepSheet(context, desk, "fabrication", signed, contentOf(signed), head, certificate);
  await inShop(viewer).add(SignOff, { revisionId, personId: viewer.personId, decision: "signed", reason: "", accepted: JSON.stringify(names), inputSha256: frozen.sha256, at: now }, tx);
  await tellHolders(context, desk, superseded);
  return { state: "for-fabrication" };
}

/**
 * Never one's own: whoever submitted it, or touched the line since the last signed one, does not decide.
 * @throws Refusal 403; 409 when it is not for review (any longer), or on hold.
 */
export async function assertMayDecide(context: CommandContext, { revision, line, spool }: DeskCase): Promise<void> {
  const { viewer, tx } = context;
  const all = await revisionsOf(viewer, spool.id, tx);
  const refusal = await decideRefusal(viewer, line.id, all, revision, tx);
  if (refusal === null) return;
  throw revision.state !== "for-review" || revision.hold ? refuseConflict(refusal) : refuseForbidden(refusal);
}

function acceptedAll(input: SheetInput, accepted: readonly string[], by: string) {
  const unverified = unverifiedDimensions(input);
  const open = unverified.filter((dimension) => !accepted.includes(dimension.pointId));
  if (open.length > 0) {
    const names = open.map((dimension) => dimension.text).join("; ");
    throw refuseConflict(`Accept each unverified dimension by name, or return the revision: ${names}.`, { unverified: open });
  }
  return unverified.map((dimension) => ({ ...dimension, by }));
}

async function supersedeLive({ viewer, tx, now }: CommandContext, { spool }: DeskCase): Promise<Revision | null> {
  const live = (await revisionsOf(viewer, spool.id, tx)).find((r) => isLive(r.state)) ?? null;
  await live?.update({ state: "superseded", hold: false, stateAt: now, stateBy: viewer.personId }, { transaction: tx });
  return live;
}

function signedInput({ viewer, now }: CommandContext, input: SheetInput, revision: Revision, accepted: SheetInput["revision"]["accepted"]): SheetInput {
  const rows = input.revision.rows.map((row) =>
    row.code === revision.code ? { ...row, date: dateOf(now), checked: viewer.name, approved: viewer.name } : row,
  );
  return { ...input, revision: { ...input.revision, state: "for-fabrication", rows, checkedBy: viewer.name, checkedRole: viewer.role, issuedAt: now.toISOString(), accepted } };
}

function contentOf(input: SheetInput): string {
  return buildModel(input.document, input.marks, input.takeOuts).spools.find((s) => s.letter === input.spool)?.content ?? "";
}

/** The bench, the one who submitted it, and everyone who worked from the one before or holds copies of it. */
async function tellHolders(context: CommandContext, desk: DeskCase, superseded: Revision | null): Promise<void> {
  const work = await inShop(context.viewer).all(WorkEntry, { spoolId: desk.spool.id }, context.tx);
  const mail = signedMail(mailFacts(context, desk, `/spools/${desk.spool.id}`), superseded?.code ?? null);
  await tell(context, ["fitter"], [desk.revision.submittedBy, ...work.map((entry) => entry.by)], mail, superseded?.id ?? null);
}
