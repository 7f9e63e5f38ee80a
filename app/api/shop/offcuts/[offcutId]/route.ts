import { z } from "zod";
import { removeOffcut } from "@/lib/commands/change-offcuts";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

export const DELETE = write("shop.change", {
  params: z.object({ offcutId: idSchema }),
  run: (context, { params }) => removeOffcut(context, params.offcutId),
});
