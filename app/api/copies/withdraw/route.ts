import { z } from "zod";
import { withdrawCopies } from "@/lib/commands/withdraw-copies";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

export const POST = write("copies.withdraw", {
  body: z.object({ copyIds: z.array(idSchema).min(1, "Name the copies.").max(500, "Mark at most 500 copies at a time.") }),
  run: (context, { body }) => withdrawCopies(context, body.copyIds),
});
