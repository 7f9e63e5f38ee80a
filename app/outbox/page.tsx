import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { OutboxPage } from "@/components/outbox/outbox-page";

export const metadata: Metadata = { title: "Outbox" };

export default function OutboxRoute() {
  if (process.env.DEMO !== "1") notFound();
  return <OutboxPage />;
}
