/** One's own sessions: which shop this one looks at, and the end of any of them. */
import type { CommandContext } from "@/lib/server/command";
import { refuseNotFound } from "@/lib/server/errors";
import type { SessionViewer } from "@/lib/server/session";
import { Membership, Session } from "@/models";

/** Looks at another of one's shops from now on. @throws Refusal 404 when one does not belong to it. */
export async function switchShop({ viewer, tx }: CommandContext<SessionViewer>, shopId: string): Promise<void> {
  const member = await Membership.findOne({ where: { shopId, personId: viewer.personId, removedAt: null }, transaction: tx });
  if (member === null) throw refuseNotFound();
  await Session.update({ shopId }, { where: { id: viewer.sessionId, personId: viewer.personId }, transaction: tx });
}

/** Ends one of one's own sessions. @throws Refusal 404 when it is somebody else's or over. */
export async function endOwnSession(context: CommandContext<SessionViewer>, sessionId: string): Promise<void> {
  const { viewer, tx, now } = context;
  const row = await Session.findOne({ where: { id: sessionId, personId: viewer.personId, endedAt: null }, transaction: tx, lock: tx.LOCK.UPDATE });
  if (row === null) throw refuseNotFound();
  await row.update({ endedAt: now }, { transaction: tx });
  context.audit({ type: "session.ended", data: { sessionId } }, { shopId: row.shopId, actor: viewer.personId });
}
