"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { useEffect, useRef } from "react";
import { useFieldArray, useForm, useWatch, type Control, type FieldErrors, type UseFormRegister } from "react-hook-form";
import type { TitleBlock } from "@/iso";
import { missingGlyphs } from "@/components/ui/missing-glyphs";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { useFormSend } from "@/components/ui/use-form-send";
import { changeOf, isOwn, MOST_OWN, rowName, rowsOf, titleRowsSchema, type TitleChange, type TitleRow, type TitleRows } from "./title-rows";

const FIELDS = ["rows"] as const;

export interface TitleFieldsFormProps {
  readonly fields: TitleBlock["fields"];
  readonly order: readonly string[] | undefined;
  readonly editable: boolean;
  readonly onSave: (change: TitleChange) => Promise<void>;
  /** Told of every keystroke and move, so that a preview can follow. */
  readonly onTyped: (change: TitleChange) => void;
}

/** The fields of the title block in the order they print: those of one's own added, worded and removed, all moved up and down. */
export function TitleFieldsForm({ fields, order, editable, onSave, onTyped }: TitleFieldsFormProps) {
  const { register, control, handleSubmit, setError, formState } = useForm<TitleRows>({
    resolver: zodResolver(titleRowsSchema), values: { rows: rowsOf(fields, order) }, resetOptions: { keepDirtyValues: true },
  });
  const list = useFieldArray({ control, name: "rows" });
  const typed = useTyped(control, onTyped);
  const { trouble, send } = useFormSend(setError, FIELDS);
  const places = useRef<HTMLOListElement>(null);
  const move = (from: number, to: number) => {
    list.move(from, to);
    requestAnimationFrame(() => focusMove(places.current?.children[to], to < from ? "up" : "down"));
  };
  const own = typed.filter(isOwn).length;
  return (
    <form noValidate onSubmit={(event) => void handleSubmit((values) => send(() => onSave(changeOf(values.rows))))(event)}>
      <h3>Fields, in the order they print</h3>
      <p className="mb-3 text-sm text-soft">Up to six of your own, such as a work order or a purchase order. Fields with a text of the job, line or sheet only change places.</p>
      {trouble ? <Notice tone="trouble" className="mb-4">{trouble}</Notice> : null}
      <fieldset disabled={!editable}>
        <ol ref={places} className="border-t border-hair">
          {list.fields.map((row, n) => (
            <li key={row.id} className="flex flex-wrap items-start gap-x-3 gap-y-1 border-b border-hair py-1">
              <RowContent row={typed[n] ?? row} n={n} register={register} errors={formState.errors} />
              {editable ? <RowButtons name={rowName(typed[n] ?? row)} n={n} count={list.fields.length} onMove={move} onRemove={isOwn(row) ? () => list.remove(n) : null} /> : null}
            </li>
          ))}
        </ol>
      </fieldset>
      {editable ? (
        <div className="mt-4 flex flex-wrap gap-3">
          <Button onClick={() => list.insert(afterOwn(typed), { key: "own", label: "", value: "" })} disabled={own >= MOST_OWN}>Add a field</Button>
          <Button onClick={() => list.replace(rowsOf(changeOf(typed).fields, undefined))}>Usual order</Button>
          <Button type="submit" tone="primary" busy={formState.isSubmitting} busyLabel="Saving">Save the fields</Button>
        </div>
      ) : null}
    </form>
  );
}

/** After the last field of one's own, or where they usually stand. */
function afterOwn(rows: readonly TitleRow[]): number {
  const last = rows.findLastIndex(isOwn);
  return (last >= 0 ? last : rows.findIndex((row) => row.key === "area")) + 1;
}

function useTyped(control: Control<TitleRows>, onTyped: (change: TitleChange) => void): readonly TitleRow[] {
  const rows = useWatch({ control, name: "rows" });
  const told = useRef(onTyped);
  useEffect(() => {
    told.current = onTyped;
  });
  const text = JSON.stringify(changeOf(rows));
  useEffect(() => told.current(JSON.parse(text) as TitleChange), [text]);
  return rows;
}

/** The finger or the keyboard stays with a row that was moved: on the same button, or the other one at an end of the list. */
function focusMove(row: Element | undefined, way: "up" | "down"): void {
  const buttons = [...(row?.querySelectorAll<HTMLButtonElement>("button[data-move]") ?? [])].filter((button) => !button.disabled);
  (buttons.find((button) => button.dataset.move === way) ?? buttons[0])?.focus();
}

function RowContent({ row, n, register, errors }: { readonly row: TitleRow; readonly n: number; readonly register: UseFormRegister<TitleRows>; readonly errors: FieldErrors<TitleRows> }) {
  if (!isOwn(row)) return <span className="flex min-h-11 min-w-0 flex-1 basis-48 items-center">{rowName(row)}</span>;
  const wrong = errors.rows?.[n];
  return (
    <span className="grid min-w-0 flex-1 basis-64 grid-cols-2 gap-2">
      <TextField label="Label" error={wrong?.label?.message} caution={missingGlyphs(row.label)} {...register(`rows.${n}.label`)} />
      <TextField label="Text" error={wrong?.value?.message} caution={missingGlyphs(row.value)} {...register(`rows.${n}.value`)} />
    </span>
  );
}

interface RowButtonsProps {
  readonly name: string;
  readonly n: number;
  readonly count: number;
  readonly onMove: (from: number, to: number) => void;
  readonly onRemove: (() => void) | null;
}

function RowButtons({ name, n, count, onMove, onRemove }: RowButtonsProps) {
  return (
    <span className="flex gap-2">
      {onRemove ? <Button tone="quiet" aria-label={`Remove ${name}`} onClick={onRemove}>Remove</Button> : null}
      <Button data-move="up" aria-label={`Move ${name} up`} disabled={n === 0} onClick={() => onMove(n, n - 1)}>Up</Button>
      <Button data-move="down" aria-label={`Move ${name} down`} disabled={n === count - 1} onClick={() => onMove(n, n + 1)}>Down</Button>
    </span>
  );
}
