/** A package is asked for: which sheets in which revision is fixed now, the queue makes it. */
import { randomUUID } from "node:crypto";
import { Op } from "sequelize";
import { STATE_WORDS } from "@/iso";
import { chosenSheets } from "@/lib/queries/package-source";
import { packageSource } from "@/lib/queries/package-rows";
import type { PackageNewForm } from "@/lib/rules/package-forms";
import { PACKED_STATES, type PackageSource, type PackedSheet, type Transmittal } from "@/lib/rules/packages";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict, refuseInvalid, refuseNotFound } from "@/lib/server/errors";
import { enqueue } from "@/lib/server/queue";
import { inShop } from "@/lib/server/scope";
import { settings } from "@/lib/server/settings";
import { sha256Text } from "@/lib/server/tokens";
import { Job, Package, PackageSheet, Revision, Shop } from "@/models";

/** Small packages are cut finer, so that their bar moves, too. */
const PART_SHEETS = { few: 2, many: 20, manyFrom: 100 } as const;

/** @throws Refusal 404 for a sheet that is not the job's; 409 for one that is not to be packed any more, or a transmittal's number used before. */
export async function askForPackage(context: CommandContext, jobId: string, form: PackageNewForm): Promise<{ id: string }> {
  const { viewer, tx, now } = context;
  const job = await inShop(viewer).one(Job, jobId, tx);
  const revisionIds = [...new Set(form.revisionIds)];
  const sheets = await chosenSheets(viewer, jobId, revisionIds, tx);
  if (sheets.length < revisionIds.length) throw refuseNotFound();
  assertPacked(sheets);
  await assertNewNumber(context, jobId, form.transmittal);
  const id = randomUUID();
  const source = await sourceOf(context, job, id, form, sheets);
  const text = JSON.stringify(source);
  const values = { jobId, title: source.title, state: "waiting" as const, source: text, sourceSha256: sha256Text(text), transmittal: form.transmittal?.number ?? null, askedBy: viewer.personId, askedAt: now };
  await Package.create({ shopId: viewer.shopId, id, ...values }, { transaction: tx });
  const rows = sheets.map(({ sheetId, state, hold }, ordinal) => ({ shopId: viewer.shopId, id: randomUUID(), packageId: id, ordinal, sheetId, state, hold }));
  await PackageSheet.bulkCreate(rows, { transaction: tx });
  await enqueue("package", { shopId: viewer.shopId, packageId: id }, tx);
  context.audit({ type: "package.asked", data: { packageId: id, jobId, title: source.title, count: sheets.length, sourceSha256: values.sourceSha256 } });
  return { id };
}

/**
 * The same choice again with what is current now: of each spool its live sheet, or the one for review where that was
 * chosen. It is no transmittal: one that goes out again has a number of its own. @throws Refusal 404; 409 when nothing is left.
 */
export async function askForPackageAgain(context: CommandContext, packageId: string): Promise<{ id: string }> {
  const { viewer, tx } = context;
  const before = await inShop(viewer).one(Package, packageId, tx);
  const source = packageSource(before);
  const spoolIds = source.sheets.map((sheet) => sheet.spoolId);
  const reviewed = new Set(source.sheets.filter((sheet) => sheet.kind === "review").map((sheet) => sheet.spoolId));
  const current = await inShop(viewer).all(Revision, { spoolId: { [Op.in]: spoolIds }, state: { [Op.in]: [...PACKED_STATES] } }, tx);
  const revisionIds = current.filter(({ state, spoolId }) => state !== "for-review" || reviewed.has(spoolId)).map((revision) => revision.id);
  if (revisionIds.length === 0) throw refuseConflict("None of its spools has a sheet to pack any more.");
  const { title, form, copies, extras, paper } = source;
  return askForPackage(context, before.jobId, { title, revisionIds, form, copies, extras: [...extras], paper, transmittal: null });
}

function assertPacked(sheets: readonly PackedSheet[]): void {
  const dead = sheets.find((sheet) => !(PACKED_STATES as readonly string[]).includes(sheet.state));
  if (dead === undefined) return;
  throw refuseConflict(`Sheet ${dead.sheetNumber} revision ${dead.code} is ${STATE_WORDS[dead.state]} now. Load the page again and choose anew.`);
}

async function assertNewNumber({ viewer, tx }: CommandContext, jobId: string, transmittal: Transmittal | null): Promise<void> {
  if (transmittal === null) return;
  const used = await inShop(viewer).first(Package, { jobId, transmittal: transmittal.number, state: { [Op.notIn]: ["failed", "cancelled"] } }, tx);
  if (used === null) return;
  const message = `Transmittal ${transmittal.number} exists already in this job: ${used.title}.`;
  throw refuseInvalid(message, { "transmittal.number": message });
}

async function sourceOf({ viewer, tx, now }: CommandContext, job: Job, id: string, form: PackageNewForm, sheets: readonly PackedSheet[]): Promise<PackageSource> {
  const shop = await Shop.findOne({ where: { id: viewer.shopId }, rejectOnEmpty: true, transaction: tx });
  return {
    version: 1, title: form.title || titleOf(sheets),
    form: form.form, copies: form.form === "pdf" ? "marked" : form.copies, extras: form.extras, paper: form.paper,
    jobNumber: job.number, jobTitle: job.title, client: job.client, area: job.area, shopName: shop.name,
    frontPaper: form.paper ?? job.settings.sheetSize, printedBy: viewer.name, printedAt: now.toISOString(),
    address: `${settings().BASE_URL}/packages/${id}`, transmittal: form.transmittal, sheets,
    partSheets: sheets.length < PART_SHEETS.manyFrom ? PART_SHEETS.few : PART_SHEETS.many,
  };
}

const MOST_NAMED = 3;

/** "Lines 4-CWS-1101, 4-CWS-1102": what is in it, in few words. */
function titleOf(sheets: readonly PackedSheet[]): string {
  const lines = [...new Set(sheets.map((sheet) => sheet.line))];
  const more = lines.length > MOST_NAMED ? ` and ${lines.length - MOST_NAMED} more` : "";
  return `${lines.length === 1 ? "Line" : "Lines"} ${lines.slice(0, MOST_NAMED).join(", ")}${more}`.slice(0, 120);
}
