"use client";
import type { SWRResponse } from "swr";
import { useApi, type ApiFailure } from "@/components/ui/fetcher";
import type { Viewer } from "@/lib/rules/api-types";

/** Who is signed in and in which role; an error with status 401 when nobody is. */
export function useViewer(): SWRResponse<Viewer, ApiFailure> {
  return useApi<Viewer>("/api/viewer");
}
