import { z } from "zod";
import { askForNest } from "@/lib/commands/change-nests";
import { nestRows } from "@/lib/queries/nest-rows";
import { nestNewSchema } from "@/lib/rules/nest-forms";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";
import { write } from "@/lib/server/write";

const params = z.object({ jobId: idSchema });

export const GET = read("nests.read", { params, run: (viewer, { params }) => nestRows(viewer, params.jobId) });

export const POST = write("nests.change", {
  params,
  body: nestNewSchema,
  status: 201,
  run: (context, { params, body }) => askForNest(context, params.jobId, body),
});
