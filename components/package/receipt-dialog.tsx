"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import type { z } from "zod";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { apiSend, refreshApi } from "@/components/ui/fetcher";
import { TextArea, TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { useFormSend } from "@/components/ui/use-form-send";
import { packageReceiptSchema } from "@/lib/rules/package-forms";

type Values = z.input<typeof packageReceiptSchema>;
const FIELDS = ["receivedBy", "receivedOn", "remark"] as const;

/** Notes once who acknowledged a transmittal and when. */
export function ReceiptDialog({ packageId, open, onClose }: { readonly packageId: string; readonly open: boolean; readonly onClose: () => void }) {
  return (
    <Dialog open={open} onClose={onClose} title="Note the acknowledgement">
      <ReceiptForm packageId={packageId} onClose={onClose} />
    </Dialog>
  );
}

function ReceiptForm({ packageId, onClose }: { readonly packageId: string; readonly onClose: () => void }) {
  const { register, handleSubmit, setError, formState: { errors, isSubmitting } } = useForm<Values>({
    resolver: zodResolver(packageReceiptSchema),
    defaultValues: { receivedBy: "", receivedOn: new Date().toLocaleDateString("en-CA"), remark: "" },
  });
  const { trouble, send } = useFormSend<Values>(setError, FIELDS);
  const submit = handleSubmit((values) =>
    send(async () => {
      await apiSend("POST", `/api/packages/${packageId}/receipt`, values);
      await refreshApi(`/api/packages/${packageId}`);
      onClose();
    }),
  );
  return (
    <form noValidate onSubmit={(event) => void submit(event)} className="grid gap-3">
      {trouble ? <Notice tone="trouble">{trouble}</Notice> : null}
      <p className="text-soft">It is written once and stays. Enter it as the recipient gave it.</p>
      <TextField label="Acknowledged by" maxLength={120} error={errors.receivedBy?.message} {...register("receivedBy")} />
      <TextField label="On" type="date" error={errors.receivedOn?.message} {...register("receivedOn")} />
      <TextArea label="Remark" rows={2} maxLength={1000} error={errors.remark?.message} {...register("remark")} />
      <DialogActions>
        <Button onClick={onClose}>Close</Button>
        <Button type="submit" tone="primary" busy={isSubmitting} busyLabel="Noting">
          Note it
        </Button>
      </DialogActions>
    </form>
  );
}
