import type { Metadata } from "next";
import { WithdrawalList } from "@/components/spool/withdrawal-list";

export const metadata: Metadata = { title: "Copies to withdraw" };

export default async function JobWithdrawalsRoute({ params }: { readonly params: Promise<{ jobId: string }> }) {
  const { jobId } = await params;
  return <WithdrawalList path={`/api/jobs/${jobId}/copies`} of="job" back={`/jobs/${jobId}`} />;
}
