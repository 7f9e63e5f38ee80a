import { z } from "zod";
import { changeLine } from "@/lib/commands/change-line";
import { saveLine } from "@/lib/commands/save-line";
import { lineDetail } from "@/lib/queries/line-detail";
import { lineHeadSchema } from "@/lib/rules/forms";
import { DOCUMENT_MAX_BYTES, idSchema, lineSaveSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";
import { write } from "@/lib/server/write";

const params = z.object({ lineId: idSchema });

export const GET = read("lines.read", { params, run: (viewer, { params }) => lineDetail(viewer, params.lineId) });

export const PUT = write("lines.change", {
  params,
  body: lineSaveSchema,
  maxBytes: DOCUMENT_MAX_BYTES,
  run: (context, { params, body }) => saveLine(context, params.lineId, body),
});

export const PATCH = write("lines.change", {
  params,
  body: lineHeadSchema,
  run: (context, { params, body }) => changeLine(context, params.lineId, body),
});
