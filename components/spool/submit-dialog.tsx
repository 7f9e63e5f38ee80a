"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import type { SheetSize } from "@/iso";
import { SHEET_OPTIONS } from "@/components/jobs/sheet-words";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { apiSend, refreshApi } from "@/components/ui/fetcher";
import { Select, TextField } from "@/components/ui/field";
import { countText } from "@/components/ui/format";
import { Notice, useToast } from "@/components/ui/notice";
import { useFormSend } from "@/components/ui/use-form-send";
import type { SpoolDetail } from "@/lib/rules/api-types";
import { submitSchema, type SubmitForm } from "@/lib/rules/forms";

export interface SubmitDialogProps {
  readonly open: boolean;
  readonly spool: SpoolDetail;
  readonly size: SheetSize;
  readonly onClose: () => void;
}

const FIELDS = ["description", "size"] as const;

/** Freezes the sheet and sends it for review. */
export function SubmitDialog({ open, spool, size, onClose }: SubmitDialogProps) {
  return (
    <Dialog open={open} onClose={onClose} title={`Submit spool ${spool.letter} for review`}>
      <SubmitFields spool={spool} size={size} onDone={onClose} />
    </Dialog>
  );
}

function SubmitFields({
  spool,
  size,
  onDone,
}: {
  readonly spool: SpoolDetail;
  readonly size: SheetSize;
  readonly onDone: () => void;
}) {
  const say = useToast();
  const { register, handleSubmit, setError, formState } = useForm<SubmitForm>({
    resolver: zodResolver(submitSchema),
    defaultValues: { description: "", size },
  });
  const { trouble, send } = useFormSend(setError, FIELDS);
  const submit = (values: SubmitForm) =>
    send(async () => {
      await apiSend("POST", `/api/spools/${spool.id}/submit`, values);
      await refreshApi("/api/spools", "/api/jobs", "/api/lines");
      say("Submitted. The inspectors have mail.");
      onDone();
    });
  return (
    <form noValidate onSubmit={(event) => void handleSubmit(submit)(event)} className="space-y-4">
      {trouble ? <Notice tone="trouble">{trouble}</Notice> : null}
      <WorkBegun spool={spool} />
      <p>The sheet is frozen as it is now and mailed to the inspectors. A second person signs it.</p>
      <TextField
        label="What this revision is for"
        hint="Printed in the revision block, such as: Issued for fabrication, or Valve moved 6 in north."
        error={formState.errors.description?.message}
        {...register("description")}
      />
      <Select
        label="Sheet size"
        options={SHEET_OPTIONS}
        error={formState.errors.size?.message}
        {...register("size")}
      />
      <DialogActions>
        <Button type="submit" tone="primary" busy={formState.isSubmitting} busyLabel="Submitting">
          Submit for review
        </Button>
      </DialogActions>
    </form>
  );
}

/** What was already done from the sheet in force, before somebody replaces it. */
function WorkBegun({ spool }: { readonly spool: SpoolDetail }) {
  const count = (kind: string) =>
    new Set(spool.work.filter((entry) => entry.kind === kind).map((entry) => entry.key)).size;
  const parts = [
    { n: count("cut"), text: countText(count("cut"), "piece") + " cut" },
    { n: count("fit-up"), text: countText(count("fit-up"), "joint") + " fitted" },
    { n: count("weld"), text: countText(count("weld"), "weld") + " made" },
    { n: count("visual"), text: countText(count("visual"), "weld") + " examined" },
  ].filter((part) => part.n > 0);
  if (parts.length === 0) return null;
  return (
    <Notice tone="caution" word="Work has begun">
      {parts.map((part) => part.text).join(", ")}. The review lists what this revision means for them.
    </Notice>
  );
}
