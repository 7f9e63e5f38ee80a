"use client";
import { useCallback, useState } from "react";
import type { FieldValues, Path, UseFormSetError } from "react-hook-form";
import { ApiFailure, failureText } from "./fetcher";

/**
 * Sends a form: errors that name a field go to that field, the rest becomes one sentence for the form's head. What was
 * typed stays where it is.
 */
export function useFormSend<Values extends FieldValues>(
  setError: UseFormSetError<Values>,
  knownFields: readonly Path<Values>[],
) {
  const [trouble, setTrouble] = useState<string | null>(null);
  const send = useCallback(
    async (work: () => Promise<void>) => {
      setTrouble(null);
      try {
        await work();
      } catch (failure) {
        const named = failure instanceof ApiFailure ? Object.entries(failure.fields) : [];
        const mine = named.filter(([field]) => knownFields.includes(field as Path<Values>));
        for (const [field, message] of mine) setError(field as Path<Values>, { message });
        if (mine.length === 0) setTrouble(failureText(failure));
      }
    },
    [setError, knownFields],
  );
  return { trouble, send };
}
