/** A new shop with its first owner. Someone who already has an account proves it and gets a second shop. */
import { randomUUID } from "node:crypto";
import { defaultShopSettings } from "@/lib/rules/default-settings";
import type { SignUpForm } from "@/lib/rules/forms";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict } from "@/lib/server/errors";
import { hashPassword, isPassword } from "@/lib/server/passwords";
import { personByEmail } from "@/lib/server/session";
import { Membership, Person, Shop } from "@/models";

export interface OpenedShop {
  readonly shopId: string;
  readonly personId: string;
}

/** @throws Refusal 409 when the address has an account with another password. */
export async function openShop(context: CommandContext<unknown>, form: SignUpForm): Promise<OpenedShop> {
  const { tx, now } = context;
  const personId = await personOf(context, form);
  const shopId = randomUUID();
  const membershipId = randomUUID();
  await Shop.create({ id: shopId, name: form.shopName, settings: defaultShopSettings("imperial"), createdAt: now }, { transaction: tx });
  await Membership.create({ shopId, id: membershipId, personId, role: "owner", joinedAt: now }, { transaction: tx });
  const where = { shopId, actor: personId };
  context.audit({ type: "shop.created", data: { name: form.shopName } }, where);
  context.audit({ type: "person.joined", data: { membershipId, personId, name: form.name, role: "owner" } }, where);
  return { shopId, personId };
}

async function personOf({ tx, now }: CommandContext<unknown>, form: SignUpForm): Promise<string> {
  const known = await personByEmail(form.email, tx);
  if (known !== null) {
    if (await isPassword(form.password, known.passwordHash)) return known.id;
    throw refuseConflict("This cannot be opened with that address and password. If you have an account, use its password.");
  }
  return addPerson({ email: form.email, name: form.name, passwordHash: await hashPassword(form.password), createdAt: now }, tx);
}

/** A new account. @returns the person's id. */
export async function addPerson(
  facts: { readonly email: string; readonly name: string; readonly passwordHash: string; readonly createdAt: Date },
  tx: CommandContext["tx"],
): Promise<string> {
  const id = randomUUID();
  await Person.create({ id, ...facts }, { transaction: tx });
  return id;
}
