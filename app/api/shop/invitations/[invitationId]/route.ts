import { z } from "zod";
import { withdrawInvitation } from "@/lib/commands/invite-person";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

export const DELETE = write("shop.change", {
  params: z.object({ invitationId: idSchema }),
  run: (context, { params }) => withdrawInvitation(context, params.invitationId),
});
