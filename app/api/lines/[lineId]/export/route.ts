import { z } from "zod";
import { POINT_READERS, POINT_WRITERS } from "@/components/exchange/point-words";
import { renderLineList, renderPoints } from "@/lib/commands/render-export";
import { fileAnswer } from "@/lib/queries/stored-files";
import { listExportSchema, pointsExportSchema } from "@/lib/rules/exchange/export-query";
import { pointRows } from "@/lib/rules/exchange/write-points";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";

/** A line's points as CSV, and the lists of all its spools: issued, or as they would be now, which the file says. */
export const GET = read("lines.read", {
  params: z.object({ lineId: idSchema }),
  query: z.discriminatedUnion("what", [...listExportSchema, pointsExportSchema], { error: "Say what: points, materials, cuts or welds." }),
  run: async (viewer, { params, query }) => {
    const file = query.what === "points"
      ? await renderPoints(viewer, params.lineId, (document) => pointRows(document, POINT_WRITERS, POINT_READERS))
      : await renderLineList(viewer, params.lineId, query.what, query.as, query.of);
    return fileAnswer(file.bytes, { name: file.name, type: file.type, inline: false });
  },
});
