/** The shop's settings, as its page shows them. */
import type { ShopSettings } from "@/lib/rules/api-types";
import { NESTING_START } from "@/lib/rules/nest-plans";
import { getDb } from "@/lib/server/database";
import type { ShopMember } from "@/lib/server/scope";
import { Shop } from "@/models";
import { takeOutWords } from "./take-out-words";

export async function shopSettings(member: ShopMember): Promise<ShopSettings> {
  getDb();
  const shop = await Shop.findOne({ where: { id: member.shopId }, rejectOnEmpty: true });
  const { fields, titleOrder, logo, sheetSize, defaults, stock } = shop.settings;
  const titleBlock = { shopName: shop.name, client: "", project: "", jobNumber: "", area: "", fields, ...(titleOrder?.length ? { order: titleOrder } : {}), logo };
  return { name: shop.name, titleBlock, sheetSize, defaults, stock, nesting: shop.settings.nesting ?? NESTING_START, takeOuts: await takeOutWords(member) };
}
