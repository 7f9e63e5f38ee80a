"use client";
import { useMemo, useState } from "react";
import type { SheetSize } from "@/iso";
import { SpoolFilesButton } from "@/components/exchange/spool-files";
import { SHEET_OPTIONS } from "@/components/jobs/sheet-words";
import { useViewer } from "@/components/shell/use-viewer";
import { Button, ButtonLink } from "@/components/ui/button";
import { ChoiceRow } from "@/components/ui/choice-row";
import { useApi } from "@/components/ui/fetcher";
import { Select } from "@/components/ui/field";
import { Loaded } from "@/components/ui/loaded";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import { StateWord } from "@/components/ui/state-word";
import { TitleStrip } from "@/components/ui/title-strip";
import { usePageTitle } from "@/components/ui/use-page-title";
import type { RevisionSummary, Role, SpoolDetail } from "@/lib/rules/api-types";
import { canDo } from "@/lib/rules/permissions";
import { CopiesOut } from "./copies-out";
import { RevisionHistory } from "./revision-history";
import { SheetBox } from "./sheet-box";
import { SheetSetPrint } from "./sheet-set-print";
import { SubmitDialog } from "./submit-dialog";
import { WorkSection } from "./work-section";

/** One spool: its sheet first, then cut list, welds and their logs, and every revision. */
export function SpoolPage({ spoolId }: { readonly spoolId: string }) {
  const spool = useApi<SpoolDetail>(`/api/spools/${spoolId}`);
  const viewer = useViewer();
  return (
    <Loaded api={spool} page label="Loading the spool" lines={10}>
      {(data) => <Spool spool={data} role={viewer.data?.role ?? "fitter"} />}
    </Loaded>
  );
}

function newestOf(revisions: readonly RevisionSummary[]): RevisionSummary | null {
  return revisions.reduce<RevisionSummary | null>(
    (newest, one) => (newest === null || one.submittedAt > newest.submittedAt ? one : newest),
    null,
  );
}

/** A detailer starts at the draft where it says something else than the issued sheet; others at what is issued. */
function opensAtDraft({ draft, live }: SpoolDetail, role: Role): boolean {
  if (!draft || !live) return draft !== null;
  return role === "detailer" && JSON.stringify(draft.document) !== JSON.stringify(live.input.document);
}

function Spool({ spool, role }: { readonly spool: SpoolDetail; readonly role: Role }) {
  const [wanted, setWanted] = useState<"issued" | "draft">(opensAtDraft(spool, role) ? "draft" : "issued");
  const [size, setSize] = useState<SheetSize>(spool.draft?.size ?? spool.live?.input.size ?? "tabloid");
  const [submitting, setSubmitting] = useState(false);
  const issued = wanted === "issued" || !spool.draft;
  const draft = useMemo(() => (spool.draft ? { ...spool.draft, size } : null), [spool.draft, size]);
  const input = issued ? (spool.live?.input ?? null) : draft;
  const liveRevision = spool.revisions.find((revision) => revision.id === spool.live?.revisionId) ?? null;
  return (
    <>
      <SpoolHead spool={spool} role={role} onSubmit={() => setSubmitting(true)} />
      {spool.why.submit && canDo(role, "revisions.submit") ? (
        <Notice className="mb-4">{spool.why.submit}</Notice>
      ) : null}
      <div className="mb-3 flex flex-wrap items-end justify-between gap-x-8 gap-y-3" data-screen-only>
        {spool.live && spool.draft ? (
          <ChoiceRow
            label="Which sheet"
            value={wanted}
            onChange={setWanted}
            choices={[
              { value: "issued", label: `Issued, rev ${liveRevision?.code ?? ""}` },
              { value: "draft", label: "As it would be now" },
            ]}
          />
        ) : (
          <span />
        )}
        <div className="flex flex-wrap items-end gap-3">
          <SheetActions
            spool={spool}
            issued={issued}
            liveRevision={liveRevision}
            size={size}
            onSize={setSize}
          />
          {input ? <SheetSetPrint spoolId={spool.id} issued={issued} size={issued ? null : size} /> : null}
          {input ? <SpoolFilesButton spoolId={spool.id} input={input} issued={issued} /> : null}
        </div>
      </div>
      {input ? (
        <SheetBox input={input} line={spool.line.number} />
      ) : (
        <Notice className="mb-6">There is no issued sheet of this spool yet.</Notice>
      )}
      <div className="mt-8 grid gap-x-10 xl:grid-cols-[minmax(0,2fr)_minmax(0,1fr)]">
        <div className="min-w-0">
          {input ? <WorkSection spool={spool} input={input} issued={issued} role={role} /> : null}
          <CopiesOut spoolId={spool.id} role={role} />
        </div>
        <Section title="Revisions">
          <RevisionHistory revisions={spool.revisions} role={role} mayHold={spool.can.hold} />
        </Section>
      </div>
      <SubmitDialog open={submitting} spool={spool} size={size} onClose={() => setSubmitting(false)} />
    </>
  );
}

