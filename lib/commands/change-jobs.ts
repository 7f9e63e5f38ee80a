/** Jobs: opening one with the shop's defaults, changing it, its logo. */
import { fn, where, col, Op, type Transaction } from "sequelize";
import type { JobNewForm, JobSettingsForm } from "@/lib/rules/forms";
import { lineSettingsIn, type StoredJobSettings } from "@/lib/rules/default-settings";
import type { SentFile } from "@/lib/server/body";
import type { Actor, CommandContext } from "@/lib/server/command";
import { refuseConflict } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { Job, Shop } from "@/models";
import { storeLogo } from "./store-logo";

/** Opens a job. It starts with the shop's settings in the units asked for. @throws Refusal 409 when the number is taken. */
export async function addJob(context: CommandContext, form: JobNewForm): Promise<{ id: string }> {
  const { viewer, tx, now } = context;
  await assertNumberFree(viewer, form.number, null, tx);
  const shop = await Shop.findOne({ where: { id: viewer.shopId }, rejectOnEmpty: true, transaction: tx });
  const { fields, titleOrder, sheetSize, defaults } = shop.settings;
  const settings: StoredJobSettings = { fields, ...(titleOrder ? { titleOrder } : {}), logo: null, sheetSize, plantNorthDeg: 0, defaults: lineSettingsIn(form.units, defaults) };
  const { number, title, client, area } = form;
  const values = { number, title, client, area, open: true, settings, createdAt: now, createdBy: viewer.personId, updatedAt: now };
  const job = await inShop(viewer).add(Job, values, tx);
  context.audit({ type: "job.created", data: { jobId: job.id, number } });
  return { id: job.id };
}

/** Changes what the form names; what is absent stays. Lines keep the settings they were made with. */
export async function changeJob(context: CommandContext, jobId: string, form: JobSettingsForm): Promise<void> {
  const { viewer, tx, now } = context;
  const job = await inShop(viewer).locked(Job, jobId, tx);
  if (form.number !== undefined) await assertNumberFree(viewer, form.number, jobId, tx);
  const { number, title, client, area, open, ...settings } = form;
  const kept = { number: job.number, title: job.title, client: job.client, area: job.area, open: job.open };
  await job.update({ ...kept, ...present({ number, title, client, area, open }), settings: { ...job.settings, ...present(settings) }, updatedAt: now }, { transaction: tx });
  context.audit({ type: "job.changed", data: { jobId, number: job.number, what: Object.keys(present(form)) } });
}

/** Sets the job's logo, or takes it away so that the shop's shows. */
export async function setJobLogo(context: CommandContext, jobId: string, file: SentFile | null): Promise<void> {
  const { viewer, tx, now } = context;
  await inShop(viewer).one(Job, jobId, tx);
  const logo = file === null ? null : await storeLogo(context, file);
  const job = await inShop(viewer).locked(Job, jobId, tx);
  await job.update({ settings: { ...job.settings, logo }, updatedAt: now }, { transaction: tx });
  context.audit({ type: "job.logo", data: { jobId, number: job.number, sha256: logo?.key ?? null } });
}

/** Only what was named. */
function present<T extends object>(values: T): Partial<T> {
  return Object.fromEntries(Object.entries(values).filter(([, value]) => value !== undefined)) as Partial<T>;
}

async function assertNumberFree(viewer: Actor, number: string, exceptId: string | null, tx: Transaction): Promise<void> {
  const taken = await Job.findOne({
    where: { shopId: viewer.shopId, [Op.and]: [where(fn("lower", col("number")), number.toLowerCase())], ...(exceptId === null ? {} : { id: { [Op.ne]: exceptId } }) },
    transaction: tx,
  });
  if (taken !== null) throw refuseConflict(`There is a job ${taken.number} already.`, { fields: { number: "This number is taken." } });
}
