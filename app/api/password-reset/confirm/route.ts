import { confirmPasswordReset } from "@/lib/commands/reset-password";
import { resetConfirmSchema } from "@/lib/rules/forms";
import { addressOf } from "@/lib/server/request-facts";
import { askingLimit, countTry } from "@/lib/server/throttle";
import { writePublic } from "@/lib/server/write";

/** Unlogged by rule, since somebody who belongs to no shop any longer has no log; every shop they belong to is told. */
export const POST = writePublic({
  body: resetConfirmSchema,
  rule: "unlogged",
  before: (_viewer, { request }) => countTry([askingLimit("password-reset-confirm", addressOf(request.headers))], new Date()),
  run: (context, { body }) => confirmPasswordReset(context, body.token, body.password),
});
