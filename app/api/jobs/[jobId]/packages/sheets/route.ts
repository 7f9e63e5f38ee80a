import { z } from "zod";
import { packageCandidates } from "@/lib/queries/package-source";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";

/** The job's sheets that may be packed. */
export const GET = read("packages.make", { params: z.object({ jobId: idSchema }), run: (viewer, { params }) => packageCandidates(viewer, params.jobId) });
