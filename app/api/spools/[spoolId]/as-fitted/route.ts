import { z } from "zod";
import { recordMeasurement } from "@/lib/commands/record-measurement";
import { spoolMeasurements } from "@/lib/queries/spool-measurements";
import { MEASUREMENT_MAX_BYTES, measurementSchema } from "@/lib/rules/as-fitted-types";
import { idSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";
import { write } from "@/lib/server/write";

const params = z.object({ spoolId: idSchema });

export const GET = read("issued.read", { params, run: (viewer, { params }) => spoolMeasurements(viewer, params.spoolId) });

export const POST = write("work.record", {
  params,
  body: measurementSchema,
  maxBytes: MEASUREMENT_MAX_BYTES,
  status: 201,
  run: (context, { params, body }) => recordMeasurement(context, params.spoolId, body),
});
