"use client";
import { useState } from "react";
import { TextField } from "@/components/ui/field";
import type { EntryResult } from "./entry-result";

export interface CommitFieldProps<T> {
  readonly label: string;
  readonly hint?: string;
  /** The stored value as text. */
  readonly text: string;
  readonly placeholder?: string;
  readonly figure?: boolean;
  readonly readOnly: boolean;
  readonly read: (text: string) => EntryResult<T>;
  readonly onCommit: (value: T) => void;
}

/** A field that takes its text on Enter or on leaving it; a text it does not understand stays, with a sentence. */
export function CommitField<T>({ label, hint, text, placeholder, figure, readOnly, read, onCommit }: CommitFieldProps<T>) {
  const [typed, setTyped] = useState<string | null>(null);
  const result = typed === null ? null : read(typed);
  const [asked, setAsked] = useState(false);
  const commit = (): void => {
    setAsked(true);
    if (typed === null || !result?.ok) return;
    if (typed !== text) onCommit(result.value);
    setTyped(null);
    setAsked(false);
  };
  return (
    <TextField
      label={label}
      hint={result?.ok && result.understood ? result.understood : hint}
      figure={figure}
      placeholder={placeholder}
      readOnly={readOnly}
      value={typed ?? text}
      error={asked && result && !result.ok ? result.message : undefined}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={commit}
      onKeyDown={(event) => {
        if (event.key === "Enter") commit();
        if (event.key === "Escape") setTyped(null);
      }}
    />
  );
}
