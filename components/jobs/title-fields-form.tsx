"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { useFieldArray, useForm } from "react-hook-form";
import { z } from "zod";
import type { TitleBlock } from "@/iso";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { useFormSend } from "@/components/ui/use-form-send";
import { titleFieldsSchema } from "@/lib/rules/forms";

const schema = z.object({ fields: titleFieldsSchema });
type Values = z.infer<typeof schema>;
const FIELDS = ["fields"] as const;
const MOST = 6;

export interface TitleFieldsFormProps {
  readonly fields: TitleBlock["fields"];
  readonly editable: boolean;
  readonly onSave: (fields: Values["fields"]) => Promise<void>;
}

/** Labelled fields of the shop's or client's own in the title block, printed in this order. */
export function TitleFieldsForm({ fields, editable, onSave }: TitleFieldsFormProps) {
  const { register, control, handleSubmit, setError, formState } = useForm<Values>({
    resolver: zodResolver(schema),
    values: { fields: fields.map((field) => ({ ...field })) },
    resetOptions: { keepDirtyValues: true },
  });
  const rows = useFieldArray({ control, name: "fields" });
  const { trouble, send } = useFormSend(setError, FIELDS);
  const errors = formState.errors.fields;
  return (
    <form
      noValidate
      onSubmit={(event) => void handleSubmit((values) => send(() => onSave(values.fields)))(event)}
    >
      <h3>Fields of your own</h3>
      <p className="mb-3 text-sm text-soft">At most six, such as a work order or a purchase order.</p>
      {trouble ? (
        <Notice tone="trouble" className="mb-4">
          {trouble}
        </Notice>
      ) : null}
      <fieldset disabled={!editable} className="space-y-3">
        {rows.fields.map((row, n) => (
          <div key={row.id} className="grid grid-cols-[1fr_1fr_auto] items-start gap-3">
            <TextField
              label={`Label ${n + 1}`}
              error={errors?.[n]?.label?.message}
              {...register(`fields.${n}.label`)}
            />
            <TextField label="Text" error={errors?.[n]?.value?.message} {...register(`fields.${n}.value`)} />
            <Button
              tone="quiet"
              className="mt-7"
              aria-label={`Remove field ${n + 1}`}
              onClick={() => rows.remove(n)}
            >
              Remove
            </Button>
          </div>
        ))}
        {rows.fields.length === 0 ? <p className="text-soft">None yet.</p> : null}
      </fieldset>
      {editable ? (
        <div className="mt-4 flex flex-wrap gap-3">
          <Button onClick={() => rows.append({ label: "", value: "" })} disabled={rows.fields.length >= MOST}>
            Add a field
          </Button>
          <Button type="submit" tone="primary" busy={formState.isSubmitting} busyLabel="Saving">
            Save the fields
          </Button>
        </div>
      ) : null}
    </form>
  );
}
