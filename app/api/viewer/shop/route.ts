import { switchShop } from "@/lib/commands/change-session";
import { shopSwitchSchema } from "@/lib/rules/forms";
import { write } from "@/lib/server/write";

export const POST = write("shop.read", {
  body: shopSwitchSchema,
  rule: "unlogged",
  run: (context, { body }) => switchShop(context, body.shopId),
});
