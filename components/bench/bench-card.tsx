"use client";
import clsx from "clsx";
import { useId, useState } from "react";
import { Button, ButtonLink, buttonClass } from "@/components/ui/button";
import { useApi } from "@/components/ui/fetcher";
import { dayText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { Notice } from "@/components/ui/notice";
import { Progress } from "@/components/ui/progress";
import { StateWord } from "@/components/ui/state-word";
import { SheetSetPrint } from "@/components/spool/sheet-set-print";
import { WorkSection } from "@/components/spool/work-section";
import type { BenchRow, Role, SpoolDetail } from "@/lib/rules/api-types";

/** One issued sheet: what it is, how far it is, its PDF, and the log under the thumb. */
export function BenchCard({ row, role }: { readonly row: BenchRow; readonly role: Role }) {
  const [recording, setRecording] = useState(false);
  const panel = useId();
  return (
    <li className={clsx("frame p-5", recording && "lg:col-span-2")}>
      <div className="flex flex-wrap items-start justify-between gap-x-4 gap-y-1">
        <h2 className="figure text-2xl">
          {row.sheetNumber} <span className="whitespace-nowrap">rev {row.code}</span>
        </h2>
        <StateWord state={row.state} hold={row.hold} className="pt-1.5" />
      </div>
      <p className="mt-1 text-lg">
        <span className="figure">{row.line}</span> spool {row.letter}
      </p>
      <p className="text-soft">
        Job {row.job}, issued {dayText(row.issuedAt)}
      </p>
      {row.hold ? (
        <Notice tone="trouble" word="HOLD" className="mt-3">
          Do not work from this sheet until it is released.
        </Notice>
      ) : null}
      <div className="mt-4 grid grid-cols-2 gap-5">
        <Progress done={row.cut} of={row.pieces} word="cut" />
        <Progress done={row.welded} of={row.welds} word="welded" />
      </div>
      <div className="mt-5 grid gap-3 sm:grid-cols-3">
        <a
          className={buttonClass("primary", true)}
          href={`/api/revisions/${row.revisionId}/sheet?kind=fabrication&copy=1`}
          target="_blank"
          rel="noreferrer"
        >
          Open the sheet
        </a>
        <SheetSetPrint spoolId={row.spoolId} issued size={null} big />
        <Button
          big
          aria-expanded={recording}
          aria-controls={panel}
          onClick={() => setRecording((now) => !now)}
        >
          {recording ? "Close the log" : "Record work"}
        </Button>
        <ButtonLink big href={`/spools/${row.spoolId}`}>
          Spool page
        </ButtonLink>
      </div>
      <div id={panel}>{recording ? <BenchLog spoolId={row.spoolId} role={role} /> : null}</div>
    </li>
  );
}

function BenchLog({ spoolId, role }: { readonly spoolId: string; readonly role: Role }) {
  const spool = useApi<SpoolDetail>(`/api/spools/${spoolId}`);
  return (
    <div className="mt-6 border-t border-ink pt-5">
      <Loaded api={spool} label="Loading pieces and welds">
        {(data) =>
          data.live ? (
            <WorkSection spool={data} input={data.live.input} issued role={role} />
          ) : (
            <Notice>This sheet is no longer in force.</Notice>
          )
        }
      </Loaded>
    </div>
  );
}
