import type { Metadata } from "next";
import { LinePage } from "@/components/run-editor/line-page";

export const metadata: Metadata = { title: "Line" };

export default async function LineRoute({ params }: { readonly params: Promise<{ lineId: string }> }) {
  const { lineId } = await params;
  return <LinePage lineId={lineId} />;
}
