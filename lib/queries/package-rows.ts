/** Packages as pages show them. Who sees issued sheets only is shown packages of issued sheets only. */
import { QueryTypes } from "sequelize";
import type { RevisionState } from "@/iso";
import { outdatedSentence, standingWords, type PackageDetail, type PackageRow, type PackageSheetRow, type PackageSource } from "@/lib/rules/packages";
import { plainName } from "@/lib/rules/exchange/file-names";
import { getDb } from "@/lib/server/database";
import { refuseNotFound } from "@/lib/server/errors";
import { inShop, type ShopMember } from "@/lib/server/scope";
import type { SessionViewer } from "@/lib/server/session";
import { Job, Package, PackageReceipt } from "@/models";
import { seesIssuedOnly } from "./jobs";
import { peopleNames } from "./people-names";

/** Newest packages shown of a job. */
const MOST_SHOWN = 200;

/** The job's packages, the newest first. @throws Refusal 404. */
export async function packageRows(viewer: SessionViewer, jobId: string): Promise<PackageRow[]> {
  await inShop(viewer).one(Job, jobId);
  const packages = await inShop(viewer).all(Package, { jobId }, null, { order: [["askedAt", "DESC"], ["id", "ASC"]], limit: MOST_SHOWN });
  const shown = packages.filter((one) => maySeePackage(viewer, packageSource(one)));
  return rowsOf(viewer, shown);
}

/** @throws Refusal 404, also for a package with sheets for review in it to who sees issued sheets only. */
export async function packageDetail(viewer: SessionViewer, packageId: string): Promise<PackageDetail> {
  const one = await visiblePackage(viewer, packageId);
  const source = packageSource(one);
  const job = await inShop(viewer).one(Job, one.jobId);
  const [row] = await rowsOf(viewer, [one]);
  const receipt = await inShop(viewer).first(PackageReceipt, { packageId });
  const nameOf = await peopleNames([receipt?.by ?? null]);
  const { form, copies, extras, paper } = source;
  return {
    ...row!, jobId: job.id, jobNumber: job.number, fileName: packageFileName(source), sha256: one.sha256, doneAt: one.doneAt?.toISOString() ?? null,
    options: { form, copies, extras, paper }, facts: source.transmittal,
    receipt: receipt === null ? null : { receivedBy: receipt.receivedBy, receivedOn: receipt.receivedOn, remark: receipt.remark, by: nameOf(receipt.by), at: receipt.at.toISOString() },
    rows: await sheetsNow(viewer, packageId, source),
    holders: await holders(viewer, one),
  };
}

/** @throws Refusal 404. */
export async function visiblePackage(viewer: SessionViewer, packageId: string): Promise<Package> {
  const one = await inShop(viewer).one(Package, packageId);
  if (!maySeePackage(viewer, packageSource(one))) throw refuseNotFound();
  return one;
}

export function packageSource(one: Pick<Package, "source">): PackageSource {
  return JSON.parse(one.source) as PackageSource;
}

/** "2614-package-rack-east.pdf". */
export function packageFileName({ jobNumber, title, form, transmittal }: PackageSource): string {
  const words = transmittal === null ? `package ${title}` : `transmittal ${transmittal.number} ${title}`;
  return `${plainName(`${jobNumber} ${words}`)}.${form}`;
}

function maySeePackage(viewer: Pick<SessionViewer, "role">, source: PackageSource): boolean {
  return !seesIssuedOnly(viewer) || source.sheets.every((sheet) => sheet.kind === "fabrication");
}

async function rowsOf(viewer: SessionViewer, packages: readonly Package[]): Promise<PackageRow[]> {
  const ids = packages.map((one) => one.id);
  const nameOf = await peopleNames(packages.map((one) => one.askedBy));
  const prepared = await preparedSheets(viewer, ids);
  const outdated = await outdatedCounts(viewer, ids);
  return packages.map((one) => {
    const source = packageSource(one);
    const sheets = source.sheets.length;
    return {
      id: one.id, title: one.title, state: one.state, form: source.form, transmittal: one.transmittal, sheets,
      prepared: one.state === "ready" ? sheets : (prepared.get(one.id) ?? 0),
      bytes: one.bytes, pages: one.pages, problem: one.problem, askedBy: nameOf(one.askedBy), askedAt: one.askedAt.toISOString(),
      outdated: outdated.get(one.id) ?? 0,
    };
  });
}

