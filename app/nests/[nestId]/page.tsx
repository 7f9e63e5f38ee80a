import type { Metadata } from "next";
import { NestPage } from "@/components/nest/nest-page";

export const metadata: Metadata = { title: "Cutting plan" };

export default async function NestRoute({ params }: { readonly params: Promise<{ nestId: string }> }) {
  const { nestId } = await params;
  return <NestPage nestId={nestId} />;
}
