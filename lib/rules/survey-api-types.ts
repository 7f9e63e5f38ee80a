/** What travels between the survey's route handlers and its page, as plain JSON. */
import type { SurveyDocument } from "@/iso";
import type { SaveLineConflict, UploadRow } from "./api-types";

/** What the survey page needs of a line; fitters read it too, so it holds nothing of the run. */
export interface SurveyDetail {
  readonly line: { readonly id: string; readonly number: string; readonly title: string };
  readonly job: { readonly id: string; readonly number: string };
  /** 0 while nothing was saved. */
  readonly version: number;
  readonly document: SurveyDocument;
  /** Outside diameter of the line's pipe, mm; 0 when the table has none. */
  readonly odMm: number;
  readonly uploads: readonly UploadRow[];
  readonly updatedAt: string | null;
  readonly updatedBy: string | null;
}

/** 409: somebody saved since; carries theirs, so that both can be laid side by side at once. */
export interface SaveSurveyConflict extends SaveLineConflict {
  readonly document: SurveyDocument;
}
