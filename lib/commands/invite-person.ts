/** Asks somebody into the shop by a mailed link; and takes such a link back. */
import type { InviteForm } from "@/lib/rules/forms";
import { invitationMail } from "@/lib/rules/mail-texts";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { personByEmail, type SessionViewer } from "@/lib/server/session";
import { settings } from "@/lib/server/settings";
import { newToken, sha256Text } from "@/lib/server/tokens";
import { Invitation, Membership } from "@/models";

export const INVITATION_DAYS = 7;
const DAY_MS = 86_400_000;

/** @throws Refusal 409 when the address is already in, or was asked and can still answer. */
export async function invitePerson(context: CommandContext<SessionViewer>, form: InviteForm): Promise<{ id: string }> {
  const { viewer, tx, now } = context;
  await assertNotIn(context, form.email);
  await clearOld(context, form.email);
  const token = newToken();
  const expiresAt = new Date(now.getTime() + INVITATION_DAYS * DAY_MS);
  const values = { email: form.email, role: form.role, tokenHash: sha256Text(token), invitedBy: viewer.personId, createdAt: now, expiresAt };
  const invitation = await inShop(viewer).add(Invitation, values, tx);
  context.audit({ type: "person.invited", data: { invitationId: invitation.id, email: form.email, role: form.role } });
  const link = `${settings().BASE_URL}/invitation/${token}`;
  context.mail({ to: form.email, ...invitationMail({ shop: viewer.shopName, by: viewer.name, role: form.role, link, days: INVITATION_DAYS }) });
  return { id: invitation.id };
}

async function assertNotIn({ viewer, tx }: CommandContext<SessionViewer>, email: string): Promise<void> {
  const person = await personByEmail(email, tx);
  if (person === null) return;
  const member = await inShop(viewer).first(Membership, { personId: person.id, removedAt: null }, tx);
  if (member !== null) throw refuseConflict(`${email} already belongs to this shop.`);
}

/** A link that ran out makes room for a new one; one that still works does not. */
async function clearOld({ viewer, tx, now }: CommandContext<SessionViewer>, email: string): Promise<void> {
  const open = await inShop(viewer).first(Invitation, { email, acceptedAt: null, withdrawnAt: null }, tx);
  if (open === null) return;
  if (open.expiresAt > now) throw refuseConflict(`${email} has an invitation that still works. Withdraw it first.`);
  await open.update({ withdrawnAt: now }, { transaction: tx });
}

/** @throws Refusal 404 when there is none, 409 when it was used. */
export async function withdrawInvitation(context: CommandContext, invitationId: string): Promise<void> {
  const { viewer, tx, now } = context;
  const row = await inShop(viewer).locked(Invitation, invitationId, tx);
  if (row.acceptedAt !== null) throw refuseConflict("This invitation was accepted already. Remove the person instead.");
  if (row.withdrawnAt === null) await row.update({ withdrawnAt: now }, { transaction: tx });
  context.audit({ type: "person.invitation-withdrawn", data: { invitationId, email: row.email } });
}
