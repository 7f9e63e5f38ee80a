import { z } from "zod";
import { renderDimensionRecord } from "@/lib/commands/render-dimension-record";
import { fileAnswer } from "@/lib/queries/stored-files";
import { recordPrintSchema } from "@/lib/rules/as-fitted-types";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";

/** A kept measurement as a dimension record, or the blank form of one. */
export const GET = read("issued.read", {
  params: z.object({ spoolId: idSchema }),
  query: recordPrintSchema,
  run: async (viewer, { params, query }) => {
    const { name, bytes } = await renderDimensionRecord(viewer, params.spoolId, query);
    return fileAnswer(bytes, { name, type: "application/pdf", inline: true });
  },
});
