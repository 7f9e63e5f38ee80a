"use client";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { countText } from "@/components/ui/format";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import { ReasonDialog, actWords, type RevisionAct } from "@/components/spool/reason-dialog";
import type { ReviewDetail } from "@/lib/rules/api-types";
import { SignDialog } from "./sign-dialog";

/** Sign, return, hold or void; what the viewer may not do is not there. */
export function Decision({
  review,
  accepted,
}: {
  readonly review: ReviewDetail;
  readonly accepted: readonly string[];
}) {
  const router = useRouter();
  const [signing, setSigning] = useState(false);
  const [act, setAct] = useState<RevisionAct | null>(null);
  const { revision, can } = review;
  const open = review.unverified.filter((dimension) => !accepted.includes(dimension.pointId)).length;
  const acts: RevisionAct[] = [];
  if (can.return) acts.push("return");
  if (can.hold) acts.push(revision.hold ? "release" : "hold");
  if (can.void) acts.push("void");
  return (
    <Section title="Decision" className="border border-ink bg-sheet p-4">
      {can.sign && open > 0 ? (
        <Notice tone="caution" word="Not yet" className="mb-4">
          {countText(open, "unverified dimension")} above {open === 1 ? "is" : "are"} not accepted. Accept
          each, or return the revision.
        </Notice>
      ) : null}
      <div className="flex flex-wrap gap-3">
        {can.sign ? (
          <Button tone="primary" big disabled={open > 0} onClick={() => setSigning(true)}>
            Sign for fabrication
          </Button>
        ) : null}
        {acts.map((one) => (
          <Button
            key={one}
            big={one === "return"}
            tone={one === "hold" || one === "void" ? "stop" : "plain"}
            onClick={() => setAct(one)}
          >
            {actWords(one).title}
          </Button>
        ))}
      </div>
      <SignDialog open={signing} review={review} accepted={accepted} onClose={() => setSigning(false)} />
      <ReasonDialog
        act={act}
        revisionId={revision.id}
        code={revision.code}
        onClose={() => setAct(null)}
        onDone={
          act === "return" || act === "void" ? () => router.push(`/spools/${review.spool.id}`) : undefined
        }
      />
    </Section>
  );
}
