import { z } from "zod";
import { recordWork } from "@/lib/commands/record-work";
import { workSchema } from "@/lib/rules/forms";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

export const POST = write("work.record", {
  params: z.object({ spoolId: idSchema }),
  body: workSchema,
  status: 201,
  run: (context, { params, body }) => recordWork(context, params.spoolId, body),
});
