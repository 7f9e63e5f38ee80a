"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { useRouter } from "next/navigation";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { apiSend, refreshApi } from "@/components/ui/fetcher";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { useFormSend } from "@/components/ui/use-form-send";
import type { LineRow } from "@/lib/rules/api-types";
import { lineNewSchema, type LineNewForm } from "@/lib/rules/forms";

const FIELDS = ["number", "title"] as const;

export interface LineDialogProps {
  readonly jobId: string;
  /** null = closed; copyOf null = a new line, else a copy of that one. */
  readonly adding: { readonly copyOf: LineRow | null } | null;
  readonly onClose: () => void;
}

/** A new line from the job's defaults, or a copy of a line with its points. */
export function LineDialog({ jobId, adding, onClose }: LineDialogProps) {
  const copyOf = adding?.copyOf ?? null;
  return (
    <Dialog
      open={adding !== null}
      onClose={onClose}
      title={copyOf ? `Copy line ${copyOf.number}` : "New line"}
    >
      <LineForm jobId={jobId} copyOf={copyOf} />
    </Dialog>
  );
}

function LineForm({ jobId, copyOf }: { readonly jobId: string; readonly copyOf: LineRow | null }) {
  const router = useRouter();
  const { register, handleSubmit, setError, formState } = useForm<LineNewForm>({
    resolver: zodResolver(lineNewSchema),
    defaultValues: { number: "", title: copyOf?.title ?? "" },
  });
  const { trouble, send } = useFormSend(setError, FIELDS);
  const { errors } = formState;
  const add = (values: LineNewForm) =>
    send(async () => {
      const path = copyOf ? `/api/lines/${copyOf.id}/copy` : `/api/jobs/${jobId}/lines`;
      const { id } = await apiSend<{ id: string }>("POST", path, values);
      void refreshApi("/api/jobs");
      router.push(`/lines/${id}`);
    });
  return (
    <form noValidate onSubmit={(event) => void handleSubmit(add)(event)}>
      {trouble ? (
        <Notice tone="trouble" className="mb-4">
          {trouble}
        </Notice>
      ) : null}
      <p className="mb-4 text-soft">
        {copyOf
          ? "The copy takes the points and settings, with weld numbers, piece marks and spool letters of its own. Revisions stay with the line copied."
          : "The line starts with the job's defaults and then owns its settings."}
      </p>
      <div className="grid gap-4 sm:grid-cols-2">
        <TextField label="Line number" figure error={errors.number?.message} {...register("number")} />
        <TextField label="Title" error={errors.title?.message} {...register("title")} />
      </div>
      <DialogActions>
        <Button type="submit" tone="primary" busy={formState.isSubmitting} busyLabel="Making the line">
          {copyOf ? "Copy the line" : "Make the line"}
        </Button>
      </DialogActions>
    </form>
  );
}
