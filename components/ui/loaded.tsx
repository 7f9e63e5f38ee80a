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
  /** The whole page waits for it: until then its label is the page's heading. */
  readonly page?: boolean;
  readonly children: (data: T) => ReactNode;
}

/** Shows what came, grey lines while it comes, or the plain sentence why it did not. Data once shown stays on screen. */
export function Loaded<T>({ api, label, lines, page, children }: LoadedProps<T>) {
  const heading = page ? <h1 className="sr-only">{api.error ? "Not shown" : label}</h1> : null;
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
      <>
        {heading}
        <Notice tone="trouble" word={api.error.status === 403 ? "Not for your role" : "Not shown"}>
          {api.error.message}{" "}
          {api.error.status === 403 || api.error.status === 404 ? null : (
            <Button tone="quiet" onClick={() => void api.mutate()}>
              Try again
            </Button>
          )}
        </Notice>
      </>
    );
  }
  return (
    <>
      {heading}
      <Skeleton lines={lines} label={label} />
    </>
  );
}
