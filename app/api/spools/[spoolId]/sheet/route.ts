import { z } from "zod";
import { renderDraftSheet } from "@/lib/commands/render-draft-sheet";
import { fileAnswer } from "@/lib/queries/stored-files";
import { sheetSizeSchema } from "@/lib/rules/forms";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";

/** The sheet as it would be now, DRAFT across it; issued sheets are had from their revision. */
export const GET = read("lines.read", {
  params: z.object({ spoolId: idSchema }),
  query: z.object({ size: sheetSizeSchema.optional() }),
  run: async (viewer, { params, query }) => {
    const { name, bytes } = await renderDraftSheet(viewer, params.spoolId, query.size ?? null);
    return fileAnswer(bytes, { name, type: "application/pdf", inline: true });
  },
});
