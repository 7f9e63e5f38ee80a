"use client";
import clsx from "clsx";
import {
  useId,
  type InputHTMLAttributes,
  type ReactNode,
  type SelectHTMLAttributes,
  type TextareaHTMLAttributes,
} from "react";

const CONTROL =
  "w-full min-h-11 border bg-sheet px-3 py-2 text-ink placeholder:text-soft disabled:bg-shade disabled:text-soft";

export interface FieldFrameProps {
  readonly label: ReactNode;
  /** One line of help under the label. */
  readonly hint?: ReactNode;
  /** A caution that belongs to this entry; always visible. */
  readonly caution?: ReactNode;
  /** What is wrong with the entry, in a sentence. */
  readonly error?: string | undefined;
  readonly className?: string;
}

/** Ids and aria attributes a control in a Field needs. */
export interface FieldIds {
  readonly id: string;
  readonly "aria-describedby": string | undefined;
  readonly "aria-invalid": true | undefined;
}

/** A labelled entry: label, hint, the control (a function of its ids), caution, error. */
export function Field({
  label,
  hint,
  caution,
  error,
  className,
  children,
}: FieldFrameProps & { readonly children: (ids: FieldIds) => ReactNode }) {
  const id = useId();
  const described = [hint && `${id}-hint`, caution && `${id}-caution`, error && `${id}-error`]
    .filter(Boolean)
    .join(" ");
  return (
    <div className={clsx("min-w-0", className)}>
      <label htmlFor={id} className="block font-medium">
        {label}
      </label>
      {hint ? (
        <p id={`${id}-hint`} className="text-sm text-soft">
          {hint}
        </p>
      ) : null}
      <div className="mt-1">
        {children({
          id,
          "aria-describedby": described || undefined,
          "aria-invalid": error ? true : undefined,
        })}
      </div>
      {caution ? (
        <p id={`${id}-caution`} className="mt-1 text-sm text-caution">
          {caution}
        </p>
      ) : null}
      {error ? (
        <p id={`${id}-error`} role="alert" className="mt-1 text-sm font-medium text-alert">
          {error}
        </p>
      ) : null}
    </div>
  );
}

type Frame = FieldFrameProps & {
  /** Numbers and codes are set in Roboto Mono. */
  readonly figure?: boolean;
};

function controlClass(error: string | undefined, figure: boolean | undefined): string {
  return clsx(CONTROL, error ? "border-alert border-2" : "border-rule", figure && "figure");
}

/** A one-line entry; spread react-hook-form's `register(...)` into it. */
export function TextField({
  label,
  hint,
  caution,
  error,
  className,
  figure,
  ...input
}: Frame & InputHTMLAttributes<HTMLInputElement>) {
  return (
    <Field label={label} hint={hint} caution={caution} error={error} className={className}>
      {(ids) => (
        <input type="text" autoComplete="off" {...input} {...ids} className={controlClass(error, figure)} />
      )}
    </Field>
  );
}

/** An entry of several lines. */
export function TextArea({
  label,
  hint,
  caution,
  error,
  className,
  figure,
  ...input
}: Frame & TextareaHTMLAttributes<HTMLTextAreaElement>) {
  return (
    <Field label={label} hint={hint} caution={caution} error={error} className={className}>
      {(ids) => <textarea rows={3} {...input} {...ids} className={controlClass(error, figure)} />}
    </Field>
  );
}

export interface Option {
  readonly value: string;
  readonly label: string;
}

/** One of a few, as the browser's own list: works with keyboard, screen reader and thumb. */
export function Select({
  label,
  hint,
  caution,
  error,
  className,
  figure,
  options,
  ...input
}: Frame & SelectHTMLAttributes<HTMLSelectElement> & { readonly options: readonly Option[] }) {
  return (
    <Field label={label} hint={hint} caution={caution} error={error} className={className}>
      {(ids) => (
        <select {...input} {...ids} className={controlClass(error, figure)}>
          {options.map((option) => (
            <option key={option.value} value={option.value}>
              {option.label}
            </option>
          ))}
        </select>
      )}
    </Field>
  );
}

/** A tick with its sentence; the whole line is the target. */
export function Check({
  label,
  error,
  className,
  ...input
}: {
  readonly label: ReactNode;
  readonly error?: string | undefined;
  readonly className?: string;
} & InputHTMLAttributes<HTMLInputElement>) {
  const id = useId();
  return (
    <div className={className}>
      <label className="flex min-h-11 items-start gap-3 py-2">
        <input
          {...input}
          type="checkbox"
          aria-invalid={error ? true : undefined}
          aria-describedby={error ? `${id}-error` : undefined}
          className="mt-0.5 size-6 shrink-0 accent-dye"
        />
        <span>{label}</span>
      </label>
      {error ? (
        <p id={`${id}-error`} role="alert" className="text-sm font-medium text-alert">
          {error}
        </p>
      ) : null}
    </div>
  );
}
