import { z } from "zod";
import { keepSet } from "@/lib/commands/print-copy";
import { renderSheetSet } from "@/lib/commands/render-sheet-set";
import { fileAnswer } from "@/lib/queries/stored-files";
import { sheetSetSchema } from "@/lib/rules/exchange/export-query";
import { idSchema } from "@/lib/rules/write-bodies";
import { runCommand } from "@/lib/server/command";
import { read } from "@/lib/server/read";

/** The chosen parts of a spool's sheet set as one PDF. A set of an issued sheet is noted with who took it; a draft says so on every page. */
export const GET = read("sheets.print", {
  params: z.object({ spoolId: idSchema }),
  query: sheetSetSchema,
  run: async (viewer, { params, query }) => {
    const { name, bytes, sheet, parts } = await renderSheetSet(viewer, params.spoolId, query, new Date());
    if (sheet !== null) await runCommand(viewer, "logged", (context) => keepSet(context, sheet, parts, bytes));
    return fileAnswer(bytes, { name, type: "application/pdf", inline: true });
  },
});
