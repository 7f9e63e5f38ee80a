import { z } from "zod";
import { renderSpoolDrawing, renderSpoolList } from "@/lib/commands/render-export";
import { fileAnswer } from "@/lib/queries/stored-files";
import { drawingExportSchema, listExportSchema } from "@/lib/rules/exchange/export-query";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";

/** A spool's lists as CSV or XLSX, its sheets as SVG or DXF: issued, or as they would be now, which the file says. */
export const GET = read("issued.read", {
  params: z.object({ spoolId: idSchema }),
  query: z.discriminatedUnion("what", [...listExportSchema, drawingExportSchema], { error: "Say what: materials, cuts, welds or drawing." }),
  run: async (viewer, { params, query }) => {
    const file = query.what === "drawing"
      ? await renderSpoolDrawing(viewer, params.spoolId, query)
      : await renderSpoolList(viewer, params.spoolId, query.what, query.as, query.of);
    return fileAnswer(file.bytes, { name: file.name, type: file.type, inline: false });
  },
});
