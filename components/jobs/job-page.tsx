"use client";
import { useState } from "react";
import { NestList } from "@/components/nest/nest-list";
import { PackageList } from "@/components/package/package-list";
import { JobWithdrawals } from "@/components/spool/copies-out";
import { ChoiceRow } from "@/components/ui/choice-row";
import { useApi } from "@/components/ui/fetcher";
import { countText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { TitleStrip } from "@/components/ui/title-strip";
import { usePageTitle } from "@/components/ui/use-page-title";
import { useViewer } from "@/components/shell/use-viewer";
import type { JobDetail } from "@/lib/rules/api-types";
import { canDo } from "@/lib/rules/permissions";
import { JobSettingsView } from "./job-settings-view";
import { LineList } from "./line-list";
import { SHEET_WORDS } from "./sheet-words";

/** One job: its lines with their spools by state, and its settings. */
export function JobPage({ jobId }: { readonly jobId: string }) {
  const job = useApi<JobDetail>(`/api/jobs/${jobId}`);
  const viewer = useViewer();
  const role = viewer.data?.role ?? "fitter";
  const [view, setView] = useState<"lines" | "packages" | "plans" | "settings">("lines");
  return (
    <Loaded api={job} page label="Loading the job" lines={8}>
      {(data) => (
        <>
          <JobHead job={data} />
          <JobWithdrawals jobId={data.id} role={role} />
          {canDo(role, "nests.read") ? (
            <div className="mb-5" data-screen-only>
              <ChoiceRow
                label="Part of the job"
                value={view}
                onChange={setView}
                choices={[
                  { value: "lines", label: `Lines (${data.lines.length})` },
                  { value: "packages", label: "Packages" },
                  { value: "plans", label: "Cutting plans" },
                  ...(canDo(role, "lines.read") ? [{ value: "settings" as const, label: "Job settings" }] : []),
                ]}
              />
            </div>
          ) : null}
          {view === "lines" ? (
            <LineList job={data} role={role} />
          ) : view === "packages" ? (
            <PackageList job={data} />
          ) : view === "plans" ? (
            <NestList job={data} role={role} />
          ) : (
            <JobSettingsView job={data} editable={canDo(role, "lines.change")} />
          )}
        </>
      )}
    </Loaded>
  );
}

function JobHead({ job }: { readonly job: JobDetail }) {
  usePageTitle(`${job.number} ${job.title}`);
  const spools = job.lines.reduce((sum, line) => sum + line.spools.length, 0);
  return (
    <TitleStrip
      kind={job.open ? "Job" : "Job, closed"}
      title={
        <>
          <span className="figure">{job.number}</span> {job.title}
        </>
      }
      trail={[{ href: "/jobs", label: "Jobs" }]}
      cells={[
        { label: "Client", value: job.client || "none" },
        { label: "Area", value: job.area || "none" },
        { label: "Units", value: job.defaults.units === "metric" ? "DN, mm" : "NPS, ft-in" },
        { label: "Sheet", value: SHEET_WORDS[job.sheetSize] },
        { label: "Spools", value: countText(spools, "spool"), figure: true },
      ]}
    />
  );
}