function SpoolHead({
  spool,
  role,
  onSubmit,
}: {
  readonly spool: SpoolDetail;
  readonly role: Role;
  readonly onSubmit: () => void;
}) {
  const newest = newestOf(spool.revisions);
  usePageTitle(`${spool.line.number} spool ${spool.letter}`);
  const trail = [
    { href: "/jobs", label: "Jobs" },
    { href: `/jobs/${spool.job.id}`, label: spool.job.number },
  ];
  if (canDo(role, "lines.read")) trail.push({ href: `/lines/${spool.line.id}`, label: spool.line.number });
  return (
    <TitleStrip
      kind="Spool"
      title={
        <>
          <span className="figure">{spool.line.number}</span> spool {spool.letter}
        </>
      }
      trail={trail}
      actions={
        <>
          <ButtonLink href={`/lines/${spool.line.id}/survey`}>Survey</ButtonLink>
          {canDo(role, "revisions.submit") ? (
            <Button tone="primary" disabled={!spool.can.submit} onClick={onSubmit}>
              Submit for review
            </Button>
          ) : null}
        </>
      }
      cells={[
        { label: "State", value: <StateWord state={newest?.state ?? "draft"} hold={newest?.hold} /> },
        { label: "Revision", value: newest?.code ?? "none", figure: true },
        {
          label: "Sheet",
          value: spool.sheetNumber ?? "numbered at first submission",
          figure: spool.sheetNumber !== null,
        },
        { label: "Job", value: `${spool.job.number} ${spool.job.title}` },
        { label: "Line", value: spool.line.title || spool.line.number },
      ]}
    />
  );
}

interface SheetActionsProps {
  readonly spool: SpoolDetail;
  readonly issued: boolean;
  readonly liveRevision: RevisionSummary | null;
  readonly size: SheetSize;
  readonly onSize: (size: SheetSize) => void;
}

const LINK =
  "inline-flex min-h-11 items-center border border-ink bg-sheet px-4 font-medium hover:border-dye hover:bg-dye-tint";

function SheetActions({ spool, issued, liveRevision, size, onSize }: SheetActionsProps) {
  if (issued) {
    if (!liveRevision) return null;
    const path = `/api/revisions/${liveRevision.id}/sheet?kind=fabrication`;
    return (
      <div className="flex flex-wrap gap-3">
        <a className={LINK} href={`${path}&copy=1`} target="_blank" rel="noreferrer">
          Print the sheet (PDF)
        </a>
        <a className={LINK} href={path} target="_blank" rel="noreferrer">
          Signed original (PDF)
        </a>
      </div>
    );
  }
  return (
    <div className="flex flex-wrap items-end gap-3">
      <Select
        label="Sheet size"
        className="w-52"
        options={SHEET_OPTIONS}
        value={size}
        onChange={(event) => onSize(event.target.value as SheetSize)}
      />
      <a
        className={LINK}
        href={`/api/spools/${spool.id}/sheet?size=${size}`}
        target="_blank"
        rel="noreferrer"
      >
        Print the draft (PDF)
      </a>
    </div>
  );
}
