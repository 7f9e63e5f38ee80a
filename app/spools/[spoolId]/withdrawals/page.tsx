import type { Metadata } from "next";
import { WithdrawalList } from "@/components/spool/withdrawal-list";

export const metadata: Metadata = { title: "Copies to withdraw" };

export default async function SpoolWithdrawalsRoute({ params }: { readonly params: Promise<{ spoolId: string }> }) {
  const { spoolId } = await params;
  return <WithdrawalList path={`/api/spools/${spoolId}/copies`} of="spool" back={`/spools/${spoolId}`} />;
}
