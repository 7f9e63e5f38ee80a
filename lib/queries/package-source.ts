/** What a package is made of: the sheets that may be chosen, and those chosen with what is printed of them. */
import { QueryTypes, type Transaction } from "sequelize";
import type { RevisionState } from "@/iso";
import { PACKED_STATES, type PackageCandidate, type PackedSheet } from "@/lib/rules/packages";
import { canDo } from "@/lib/rules/permissions";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import { getDb } from "@/lib/server/database";
import { inShop } from "@/lib/server/scope";
import type { SessionViewer } from "@/lib/server/session";
import { Job } from "@/models";

interface Row {
  readonly revisionId: string;
  readonly sheetId: string;
  readonly spoolId: string;
  readonly lineId: string;
  readonly line: string;
  readonly letter: string;
  readonly sheetNumber: number | null;
  readonly code: string;
  readonly state: RevisionState;
  readonly hold: boolean;
  readonly kind: "review" | "fabrication";
  readonly sha256: string;
  readonly objectKey: string;
  readonly signed: boolean;
}

/** Each revision once, with the sheet that stands for it now: the signed one as soon as it is issued. */
const SHEETS = `
SELECT r.id AS "revisionId", f.id AS "sheetId", p.id AS "spoolId", l.id AS "lineId", l.number AS line, p.letter, p.sheet_number AS "sheetNumber",
       r.code, r.state, r.hold, f.kind, f.sha256, f.object_key AS "objectKey", f.certificate_id IS NOT NULL AS signed
FROM revisions r
JOIN spools p ON p.shop_id = r.shop_id AND p.id = r.spool_id
JOIN lines l ON l.shop_id = p.shop_id AND l.id = p.line_id
JOIN revision_sheets f ON f.shop_id = r.shop_id AND f.revision_id = r.id AND f.kind = CASE WHEN r.state = 'for-review' THEN 'review' ELSE 'fabrication' END
WHERE r.shop_id = $shopId AND l.job_id = $jobId AND l.archived_at IS NULL AND p.status = 'live'`;

/** The job's sheets that may be packed, by line and letter. Who sees issued sheets only is shown those. @throws Refusal 404. */
export async function packageCandidates(viewer: SessionViewer, jobId: string): Promise<PackageCandidate[]> {
  await inShop(viewer).one(Job, jobId);
  const rows = await sheetRows(viewer.shopId, jobId, "r.state = ANY($states::text[])", { states: statesFor(viewer) });
  return rows.map(({ revisionId, lineId, line, letter, sheetNumber, code, state, hold }) => ({
    revisionId, lineId, line, letter, code, hold, state: state as PackageCandidate["state"], sheetNumber: sheetNumberText(sheetNumber),
  }));
}

function statesFor(viewer: Pick<SessionViewer, "role">): string[] {
  return PACKED_STATES.filter((state) => state !== "for-review" || canDo(viewer.role, "revisions.review"));
}

/** The chosen sheets in the order they print; those that are not the job's, or not the viewer's to see, are not among them. */
export async function chosenSheets(viewer: Pick<SessionViewer, "shopId" | "role">, jobId: string, revisionIds: readonly string[], tx: Transaction): Promise<PackedSheet[]> {
  const rows = await sheetRows(viewer.shopId, jobId, "r.id = ANY($revisionIds::uuid[])", { revisionIds: [...revisionIds] }, tx);
  const seen = rows.filter((row) => row.kind === "fabrication" || canDo(viewer.role, "revisions.review"));
  return seen.map(({ revisionId, sheetId, spoolId, kind, sheetNumber, code, state, hold, line, letter, sha256, objectKey, signed }) => ({
    revisionId, sheetId, spoolId, kind, code, state, hold, line, letter, sha256, objectKey, signed, sheetNumber: sheetNumberText(sheetNumber),
  }));
}

async function sheetRows(shopId: string, jobId: string, where: string, bind: Readonly<Record<string, unknown>>, transaction: Transaction | null = null): Promise<Row[]> {
  const rows = await getDb().query<Row>(`${SHEETS} AND ${where}`, { bind: { shopId, jobId, ...bind }, type: QueryTypes.SELECT, transaction });
  const filed = new Intl.Collator("en-US", { numeric: true, sensitivity: "base" });
  return rows.sort((a, b) => filed.compare(a.line, b.line) || a.letter.length - b.letter.length || filed.compare(a.letter, b.letter) || filed.compare(a.code, b.code));
}
