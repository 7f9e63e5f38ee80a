import type { Metadata } from "next";
import { SurveyPage } from "@/components/survey/survey-page";

export const metadata: Metadata = { title: "Survey" };

export default async function SurveyRoute({ params }: { readonly params: Promise<{ lineId: string }> }) {
  const { lineId } = await params;
  return <SurveyPage lineId={lineId} />;
}
