import { z } from "zod";
import { voidRevision } from "@/lib/commands/decide-revision";
import { reasonSchema } from "@/lib/rules/forms";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

export const POST = write("revisions.hold", {
  params: z.object({ revisionId: idSchema }),
  body: reasonSchema,
  run: (context, { params, body }) => voidRevision(context, params.revisionId, body.reason),
});
