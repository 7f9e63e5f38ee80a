import { z } from "zod";
import { submitRevision } from "@/lib/commands/submit-revision";
import { submitSchema } from "@/lib/rules/forms";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

export const POST = write("revisions.submit", {
  params: z.object({ spoolId: idSchema }),
  body: submitSchema,
  status: 201,
  run: (context, { params, body }) => submitRevision(context, params.spoolId, body),
});
