import { z } from "zod";
import { fileAnswer } from "@/lib/queries/stored-files";
import { nestDetail } from "@/lib/queries/nest-rows";
import { csvFile } from "@/lib/rules/exchange/csv-cells";
import { plainName } from "@/lib/rules/exchange/file-names";
import { planRows } from "@/lib/rules/nest-table";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";

/** The plan as CSV: one row per piece, in the order it is cut. */
export const GET = read("nests.read", {
  params: z.object({ nestId: idSchema }),
  run: async (viewer, { params }) => {
    const nest = await nestDetail(viewer, params.nestId);
    const bytes = new TextEncoder().encode(csvFile(planRows(nest)));
    return fileAnswer(bytes, { name: `${plainName(`${nest.jobNumber} cutting plan ${nest.title}`)}.csv`, type: "text/csv; charset=utf-8", inline: false });
  },
});
