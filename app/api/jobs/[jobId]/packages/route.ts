import { z } from "zod";
import { askForPackage } from "@/lib/commands/ask-for-package";
import { packageRows } from "@/lib/queries/package-rows";
import { packageNewSchema } from "@/lib/rules/package-forms";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";
import { write } from "@/lib/server/write";

const params = z.object({ jobId: idSchema });

export const GET = read("packages.make", { params, run: (viewer, { params }) => packageRows(viewer, params.jobId) });

export const POST = write("packages.make", {
  params,
  body: packageNewSchema,
  status: 201,
  run: (context, { params, body }) => askForPackage(context, params.jobId, body),
});
