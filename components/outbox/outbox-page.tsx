"use client";
import Link from "next/link";
import { EmptyState } from "@/components/ui/empty-state";
import { useApi } from "@/components/ui/fetcher";
import { timeText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { TitleStrip } from "@/components/ui/title-strip";
import type { OutboxMail } from "@/lib/rules/api-types";

/** Every mail the demo would have sent, newest first. Exists in demo mode only. */
export function OutboxPage() {
  const outbox = useApi<readonly OutboxMail[]>("/api/outbox", { refreshInterval: 5_000 });
  return (
    <div className="mx-auto max-w-3xl">
      <TitleStrip title="Outbox" kind="Demo only: mails stay on this machine" />
      <Loaded api={outbox} label="Loading mails">
        {(mails) =>
          mails.length === 0 ? (
            <EmptyState title="No mail yet">
              Submit a revision or invite a person, and the mail shows here.
            </EmptyState>
          ) : (
            <ol className="space-y-5">
              {[...mails]
                .sort((a, b) => b.at.localeCompare(a.at))
                .map((mail, n) => (
                  <li key={`${mail.at}-${n}`} className="border border-ink bg-sheet p-5">
                    <h2>{mail.subject}</h2>
                    <p className="mb-3 text-sm text-soft">
                      To {mail.to}, {timeText(mail.at)}
                    </p>
                    <p className="break-words whitespace-pre-wrap">
                      <WithLinks text={mail.text} />
                    </p>
                  </li>
                ))}
            </ol>
          )
        }
      </Loaded>
    </div>
  );
}

const ADDRESS = /(https?:\/\/[^\s<>"]+)/;

/** Addresses of this site become links; all else stays text. */
function WithLinks({ text }: { readonly text: string }) {
  return text.split(ADDRESS).map((part, n) => {
    const own =
      ADDRESS.test(part) && typeof window !== "undefined" && part.startsWith(window.location.origin);
    if (!own) return part;
    return (
      <Link key={n} href={part.slice(window.location.origin.length)} className="inked">
        {part}
      </Link>
    );
  });
}
