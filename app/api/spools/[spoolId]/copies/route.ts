import { z } from "zod";
import { spoolCopies } from "@/lib/queries/copies-out";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";

export const GET = read("issued.read", { params: z.object({ spoolId: idSchema }), run: (viewer, { params }) => spoolCopies(viewer, params.spoolId) });
