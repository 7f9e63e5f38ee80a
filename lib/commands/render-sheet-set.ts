/** A sheet set of a spool as one PDF. What is issued is frozen: its sheet is the stored one, the other parts are composed from the same input and the work record of now. */
import { measureText } from "@/fonts/widths";
import { sheetSetPages, SHEET_PART_WORDS, type SheetInput, type SheetPart, type SheetSetExtras, type SheetSize } from "@/iso";
import { spoolExportInput, type Issue } from "@/lib/queries/export-inputs";
import { revisionsOf } from "@/lib/queries/revision-facts";
import { stockPlaces } from "@/lib/queries/stock-places";
import { storedSheet, type StoredSheet } from "@/lib/queries/stored-sheet";
import { workEntries } from "@/lib/queries/work-entries";
import { copyWord } from "@/lib/rules/copy-words";
import { exportFileName } from "@/lib/rules/exchange/file-names";
import { isLive } from "@/lib/rules/revision-rules";
import type { SessionViewer } from "@/lib/server/session";
import { getObject, objectKey } from "@/lib/server/storage";
import { bindSheetSet, countPages } from "@/pdf/sheet-set";
import { sheetTitle } from "./render-sheet";

export interface SheetSetAsked {
  readonly parts: readonly SheetPart[];
  readonly of: Issue;
  /** null = as issued, or the job's for a draft. An issued spool sheet keeps the size it was signed in. */
  readonly size: SheetSize | null;
  readonly safeMargins: boolean;
  /** Thickness of the paper templates are printed on, mm; null = ordinary. */
  readonly paper: number | null;
}

export interface RenderedSet {
  readonly name: string;
  readonly bytes: Uint8Array;
  /** The issued sheet whose pages or derived pages it holds; null for a draft. */
  readonly sheet: StoredSheet | null;
  readonly parts: readonly SheetPart[];
}

/** @throws Refusal as spoolExportInput does. */
export async function renderSheetSet(viewer: SessionViewer, spoolId: string, asked: SheetSetAsked, now: Date): Promise<RenderedSet> {
  const found = await spoolExportInput(viewer, spoolId, asked.of, now, asked.size);
  const input = asked.size === null ? found : { ...found, size: asked.size };
  const sheet = input.revision.state === "draft" ? null : await issuedSheet(viewer, spoolId);
  const stored = sheet !== null && asked.parts.includes("sheet") ? sheet : null;
  const extras: SheetSetExtras = {
    stock: await stockPlaces(viewer, spoolId),
    work: sheet === null ? null : { entries: await workEntries(viewer, spoolId), readAt: now.toISOString() },
    printed: { by: viewer.name, at: now.toISOString() },
    safeMargins: asked.safeMargins,
    ...(asked.paper === null ? {} : { paperMm: asked.paper }),
    ...(stored === null ? {} : { storedSheetPages: await countPages(stored.bytes) }),
  };
  const set = sheetSetPages(input, asked.parts, extras, measureText);
  const bytes = await bindSheetSet({
    set, safeMargins: asked.safeMargins, at: now.toISOString(), logo: await logoOf(viewer, input),
    stored: stored && { bytes: stored.bytes, mark: { word: copyWord(stored.state, stored.hold), printedAt: now.toISOString(), printedBy: viewer.name, original: { sha256: stored.sha256, signed: stored.signed } } },
    title: `${sheetTitle(input)}, sheet set`, subject: asked.parts.map((part) => SHEET_PART_WORDS[part]).join(", "), author: input.titleBlock.shopName, keywords: input.revision.auditHead,
  });
  return { name: exportFileName([input], "sheet-set", "pdf"), bytes, sheet, parts: asked.parts };
}

/** The signed sheet of the live revision; it has one, or it would not be live. */
async function issuedSheet(viewer: SessionViewer, spoolId: string): Promise<StoredSheet | null> {
  const live = (await revisionsOf(viewer, spoolId)).find((revision) => isLive(revision.state));
  return live === undefined ? null : storedSheet(viewer, live.id, "fabrication");
}

async function logoOf(viewer: SessionViewer, { titleBlock: { logo } }: SheetInput): Promise<Uint8Array | null> {
  return logo === null ? null : getObject(objectKey(viewer.shopId, logo.key));
}
