import { z } from "zod";
import { cancelPackage } from "@/lib/commands/change-packages";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

export const POST = write("packages.make", {
  params: z.object({ packageId: idSchema }),
  run: (context, { params }) => cancelPackage(context, params.packageId),
});
