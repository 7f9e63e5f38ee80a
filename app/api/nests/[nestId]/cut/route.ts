import { z } from "zod";
import { cutNest } from "@/lib/commands/change-nests";
import { nestCutSchema } from "@/lib/rules/nest-forms";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

export const POST = write("nests.change", {
  params: z.object({ nestId: idSchema }),
  body: nestCutSchema,
  run: (context, { params, body }) => cutNest(context, params.nestId, body),
});
