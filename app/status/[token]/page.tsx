import type { Metadata } from "next";
import { StatusPage } from "@/components/status/status-page";

export const metadata: Metadata = {
  title: "Status of a sheet",
  robots: { index: false },
  referrer: "no-referrer",
};

export default async function StatusRoute({ params }: { readonly params: Promise<{ token: string }> }) {
  const { token } = await params;
  return <StatusPage token={token} />;
}
