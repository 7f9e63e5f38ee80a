/** Jobs as listed, and one job with its lines. Who sees issued sheets only is shown jobs and lines that have some. */
import { QueryTypes } from "sequelize";
import type { JobDetail, JobRow, LineRow } from "@/lib/rules/api-types";
import { canDo } from "@/lib/rules/permissions";
import { getDb } from "@/lib/server/database";
import { refuseForbidden } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import type { SessionViewer } from "@/lib/server/session";
import { Job, Line } from "@/models";
import { peopleNames } from "./people-names";
import { spoolRowsByLine } from "./spool-rows";

const JOBS = `
SELECT j.id, j.number, j.title, j.client, j.open,
  greatest(j.updated_at, max(l.updated_at)) AS "updatedAt",
  count(DISTINCT l.id)::int AS lines,
  count(DISTINCT s.id)::int AS spools,
  count(DISTINCT s.id) FILTER (WHERE r.state = 'for-review')::int AS "forReview",
  count(DISTINCT s.id) FILTER (WHERE r.state = 'for-fabrication')::int AS "forFabrication",
  count(DISTINCT s.id) FILTER (WHERE r.hold)::int AS held
FROM jobs j
LEFT JOIN lines l ON l.shop_id = j.shop_id AND l.job_id = j.id AND l.archived_at IS NULL
  AND (NOT $issuedOnly::boolean OR EXISTS (
    SELECT 1 FROM spools i JOIN revisions ir ON ir.shop_id = i.shop_id AND ir.spool_id = i.id
    WHERE i.shop_id = l.shop_id AND i.line_id = l.id AND ir.state IN ('for-fabrication', 'as-built')))
LEFT JOIN spools s ON s.shop_id = l.shop_id AND s.line_id = l.id AND s.status = 'live'
  AND (NOT $issuedOnly::boolean OR EXISTS (
    SELECT 1 FROM revisions ir WHERE ir.shop_id = s.shop_id AND ir.spool_id = s.id AND ir.state IN ('for-fabrication', 'as-built')))
LEFT JOIN revisions r ON r.shop_id = s.shop_id AND r.spool_id = s.id AND r.state IN ('for-review', 'for-fabrication', 'as-built')
  AND (NOT $issuedOnly::boolean OR r.state <> 'for-review')
WHERE j.shop_id = $shopId
GROUP BY j.shop_id, j.id
HAVING NOT $issuedOnly::boolean OR count(s.id) > 0
ORDER BY "updatedAt" DESC, j.id`;

/** Whether a viewer sees issued sheets only. */
export function seesIssuedOnly(viewer: Pick<SessionViewer, "role">): boolean {
  return !canDo(viewer.role, "lines.read");
}

export async function jobRows(viewer: SessionViewer): Promise<JobRow[]> {
  const bind = { shopId: viewer.shopId, issuedOnly: seesIssuedOnly(viewer) };
  const rows = await getDb().query<Omit<JobRow, "updatedAt"> & { updatedAt: Date }>(JOBS, { bind, type: QueryTypes.SELECT });
  return rows.map((row) => ({ ...row, updatedAt: row.updatedAt.toISOString() }));
}

/** @throws Refusal 404; 403 for a fitter when nothing of it is issued. */
export async function jobDetail(viewer: SessionViewer, jobId: string): Promise<JobDetail> {
  const job = await inShop(viewer).one(Job, jobId);
  const lines = await linesOf(viewer, jobId);
  const { number, title, client, area, open } = job;
  return { id: job.id, number, title, client, area, open, ...job.settings, lines };
}

/** A job's lines that are not archived, by number. @throws Refusal 404, 403 as for the job. */
export async function lineRows(viewer: SessionViewer, jobId: string): Promise<LineRow[]> {
  await inShop(viewer).one(Job, jobId);
  return linesOf(viewer, jobId);
}

async function linesOf(viewer: SessionViewer, jobId: string): Promise<LineRow[]> {
  const attributes = ["id", "number", "title", "size", "material", "points", "updatedAt", "updatedBy"] as const;
  const lines = await inShop(viewer).all(Line, { jobId, archivedAt: null }, null, { attributes: [...attributes], order: [["number", "ASC"]] });
  const issuedOnly = seesIssuedOnly(viewer);
  const spools = await spoolRowsByLine(viewer, lines.map((line) => line.id), issuedOnly);
  const nameOf = await peopleNames(lines.map((line) => line.updatedBy));
  const shown = lines.filter((line) => !issuedOnly || spools.has(line.id));
  if (issuedOnly && shown.length === 0) throw refuseForbidden("Nothing of this job is issued yet.");
  return shown.map((line) => ({
    id: line.id,
    number: line.number,
    title: line.title,
    size: line.size,
    material: line.material,
    points: line.points,
    spools: spools.get(line.id) ?? [],
    updatedAt: line.updatedAt.toISOString(),
    updatedBy: nameOf(line.updatedBy),
  }));
}
