/** What a signed-in person asks about themselves and their shop's people. */
import { QueryTypes } from "sequelize";
import type { InvitationRow, PersonRow, Role, SessionRow, Viewer } from "@/lib/rules/api-types";
import { getDb } from "@/lib/server/database";
import { inShop } from "@/lib/server/scope";
import type { SessionViewer } from "@/lib/server/session";
import { settings } from "@/lib/server/settings";
import { Invitation, Session } from "@/models";

const SHOPS = `
SELECT h.id, h.name, m.role FROM memberships m JOIN shops h ON h.id = m.shop_id
WHERE m.person_id = $personId AND m.removed_at IS NULL ORDER BY lower(h.name), h.id`;

export async function viewerDetail(viewer: SessionViewer): Promise<Viewer> {
  const { personId, name, email, role } = viewer;
  const shops = await getDb().query<{ id: string; name: string; role: Role }>(SHOPS, { bind: { personId }, type: QueryTypes.SELECT });
  return { personId, name, email, role, shop: { id: viewer.shopId, name: viewer.shopName }, shops, demo: settings().DEMO };
}

/** One's own sessions that are not over, the newest first. */
export async function sessionRows(viewer: SessionViewer): Promise<SessionRow[]> {
  const now = new Date();
  const rows = await Session.findAll({ where: { personId: viewer.personId, endedAt: null }, order: [["createdAt", "DESC"]] });
  return rows
    .filter((row) => row.expiresAt > now)
    .map((row) => ({
      id: row.id,
      createdAt: row.createdAt.toISOString(),
      lastSeenAt: row.lastSeenAt.toISOString(),
      device: row.device,
      current: row.id === viewer.sessionId,
    }));
}

const PEOPLE = `
SELECT m.id, m.person_id AS "personId", p.name, p.email, m.role, m.joined_at AS "joinedAt"
FROM memberships m JOIN people p ON p.id = m.person_id
WHERE m.shop_id = $shopId AND m.removed_at IS NULL ORDER BY lower(p.name), m.id`;

export async function peopleRows(viewer: SessionViewer): Promise<PersonRow[]> {
  const { shopId, personId } = viewer;
  const rows = await getDb().query<Omit<PersonRow, "joinedAt" | "you"> & { joinedAt: Date }>(PEOPLE, { bind: { shopId }, type: QueryTypes.SELECT });
  return rows.map((row) => ({ ...row, joinedAt: row.joinedAt.toISOString(), you: row.personId === personId }));
}

/** Invitations nobody has answered yet, the newest first; those that ran out are among them, to be withdrawn. */
export async function invitationRows(viewer: SessionViewer): Promise<InvitationRow[]> {
  const rows = await inShop(viewer).all(Invitation, { acceptedAt: null, withdrawnAt: null }, null, { order: [["createdAt", "DESC"]] });
  return rows.map(({ id, email, role, createdAt, expiresAt }) => ({ id, email, role, createdAt: createdAt.toISOString(), expiresAt: expiresAt.toISOString() }));
}
