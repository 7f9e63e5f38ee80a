"use client";
/** Ends of the line's survey as the closing takes them: position, axis and how well they are known. */
import { useMemo } from "react";
import { endCrossCovariance, surveyResult, type SurveyEndResult, type UnitSystem } from "@/iso";
import { lengthEntryText } from "@/components/jobs/settings-text";
import { useApi } from "@/components/ui/fetcher";
import type { SurveyDetail } from "@/lib/rules/survey-api-types";
import { directionText, type EndForm, type SurveyedEnd } from "./closing-form";

/** A surveyed end with what it shares with the other ends of its survey. */
export interface SurveyedEndResult extends SurveyEndResult {
  readonly across?: SurveyedEnd["across"];
}

const NONE: readonly SurveyedEndResult[] = [];
/** What a list of rows calls a surveyed end, before its id. */
const PREFIX = "survey:";

/** Surveyed ends of a line; none while they load, and none where nothing was surveyed. */
export function useSurveyedEnds(lineId: string | null): readonly SurveyedEndResult[] {
  const { data } = useApi<SurveyDetail>(lineId === null ? null : `/api/lines/${lineId}/survey`, { revalidateOnFocus: false });
  return useMemo(() => (data && data.document.ends.length > 0 ? endsOf(data) : NONE), [data]);
}

/** Ends of a survey, each with its covariance to every other. */
function endsOf({ document, odMm }: SurveyDetail): SurveyedEndResult[] {
  const { ends, adjustment } = surveyResult(document, odMm);
  const across = (id: string) => Object.fromEntries(ends.flatMap((other) => {
    const block = other.id !== id && adjustment ? endCrossCovariance(document, adjustment, id, other.id) : null;
    return block ? [[other.id, block] as const] : [];
  }));
  return ends.map((end) => ({ ...end, across: across(end.id) }));
}

export function surveyedOptions(ends: readonly SurveyEndResult[]): { readonly value: string; readonly label: string }[] {
  return ends.map((end) => ({ value: `${PREFIX}${end.id}`, label: `surveyed: ${end.name}` }));
}

/** The option an end form stands for. */
export function takenFrom(end: EndForm): string {
  return end.surveyed ? `${PREFIX}${end.surveyed.endId}` : end.pointId;
}

/** The fields of a surveyed end, or null when the choice names none. */
export function endFromSurvey(ends: readonly SurveyedEndResult[], choice: string, units: UnitSystem): Pick<EndForm, "pointId" | "e" | "n" | "u" | "direction" | "surveyed"> | null {
  const end = ends.find((each) => choice === `${PREFIX}${each.id}`);
  if (!end) return null;
  const [e, n, u] = end.position.map((mm) => lengthEntryText(mm, units));
  return { pointId: "", e: e ?? "", n: n ?? "", u: u ?? "", direction: directionText(end.axis), surveyed: { endId: end.id, withinMm: end.positionWithinMm, covariance: end.covariance, across: end.across ?? {} } };
}

/** The two ends an address asks to close between (`?close=id,id`), as choices; null when it asks for none. */
export function endsAsked(search: string): readonly [string, string] | null {
  const [first, second] = (new URLSearchParams(search).get("close") ?? "").split(",");
  return first && second ? [`${PREFIX}${first}`, `${PREFIX}${second}`] : null;
}
