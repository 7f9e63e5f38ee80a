import { z } from "zod";
import { saveSurvey } from "@/lib/commands/save-survey";
import { surveyDetail } from "@/lib/queries/survey-detail";
import { idSchema, SURVEY_MAX_BYTES, surveySaveSchema } from "@/lib/rules/write-bodies";
import { read } from "@/lib/server/read";
import { write } from "@/lib/server/write";

const params = z.object({ lineId: idSchema });

export const GET = read("surveys.change", { params, run: (viewer, { params }) => surveyDetail(viewer, params.lineId) });

export const PUT = write("surveys.change", {
  params,
  body: surveySaveSchema,
  maxBytes: SURVEY_MAX_BYTES,
  run: (context, { params, body }) => saveSurvey(context, params.lineId, body),
});
