"use client";
import { useState } from "react";
import { useViewer } from "@/components/shell/use-viewer";
import { Button, ButtonLink } from "@/components/ui/button";
import { apiSend, failureText, refreshApi, useApi } from "@/components/ui/fetcher";
import { timeText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { Notice, useToast } from "@/components/ui/notice";
import { TitleStrip } from "@/components/ui/title-strip";
import { usePageTitle } from "@/components/ui/use-page-title";
import { amountText, NEST_STATE_WORDS, type NestDetail } from "@/lib/rules/nest-plans";
import { planGroups } from "@/lib/rules/nest-table";
import { canDo } from "@/lib/rules/permissions";
import { CutDialog } from "./cut-dialog";
import { PlanGroupView } from "./plan-group";

/** Time between two looks at a running search, ms. */
const LOOK_EVERY_MS = 1_000;

/** One cutting plan: its picture, its table, its totals; cancel while it is searched, lock when cutting begins. */
export function NestPage({ nestId }: { readonly nestId: string }) {
  const nest = useApi<NestDetail>(`/api/nests/${nestId}`, { refreshInterval: (data) => (isRunning(data) ? LOOK_EVERY_MS : 0) });
  return (
    <Loaded api={nest} page label="Loading the cutting plan" lines={8}>
      {(data) => <Nest nest={data} />}
    </Loaded>
  );
}

function isRunning(nest: Pick<NestDetail, "state"> | undefined): boolean {
  return nest?.state === "waiting" || nest?.state === "searching";
}

function Nest({ nest }: { readonly nest: NestDetail }) {
  usePageTitle(`Cutting plan ${nest.title}`);
  const viewer = useViewer();
  const [cutting, setCutting] = useState(false);
  const mayChange = canDo(viewer.data?.role ?? "fitter", "nests.change");
  const { source, result } = nest;
  const groups = result ? planGroups(source, result) : [];
  return (
    <>
      <TitleStrip
        kind="Cutting plan"
        title={nest.title}
        trail={[{ href: "/jobs", label: "Jobs" }, { href: `/jobs/${nest.jobId}`, label: nest.jobNumber }]}
        cells={[
          { label: "State", value: NEST_STATE_WORDS[nest.state] },
          { label: "Asked for", value: `${nest.askedBy}, ${timeText(nest.askedAt)}` },
          { label: "Saw", value: `${source.saw.name}, cut of ${source.saw.kerfMm} mm` },
          { label: "Pieces", value: String(nest.pieces), figure: true },
        ]}
      />
      <NestState nest={nest} mayChange={mayChange} />
      {nest.stale.length > 0 ? (
        <Notice tone="caution" word="Out of date" className="mb-4">
          {nest.stale.join(" ")} Make the plan again before cutting.
        </Notice>
      ) : null}
      <Notice tone="caution" word="Verify" className="mb-4">
        By tape, two readings, before cutting. Confirm the heat number on the pipe in hand.
      </Notice>
      {source.leftOut.length > 0 ? (
        <Notice className="mb-4" word="Left out">
          {source.leftOut.map(({ mark, reason }) => `${mark} is ${reason}`).join(" · ")}
        </Notice>
      ) : null}
      {result ? (
        <div className="mb-5 flex flex-wrap gap-3" data-screen-only>
          {mayChange && nest.state === "done" ? (
            <Button tone="primary" disabled={nest.stale.length > 0} onClick={() => setCutting(true)}>
              Cutting begins: lock
            </Button>
          ) : null}
          <Button onClick={() => window.print()}>Print the plan</Button>
          <a className="inline-flex min-h-11 items-center px-2 text-dye underline underline-offset-4" href={`/api/nests/${nest.id}/export`} download>
            Save as CSV
          </a>
        </div>
      ) : null}
      {groups.map((plan) => (
        <PlanGroupView key={plan.title + plan.group.units} plan={plan} />
      ))}
      <MadeFrom nest={nest} />
      <CutDialog nest={nest} groups={groups} open={cutting} onClose={() => setCutting(false)} />
      <p className="mt-6" data-screen-only>
        <ButtonLink href={`/jobs/${nest.jobId}`} tone="quiet">
          Back to job {nest.jobNumber}
        </ButtonLink>
      </p>
    </>
  );
}

function NestState({ nest, mayChange }: { readonly nest: NestDetail; readonly mayChange: boolean }) {
  const say = useToast();
  const cancel = async () => {
    await apiSend("POST", `/api/nests/${nest.id}/cancel`).catch((failure: unknown) => say(failureText(failure), "trouble"));
    await refreshApi(`/api/nests/${nest.id}`);
  };
  if (isRunning(nest)) {
    const { progress } = nest;
    return (
      <Notice className="mb-4" word={nest.state === "waiting" ? "Waiting" : "Searching"}>
        <span role="status">
          {progress ? `Best so far costs ${amountText(progress.cost)}; nothing can cost less than ${amountText(Math.max(0, progress.bound))}. ` : ""}
          The search takes about {nest.source.seconds} seconds.
        </span>{" "}
        {mayChange ? (
          <Button tone="quiet" onClick={() => void cancel()}>
            Cancel the search
          </Button>
        ) : null}
      </Notice>
    );
  }
  if (nest.state === "failed") return <Notice tone="trouble" className="mb-4">The search ended without a plan. Ask for it again; if it stays so, tell the owner of your shop.</Notice>;
  if (nest.state === "cancelled") return <Notice className="mb-4">This search was cancelled. Nothing was taken from the rack.</Notice>;
  if (nest.state !== "cut") return null;
  return (
    <Notice tone="done" className="mb-4" word="Locked">
      Cutting began {timeText(nest.cutAt)}, {nest.cutBy}. Its stock is off the rack and its rests are back on it; the plan does not change any more.
    </Notice>
  );
}

function MadeFrom({ nest }: { readonly nest: NestDetail }) {
  return (
    <p className="text-sm text-soft">
      Made from{" "}
      {nest.source.spools.map(({ line, letter, revisionId, code }) => `line ${line} spool ${letter} ${revisionId === null ? "(DRAFT)" : `rev ${code}`}`).join(", ")}.
      {nest.source.heat ? ` Only stock of heat ${nest.source.heat}.` : ""}
    </p>
  );
}
