/**
 * Who is asking. The cookie holds a signed token with the id of a session row and nothing else; person, shop, role and
 * whether they are still in are read on each request, so that an ended session or a removed person is out at once.
 */
import { randomUUID } from "node:crypto";
import { decode } from "next-auth/jwt";
import { QueryTypes, type Transaction } from "sequelize";
import type { Role } from "@/lib/rules/api-types";
import { Person, Session } from "@/models";
import { appendAudit } from "./audit";
import { getDb, inTransaction } from "./database";
import { refuseUnknown } from "./errors";
import type { ShopMember } from "./scope";
import { settings } from "./settings";

/** The signed-in person, as read on this request. */
export interface SessionViewer extends ShopMember {
  readonly sessionId: string;
  readonly personId: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly shopName: string;
}

export const SESSION_DAYS = 14;
const DAY_MS = 86_400_000;
const SEEN_EVERY_MS = 60_000;
const DEVICE_MAX = 200;

/** Whether cookies are kept to https, as next-auth names them. */
export function isSecureSite(): boolean {
  return settings().BASE_URL.startsWith("https:");
}

/** Name of the cookie that carries the session. */
export function sessionCookieName(): string {
  return isSecureSite() ? "__Secure-next-auth.session-token" : "next-auth.session-token";
}

/** The viewer of a request by its Cookie header, or null when nobody (any longer) is signed in. */
export async function viewerOfCookies(cookieHeader: string | null): Promise<SessionViewer | null> {
  const token = cookieValue(cookieHeader ?? "", sessionCookieName());
  const sessionId = token === null ? null : await sessionIdOf(token);
  return sessionId === null ? null : viewerOfSession(sessionId, new Date());
}

/** Tokens are letters, digits, - _ and dots, so nothing in one was escaped. */
function cookieValue(header: string, name: string): string | null {
  const pair = header.split(";").map((part) => part.trim()).find((part) => part.startsWith(`${name}=`));
  return pair === undefined ? null : pair.slice(name.length + 1);
}

/** The session id in a token of ours, or null when it is not ours, altered or run out. */
async function sessionIdOf(token: string): Promise<string | null> {
  try {
    const claims = await decode({ token, secret: settings().NEXTAUTH_SECRET });
    return typeof claims?.sid === "string" ? claims.sid : null;
  } catch {
    return null;
  }
}

interface ViewerRow extends Omit<SessionViewer, "sessionId"> {
  readonly lastSeenAt: Date;
}

const VIEWER = `
SELECT p.id AS "personId", p.name, p.email, m.role, s.shop_id AS "shopId", h.name AS "shopName", s.last_seen_at AS "lastSeenAt"
FROM sessions s
JOIN people p ON p.id = s.person_id
JOIN memberships m ON m.person_id = s.person_id AND m.shop_id = s.shop_id AND m.removed_at IS NULL
JOIN shops h ON h.id = s.shop_id
WHERE s.id = $sessionId AND s.ended_at IS NULL AND s.expires_at > $now`;

async function viewerOfSession(sessionId: string, now: Date): Promise<SessionViewer | null> {
  const [row] = await getDb().query<ViewerRow>(VIEWER, { bind: { sessionId, now }, type: QueryTypes.SELECT });
  if (row === undefined) return null;
  const { lastSeenAt, ...viewer } = row;
  if (now.getTime() - lastSeenAt.getTime() > SEEN_EVERY_MS) await Session.update({ lastSeenAt: now }, { where: { id: sessionId } });
  return { ...viewer, sessionId };
}

/** The viewer of a page being rendered, or null. For server components; route handlers go through the wrappers. */
export async function pageViewer(): Promise<SessionViewer | null> {
  const { cookies } = await import("next/headers");
  return viewerOfCookies((await cookies()).toString());
}

/** The viewer of a request, or of the page being rendered when none is given. @throws Refusal 401 when nobody is signed in. */
export async function requireViewer(request?: Request): Promise<SessionViewer> {
  const viewer = request === undefined ? await pageViewer() : await viewerOfCookies(request.headers.get("cookie"));
  if (viewer === null) throw refuseUnknown();
  return viewer;
}

/** The shop one looked at last comes first, then the one joined first. */
const HOME_SHOP = `
SELECT m.shop_id AS "shopId" FROM memberships m
WHERE m.person_id = $personId AND m.removed_at IS NULL
ORDER BY (SELECT max(s.last_seen_at) FROM sessions s WHERE s.person_id = m.person_id AND s.shop_id = m.shop_id) DESC NULLS LAST, m.joined_at, m.id
LIMIT 1`;

/**
 * Starts a session of a person in the shop they looked at last.
 * @returns its id, or null when they belong to no shop (any longer).
 */
export async function startSession(personId: string, device: string): Promise<string | null> {
  return inTransaction(async (tx) => {
    const [member] = await getDb().query<{ shopId: string }>(HOME_SHOP, { bind: { personId }, type: QueryTypes.SELECT, transaction: tx });
    if (member === undefined) return null;
    const now = new Date();
    const sessionId = randomUUID();
    const expiresAt = new Date(now.getTime() + SESSION_DAYS * DAY_MS);
    await Session.create(
      { id: sessionId, personId, shopId: member.shopId, device: device.slice(0, DEVICE_MAX), createdAt: now, lastSeenAt: now, expiresAt },
      { transaction: tx },
    );
    await appendAudit(tx, { shopId: member.shopId, actor: personId, at: now, event: { type: "session.started", data: { sessionId } } });
    return sessionId;
  });
}

/** Ends a session; one that is over already stays as it is. */
export async function endSession(sessionId: string): Promise<void> {
  await inTransaction(async (tx) => {
    const row = await Session.findOne({ where: { id: sessionId, endedAt: null }, transaction: tx, lock: tx.LOCK.UPDATE });
    if (row === null) return;
    const now = new Date();
    await row.update({ endedAt: now }, { transaction: tx });
    await appendAudit(tx, { shopId: row.shopId, actor: row.personId, at: now, event: { type: "session.ended", data: { sessionId } } });
  });
}

/** Ends every session of a person, after a new password or their removal from a shop. */
export async function endSessionsOf(tx: Transaction, personId: string, now: Date, shopId?: string): Promise<void> {
  await Session.update({ endedAt: now }, { where: { personId, endedAt: null, ...(shopId === undefined ? {} : { shopId }) }, transaction: tx });
}

/** A live person by e-mail address, or null. */
export async function personByEmail(email: string, tx: Transaction | null = null): Promise<Person | null> {
  getDb();
  return Person.findOne({ where: { email }, transaction: tx });
}
