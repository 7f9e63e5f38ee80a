"use client";
import { useId } from "react";

/** A file chooser that looks and works like a button. */
export function FileButton({
  label,
  accept,
  onFile,
}: {
  readonly label: string;
  readonly accept: string;
  readonly onFile: (file: File | null) => void;
}) {
  const id = useId();
  return (
    <span className="relative inline-flex">
      <input
        id={id}
        type="file"
        accept={accept}
        className="peer sr-only"
        onChange={(event) => {
          onFile(event.target.files?.[0] ?? null);
          event.target.value = "";
        }}
      />
      <label
        htmlFor={id}
        className="inline-flex min-h-11 cursor-pointer items-center border border-ink bg-sheet px-4 font-medium peer-focus-visible:outline-3 peer-focus-visible:outline-offset-2 peer-focus-visible:outline-dye hover:bg-dye-tint"
      >
        {label}
      </label>
    </span>
  );
}
