import { z } from "zod";
import { renderBench } from "@/lib/commands/render-bench";
import { fileAnswer } from "@/lib/queries/stored-files";
import { benchPrintSchema } from "@/lib/rules/exchange/export-query";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";

/** A spool's bench lay-out or its true-scale templates as PDF: of what is issued, or as it would be now, which every page says. */
export const GET = read("issued.read", {
  params: z.object({ spoolId: idSchema }),
  query: benchPrintSchema,
  run: async (viewer, { params, query }) => {
    const { name, bytes } = await renderBench(viewer, params.spoolId, query);
    return fileAnswer(bytes, { name, type: "application/pdf", inline: true });
  },
});
