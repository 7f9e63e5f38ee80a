"use client";
import { useId } from "react";

/** Narrows a list while typing. */
export function SearchField({
  label,
  value,
  onChange,
}: {
  readonly label: string;
  readonly value: string;
  readonly onChange: (value: string) => void;
}) {
  const id = useId();
  return (
    <div className="w-full sm:w-72">
      <label htmlFor={id} className="mb-1 block font-medium">
        {label}
      </label>
      <input
        id={id}
        type="search"
        value={value}
        onChange={(event) => onChange(event.target.value)}
        autoComplete="off"
        className="min-h-11 w-full border border-rule bg-sheet px-3"
      />
    </div>
  );
}
