import type { Metadata } from "next";
import { ReviewPage } from "@/components/review/review-page";

export const metadata: Metadata = { title: "Review" };

export default async function ReviewRoute({ params }: { readonly params: Promise<{ revisionId: string }> }) {
  const { revisionId } = await params;
  return <ReviewPage revisionId={revisionId} />;
}
