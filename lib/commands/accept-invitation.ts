/** Joins a shop by a mailed link: a new person by name and password, a known one by the password they have. */
import { randomUUID } from "node:crypto";
import { Op, type Transaction } from "sequelize";
import type { InvitationAcceptForm } from "@/lib/rules/forms";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict, refuseGone, refuseInvalid } from "@/lib/server/errors";
import { hashPassword, isPassword } from "@/lib/server/passwords";
import { personByEmail } from "@/lib/server/session";
import { sha256Text } from "@/lib/server/tokens";
import { Invitation, Membership, type Person } from "@/models";
import { addPerson } from "./open-shop";

const OVER = "This link has been used, was withdrawn or has run out. Ask the owner of the shop for a new one.";

/** @throws Refusal 410 when the link is over, 400 when a known person's password is wrong, 409 when they are in already. */
export async function acceptInvitation(context: CommandContext<unknown>, form: InvitationAcceptForm): Promise<void> {
  const { tx, now } = context;
  const row = await openInvitation(form.token, now, tx);
  const known = await personByEmail(row.email, tx);
  const personId = known === null ? await joinNew(context, row.email, form) : await joinKnown(known, form.password);
  const { shopId, role } = row;
  const already = await Membership.findOne({ where: { shopId, personId, removedAt: null }, transaction: tx });
  if (already !== null) throw refuseConflict("You already belong to this shop. Sign in.");
  const membershipId = randomUUID();
  await Membership.create({ shopId, id: membershipId, personId, role, joinedAt: now }, { transaction: tx });
  await row.update({ acceptedAt: now }, { transaction: tx });
  const name = known?.name ?? form.name;
  context.audit({ type: "person.joined", data: { membershipId, personId, name, role } }, { shopId, actor: personId });
}

/** Locked, so that a link opened twice at once is used once. */
async function openInvitation(token: string, now: Date, tx: Transaction): Promise<Invitation> {
  const row = await Invitation.findOne({
    where: { tokenHash: sha256Text(token), acceptedAt: null, withdrawnAt: null, expiresAt: { [Op.gt]: now } },
    transaction: tx,
    lock: tx.LOCK.UPDATE,
  });
  if (row === null) throw refuseGone(OVER);
  return row;
}

async function joinNew({ tx, now }: CommandContext<unknown>, email: string, form: InvitationAcceptForm): Promise<string> {
  return addPerson({ email, name: form.name, passwordHash: await hashPassword(form.password), createdAt: now }, tx);
}

async function joinKnown(person: Person, password: string): Promise<string> {
  if (await isPassword(password, person.passwordHash)) return person.id;
  const sentence = "You have an account already: enter the password you sign in with.";
  throw refuseInvalid(sentence, { password: sentence });
}
