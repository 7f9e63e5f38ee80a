"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { useRouter } from "next/navigation";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { apiSend, refreshApi } from "@/components/ui/fetcher";
import { Select, TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { useFormSend } from "@/components/ui/use-form-send";
import { jobNewSchema, type JobNewForm } from "@/lib/rules/forms";

const FIELDS = ["number", "title", "client", "area", "units"] as const;
export const UNIT_OPTIONS = [
  { value: "imperial", label: "NPS, feet and inches to 1/16" },
  { value: "metric", label: "DN, millimetres" },
] as const;

/** Opens a job; everything else about it is set on its own page. */
export function NewJobDialog({ open, onClose }: { readonly open: boolean; readonly onClose: () => void }) {
  return (
    <Dialog open={open} onClose={onClose} title="New job">
      <NewJobForm />
    </Dialog>
  );
}

function NewJobForm() {
  const router = useRouter();
  const { register, handleSubmit, setError, formState } = useForm<JobNewForm>({
    resolver: zodResolver(jobNewSchema),
    defaultValues: { number: "", title: "", client: "", area: "", units: "imperial" },
  });
  const { trouble, send } = useFormSend(setError, FIELDS);
  const { errors } = formState;
  const add = (values: JobNewForm) =>
    send(async () => {
      const { id } = await apiSend<{ id: string }>("POST", "/api/jobs", values);
      void refreshApi("/api/jobs");
      router.push(`/jobs/${id}`);
    });
  return (
    <form noValidate onSubmit={(event) => void handleSubmit(add)(event)}>
      {trouble ? (
        <Notice tone="trouble" className="mb-4">
          {trouble}
        </Notice>
      ) : null}
      <div className="grid gap-4 sm:grid-cols-2">
        <TextField label="Job number" figure error={errors.number?.message} {...register("number")} />
        <TextField label="Title" error={errors.title?.message} {...register("title")} />
        <TextField label="Client" error={errors.client?.message} {...register("client")} />
        <TextField label="Area or unit" error={errors.area?.message} {...register("area")} />
        <Select
          label="Units"
          hint="Each line may still choose its own."
          options={UNIT_OPTIONS}
          className="sm:col-span-2"
          error={errors.units?.message}
          {...register("units")}
        />
      </div>
      <DialogActions>
        <Button type="submit" tone="primary" busy={formState.isSubmitting} busyLabel="Opening">
          Open the job
        </Button>
      </DialogActions>
    </form>
  );
}
