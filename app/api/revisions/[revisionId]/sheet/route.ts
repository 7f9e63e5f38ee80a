import { z } from "zod";
import { downloadOriginal, printCopy } from "@/lib/commands/print-copy";
import { storedSheet } from "@/lib/queries/stored-sheet";
import { idSchema } from "@/lib/rules/write-bodies";
import { runCommand } from "@/lib/server/command";
import { pdfAnswer } from "@/lib/server/pdf-answer";
import { read } from "@/lib/server/read";

/** The stored bytes unaltered, or with ?copy=1 a copy marked for printing. Either is noted with who took it. */
export const GET = read("sheets.print", {
  params: z.object({ revisionId: idSchema }),
  query: z.object({ kind: z.enum(["review", "fabrication"]).nullable().default(null), copy: z.literal("1").optional() }),
  run: async (viewer, { params, query }) => {
    const sheet = await storedSheet(viewer, params.revisionId, query.kind);
    const take = query.copy === undefined ? downloadOriginal : printCopy;
    const bytes = await runCommand(viewer, "logged", (context) => take(context, sheet));
    return pdfAnswer(bytes, sheet.fileName);
  },
});
