import { setShopLogo } from "@/lib/commands/change-shop";
import { LOGO_MAX_BYTES } from "@/lib/rules/write-bodies";
import { write, writeFile } from "@/lib/server/write";

export const PUT = writeFile("shop.change", {
  maxBytes: LOGO_MAX_BYTES,
  run: (context, { body }) => setShopLogo(context, body),
});

export const DELETE = write("shop.change", { run: (context) => setShopLogo(context, null) });
