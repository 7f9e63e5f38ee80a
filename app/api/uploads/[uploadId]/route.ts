import { z } from "zod";
import { removeUpload } from "@/lib/commands/change-uploads";
import { uploadFile } from "@/lib/queries/stored-files";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";
import { write } from "@/lib/server/write";

const params = z.object({ uploadId: idSchema });

export const GET = read("lines.read", { params, run: (viewer, { params }) => uploadFile(viewer, params.uploadId) });

export const DELETE = write("lines.change", { params, run: (context, { params }) => removeUpload(context, params.uploadId) });
