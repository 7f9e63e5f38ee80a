"use client";
import clsx from "clsx";
import type { ReactNode } from "react";

export interface Choice<Value extends string> {
  readonly value: Value;
  readonly label: ReactNode;
}

/** One of a few, side by side; the chosen one is underlined in dye and marked as pressed. */
export function ChoiceRow<Value extends string>({
  label,
  choices,
  value,
  onChange,
}: {
  readonly label: string;
  readonly choices: readonly Choice<Value>[];
  readonly value: Value;
  readonly onChange: (value: Value) => void;
}) {
  return (
    <div role="group" aria-label={label} className="flex flex-wrap">
      {choices.map((choice) => (
        <button
          key={choice.value}
          type="button"
          aria-pressed={choice.value === value}
          onClick={() => onChange(choice.value)}
          className={clsx(
            "min-h-11 border-b-[3px] px-3 font-medium",
            choice.value === value
              ? "border-dye text-dye"
              : "border-hair text-soft hover:border-rule hover:text-ink",
          )}
        >
          {choice.label}
        </button>
      ))}
    </div>
  );
}
