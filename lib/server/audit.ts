/** The shop's log: entries are appended in the transaction of the change they tell of, one at a time per shop. */
import { QueryTypes, type Transaction } from "sequelize";
import { auditEventSchema, type AuditEvent as Event } from "@/lib/rules/audit-events";
import { chainBreak, chainText, CHAIN_START, type ChainHead } from "@/lib/rules/audit-chain";
import { AuditEvent, RevisionSheet } from "@/models";
import { getDb } from "./database";
import { sha256Text } from "./tokens";

export interface AuditAppend {
  readonly shopId: string;
  /** Person, or null for what the server did by itself. */
  readonly actor: string | null;
  readonly at: Date;
  readonly event: Event;
}

/**
 * Appends one entry under the shop's advisory lock, which is kept until the transaction ends: the chain of two
 * changes never forks.
 * @returns the new head of the chain.
 */
export async function appendAudit(tx: Transaction, append: AuditAppend): Promise<ChainHead> {
  const event = auditEventSchema.parse(append.event);
  const { shopId, actor, at } = append;
  await getDb().query("SELECT pg_advisory_xact_lock(hashtextextended('audit:' || $shopId, 0))", { bind: { shopId }, transaction: tx });
  const last = await auditHead(shopId, tx);
  const entry = { shopId, seq: last.seq + 1, at: at.toISOString(), actor, type: event.type, data: JSON.stringify(event.data), prevHash: last.hash };
  const hash = sha256Text(chainText(entry));
  await AuditEvent.create({ ...entry, at, hash }, { transaction: tx });
  return { seq: entry.seq, hash };
}

/** Head of a shop's chain: the last entry, or the start of an empty one. */
export async function auditHead(shopId: string, tx: Transaction | null = null): Promise<ChainHead> {
  const [row] = await getDb().query<{ seq: string; hash: string }>(
    "SELECT seq, hash FROM audit_events WHERE shop_id = $shopId ORDER BY seq DESC LIMIT 1",
    { bind: { shopId }, type: QueryTypes.SELECT, transaction: tx },
  );
  return row === undefined ? { seq: 0, hash: CHAIN_START } : { seq: Number(row.seq), hash: row.hash };
}

/** A head as it is printed: entry number and hash. */
export function headText(head: ChainHead): string {
  return `${head.seq}:${head.hash}`;
}

/**
 * Walks a shop's whole chain.
 * @param knownHeads heads noted outside the database (mails, server log); those stored with the sheets are read here.
 * @returns null when it is whole, else a sentence saying where it breaks.
 */
export async function verifyAudit(shopId: string, knownHeads: readonly ChainHead[] = []): Promise<string | null> {
  getDb();
  const rows = await AuditEvent.findAll({ where: { shopId }, order: [["seq", "ASC"]], raw: true });
  const sheets = await RevisionSheet.findAll({ where: { shopId }, attributes: ["auditSeq", "auditHash"], raw: true });
  const entries = rows.map((row) => ({ ...row, seq: Number(row.seq), at: row.at.toISOString() }));
  const noted = sheets.map((sheet) => ({ seq: Number(sheet.auditSeq), hash: sheet.auditHash }));
  return chainBreak(entries, [...noted, ...knownHeads], sha256Text);
}
