/** A titled group of fields in a settings form, and what each group is handed. */
import type { ReactNode } from "react";
import type { FieldErrors, UseFormRegister } from "react-hook-form";
import type { SettingsText } from "./settings-text";

export interface SettingsPart {
  readonly register: UseFormRegister<SettingsText>;
  readonly errors: FieldErrors<SettingsText>;
}

export function Group({
  title,
  hint,
  children,
}: {
  readonly title: string;
  readonly hint?: string;
  readonly children: ReactNode;
}) {
  return (
    <div role="group" aria-label={title}>
      <h3>{title}</h3>
      {hint ? <p className="text-sm text-soft">{hint}</p> : null}
      <div className="mt-2 grid gap-4 sm:grid-cols-2 xl:grid-cols-4">{children}</div>
    </div>
  );
}
