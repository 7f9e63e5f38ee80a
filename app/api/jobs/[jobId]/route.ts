import { z } from "zod";
import { changeJob } from "@/lib/commands/change-jobs";
import { jobDetail } from "@/lib/queries/jobs";
import { jobSettingsSchema } from "@/lib/rules/forms";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";
import { write } from "@/lib/server/write";

const params = z.object({ jobId: idSchema });

export const GET = read("jobs.list", { params, run: (viewer, { params }) => jobDetail(viewer, params.jobId) });

export const PATCH = write("lines.change", {
  params,
  body: jobSettingsSchema,
  run: (context, { params, body }) => changeJob(context, params.jobId, body),
});
