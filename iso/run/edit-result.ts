/** What an edit gives that may be refused: the new document, or one sentence that says why not and what to do. */
import type { RunDocument } from "./document";

export type EditResult = { readonly ok: true; readonly document: RunDocument } | { readonly ok: false; readonly message: string };

export function refused(message: string): EditResult {
  return { ok: false, message };
}

export function edited(document: RunDocument): EditResult {
  return { ok: true, document };
}
