/** Packages in tests: a job with several issued spools, one made through the queue's own job, its file read back. */
import * as jobPackages from "@/app/api/jobs/[jobId]/packages/route";
import * as packageRoute from "@/app/api/packages/[packageId]/route";
import * as signRoute from "@/app/api/revisions/[revisionId]/sign/route";
import * as submitRoute from "@/app/api/spools/[spoolId]/submit/route";
import { addJob } from "@/lib/commands/change-jobs";
import { storeLine } from "@/lib/commands/add-line";
import { runPackageJob } from "@/lib/jobs/package-job";
import type { PackageDetail } from "@/lib/rules/packages";
import { runCommand, type Actor } from "@/lib/server/command";
import { getObject } from "@/lib/server/storage";
import { Package, Spool } from "@/models";
import { sampleDocument } from "../factories";
import { signBody } from "./revision-support";
import { call, unique, type TestPerson, type TestShop } from "./support";

export interface IssuedSpool {
  readonly lineId: string;
  readonly line: string;
  readonly spoolId: string;
  readonly revisionId: string;
}

export interface IssuedJob {
  readonly jobId: string;
  readonly spools: readonly IssuedSpool[];
}

/** A job of its own with so many lines of one signed spool each. */
export async function issuedJob(shop: TestShop, count: number): Promise<IssuedJob> {
  const job = await runCommand<Actor, { id: string }>(shop.detailer, "logged", (context) =>
    addJob(context, { number: unique("J"), title: "Packed job", client: "Client", area: "Area 1", units: "imperial" }),
  );
  const spools: IssuedSpool[] = [];
  for (let index = 0; index < count; index += 1) spools.push(await issueLine(shop, job.id, `L-${String(index + 1).padStart(3, "0")}`, index));
  return { jobId: job.id, spools };
}

async function issueLine(shop: TestShop, jobId: string, line: string, index: number): Promise<IssuedSpool> {
  const { id: lineId } = await runCommand<Actor, { id: string }>(shop.detailer, "logged", (context) => storeLine(context, jobId, sampleDocument(line, 1_000 + 25 * index), null));
  const spool = await Spool.findOne({ where: { shopId: shop.shopId, lineId }, order: [["letter", "ASC"]], rejectOnEmpty: true });
  return { lineId, line, spoolId: spool.id, revisionId: await issue(shop, spool.id) };
}

/** Submits and signs what a spool is now. @returns the revision's id. */
export async function issue(shop: TestShop, spoolId: string): Promise<string> {
  const submitted = await call(submitRoute.POST, { as: shop.detailer, method: "POST", params: { spoolId }, body: { description: "Issue", size: "letter" } });
  if (submitted.status >= 300) throw new Error(`submit answered ${submitted.status} ${submitted.text}`);
  const revisionId = submitted.json.revisionId as string;
  const signed = await call(signRoute.POST, { as: shop.inspector, method: "POST", params: { revisionId }, body: signBody });
  if (signed.status >= 300) throw new Error(`sign answered ${signed.status} ${signed.text}`);
  return revisionId;
}

export const revisionsOfJob = (job: IssuedJob): string[] => job.spools.map((spool) => spool.revisionId);

/** Asks for a package of the job. @returns its id. */
export async function askPackage(job: IssuedJob, as: TestPerson, more: Readonly<Record<string, unknown>> = {}): Promise<string> {
  const body = { revisionIds: revisionsOfJob(job), form: "pdf", ...more };
  const answer = await call(jobPackages.POST, { as, method: "POST", params: { jobId: job.jobId }, body });
  if (answer.status !== 201) throw new Error(`asking answered ${answer.status} ${answer.text}`);
  return answer.json.id as string;
}

/** Asks for a package and makes it as the queue would. @returns its id. */
export async function madePackage(job: IssuedJob, as: TestPerson, more: Readonly<Record<string, unknown>> = {}): Promise<string> {
  const packageId = await askPackage(job, as, more);
  await runPackageJob({ shopId: as.shopId, packageId });
  return packageId;
}

export async function packageOf(packageId: string, as: TestPerson): Promise<PackageDetail> {
  const answer = await call(packageRoute.GET, { as, params: { packageId } });
  if (answer.status !== 200) throw new Error(`the package answered ${answer.status} ${answer.text}`);
  return answer.json as PackageDetail;
}

/** The stored result's bytes. */
export async function resultBytes(packageId: string): Promise<Uint8Array> {
  const one = await Package.findOne({ where: { id: packageId }, rejectOnEmpty: true });
  const bytes = one.objectKey === null ? null : await getObject(one.objectKey);
  if (bytes === null) throw new Error("The package has no stored result.");
  return bytes;
}
