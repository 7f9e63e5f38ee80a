import { z } from "zod";
import { printCopy } from "@/lib/commands/print-copy";
import { storedSheet } from "@/lib/queries/stored-sheet";
import { idSchema } from "@/lib/rules/write-bodies";
import { runCommand } from "@/lib/server/command";
import { pdfAnswer } from "@/lib/server/pdf-answer";
import { read } from "@/lib/server/read";

/** The stored bytes unaltered, or with ?copy=1 a copy marked for printing (which the log is told of). */
export const GET = read("sheets.print", {
  params: z.object({ revisionId: idSchema }),
  query: z.object({ kind: z.enum(["review", "fabrication"]).nullable().default(null), copy: z.literal("1").optional() }),
  run: async (viewer, { params, query }) => {
    const sheet = await storedSheet(viewer, params.revisionId, query.kind);
    const bytes = query.copy === undefined ? sheet.bytes : await runCommand(viewer, "logged", (context) => printCopy(context, sheet));
    return pdfAnswer(bytes, sheet.fileName);
  },
});
