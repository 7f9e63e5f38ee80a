import clsx from "clsx";
import type { StatusDetail } from "@/lib/rules/api-types";

/** The one question a sheet in the hand asks: may I work from it. Word, shape and colour say the same. */
export function Verdict({ status }: { readonly status: StatusDetail }) {
  return (
    <div className="flex items-center gap-4 sm:gap-6">
      <svg
        aria-hidden
        viewBox="0 0 48 48"
        data-shape={status.current ? "current" : "not-current"}
        fill="none"
        stroke="currentColor"
        strokeWidth="5"
        className={clsx("size-16 shrink-0 sm:size-24", status.current ? "text-good" : "text-alert")}
      >
        {status.current ? (
          <>
            <circle cx="24" cy="24" r="20" />
            <path d="M14 25l7 7 13-15" />
          </>
        ) : (
          <path d="M8 8l32 32M40 8 8 40" strokeWidth="8" />
        )}
      </svg>
      <div>
        <h1 className={clsx("text-4xl sm:text-6xl", status.current ? "text-good" : "text-alert")}>
          {status.current ? "CURRENT" : "NOT CURRENT"}
        </h1>
        <p className="mt-1 sm:text-lg">{verdictText(status)}</p>
      </div>
    </div>
  );
}

/** Why, in one sentence, and what to do about it. */
export function verdictText(status: StatusDetail): string {
  if (status.current) return `Revision ${status.code} is the one in force. Verify by tape before cutting.`;
  if (status.hold) return `Revision ${status.code} is on HOLD. Do not work from it until it is released.`;
  if (status.liveCode) return `Revision ${status.liveCode} is in force. Get that sheet before any more work.`;
  if (status.state === "for-review" || status.state === "draft")
    return "It is not signed yet. Do not cut or weld from it.";
  return "No revision of this spool is in force. Do not work from this sheet.";
}
