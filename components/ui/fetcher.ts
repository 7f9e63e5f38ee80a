"use client";
import useSWR, { mutate as mutateAny, type SWRConfiguration, type SWRResponse } from "swr";
import type { ApiError } from "@/lib/rules/api-types";

/** What the server refused, with its plain sentence; `body` is the whole answer (a save conflict says more). */
export class ApiFailure extends Error {
  constructor(
    readonly status: number,
    readonly code: string,
    message: string,
    readonly fields: Readonly<Record<string, string>>,
    readonly body: unknown = null,
  ) {
    super(message);
    this.name = "ApiFailure";
  }
}

const SENTENCES: Readonly<Record<number, string>> = {
  401: "You are signed out. Sign in again to go on.",
  403: "Your role does not allow this.",
  404: "There is nothing here, or it belongs to another shop.",
  409: "Somebody changed this in the meantime. Load it again.",
  410: "This link has been used or has run out. Ask for a new one.",
  413: "That is too large to send.",
  415: "That kind of file is not accepted.",
  429: "Too many tries. Wait a minute, then try again.",
};

const NO_ANSWER =
  "The server did not answer. Check the connection and try again; what you typed is still here.";
const WENT_WRONG = "The server could not do this. Try again; if it stays so, tell the owner of your shop.";

function isApiError(value: unknown): value is ApiError {
  return (
    typeof value === "object" &&
    value !== null &&
    typeof (value as ApiError).message === "string" &&
    typeof (value as ApiError).code === "string"
  );
}

async function failureOf(response: Response): Promise<ApiFailure> {
  const body: unknown = await response.json().catch(() => null);
  if (isApiError(body))
    return new ApiFailure(response.status, body.code, body.message, body.fields ?? {}, body);
  return new ApiFailure(response.status, "failed", SENTENCES[response.status] ?? WENT_WRONG, {});
}

async function answerOf<T>(request: Promise<Response>): Promise<T> {
  const response = await request.catch(() => {
    throw new ApiFailure(0, "offline", NO_ANSWER, {});
  });
  if (!response.ok) throw await failureOf(response);
  if (response.status === 204) return undefined as T;
  const text = await response.text();
  return (text === "" ? undefined : JSON.parse(text)) as T;
}

/** Reads JSON. Throws ApiFailure with a plain sentence. */
export function apiGet<T>(path: string): Promise<T> {
  return answerOf<T>(fetch(path, { headers: { accept: "application/json" }, credentials: "same-origin" }));
}

/** Writes JSON. Throws ApiFailure with a plain sentence and the errors by field. */
export function apiSend<T>(
  method: "POST" | "PUT" | "PATCH" | "DELETE",
  path: string,
  body?: unknown,
): Promise<T> {
  return answerOf<T>(
    fetch(path, {
      method,
      credentials: "same-origin",
      headers: { accept: "application/json", "content-type": "application/json" },
      body: JSON.stringify(body ?? {}),
    }),
  );
}

/** Sends one file (multipart field `file`) by POST or PUT. */
export function apiUpload<T>(method: "POST" | "PUT", path: string, file: File): Promise<T> {
  const form = new FormData();
  form.append("file", file);
  return answerOf<T>(
    fetch(path, { method, credentials: "same-origin", headers: { accept: "application/json" }, body: form }),
  );
}

/** Reads a path of the API and keeps it fresh; null = nothing to read yet. */
export function useApi<T>(
  path: string | null,
  options?: SWRConfiguration<T, ApiFailure>,
): SWRResponse<T, ApiFailure> {
  return useSWR<T, ApiFailure>(path, apiGet, { shouldRetryOnError: false, ...options });
}

/** Reads again everything whose path starts with one of these. */
export function refreshApi(...prefixes: readonly string[]): Promise<unknown> {
  return mutateAny((key) => typeof key === "string" && prefixes.some((prefix) => key.startsWith(prefix)));
}

/** The plain sentence of any failure. */
export function failureText(failure: unknown): string {
  return failure instanceof ApiFailure ? failure.message : WENT_WRONG;
}
