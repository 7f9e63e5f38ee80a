"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { apiSend, refreshApi } from "@/components/ui/fetcher";
import { Select, TextField } from "@/components/ui/field";
import { Notice, useToast } from "@/components/ui/notice";
import { useFormSend } from "@/components/ui/use-form-send";
import type { WorkKind } from "@/lib/rules/api-types";
import { WORK_FIELDS, workSchema, type WorkForm } from "@/lib/rules/forms";
import { FIELD_WELD_CAUTION, FIELD_WORDS, RESULT_OPTIONS, WORK_WORDS } from "./work-words";

/** What is being recorded, and on what. */
export interface WorkTarget {
  readonly spoolId: string;
  readonly kind: WorkKind;
  /** Piece mark or weld number; "" = the person names what was measured. */
  readonly mark: string;
  readonly key: string;
  /** What it is, in words ("cut length 28 1/4 in"). */
  readonly about: string;
  readonly field: boolean;
}

/** One entry of the work log; entries are added, never changed, so it says so. */
export function WorkDialog({
  target,
  onClose,
}: {
  readonly target: WorkTarget | null;
  readonly onClose: () => void;
}) {
  return (
    <Dialog open={target !== null} onClose={onClose} title={target ? titleOf(target) : "Record work"}>
      {target ? <WorkEntryForm target={target} onDone={onClose} /> : null}
    </Dialog>
  );
}

function titleOf(target: WorkTarget): string {
  return target.kind === "actual"
    ? "Record an actual dimension"
    : `${WORK_WORDS[target.kind]} ${target.mark}`;
}

function WorkEntryForm({ target, onDone }: { readonly target: WorkTarget; readonly onDone: () => void }) {
  const say = useToast();
  const names: readonly string[] = WORK_FIELDS[target.kind];
  const { register, handleSubmit, setError, formState } = useForm<WorkForm>({
    resolver: zodResolver(workSchema),
    defaultValues: {
      kind: target.kind,
      mark: target.mark,
      key: target.key || "actual",
      values: Object.fromEntries(names.map((name) => [name, ""])),
    },
  });
  const { trouble, send } = useFormSend(setError, ["mark"]);
  const record = (values: WorkForm) =>
    send(async () => {
      await apiSend(
        "POST",
        `/api/spools/${target.spoolId}/work`,
        target.key ? values : { ...values, key: `actual:${values.mark}` },
      );
      await refreshApi("/api/spools", "/api/bench");
      say(`${WORK_WORDS[target.kind]} ${values.mark} recorded.`);
      onDone();
    });
  return (
    <form noValidate onSubmit={(event) => void handleSubmit(record)(event)} className="space-y-4">
      {trouble ? <Notice tone="trouble">{trouble}</Notice> : null}
      {target.about ? <p>{target.about}</p> : null}
      {target.field ? <Notice tone="caution">{FIELD_WELD_CAUTION}</Notice> : null}
      {target.mark === "" ? (
        <TextField
          label="What was measured"
          hint="Such as face to face, E, or diagonal A-C."
          error={formState.errors.mark?.message}
          {...register("mark")}
        />
      ) : null}
      {names.map((name) => {
        const words = FIELD_WORDS[name];
        const common = { error: formState.errors.values?.[name]?.message, ...register(`values.${name}`) };
        if (name === "result")
          return <Select key={name} label="Result" options={RESULT_OPTIONS} {...common} />;
        return (
          <TextField
            key={name}
            label={words?.label ?? name}
            hint={words?.hint}
            caution={words?.caution}
            figure={words?.figure}
            {...common}
          />
        );
      })}
      <p className="text-sm text-soft">
        An entry keeps your name and the time and cannot be changed; a correction is a new entry.
      </p>
      <DialogActions>
        <Button type="submit" tone="primary" big busy={formState.isSubmitting} busyLabel="Recording">
          Record
        </Button>
      </DialogActions>
    </form>
  );
}
