/** The shop's log, the newest entries first, with the result of walking its whole chain. */
import { Op } from "sequelize";
import type { AuditPage } from "@/lib/rules/api-types";
import { auditSentenceOf } from "@/lib/rules/audit-events";
import { auditHead, verifyAudit } from "@/lib/server/audit";
import type { ShopMember } from "@/lib/server/scope";
import { AuditEvent } from "@/models";
import { peopleNames } from "./people-names";

const PAGE_ROWS = 50;

/** @param before entries older than this one; null starts at the newest. */
export async function auditPage({ shopId }: ShopMember, before: number | null): Promise<AuditPage> {
  const [broken, head] = [await verifyAudit(shopId), await auditHead(shopId)];
  const where = { shopId, ...(before === null ? {} : { seq: { [Op.lt]: before } }) };
  const rows = await AuditEvent.findAll({ where, order: [["seq", "DESC"]], limit: PAGE_ROWS });
  const nameOf = await peopleNames(rows.map((row) => row.actor));
  const last = rows[rows.length - 1];
  return {
    rows: rows.map((row) => ({
      seq: row.seq,
      at: row.at.toISOString(),
      actor: row.actor === null ? "Quarterline" : nameOf(row.actor),
      type: row.type,
      text: auditSentenceOf(row.type, row.data),
      hash: row.hash,
    })),
    head,
    broken,
    nextBefore: last === undefined || last.seq <= 1 ? null : last.seq,
  };
}
