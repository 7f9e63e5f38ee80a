/** Unsaved work kept in this browser until the server has it: survives a reload, a crash or a lost connection. */
import { parseRunDocument, type RunDocument } from "@/iso";

export interface StoredDraft {
  readonly document: RunDocument;
  /** Version of the line the draft started from. */
  readonly version: number;
  readonly at: string;
}

const key = (lineId: string, personId: string): string => `quarterline.line.${lineId}.${personId}`;

export function writeDraft(lineId: string, personId: string, draft: StoredDraft): void {
  try {
    localStorage.setItem(key(lineId, personId), JSON.stringify(draft));
  } catch {
    // A full or closed store leaves the work in memory, where it still is.
  }
}

export function clearDraft(lineId: string, personId: string): void {
  try {
    localStorage.removeItem(key(lineId, personId));
  } catch {
    // Nothing to clear where nothing can be kept.
  }
}

/** The draft of this person, or null when there is none or it is not a run document any more. */
export function readDraft(lineId: string, personId: string): StoredDraft | null {
  try {
    const value: unknown = JSON.parse(localStorage.getItem(key(lineId, personId)) ?? "null");
    if (typeof value !== "object" || value === null) return null;
    const { document, version, at } = value as Partial<StoredDraft>;
    const parsed = parseRunDocument(document);
    return parsed.ok && typeof version === "number" ? { document: parsed.document, version, at: String(at ?? "") } : null;
  } catch {
    return null;
  }
}
