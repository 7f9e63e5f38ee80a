import { changeShop } from "@/lib/commands/change-shop";
import { shopSettings } from "@/lib/queries/shop-settings";
import { shopSettingsSchema } from "@/lib/rules/forms";
import { read } from "@/lib/server/read";
import { write } from "@/lib/server/write";

export const GET = read("shop.read", { run: shopSettings });

export const PATCH = write("shop.change", {
  body: shopSettingsSchema,
  run: (context, { body }) => changeShop(context, body),
});
