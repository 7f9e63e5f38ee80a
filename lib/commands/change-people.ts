/** Roles and removal of a shop's people. A shop always keeps an owner. */
import type { Transaction } from "sequelize";
import type { Role } from "@/lib/rules/api-types";
import type { Actor, CommandContext } from "@/lib/server/command";
import { refuseConflict, refuseNotFound } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { endSessionsOf } from "@/lib/server/session";
import { Membership, Person } from "@/models";

const LAST_OWNER = "A shop needs an owner. Make somebody else an owner first.";

/** @throws Refusal 404, or 409 when the only owner would stop being one. */
export async function changeRole(context: CommandContext, membershipId: string, role: Role): Promise<void> {
  const { viewer, tx } = context;
  const { member, name } = await liveMember(viewer, membershipId, tx);
  if (role !== "owner") await assertOtherOwner(viewer, member, tx);
  const from = member.role;
  await member.update({ role }, { transaction: tx });
  context.audit({ type: "person.role", data: { membershipId, name, from, to: role } });
}

/** Removes a person from the shop and ends their sessions in it. @throws Refusal 404, or 409 for the only owner. */
export async function removePerson(context: CommandContext, membershipId: string): Promise<void> {
  const { viewer, tx, now } = context;
  const { member, name } = await liveMember(viewer, membershipId, tx);
  await assertOtherOwner(viewer, member, tx);
  await member.update({ removedAt: now }, { transaction: tx });
  await endSessionsOf(tx, member.personId, now, viewer.shopId);
  context.audit({ type: "person.removed", data: { membershipId, name } });
}

async function liveMember(viewer: Actor, membershipId: string, tx: Transaction): Promise<{ member: Membership; name: string }> {
  // Every owner's row is locked first and in one order, so that two owners cannot remove each other at once.
  await Membership.findAll({
    where: { shopId: viewer.shopId, role: "owner", removedAt: null },
    order: [["id", "ASC"]],
    transaction: tx,
    lock: tx.LOCK.UPDATE,
  });
  const member = await inShop(viewer).locked(Membership, membershipId, tx);
  if (member.removedAt !== null) throw refuseNotFound();
  const person = await Person.findOne({ where: { id: member.personId }, rejectOnEmpty: true, transaction: tx });
  return { member, name: person.name };
}

async function assertOtherOwner(viewer: Actor, member: Membership, tx: Transaction): Promise<void> {
  if (member.role !== "owner") return;
  const owners = await Membership.count({ where: { shopId: viewer.shopId, role: "owner", removedAt: null }, transaction: tx });
  if (owners <= 1) throw refuseConflict(LAST_OWNER);
}
