import { z } from "zod";
import { addUpload } from "@/lib/commands/change-uploads";
import { idSchema, UPLOAD_MAX_BYTES } from "@/lib/rules/write-bodies";
import { writeFile } from "@/lib/server/write";

/** A photo of the survey, kept with the line's sketches; whoever measures may add one. */
export const POST = writeFile("surveys.change", {
  params: z.object({ lineId: idSchema }),
  maxBytes: UPLOAD_MAX_BYTES,
  status: 201,
  run: (context, { params, body }) => addUpload(context, params.lineId, body),
});
