"use client";
import type { ReactNode } from "react";
import type { SWRResponse } from "swr";
import { Button } from "./button";
import type { ApiFailure } from "./fetcher";
import { Notice } from "./notice";
import { Skeleton } from "./progress";

export interface LoadedProps<T> {
  readonly api: SWRResponse<T, ApiFailure>;
  /** What is being fetched, for screen readers: "Loading jobs". */
  readonly label: string;
  readonly lines?: number;
  readonly children: (data: T) => ReactNode;
}

/** Shows what came, grey lines while it comes, or the plain sentence why it did not. Data once shown stays on screen. */
export function Loaded<T>({ api, label, lines, children }: LoadedProps<T>) {
  if (api.data !== undefined) {
    return (
      <>
        {api.error ? (
          <Notice tone="caution" className="mb-4">
            What you see may be out of date: {api.error.message}
          </Notice>
        ) : null}
        {children(api.data)}
      </>
    );
  }
  if (api.error) {
    return (
      <Notice tone="trouble" word={api.error.status === 403 ? "Not for your role" : "Not shown"}>
        {api.error.message}{" "}
        {api.error.status === 403 || api.error.status === 404 ? null : (
          <Button tone="quiet" onClick={() => void api.mutate()}>
            Try again
          </Button>
        )}
      </Notice>
    );
  }
  return <Skeleton lines={lines} label={label} />;
}
