import { z } from "zod";
import { addLine } from "@/lib/commands/add-line";
import { lineRows } from "@/lib/queries/jobs";
import { lineNewSchema } from "@/lib/rules/forms";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";
import { write } from "@/lib/server/write";

const params = z.object({ jobId: idSchema });

export const GET = read("jobs.list", { params, run: (viewer, { params }) => lineRows(viewer, params.jobId) });

export const POST = write("lines.change", {
  params,
  body: lineNewSchema,
  status: 201,
  run: (context, { params, body }) => addLine(context, params.jobId, body),
});
