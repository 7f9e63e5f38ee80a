"use client";
import type { LineSettings } from "@/iso";
import { apiSend, refreshApi } from "@/components/ui/fetcher";
import { Notice, useToast } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import type { JobDetail } from "@/lib/rules/api-types";
import { JobHeadForm } from "./job-head-form";
import { LineSettingsForm } from "./line-settings-form";
import { LogoField } from "./logo-field";
import { TitleFieldsForm } from "./title-fields-form";

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
        <div className="grid gap-8 lg:grid-cols-2">
          <TitleFieldsForm
            fields={job.fields}
            editable={editable}
            onSave={(fields) => patch({ fields }, "Title block saved.")}
          />
          <LogoField
            path={`${path}/logo`}
            logo={job.logo}
            editable={editable}
            onChanged={() => void refreshApi("/api/jobs")}
          />
        </div>
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
