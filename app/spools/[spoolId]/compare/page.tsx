import type { Metadata } from "next";
import { ComparePage } from "@/components/compare/compare-page";

export const metadata: Metadata = { title: "Compare revisions" };

interface Props {
  readonly params: Promise<{ readonly spoolId: string }>;
  readonly searchParams: Promise<Readonly<Record<string, string | readonly string[] | undefined>>>;
}

export default async function CompareRoute({ params, searchParams }: Props) {
  const { spoolId } = await params;
  const { from, to } = await searchParams;
  return <ComparePage spoolId={spoolId} from={oneOf(from)} to={oneOf(to)} />;
}

const oneOf = (value: string | readonly string[] | undefined): string | null => (typeof value === "string" && value !== "" ? value : null);
