import { z } from "zod";
import { renderCompare } from "@/lib/commands/render-compare";
import { compareDetail } from "@/lib/queries/compare-inputs";
import { fileAnswer } from "@/lib/queries/stored-files";
import { compareQuerySchema } from "@/lib/rules/compare-types";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";

/** Two revisions of a spool compared: pages to print, or both inputs for the screen. Fitters compare issued ones only. */
export const GET = read("issued.read", {
  params: z.object({ spoolId: idSchema }),
  query: compareQuerySchema,
  run: async (viewer, { params, query }) => {
    if (query.as === "data") return compareDetail(viewer, params.spoolId, query, new Date());
    const { name, bytes } = await renderCompare(viewer, params.spoolId, query, new Date());
    return fileAnswer(bytes, { name, type: "application/pdf", inline: true });
  },
});
