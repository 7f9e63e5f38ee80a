import { z } from "zod";
import { packageDetail } from "@/lib/queries/package-rows";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";

export const GET = read("packages.make", { params: z.object({ packageId: idSchema }), run: (viewer, { params }) => packageDetail(viewer, params.packageId) });
