import type { Metadata } from "next";
import { SpoolPage } from "@/components/spool/spool-page";

export const metadata: Metadata = { title: "Spool" };

export default async function SpoolRoute({ params }: { readonly params: Promise<{ spoolId: string }> }) {
  const { spoolId } = await params;
  return <SpoolPage spoolId={spoolId} />;
}
