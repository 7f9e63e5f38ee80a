import { z } from "zod";
import { spoolDetail } from "@/lib/queries/spool-detail";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";

export const GET = read("issued.read", {
  params: z.object({ spoolId: idSchema }),
  run: (viewer, { params }) => spoolDetail(viewer, params.spoolId),
});
