import { z } from "zod";
import { askForPackageAgain } from "@/lib/commands/ask-for-package";
import { idSchema } from "@/lib/rules/write-bodies";
import { write } from "@/lib/server/write";

/** The same choice with what is current now. */
export const POST = write("packages.make", {
  params: z.object({ packageId: idSchema }),
  status: 201,
  run: (context, { params }) => askForPackageAgain(context, params.packageId),
});
