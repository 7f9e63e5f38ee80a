import { z } from "zod";
import { noteReceipt } from "@/lib/commands/change-packages";
import { packageReceiptSchema } from "@/lib/rules/package-forms";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

export const POST = write("packages.receipt", {
  params: z.object({ packageId: idSchema }),
  body: packageReceiptSchema,
  run: (context, { params, body }) => noteReceipt(context, params.packageId, body),
});
