import { z } from "zod";
import { nestDetail } from "@/lib/queries/nest-rows";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";

export const GET = read("nests.read", { params: z.object({ nestId: idSchema }), run: (viewer, { params }) => nestDetail(viewer, params.nestId) });
