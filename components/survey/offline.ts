/** Lets the survey page open without a signal once it was opened with one. */

/**
 * Registers the worker that keeps this page and its scripts, and names them to it: on the first visit they were loaded
 * before the worker was there. Without workers the page still works while it stays open.
 */
export function keepForOffline(): void {
  if (!("serviceWorker" in navigator)) return;
  void navigator.serviceWorker
    .register("/survey-worker.js", { scope: "/lines/" })
    .then(() => navigator.serviceWorker.ready)
    .then((registration) => {
      const assets = performance.getEntriesByType("resource").map((entry) => entry.name).filter((name) => name.startsWith(`${location.origin}/_next/static/`));
      registration.active?.postMessage({ page: location.pathname, assets });
    })
    .catch(() => undefined);
}
