/** The survey of a line, or an empty one in the line's unit. */
import { emptySurvey, parseSurveyDocument, pipeOdMm, type SurveyDocument } from "@/iso";
import type { SurveyDetail } from "@/lib/rules/survey-api-types";
import { inShop } from "@/lib/server/scope";
import type { SessionViewer } from "@/lib/server/session";
import { Job, Line, Survey } from "@/models";
import { uploadRows } from "./line-detail";
import { peopleNames } from "./people-names";
import { storedDocument } from "./stored-line";

/** @throws Refusal 404. */
export async function surveyDetail(viewer: SessionViewer, lineId: string): Promise<SurveyDetail> {
  const shop = inShop(viewer);
  const line = await shop.one(Line, lineId);
  const job = await shop.one(Job, line.jobId);
  const survey = await shop.first(Survey, { lineId });
  const { settings } = storedDocument(line);
  const nameOf = await peopleNames(survey ? [survey.updatedBy] : []);
  return {
    line: { id: line.id, number: line.number, title: line.title },
    job: { id: job.id, number: job.number },
    version: survey?.version ?? 0,
    document: survey ? storedSurvey(survey) : emptySurvey(settings.units),
    odMm: pipeOdMm(settings.pipe.nps, settings.units) ?? 0,
    uploads: await uploadRows(viewer, lineId),
    updatedAt: survey?.updatedAt.toISOString() ?? null,
    updatedBy: survey ? nameOf(survey.updatedBy) : null,
  };
}

/** @throws Error when the stored text is no survey: it was checked when it was saved. */
export function storedSurvey(survey: Pick<Survey, "id" | "document">): SurveyDocument {
  const document = parseSurveyDocument(JSON.parse(survey.document));
  if (document === null) throw new Error(`The stored survey ${survey.id} does not read.`);
  return document;
}
