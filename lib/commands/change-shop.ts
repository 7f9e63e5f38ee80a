/** The shop's own settings, its logo, and its word on catalogue take-outs. */
import { catalogueValue } from "@/iso";
import type { ShopSettingsForm } from "@/lib/rules/forms";
import type { CommandContext } from "@/lib/server/command";
import type { SentFile } from "@/lib/server/body";
import { refuseInvalid } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import { Shop, TakeOutWord } from "@/models";
import { storeLogo } from "./store-logo";

const NO_TABLE = "No table of ours has this fitting, so there is nothing to confirm. Enter what you measured.";

/** Changes what the form names; what is absent stays. */
export async function changeShop(context: CommandContext, form: ShopSettingsForm): Promise<void> {
  const shop = await lockedShop(context);
  const { name, ...changes } = form;
  const what = Object.keys(form).filter((key) => form[key as keyof ShopSettingsForm] !== undefined);
  await shop.update({ name: name ?? shop.name, settings: { ...shop.settings, ...changes } }, { transaction: context.tx });
  context.audit({ type: "shop.changed", data: { what } });
}

/** Sets the shop's logo, or takes it away. @throws Refusal 415 when the file is no PNG, JPEG or plain SVG. */
export async function setShopLogo(context: CommandContext, file: SentFile | null): Promise<void> {
  const logo = file === null ? null : await storeLogo(context, file);
  const shop = await lockedShop(context);
  await shop.update({ settings: { ...shop.settings, logo } }, { transaction: context.tx });
  context.audit({ type: "shop.logo", data: { sha256: logo?.key ?? null } });
}

/** Confirms a take-out as tabulated (`valueMm` null) or replaces it with what the shop measured, mm. */
export async function recordTakeOut(context: CommandContext, form: { readonly key: string; readonly valueMm: number | null }): Promise<void> {
  const { viewer, tx, now } = context;
  if (form.valueMm === null && catalogueValue(form.key, "imperial", []) === null) {
    throw refuseInvalid(NO_TABLE, { key: NO_TABLE });
  }
  await inShop(viewer).add(TakeOutWord, { key: form.key, valueMm: form.valueMm, by: viewer.personId, at: now }, tx);
  context.audit({ type: "take-out.word", data: form });
}

function lockedShop({ viewer, tx }: CommandContext): Promise<Shop> {
  return Shop.findOne({ where: { id: viewer.shopId }, rejectOnEmpty: true, transaction: tx, lock: tx.LOCK.UPDATE });
}
