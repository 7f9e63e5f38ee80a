import { addJob } from "@/lib/commands/change-jobs";
import { jobRows } from "@/lib/queries/jobs";
import { jobNewSchema } from "@/lib/rules/forms";
import { read } from "@/lib/server/read";
import { write } from "@/lib/server/write";

export const GET = read("jobs.list", { run: jobRows });

export const POST = write("lines.change", {
  body: jobNewSchema,
  status: 201,
  run: (context, { body }) => addJob(context, body),
});
