import type { Metadata } from "next";
import { JobPage } from "@/components/jobs/job-page";

export const metadata: Metadata = { title: "Job" };

export default async function JobRoute({ params }: { readonly params: Promise<{ jobId: string }> }) {
  const { jobId } = await params;
  return <JobPage jobId={jobId} />;
}
