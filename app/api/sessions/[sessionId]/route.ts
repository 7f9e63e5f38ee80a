import { z } from "zod";
import { endOwnSession } from "@/lib/commands/change-session";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

export const DELETE = write("shop.read", {
  params: z.object({ sessionId: idSchema }),
  run: (context, { params }) => endOwnSession(context, params.sessionId),
});
