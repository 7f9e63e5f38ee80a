"use client";
import { useState } from "react";
import { useViewer } from "@/components/shell/use-viewer";
import { useApi } from "@/components/ui/fetcher";
import { Loaded } from "@/components/ui/loaded";
import type { LineDetail } from "@/lib/rules/api-types";
import { freshId } from "./editor-ids";
import { RunEditor } from "./run-editor";

/** From opening on the editor holds the line; a save tells of other hands. */
const HOLD_STILL = { revalidateOnFocus: false, revalidateOnReconnect: false, revalidateIfStale: false };

/** A line by its id. Each opening reads afresh, never a copy kept from an earlier visit. */
export function LinePage({ lineId }: { readonly lineId: string }) {
  const [opening] = useState(() => freshId("r"));
  const line = useApi<LineDetail>(`/api/lines/${lineId}?opening=${opening}`, HOLD_STILL);
  const viewer = useViewer();
  return (
    <Loaded api={line} page label="Loading the line" lines={10}>
      {(data) => (viewer.data ? <RunEditor key={data.id} line={data} viewer={viewer.data} onUploads={() => line.mutate()} /> : null)}
    </Loaded>
  );
}
