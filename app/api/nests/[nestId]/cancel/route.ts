import { z } from "zod";
import { cancelNest } from "@/lib/commands/change-nests";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

export const POST = write("nests.change", {
  params: z.object({ nestId: idSchema }),
  run: (context, { params }) => cancelNest(context, params.nestId),
});