async function preparedSheets({ shopId }: ShopMember, ids: readonly string[]): Promise<Map<string, number>> {
  const rows = await getDb().query<{ id: string; sheets: string }>(
    `SELECT package_id AS id, sum(sheets) AS sheets FROM package_parts WHERE shop_id = $shopId AND package_id = ANY($ids::uuid[]) AND stored_at IS NOT NULL GROUP BY package_id`,
    { bind: { shopId, ids: [...ids] }, type: QueryTypes.SELECT },
  );
  return new Map(rows.map((row) => [row.id, Number(row.sheets)]));
}

interface NowRow {
  readonly packageId: string;
  readonly ordinal: number;
  readonly kind: "review" | "fabrication";
  readonly state: RevisionState;
  readonly hold: boolean;
  readonly nowState: RevisionState;
  readonly nowHold: boolean;
  readonly liveCode: string | null;
}

const NOW = `
SELECT s.package_id AS "packageId", s.ordinal, f.kind, s.state, s.hold, r.state AS "nowState", r.hold AS "nowHold",
       (SELECT live.code FROM revisions live WHERE live.shop_id = r.shop_id AND live.spool_id = r.spool_id AND live.state IN ('for-fabrication', 'as-built')) AS "liveCode"
FROM package_sheets s
JOIN packages p ON p.shop_id = s.shop_id AND p.id = s.package_id
JOIN revision_sheets f ON f.shop_id = s.shop_id AND f.id = s.sheet_id
JOIN revisions r ON r.shop_id = f.shop_id AND r.id = f.revision_id
WHERE s.shop_id = $shopId AND s.package_id = ANY($ids::uuid[])`;

async function standings({ shopId }: ShopMember, ids: readonly string[], changedOnly: boolean): Promise<NowRow[]> {
  const changed = changedOnly ? ` AND p.state = 'ready' AND (r.state, r.hold) IS DISTINCT FROM (s.state, s.hold)` : "";
  return getDb().query<NowRow>(`${NOW}${changed} ORDER BY s.package_id, s.ordinal`, { bind: { shopId, ids: [...ids] }, type: QueryTypes.SELECT });
}

function sentenceOf({ state, hold, nowState, nowHold, kind, liveCode }: NowRow): string | null {
  return outdatedSentence({ state, hold }, { state: nowState, hold: nowHold }, kind, liveCode ?? "");
}

/** How many sheets of each package that is ready are not current any more. */
export async function outdatedCounts(member: ShopMember, ids: readonly string[]): Promise<Map<string, number>> {
  const counts = new Map<string, number>();
  for (const row of await standings(member, ids, true)) if (sentenceOf(row) !== null) counts.set(row.packageId, (counts.get(row.packageId) ?? 0) + 1);
  return counts;
}

async function sheetsNow(member: ShopMember, packageId: string, source: PackageSource): Promise<PackageSheetRow[]> {
  const now = new Map((await standings(member, [packageId], false)).map((row) => [row.ordinal, row]));
  return source.sheets.map(({ revisionId, spoolId, sheetNumber, code, line, letter, state, hold }, ordinal) => {
    const row = now.get(ordinal);
    return {
      revisionId, spoolId, sheetNumber, code, line, letter, printed: standingWords({ state, hold }),
      now: row === undefined ? "" : standingWords({ state: row.nowState, hold: row.nowHold }),
      outdated: row === undefined ? null : sentenceOf(row),
    };
  });
}

/** Who has copies out that were taken with this package, and of how many of its sheets. */
async function holders({ shopId }: ShopMember, one: Package): Promise<PackageDetail["holders"]> {
  if (one.sha256 === null) return [];
  const rows = await getDb().query<{ by: string; at: Date; out: string }>(
    `SELECT c.by, max(c.at) AS at, count(*) FILTER (WHERE w.id IS NULL) AS out
     FROM package_sheets s JOIN sheet_copies c ON c.shop_id = s.shop_id AND c.sheet_id = s.sheet_id AND c.package_id = s.package_id
     LEFT JOIN copy_withdrawals w ON w.shop_id = c.shop_id AND w.copy_id = c.id
     WHERE s.shop_id = $shopId AND s.package_id = $id GROUP BY c.by ORDER BY at DESC`,
    { bind: { shopId, id: one.id }, type: QueryTypes.SELECT },
  );
  const nameOf = await peopleNames(rows.map((row) => row.by));
  return rows.map((row) => ({ name: nameOf(row.by), at: row.at.toISOString(), out: Number(row.out) }));
}
