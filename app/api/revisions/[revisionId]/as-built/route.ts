import { z } from "zod";
import { closeAsBuilt } from "@/lib/commands/decide-revision";
import { asBuiltSchema } from "@/lib/rules/forms";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

export const POST = write("revisions.hold", {
  params: z.object({ revisionId: idSchema }),
  body: asBuiltSchema,
  run: (context, { params, body }) => closeAsBuilt(context, params.revisionId, body.reason),
});
