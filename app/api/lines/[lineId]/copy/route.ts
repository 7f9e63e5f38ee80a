import { z } from "zod";
import { copyLine } from "@/lib/commands/add-line";
import { lineCopySchema } from "@/lib/rules/forms";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

export const POST = write("lines.change", {
  params: z.object({ lineId: idSchema }),
  body: lineCopySchema,
  status: 201,
  run: (context, { params, body }) => copyLine(context, params.lineId, body),
});
