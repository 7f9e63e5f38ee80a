import { z } from "zod";
import { reviewDetail } from "@/lib/queries/review-detail";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";

export const GET = read("revisions.review", {
  params: z.object({ revisionId: idSchema }),
  run: (viewer, { params }) => reviewDetail(viewer, params.revisionId),
});
