/** What Next runs once when a server process starts, and whenever a request fails unexpectedly. */
import type { Instrumentation } from "next";

/** Checks the settings, starts working the queue, and sees to an orderly end. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== "nodejs") return;
  const { startProcess } = await import("@/lib/jobs/process");
  await startProcess();
}

/** One log line per failed request: where and what, never who or with which words. */
export const onRequestError: Instrumentation.onRequestError = async (error, request, context) => {
  if (process.env.NEXT_RUNTIME !== "nodejs") return;
  const { log } = await import("@/lib/server/log");
  log.error({ error, method: request.method, route: context.routePath, kind: context.routeType }, "request failed");
};
