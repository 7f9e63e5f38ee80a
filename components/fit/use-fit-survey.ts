"use client";
/** The line's survey as a fit needs it: its readings and their adjustment. */
import { useMemo } from "react";
import { surveyResult } from "@/iso";
import { useApi } from "@/components/ui/fetcher";
import type { SurveyDetail } from "@/lib/rules/survey-api-types";
import type { SurveySource } from "./known-ends";

/** null while it loads, where nothing was surveyed, and with no line. */
export function useFitSurvey(lineId: string | null): SurveySource | null {
  const { data } = useApi<SurveyDetail>(lineId === null ? null : `/api/lines/${lineId}/survey`, { revalidateOnFocus: false });
  return useMemo(() => (data && data.document.ends.length > 0 ? { document: data.document, result: surveyResult(data.document, data.odMm) } : null), [data]);
}
