import { z } from "zod";
import { jobWithdrawals } from "@/lib/queries/copies-out";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";

/** Copies of the job's sheets that have to come back. */
export const GET = read("issued.read", { params: z.object({ jobId: idSchema }), run: (viewer, { params }) => jobWithdrawals(viewer, params.jobId) });
