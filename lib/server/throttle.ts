/**
 * Tries counted in fixed windows, in the database so that several processes count together. Each try is counted
 * before it is looked at, so parallel tries do not slip through.
 */
import { Op, QueryTypes } from "sequelize";
import { Throttle } from "@/models";
import { getDb } from "./database";
import { refuseThrottled } from "./errors";
import { sha256Text } from "./tokens";

export interface TryLimit {
  /** What is counted, e.g. "sign-in". */
  readonly name: string;
  /** Whom it is counted for: parts of the key, hashed before they are kept. */
  readonly who: readonly string[];
  readonly tries: number;
  readonly windowS: number;
}

const COUNT = `
INSERT INTO throttles (key, tries, window_started_at) VALUES ($key, 1, $now)
ON CONFLICT (key) DO UPDATE SET
  tries = CASE WHEN throttles.window_started_at <= $over THEN 1 ELSE throttles.tries + 1 END,
  window_started_at = CASE WHEN throttles.window_started_at <= $over THEN $now ELSE throttles.window_started_at END
RETURNING tries, window_started_at AS "startedAt"`;

function keyOf(limit: TryLimit): string {
  return `${limit.name}:${sha256Text(JSON.stringify(limit.who))}`;
}

/** Counts one try. @throws Refusal 429 with the time to wait, once a limit is passed. */
export async function countTry(limits: readonly TryLimit[], now: Date): Promise<void> {
  for (const limit of limits) {
    const over = new Date(now.getTime() - limit.windowS * 1_000);
    const [row] = await getDb().query<{ tries: number; startedAt: Date }>(COUNT, {
      bind: { key: keyOf(limit), now, over },
      type: QueryTypes.SELECT,
    });
    if (row?.tries === 1) await forgetOldWindows(now);
    if (row !== undefined && row.tries > limit.tries) throw tooMany(limit, row.startedAt, now);
  }
}

/** Longer than any limit's window. */
const OLD_S = 86_400;

/** Windows that are long over are removed as new ones open, so that the table stays small. */
async function forgetOldWindows(now: Date): Promise<void> {
  await Throttle.destroy({ where: { windowStartedAt: { [Op.lt]: new Date(now.getTime() - OLD_S * 1_000) } } });
}

/** Looks without counting. @throws Refusal 429 when the next try of a limit would be one too many. */
export async function assertTriesLeft(limits: readonly TryLimit[], now: Date): Promise<void> {
  getDb();
  for (const limit of limits) {
    const row = await Throttle.findOne({ where: { key: keyOf(limit) } });
    const over = row === null || row.windowStartedAt.getTime() + limit.windowS * 1_000 <= now.getTime();
    if (!over && row.tries >= limit.tries) throw tooMany(limit, row.windowStartedAt, now);
  }
}

function tooMany(limit: TryLimit, startedAt: Date, now: Date) {
  const leftS = Math.max(1, Math.ceil((startedAt.getTime() - now.getTime()) / 1_000) + limit.windowS);
  const minutes = Math.ceil(leftS / 60);
  return refuseThrottled(`Too many tries. Wait ${minutes === 1 ? "a minute" : `${minutes} minutes`}, then try again.`, leftS);
}

/** Forgets the tries of a limit, after a right password. */
export async function forgetTries(limit: TryLimit): Promise<void> {
  getDb();
  await Throttle.destroy({ where: { key: keyOf(limit) } });
}

const QUARTER_HOUR_S = 900;

/** Tries of a password at sign-in: few per account from one address, more per account, more still per address. */
export function signInLimits(email: string, address: string): readonly [TryLimit, TryLimit, TryLimit] {
  return [
    { name: "sign-in", who: [email, address], tries: 6, windowS: QUARTER_HOUR_S },
    { name: "sign-in-account", who: [email], tries: 40, windowS: QUARTER_HOUR_S },
    { name: "sign-in-address", who: [address], tries: 60, windowS: QUARTER_HOUR_S },
  ];
}

/** Tries of one's own password again, when signing. */
export function passwordAgainLimit(personId: string): TryLimit {
  return { name: "password-again", who: [personId], tries: 6, windowS: QUARTER_HOUR_S };
}

/** Mails and accounts asked for from one address. */
export function askingLimit(what: string, address: string): TryLimit {
  return { name: what, who: [address], tries: 20, windowS: QUARTER_HOUR_S };
}
