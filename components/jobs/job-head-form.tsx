"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { useForm, useWatch } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Check, Select, TextField } from "@/components/ui/field";
import { missingGlyphs } from "@/components/ui/missing-glyphs";
import { Notice } from "@/components/ui/notice";
import { useFormSend } from "@/components/ui/use-form-send";
import type { JobDetail } from "@/lib/rules/api-types";
import { jobSettingsSchema, type JobSettingsForm } from "@/lib/rules/forms";
import { NorthDial } from "./north-dial";
import { SHEET_OPTIONS } from "./sheet-words";

const FIELDS = ["number", "title", "client", "area", "open", "sheetSize", "plantNorthDeg"] as const;
const schema = jobSettingsSchema.pick({
  number: true,
  title: true,
  client: true,
  area: true,
  open: true,
  sheetSize: true,
  plantNorthDeg: true,
});

export interface JobHeadFormProps {
  readonly job: JobDetail;
  readonly editable: boolean;
  readonly onSave: (values: JobSettingsForm) => Promise<void>;
}

/** Number, title, client, area, sheet size and plant north. */
export function JobHeadForm({ job, editable, onSave }: JobHeadFormProps) {
  const { number, title, client, area, open, sheetSize, plantNorthDeg } = job;
  const { register, control, handleSubmit, setError, watch, formState } = useForm<JobSettingsForm>({
    resolver: zodResolver(schema),
    values: { number, title, client, area, open, sheetSize, plantNorthDeg },
    resetOptions: { keepDirtyValues: true },
  });
  const printed = useWatch({ control, name: ["title", "client", "area"] });
  const { trouble, send } = useFormSend(setError, FIELDS);
  const { errors } = formState;
  return (
    <form noValidate onSubmit={(event) => void handleSubmit((values) => send(() => onSave(values)))(event)}>
      {trouble ? (
        <Notice tone="trouble" className="mb-4">
          {trouble}
        </Notice>
      ) : null}
      <fieldset disabled={!editable} className="grid gap-4 sm:grid-cols-2 xl:grid-cols-4">
        <TextField label="Job number" figure error={errors.number?.message} {...register("number")} />
        <TextField label="Title" error={errors.title?.message} caution={missingGlyphs(printed[0] ?? "")} {...register("title")} />
        <TextField label="Client" error={errors.client?.message} caution={missingGlyphs(printed[1] ?? "")} {...register("client")} />
        <TextField label="Area or unit" error={errors.area?.message} caution={missingGlyphs(printed[2] ?? "")} {...register("area")} />
        <Select
          label="Sheet size"
          options={SHEET_OPTIONS}
          error={errors.sheetSize?.message}
          {...register("sheetSize")}
        />
        <TextField
          label="Plant north, degrees clockwise from true north"
          figure
          inputMode="decimal"
          error={errors.plantNorthDeg?.message}
          {...register("plantNorthDeg", { valueAsNumber: true })}
        />
        <NorthDial degrees={Number(watch("plantNorthDeg"))} />
        <Check label="The job is open" className="self-end" {...register("open")} />
      </fieldset>
      {editable ? (
        <Button
          type="submit"
          tone="primary"
          className="mt-5"
          busy={formState.isSubmitting}
          busyLabel="Saving"
        >
          Save the job
        </Button>
      ) : null}
    </form>
  );
}
