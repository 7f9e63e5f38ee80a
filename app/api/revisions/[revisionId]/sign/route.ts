import { z } from "zod";
import { checkPasswordAgain, signRevision } from "@/lib/commands/sign-revision";
import { signSchema } from "@/lib/rules/forms";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

export const POST = write("revisions.decide", {
  params: z.object({ revisionId: idSchema }),
  body: signSchema,
  before: (viewer, { body }) => checkPasswordAgain(viewer, body.password),
  run: (context, { params, body }) => signRevision(context, params.revisionId, body),
});
