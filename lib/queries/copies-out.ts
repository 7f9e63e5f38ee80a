/** Who took which copy of which revision, when, and whether it was withdrawn since. */
import { QueryTypes, type Transaction } from "sequelize";
import type { RevisionState } from "@/iso";
import { looksLive, mustWithdraw, type CopyRow } from "@/lib/rules/copies";
import { canDo } from "@/lib/rules/permissions";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import { getDb } from "@/lib/server/database";
import { inShop, type ShopMember } from "@/lib/server/scope";
import type { SessionViewer } from "@/lib/server/session";
import { Job, Spool } from "@/models";
import { peopleNames } from "./people-names";

/** Newest copies shown of one spool; those to be withdrawn are shown of every age. */
const MOST_SHOWN = 300;

interface Row {
  readonly id: string;
  readonly by: string;
  readonly at: Date;
  readonly marked: string;
  readonly kind: "review" | "fabrication";
  readonly spool_id: string;
  readonly line: string;
  readonly letter: string;
  readonly sheet_number: number | null;
  readonly code: string;
  readonly state: RevisionState;
  readonly hold: boolean;
  readonly withdrawn_by: string | null;
  readonly withdrawn_at: Date | null;
}

const COPIES = `
SELECT c.id, c.by, c.at, c.marked, s.kind, p.id AS spool_id, l.number AS line, p.letter, p.sheet_number, r.code, r.state, r.hold,
       w.by AS withdrawn_by, w.at AS withdrawn_at
FROM sheet_copies c
JOIN revision_sheets s ON s.shop_id = c.shop_id AND s.id = c.sheet_id
JOIN revisions r ON r.shop_id = s.shop_id AND r.id = s.revision_id
JOIN spools p ON p.shop_id = r.shop_id AND p.id = r.spool_id
JOIN lines l ON l.shop_id = p.shop_id AND l.id = p.line_id
LEFT JOIN copy_withdrawals w ON w.shop_id = c.shop_id AND w.copy_id = c.id
WHERE c.shop_id = $shopId`;

/** Not marked, of a revision that is none to work from: what may have to come back. */
const DUE = "w.id IS NULL AND (r.hold OR r.state IN ('superseded', 'void', 'returned'))";

/** Every copy of a spool's sheets, newest first. Those who see issued sheets only see copies of those. @throws Refusal 404. */
export async function spoolCopies(viewer: SessionViewer, spoolId: string): Promise<CopyRow[]> {
  await inShop(viewer).one(Spool, spoolId);
  const rows = await copyRows(viewer, "p.id = $id", spoolId);
  const seen = rows.filter((row) => row.kind === "fabrication" || canDo(viewer.role, "revisions.review"));
  return seen.filter((row, index) => index < MOST_SHOWN || row.withdraw);
}

/** Copies of a job's sheets that have to come back, newest first. @throws Refusal 404. */
export async function jobWithdrawals(viewer: SessionViewer, jobId: string): Promise<CopyRow[]> {
  await inShop(viewer).one(Job, jobId);
  const rows = await copyRows(viewer, `l.job_id = $id AND ${DUE}`, jobId);
  return rows.filter((row) => row.withdraw);
}

/** Copies the viewer took of any sheet of the shop that have to come back, newest first. */
export async function ownWithdrawals(viewer: SessionViewer): Promise<CopyRow[]> {
  const rows = await copyRows(viewer, `c.by = $id AND ${DUE}`, viewer.personId);
  return rows.filter((row) => row.withdraw);
}

async function copyRows(viewer: SessionViewer, where: string, id: string): Promise<CopyRow[]> {
  const rows = await getDb().query<Row>(`${COPIES} AND ${where} ORDER BY c.at DESC, c.id`, { bind: { shopId: viewer.shopId, id }, type: QueryTypes.SELECT });
  const nameOf = await peopleNames(rows.flatMap((row) => [row.by, row.withdrawn_by]));
  return rows.map((row) => shownRow(row, viewer, nameOf));
}

function shownRow(row: Row, viewer: SessionViewer, nameOf: (id: string | null) => string): CopyRow {
  const { id, marked, kind, line, code, state, hold } = row;
  const withdrawn = row.withdrawn_at === null ? null : { by: nameOf(row.withdrawn_by), at: row.withdrawn_at.toISOString() };
  return {
    id, marked, kind, line, code, state, hold, withdrawn,
    by: nameOf(row.by),
    mine: row.by === viewer.personId,
    at: row.at.toISOString(),
    spoolId: row.spool_id,
    spool: row.letter,
    sheetNumber: sheetNumberText(row.sheet_number),
    withdraw: mustWithdraw({ kind, marked, state, hold, withdrawn: withdrawn !== null }),
  };
}

/** Copies of one revision that are still out and look like sheets to work from, by who took them. */
export async function holdersOf({ shopId }: ShopMember, revisionId: string, tx: Transaction): Promise<Map<string, { marked: string; at: string }[]>> {
  const rows = await getDb().query<Row>(`${COPIES} AND r.id = $revisionId AND w.id IS NULL ORDER BY c.at, c.id`, {
    bind: { shopId, revisionId },
    type: QueryTypes.SELECT,
    transaction: tx,
  });
  const holders = new Map<string, { marked: string; at: string }[]>();
  for (const { by, at, marked, kind } of rows) {
    if (looksLive({ kind, marked })) holders.set(by, [...(holders.get(by) ?? []), { marked, at: at.toISOString() }]);
  }
  return holders;
}
