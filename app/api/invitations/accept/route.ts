import { acceptInvitation } from "@/lib/commands/accept-invitation";
import { invitationAcceptSchema } from "@/lib/rules/forms";
import { addressOf } from "@/lib/server/request-facts";
import { askingLimit, countTry } from "@/lib/server/throttle";
import { writePublic } from "@/lib/server/write";

export const POST = writePublic({
  body: invitationAcceptSchema,
  before: (_viewer, { request }) => countTry([askingLimit("invitation", addressOf(request.headers))], new Date()),
  run: (context, { body }) => acceptInvitation(context, body),
});
