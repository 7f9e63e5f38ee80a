/** The title block of a job's sheets: the shop's name, the job's words, and the job's logo or else the shop's. */
import type { TitleBlock } from "@/iso";
import type { Job, Shop } from "@/models";

export function titleBlockOf(shop: Shop, job: Job): TitleBlock {
  return {
    shopName: shop.name,
    client: job.client,
    project: job.title,
    jobNumber: job.number,
    area: job.area,
    plantNorthDeg: job.settings.plantNorthDeg,
    fields: job.settings.fields,
    ...(job.settings.titleOrder?.length ? { order: job.settings.titleOrder } : {}),
    logo: job.settings.logo ?? shop.settings.logo,
  };
}
