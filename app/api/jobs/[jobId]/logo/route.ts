import { z } from "zod";
import { setJobLogo } from "@/lib/commands/change-jobs";
import { idSchema, LOGO_MAX_BYTES } from "@/lib/rules/write-bodies";
import { write, writeFile } from "@/lib/server/write";

const params = z.object({ jobId: idSchema });

export const PUT = writeFile("lines.change", {
  params,
  maxBytes: LOGO_MAX_BYTES,
  run: (context, { params, body }) => setJobLogo(context, params.jobId, body),
});

export const DELETE = write("lines.change", { params, run: (context, { params }) => setJobLogo(context, params.jobId, null) });
