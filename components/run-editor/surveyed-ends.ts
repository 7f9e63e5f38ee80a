"use client";
/** Ends of the line's survey as the closing takes them: position, axis and how well they are known. */
import { useMemo } from "react";
import { surveyResult, type SurveyEndResult, type UnitSystem } from "@/iso";
import { lengthEntryText } from "@/components/jobs/settings-text";
import { useApi } from "@/components/ui/fetcher";
import type { SurveyDetail } from "@/lib/rules/survey-api-types";
import { directionText, type EndForm } from "./closing-form";

const NONE: readonly SurveyEndResult[] = [];
/** What a list of rows calls a surveyed end, before its id. */
const PREFIX = "survey:";

/** Surveyed ends of a line; none while they load, and none where nothing was surveyed. */
export function useSurveyedEnds(lineId: string | null): readonly SurveyEndResult[] {
  const { data } = useApi<SurveyDetail>(lineId === null ? null : `/api/lines/${lineId}/survey`, { revalidateOnFocus: false });
  return useMemo(() => (data && data.document.ends.length > 0 ? surveyResult(data.document, data.odMm).ends : NONE), [data]);
}

export function surveyedOptions(ends: readonly SurveyEndResult[]): { readonly value: string; readonly label: string }[] {
  return ends.map((end) => ({ value: `${PREFIX}${end.id}`, label: `surveyed: ${end.name}` }));
}

/** The option an end form stands for. */
export function takenFrom(end: EndForm): string {
  return end.surveyed ? `${PREFIX}${end.surveyed.endId}` : end.pointId;
}

/** The fields of a surveyed end, or null when the choice names none. */
export function endFromSurvey(ends: readonly SurveyEndResult[], choice: string, units: UnitSystem): Pick<EndForm, "pointId" | "e" | "n" | "u" | "direction" | "surveyed"> | null {
  const end = ends.find((each) => choice === `${PREFIX}${each.id}`);
  if (!end) return null;
  const [e, n, u] = end.position.map((mm) => lengthEntryText(mm, units));
  return { pointId: "", e: e ?? "", n: n ?? "", u: u ?? "", direction: directionText(end.axis), surveyed: { endId: end.id, withinMm: end.positionWithinMm } };
}

/** The two ends an address asks to close between (`?close=id,id`), as choices; null when it asks for none. */
export function endsAsked(search: string): readonly [string, string] | null {
  const [first, second] = (new URLSearchParams(search).get("close") ?? "").split(",");
  return first && second ? [`${PREFIX}${first}`, `${PREFIX}${second}`] : null;
}
