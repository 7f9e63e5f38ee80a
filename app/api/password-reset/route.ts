import { requestPasswordReset } from "@/lib/commands/reset-password";
import { resetRequestSchema } from "@/lib/rules/forms";
import { addressOf } from "@/lib/server/request-facts";
import { askingLimit, countTry } from "@/lib/server/throttle";
import { writePublic } from "@/lib/server/write";

export const POST = writePublic({
  body: resetRequestSchema,
  rule: "unlogged",
  before: (_viewer, { request, body }) =>
    countTry([askingLimit("password-reset", addressOf(request.headers)), { name: "password-reset-account", who: [body.email], tries: 5, windowS: 3_600 }], new Date()),
  run: (context, { body }) => requestPasswordReset(context, body.email),
});
