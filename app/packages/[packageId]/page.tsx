import type { Metadata } from "next";
import { PackagePage } from "@/components/package/package-page";

export const metadata: Metadata = { title: "Package" };

export default async function PackageRoute({ params }: { readonly params: Promise<{ packageId: string }> }) {
  const { packageId } = await params;
  return <PackagePage packageId={packageId} />;
}
