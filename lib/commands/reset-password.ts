/** Sets a password anew by a mailed link. Asking answers the same whether the address is known or not. */
import { randomUUID } from "node:crypto";
import { Op } from "sequelize";
import { passwordSetMail, resetMail } from "@/lib/rules/mail-texts";
import type { CommandContext } from "@/lib/server/command";
import { refuseGone } from "@/lib/server/errors";
import { hashPassword } from "@/lib/server/passwords";
import { endSessionsOf, personByEmail } from "@/lib/server/session";
import { settings } from "@/lib/server/settings";
import { newToken, sha256Text } from "@/lib/server/tokens";
import { Membership, PasswordReset, Person } from "@/models";

export const RESET_MINUTES = 60;

/** Mails a link to a known address, nothing to an unknown one. */
export async function requestPasswordReset(context: CommandContext<unknown>, email: string): Promise<void> {
  const { tx, now } = context;
  const person = await personByEmail(email, tx);
  if (person === null) return;
  const token = newToken();
  const expiresAt = new Date(now.getTime() + RESET_MINUTES * 60_000);
  await PasswordReset.create({ id: randomUUID(), personId: person.id, tokenHash: sha256Text(token), createdAt: now, expiresAt }, { transaction: tx });
  context.mail({ to: email, ...resetMail({ link: `${settings().BASE_URL}/reset/${token}`, minutes: RESET_MINUTES }) });
}

/** Sets the password, ends every session of the person and every other link of theirs. @throws Refusal 410. */
export async function confirmPasswordReset(context: CommandContext<unknown>, token: string, password: string): Promise<void> {
  const { tx, now } = context;
  const row = await PasswordReset.findOne({
    where: { tokenHash: sha256Text(token), usedAt: null, expiresAt: { [Op.gt]: now } },
    transaction: tx,
    lock: tx.LOCK.UPDATE,
  });
  if (row === null) throw refuseGone("This link has been used or has run out. Ask for a new one.");
  const person = await Person.findOne({ where: { id: row.personId }, rejectOnEmpty: true, transaction: tx });
  await person.update({ passwordHash: await hashPassword(password) }, { transaction: tx });
  await PasswordReset.update({ usedAt: now }, { where: { personId: person.id, usedAt: null }, transaction: tx });
  await endSessionsOf(tx, person.id, now);
  await tellShops(context, person.id);
  context.mail({ to: person.email, ...passwordSetMail() });
}

async function tellShops(context: CommandContext<unknown>, personId: string): Promise<void> {
  const memberships = await Membership.findAll({ where: { personId, removedAt: null }, order: [["shopId", "ASC"]], transaction: context.tx });
  for (const { shopId } of memberships) context.audit({ type: "person.password", data: { personId } }, { shopId, actor: personId });
}
