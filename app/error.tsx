"use client";
import { Button } from "@/components/ui/button";

/** Whatever broke while drawing a page: a plain sentence, never a trace. */
export default function PageError({ reset }: { readonly reset: () => void }) {
  return (
    <div className="mx-auto max-w-2xl py-10">
      <h1>This page could not be shown</h1>
      <p className="mt-2 mb-6 text-soft">
        Nothing that was saved is lost. Try again; if it stays so, tell the owner of your shop what you were
        doing.
      </p>
      <Button tone="primary" onClick={reset}>
        Try again
      </Button>
    </div>
  );
}
