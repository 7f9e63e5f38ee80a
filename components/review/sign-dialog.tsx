"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { useRouter } from "next/navigation";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { apiSend, refreshApi } from "@/components/ui/fetcher";
import { Check, TextField } from "@/components/ui/field";
import { Notice, useToast } from "@/components/ui/notice";
import { useFormSend } from "@/components/ui/use-form-send";
import type { ReviewDetail } from "@/lib/rules/api-types";
import { signSchema, type SignForm } from "@/lib/rules/forms";

export interface SignDialogProps {
  readonly open: boolean;
  readonly review: ReviewDetail;
  /** Points whose unverified dimension the signer accepted on the page. */
  readonly accepted: readonly string[];
  readonly onClose: () => void;
}

const FIELDS = ["password", "verified"] as const;

/** The signature: password again and one acknowledgement; it releases the sheet and supersedes the one before. */
export function SignDialog({ open, review, accepted, onClose }: SignDialogProps) {
  return (
    <Dialog open={open} onClose={onClose} title={`Sign rev ${review.revision.code} for fabrication`}>
      <SignFields review={review} accepted={accepted} onDone={onClose} />
    </Dialog>
  );
}

function SignFields({
  review,
  accepted,
  onDone,
}: {
  readonly review: ReviewDetail;
  readonly accepted: readonly string[];
  readonly onDone: () => void;
}) {
  const say = useToast();
  const router = useRouter();
  const { register, handleSubmit, setError, formState } = useForm<SignForm>({
    resolver: zodResolver(signSchema),
    defaultValues: { password: "", accepted: [...accepted] },
  });
  const { trouble, send } = useFormSend(setError, FIELDS);
  const sign = (values: SignForm) =>
    send(async () => {
      await apiSend("POST", `/api/revisions/${review.revision.id}/sign`, values);
      await refreshApi("/api/revisions", "/api/spools", "/api/jobs", "/api/bench");
      say(`Rev ${review.revision.code} is signed FOR FABRICATION.`);
      onDone();
      router.push(`/spools/${review.spool.id}`);
    });
  return (
    <form noValidate onSubmit={(event) => void handleSubmit(sign)(event)} className="space-y-4">
      {trouble ? <Notice tone="trouble">{trouble}</Notice> : null}
      <p>
        Sheet <span className="figure">{review.spool.sheetNumber}</span> becomes FOR FABRICATION under your
        name.
        {review.before
          ? ` Rev ${review.before.revision.code} becomes SUPERSEDED, and those who hold it have mail.`
          : ""}
      </p>
      {accepted.length > 0 ? (
        <p>
          Accepted by you:{" "}
          {review.unverified
            .filter((one) => accepted.includes(one.pointId))
            .map((one) => one.text)
            .join("; ")}
        </p>
      ) : null}
      <Check
        label="I checked this sheet. It is a layout aid with nominal take-outs: the bench verifies by tape, two readings, before cutting."
        error={formState.errors.verified?.message}
        {...register("verified")}
      />
      <TextField
        label="Your password, again"
        type="password"
        autoComplete="current-password"
        error={formState.errors.password?.message}
        {...register("password")}
      />
      <DialogActions>
        <Button type="submit" tone="primary" big busy={formState.isSubmitting} busyLabel="Signing">
          Sign
        </Button>
      </DialogActions>
    </form>
  );
}
