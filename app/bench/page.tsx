import type { Metadata } from "next";
import { BenchPage } from "@/components/bench/bench-page";

export const metadata: Metadata = { title: "Bench" };

export default function BenchRoute() {
  return <BenchPage />;
}
