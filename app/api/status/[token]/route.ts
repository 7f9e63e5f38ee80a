import { z } from "zod";
import { statusDetail } from "@/lib/queries/status-detail";
import { readPublic } from "@/lib/server/read";

export const GET = readPublic({
  params: z.object({ token: z.string().regex(/^[A-Za-z0-9_-]{20,64}$/) }),
  run: ({ params }) => statusDetail(params.token),
});
