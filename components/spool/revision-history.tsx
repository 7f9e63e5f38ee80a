"use client";
import Link from "next/link";
import { useState } from "react";
import { Button, ButtonLink } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { bytesText, hashText, timeText } from "@/components/ui/format";
import { StateWord } from "@/components/ui/state-word";
import type { RevisionSummary, Role } from "@/lib/rules/api-types";
import { canDo } from "@/lib/rules/permissions";
import { ReasonDialog, actWords, type RevisionAct } from "./reason-dialog";

export interface RevisionHistoryProps {
  readonly revisions: readonly RevisionSummary[];
  readonly role: Role;
  /** Whether the viewer may hold, release, void and close. */
  readonly mayHold: boolean;
}

/** Steps open to a revision in its state, for those who may take them. */
export function actsFor(revision: Pick<RevisionSummary, "state" | "hold">): readonly RevisionAct[] {
  const live = revision.state === "for-fabrication" || revision.state === "as-built";
  const open = live || revision.state === "for-review";
  if (!open) return [];
  const hold: RevisionAct = revision.hold ? "release" : "hold";
  return revision.state === "for-fabrication" && !revision.hold ? [hold, "as-built", "void"] : [hold, "void"];
}

/** Every revision of a spool, newest first, with every stored PDF and its hash. */
export function RevisionHistory({ revisions, role, mayHold }: RevisionHistoryProps) {
  const [asked, setAsked] = useState<{
    readonly act: RevisionAct;
    readonly revision: RevisionSummary;
  } | null>(null);
  if (revisions.length === 0) {
    return (
      <EmptyState title="No revision yet">
        {canDo(role, "revisions.submit")
          ? "Look the sheet over, then submit it for review; it becomes revision A."
          : "The first one shows here when a detailer submits the sheet."}
      </EmptyState>
    );
  }
  const spoolId = revisions[0]!.spoolId;
  const seesDrafts = canDo(role, "lines.read");
  const newestFirst = [...revisions].sort((a, b) => b.submittedAt.localeCompare(a.submittedAt));
  return (
    <>
      {revisions.length > 1 || seesDrafts ? (
        <p className="mb-3" data-screen-only>
          <ButtonLink href={`/spools/${spoolId}/compare`}>Compare revisions</ButtonLink>
        </p>
      ) : null}
      <ol className="space-y-5">
        {newestFirst.map((revision, at) => (
          <li key={revision.id} className="border border-ink bg-sheet p-4">
            <RevisionFacts revision={revision} />
            <StoredSheets revision={revision} />
            <div className="mt-3 flex flex-wrap gap-3" data-screen-only>
              {canDo(role, "revisions.review") ? (
                <ButtonLink
                  href={`/review/${revision.id}`}
                  tone={revision.state === "for-review" ? "primary" : "plain"}
                >
                  {revision.state === "for-review" ? "Review it" : "Open the review"}
                </ButtonLink>
              ) : null}
              {newestFirst[at + 1] ? (
                <ButtonLink href={`/spools/${spoolId}/compare?from=${newestFirst[at + 1]!.id}&to=${revision.id}`}>
                  Compare with rev {newestFirst[at + 1]!.code}
                </ButtonLink>
              ) : null}
              {mayHold
                ? actsFor(revision).map((act) => (
                    <Button
                      key={act}
                      tone={act === "hold" || act === "void" ? "stop" : "plain"}
                      onClick={() => setAsked({ act, revision })}
                    >
                      {actWords(act).title}
                    </Button>
                  ))
                : null}
            </div>
          </li>
        ))}
      </ol>
      <ReasonDialog
        act={asked?.act ?? null}
        revisionId={asked?.revision.id ?? ""}
        code={asked?.revision.code ?? ""}
        onClose={() => setAsked(null)}
      />
    </>
  );
}

function RevisionFacts({ revision }: { readonly revision: RevisionSummary }) {
  return (
    <>
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1">
        <h3 className="figure text-lg">Rev {revision.code}</h3>
        <StateWord state={revision.state} hold={revision.hold} />
      </div>
      <p className="mt-1">{revision.description}</p>
      <p className="text-sm text-soft">
        Submitted by {revision.submittedBy}, {timeText(revision.submittedAt)}
      </p>
      {revision.signedBy ? (
        <p className="text-sm text-soft">
          Signed by {revision.signedBy}, {timeText(revision.signedAt)}
        </p>
      ) : null}
      {revision.returnReason ? (
        <p className="mt-2 border-l-4 border-caution pl-3">
          <strong>Returned:</strong> {revision.returnReason}
        </p>
      ) : null}
      {revision.holdReason ? (
        <p className="mt-2 border-l-4 border-alert pl-3">
          <strong>Hold:</strong> {revision.holdReason}
        </p>
      ) : null}
    </>
  );
}

const KIND_WORDS = { review: "Submitted PDF", fabrication: "Signed PDF" } as const;

function StoredSheets({ revision }: { readonly revision: RevisionSummary }) {
  return (
    <ul className="mt-3 border-t border-hair">
      {revision.sheets.map((sheet) => (
        <li key={sheet.id} className="border-b border-hair py-2">
          <div className="flex flex-wrap items-center gap-x-5">
            <a
              className="inked inline-flex min-h-11 items-center font-medium"
              href={`/api/revisions/${revision.id}/sheet?kind=${sheet.kind}`}
              target="_blank"
              rel="noreferrer"
            >
              {KIND_WORDS[sheet.kind]}
            </a>
            <a
              className="inked inline-flex min-h-11 items-center"
              href={`/api/revisions/${revision.id}/sheet?kind=${sheet.kind}&copy=1`}
              target="_blank"
              rel="noreferrer"
            >
              Marked copy to print
            </a>
            <span className="text-sm text-soft">
              {bytesText(sheet.bytes)}, {timeText(sheet.at)}
            </span>
          </div>
          <p className="text-sm text-soft">
            SHA-256{" "}
            <span className="figure break-all" title={sheet.sha256}>
              {hashText(sheet.sha256)}
            </span>
          </p>
        </li>
      ))}
      <li className="py-2">
        <Link href={revision.statusPath} className="inked inline-flex min-h-11 items-center">
          Status page
        </Link>
      </li>
    </ul>
  );
}
