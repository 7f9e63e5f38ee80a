"use client";
import { useMemo } from "react";
import type { LineSettings, TitleBlock } from "@/iso";
import { apiSend, refreshApi, useApi } from "@/components/ui/fetcher";
import { Notice, useToast } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import type { JobDetail, LineDetail } from "@/lib/rules/api-types";
import { JobHeadForm } from "./job-head-form";
import { LineSettingsForm } from "./line-settings-form";
import { TitleEditor } from "./title-editor";
import type { TitleChange } from "./title-rows";

/** Everything a job hands down: to its sheets (title block, north, size) and to its new lines (defaults). */
export function JobSettingsView({ job, editable }: { readonly job: JobDetail; readonly editable: boolean }) {
  const say = useToast();
  const path = `/api/jobs/${job.id}`;
  const patch = async (change: object, done: string) => {
    await apiSend("PATCH", path, change);
    await refreshApi("/api/jobs");
    say(done);
  };
  return (
    <>
      {editable ? null : (
        <Notice className="mb-6">
          Your role reads these settings. The owner or a detailer changes them.
        </Notice>
      )}
      <Section title="Job and sheet">
        <JobHeadForm job={job} editable={editable} onSave={(values) => patch(values, "Job saved.")} />
      </Section>
      <Section title="Title block">
        <JobTitle job={job} editable={editable} onSave={(change) => patch(change, "Title block saved.")} />
      </Section>
      <Section title="Defaults for new lines">
        <p className="mb-4 text-soft">Lines that exist keep their own settings.</p>
        <LineSettingsForm
          settings={job.defaults}
          editable={editable}
          onSave={(defaults: LineSettings) => patch({ defaults }, "Defaults saved.")}
        />
      </Section>
    </>
  );
}

/** The job's title block, shown with its first line where it has one that can be drawn. */
function JobTitle({ job, editable, onSave }: { readonly job: JobDetail; readonly editable: boolean; readonly onSave: (change: TitleChange) => Promise<void> }) {
  const first = job.lines.find((line) => line.spools.length > 0);
  const line = useApi<LineDetail>(first ? `/api/lines/${first.id}` : null).data;
  const spool = first?.spools[0]?.letter;
  const drawn = useMemo(() => (line && spool ? { document: line.document, spool } : null), [line, spool]);
  const titleBlock = useMemo<TitleBlock>(
    () => ({
      shopName: line?.titleBlock.shopName ?? "Your shop", client: job.client, project: job.title, jobNumber: job.number, area: job.area, plantNorthDeg: job.plantNorthDeg,
      fields: job.fields, ...(job.titleOrder?.length ? { order: job.titleOrder } : {}), logo: job.logo ?? line?.titleBlock.logo ?? null,
    }),
    [job, line],
  );
  return (
    <TitleEditor
      titleBlock={titleBlock} logoPath={`/api/jobs/${job.id}/logo`} ownLogo={job.logo} size={job.sheetSize} settings={job.defaults} line={drawn} editable={editable}
      onSave={onSave} onLogo={() => void refreshApi("/api/jobs", "/api/lines")}
    />
  );
}
