"use client";
import Link from "next/link";
import { useMemo, useState } from "react";
import { useViewer } from "@/components/shell/use-viewer";
import { SheetPreview } from "@/components/sheet/sheet-preview";
import { ButtonLink } from "@/components/ui/button";
import { ChoiceRow } from "@/components/ui/choice-row";
import { useApi } from "@/components/ui/fetcher";
import { timeText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import { StateWord } from "@/components/ui/state-word";
import { TitleStrip } from "@/components/ui/title-strip";
import { usePageTitle } from "@/components/ui/use-page-title";
import { spoolFacts } from "@/components/spool/spool-facts";
import type { ReviewDetail } from "@/lib/rules/api-types";
import { ChangeList } from "./change-list";
import { Decision } from "./decision";
import { Unverified } from "./unverified";

/** One revision under review: the frozen sheet beside what changed, what it means for work begun, and the decision. */
export function ReviewPage({ revisionId }: { readonly revisionId: string }) {
  const review = useApi<ReviewDetail>(`/api/revisions/${revisionId}`);
  return (
    <Loaded api={review} page label="Loading the review" lines={10}>
      {(data) => <Review review={data} />}
    </Loaded>
  );
}

function Review({ review }: { readonly review: ReviewDetail }) {
  const viewer = useViewer();
  const [accepted, setAccepted] = useState<ReadonlySet<string>>(new Set());
  const toggle = (pointId: string) =>
    setAccepted((now) => {
      const next = new Set(now);
      if (!next.delete(pointId)) next.add(pointId);
      return next;
    });
  const deciding = review.can.sign || review.can.return || review.can.hold || review.can.void;
  return (
    <>
      <ReviewHead review={review} />
      <Standing review={review} />
      <div className="grid gap-x-10 gap-y-8 xl:grid-cols-[minmax(0,2fr)_minmax(20rem,1fr)]">
        <Sheets review={review} />
        <div className="min-w-0">
          <Impact lines={review.impact} />
          <Section title={review.before ? "What changed" : "First revision"}>
            <ChangeList changes={review.changes} first={review.before === null} />
            {review.before ? (
              <p className="mt-3" data-screen-only>
                <ButtonLink href={`/spools/${review.spool.id}/compare?to=${review.revision.id}`}>
                  See both, overlaid or side by side
                </ButtonLink>
              </p>
            ) : null}
          </Section>
          <Section title="Unverified dimensions">
            <Unverified
              dimensions={review.unverified}
              accepted={accepted}
              onToggle={toggle}
              mayAccept={review.can.sign}
              name={viewer.data?.name ?? ""}
            />
          </Section>
          <Findings review={review} />
          {deciding ? <Decision review={review} accepted={[...accepted]} /> : null}
        </div>
      </div>
    </>
  );
}

function ReviewHead({ review }: { readonly review: ReviewDetail }) {
  const { revision, spool, line, job } = review;
  usePageTitle(`Review ${spool.sheetNumber} rev ${revision.code}`);
  return (
    <TitleStrip
      kind="Review"
      title={
        <>
          <span className="figure">{spool.sheetNumber}</span> rev{" "}
          <span className="figure">{revision.code}</span>
        </>
      }
      trail={[
        { href: "/jobs", label: "Jobs" },
        { href: `/jobs/${job.id}`, label: job.number },
        { href: `/spools/${spool.id}`, label: `${line.number} spool ${spool.letter}` },
      ]}
      cells={[
        { label: "State", value: <StateWord state={revision.state} hold={revision.hold} /> },
        { label: "For", value: revision.description },
        { label: "Submitted by", value: revision.submittedBy },
        { label: "On", value: timeText(revision.submittedAt) },
      ]}
    />
  );
}

/** Why the viewer may not sign, or that it was decided already. */
function Standing({ review }: { readonly review: ReviewDetail }) {
  const { revision } = review;
  const decided =
    revision.returnReason !== null
      ? `Returned: ${revision.returnReason}`
      : revision.signedBy !== null
        ? `Signed by ${revision.signedBy}, ${timeText(revision.signedAt)}.`
        : null;
  return (
    <div className="mb-5 space-y-3">
      {revision.hold ? (
        <Notice tone="trouble" word="HOLD">
          {revision.holdReason ?? "This revision is on hold."}
        </Notice>
      ) : null}
      {decided ? <Notice word="Decided">{decided}</Notice> : null}
      {!decided && !revision.hold && review.why ? <Notice word="Not for you to sign">{review.why}</Notice> : null}
    </div>
  );
}

function Sheets({ review }: { readonly review: ReviewDetail }) {
  const [which, setWhich] = useState<"this" | "before">("this");
  const input = which === "before" && review.before ? review.before : review.input;
  const label = `Sheet ${review.spool.sheetNumber} revision ${input.revision.code}`;
  return (
    <div className="min-w-0">
      <div className="mb-2 flex flex-wrap items-end justify-between gap-3" data-screen-only>
        {review.before ? (
          <ChoiceRow
            label="Which sheet"
            value={which}
            onChange={setWhich}
            choices={[
              { value: "this", label: `Rev ${review.revision.code}, under review` },
              { value: "before", label: `Rev ${review.before.revision.code}, in force` },
            ]}
          />
        ) : (
          <span />
        )}
        <a
          className="inked inline-flex min-h-11 items-center"
          href={`/api/revisions/${review.revision.id}/sheet?kind=review`}
          target="_blank"
          rel="noreferrer"
        >
          Submitted PDF
        </a>
      </div>
      <SheetPreview key={which} input={input} label={label} />
      <p className="mt-2 text-sm text-soft">
        Back to the{" "}
        <Link href={`/spools/${review.spool.id}`} className="inked">
          spool with its history
        </Link>
        .
      </p>
    </div>
  );
}

function Impact({ lines }: { readonly lines: readonly string[] }) {
  if (lines.length === 0) return null;
  return (
    <Section title="Impact on work begun">
      <ul className="list-disc space-y-1 border-l-4 border-alert bg-alert-tint py-3 pr-4 pl-9">
        {lines.map((line) => (
          <li key={line}>{line}</li>
        ))}
      </ul>
    </Section>
  );
}

/** Cautions that always hold, and the model's own findings on this line. */
function Findings({ review }: { readonly review: ReviewDetail }) {
  const problems = useMemo(() => spoolFacts(review.input)?.model.problems ?? [], [review.input]);
  return (
    <Section title="Cautions">
      <ul className="list-disc space-y-1.5 pl-5">
        {problems.map((problem, n) => (
          <li key={n}>
            {problem.severity === "note" ? null : (
              <strong>{problem.severity === "stop" ? "Stop: " : "Warning: "}</strong>
            )}
            {problem.text}
          </li>
        ))}
        <li>Take-outs are nominal. Verify by tape, two readings, before cutting.</li>
        <li>Code, WPS, design and acceptance come from the engineer, the owner and local law.</li>
      </ul>
    </Section>
  );
}
