/** What is known of the two ends of a closing: readings of the survey where they come from there, else a typed tolerance. */
import { endInfluences, surveyedEndErrors, surveyedErrors, typedEndError, type EndError, type SurveyDocument, type SurveyResult, type Vec3 } from "@/iso";

export interface KnownEnd {
  /** Unit axis out of the end. */
  readonly axis: Vec3;
  /** End of the survey it was taken from; null when it was typed or comes from the drawing. */
  readonly surveyedId: string | null;
}

export interface SurveySource {
  readonly document: SurveyDocument;
  readonly result: SurveyResult;
}

/** ± of an end that nobody measured with a survey: position each way, mm, and axis, rad. */
export interface TypedTolerance {
  readonly positionMm: number;
  readonly axisRad: number;
}

/** Everything that may be off at the two ends, each reading once even where it bears on both. */
export function endErrors(ends: readonly [KnownEnd, KnownEnd], survey: SurveySource | null, typed: TypedTolerance): EndError[] {
  const adjustment = survey?.result.adjustment ?? null;
  const placed = (end: KnownEnd) => end.surveyedId !== null && adjustment !== null && survey!.result.ends.some(({ id }) => id === end.surveyedId);
  const ids = ends.flatMap((end) => (placed(end) ? [end.surveyedId!] : []));
  const influences = survey && adjustment && ids.length > 0 ? endInfluences(survey.document, adjustment, ids) : [];
  const fromSurvey = ids.length === 2 ? surveyedErrors(influences) : surveyedEndErrors(placed(ends[0]) ? 0 : 1, influences);
  const own = ends.flatMap((end, at) => (placed(end) ? [] : [typedEndError(at as 0 | 1, end.axis, typed.positionMm, typed.axisRad)]));
  return [...fromSurvey, ...own].filter(({ columns }) => columns.some((column) => column.some((v) => v !== 0)));
}

/** Twelve by twelve: what the closing takes as known of its ends. */
export function endsCovariance(errors: readonly EndError[]): number[][] {
  const columns = errors.flatMap((error) => error.columns);
  return Array.from({ length: 12 }, (_, i) => Array.from({ length: 12 }, (__, j) => columns.reduce((sum, column) => sum + column[i]! * column[j]!, 0)));
}
