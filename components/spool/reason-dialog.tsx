"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import type { ReactNode } from "react";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { apiSend, refreshApi } from "@/components/ui/fetcher";
import { Check, TextArea } from "@/components/ui/field";
import { Notice, useToast } from "@/components/ui/notice";
import { useFormSend } from "@/components/ui/use-form-send";
import { asBuiltSchema, reasonSchema, type AsBuiltForm, type ReasonForm } from "@/lib/rules/forms";

export type RevisionAct = "return" | "hold" | "release" | "void" | "as-built";

interface ActWords {
  readonly title: string;
  readonly lead: ReactNode;
  readonly button: string;
  readonly done: string;
  readonly stop?: boolean;
  readonly label?: string;
}

const ACTS: Readonly<Record<RevisionAct, ActWords>> = {
  return: {
    title: "Return the revision",
    lead: "It goes back to the detailer with your reason. What was submitted stays in the history.",
    button: "Return it",
    done: "Returned.",
  },
  hold: {
    title: "Put on hold",
    lead: "The sheet shows HOLD and the bench records nothing on it until it is released.",
    button: "Put on hold",
    done: "On hold.",
    stop: true,
  },
  release: {
    title: "Release the hold",
    lead: "The bench may go on with this sheet.",
    button: "Release the hold",
    done: "Hold released.",
  },
  void: {
    title: "Void the revision",
    lead: "The sheet is dead for good. Its number and marks are never used again.",
    button: "Void it",
    done: "Voided.",
    stop: true,
  },
  "as-built": {
    title: "Close as-built",
    lead: "The spool is recorded as built from this sheet.",
    button: "Close as-built",
    done: "Closed as-built.",
    label: "Remarks",
  },
};

export function actWords(act: RevisionAct): ActWords {
  return ACTS[act];
}

export interface ReasonDialogProps {
  readonly act: RevisionAct | null;
  readonly revisionId: string;
  readonly code: string;
  readonly onClose: () => void;
  readonly onDone?: () => void;
}

/** One step in a revision's life that needs a reason; as-built also asks to confirm what was checked. */
export function ReasonDialog({ act, revisionId, code, onClose, onDone }: ReasonDialogProps) {
  const done = () => {
    onClose();
    onDone?.();
  };
  return (
    <Dialog open={act !== null} onClose={onClose} title={act ? `${ACTS[act].title}: rev ${code}` : ""}>
      {act === "as-built" ? <AsBuilt revisionId={revisionId} onDone={done} /> : null}
      {act && act !== "as-built" ? <Reason act={act} revisionId={revisionId} onDone={done} /> : null}
    </Dialog>
  );
}

/** Reads again all that shows a revision. */
function refreshRevision(): Promise<unknown> {
  return refreshApi("/api/spools", "/api/revisions", "/api/jobs", "/api/bench");
}

const REASON_FIELDS = ["reason"] as const;
const AS_BUILT_FIELDS = ["reason", "verified"] as const;

function Reason({
  act,
  revisionId,
  onDone,
}: {
  readonly act: RevisionAct;
  readonly revisionId: string;
  readonly onDone: () => void;
}) {
  const say = useToast();
  const words = ACTS[act];
  const { register, handleSubmit, setError, formState } = useForm<ReasonForm>({
    resolver: zodResolver(reasonSchema),
    defaultValues: { reason: "" },
  });
  const { trouble, send } = useFormSend(setError, REASON_FIELDS);
  const go = (values: ReasonForm) =>
    send(async () => {
      await apiSend("POST", `/api/revisions/${revisionId}/${act}`, values);
      await refreshRevision();
      say(words.done);
      onDone();
    });
  return (
    <form noValidate onSubmit={(event) => void handleSubmit(go)(event)} className="space-y-4">
      {trouble ? <Notice tone="trouble">{trouble}</Notice> : null}
      <p>{words.lead}</p>
      <TextArea
        label="Reason"
        hint="The next person reads it."
        error={formState.errors.reason?.message}
        {...register("reason")}
      />
      <DialogActions>
        <Button type="submit" tone={words.stop ? "stop" : "primary"} busy={formState.isSubmitting}>
          {words.button}
        </Button>
      </DialogActions>
    </form>
  );
}

function AsBuilt({ revisionId, onDone }: { readonly revisionId: string; readonly onDone: () => void }) {
  const say = useToast();
  const words = ACTS["as-built"];
  const { register, handleSubmit, setError, formState } = useForm<AsBuiltForm>({
    resolver: zodResolver(asBuiltSchema),
  });
  const { trouble, send } = useFormSend(setError, AS_BUILT_FIELDS);
  const go = (values: AsBuiltForm) =>
    send(async () => {
      await apiSend("POST", `/api/revisions/${revisionId}/as-built`, values);
      await refreshRevision();
      say(words.done);
      onDone();
    });
  return (
    <form noValidate onSubmit={(event) => void handleSubmit(go)(event)} className="space-y-4">
      {trouble ? <Notice tone="trouble">{trouble}</Notice> : null}
      <p>{words.lead}</p>
      <TextArea
        label="Remarks"
        hint="What differs from the sheet, or that nothing does."
        error={formState.errors.reason?.message}
        {...register("reason")}
      />
      <Check
        label="The spool was measured against this sheet, and the log of its pieces and welds is complete."
        error={formState.errors.verified?.message}
        {...register("verified")}
      />
      <DialogActions>
        <Button type="submit" tone="primary" busy={formState.isSubmitting}>
          {words.button}
        </Button>
      </DialogActions>
    </form>
  );
}
