/** States of saving, and the words for them. Pure; the timer and the network are in use-autosave.ts. */

export type SaveState =
  | { readonly kind: "saved"; readonly at: string | null }
  | { readonly kind: "waiting" }
  | { readonly kind: "saving" }
  | { readonly kind: "failed"; readonly message: string }
  | { readonly kind: "conflict"; readonly by: string; readonly at: string; readonly currentVersion: number };

export function saveWords(state: SaveState): string {
  switch (state.kind) {
    case "saved": return state.at ? `Saved ${clockText(state.at)}` : "Saved";
    case "waiting": return "Saving soon";
    case "saving": return "Saving";
    case "failed": return `Not saved: ${state.message}`;
    case "conflict": return `Not saved: ${state.by} saved this line in the meantime.`;
  }
}

/** A space that never ends a line. */
const NBSP = "\u00a0";

/** Hours and minutes on the reader's own clock. */
export function clockText(iso: string): string {
  const date = new Date(iso);
  return Number.isNaN(date.getTime()) ? "" : `at${NBSP}${date.toLocaleTimeString("en-US", { hour: "numeric", minute: "2-digit" })}`;
}

/** Waits between tries while there is no connection, ms. */
const RETRY_MS = [3_000, 8_000, 20_000, 60_000] as const;

export function retryDelayMs(failures: number): number {
  return RETRY_MS[Math.min(Math.max(failures - 1, 0), RETRY_MS.length - 1)] ?? 60_000;
}
