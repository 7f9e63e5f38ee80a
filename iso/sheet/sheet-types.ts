/** What a sheet is made from (one frozen value) and what composing gives (pages of display items). */
import type { DisplayItem } from "../draw/drawing-types";
import type { PaperBox } from "../geometry/types";
import type { RunDocument, UnitSystem } from "../run/document";
import type { MarksRegister, TakeOutWord } from "../run/model-types";

export type SheetSize = "letter" | "tabloid" | "A4" | "A3";

/** State of a revision as printed; DRAFT for what was never submitted. HOLD is a flag on top. */
export type RevisionState = "draft" | "for-review" | "returned" | "for-fabrication" | "superseded" | "void" | "as-built";

export interface RevisionRow {
  readonly code: string;
  readonly description: string;
  /** ISO date (YYYY-MM-DD) or "". */
  readonly date: string;
  readonly by: string;
  readonly checked: string;
  readonly approved: string;
}

/** Title-block data the shop and the job set. */
export interface TitleBlock {
  readonly shopName: string;
  readonly client: string;
  readonly project: string;
  readonly jobNumber: string;
  readonly area: string;
  /** How far plant north lies from true north, degrees clockwise; absent = not entered. */
  readonly plantNorthDeg?: number;
  /** Extra labelled fields, as entered, in order. At most 6. */
  readonly fields: readonly { readonly label: string; readonly value: string }[];
  /** Keys of title-order.ts in the order the shop prints them; absent = the usual one. */
  readonly order?: readonly string[];
  /** Content of the logo: key of the object store and type; bytes are handed to the painter. */
  readonly logo: { readonly key: string; readonly type: "image/png" | "image/jpeg" | "image/svg+xml" } | null;
}

/** Frozen and hashed as one, kept as text. Everything the sheet shows is here, so equal input gives equal bytes. */
export interface SheetInput {
  readonly version: 1;
  readonly document: RunDocument;
  readonly marks: MarksRegister;
  readonly takeOuts: readonly TakeOutWord[];
  readonly spool: string;
  readonly size: SheetSize;
  readonly units: UnitSystem;
  readonly titleBlock: TitleBlock;
  readonly revision: {
    /** Shop-unique number of the sheet, or "" before the first submission. */
    readonly sheetNumber: string;
    readonly code: string;
    readonly state: RevisionState;
    readonly hold: boolean;
    readonly rows: readonly RevisionRow[];
    readonly drawnBy: string;
    readonly checkedBy: string;
    /** In what role they signed; absent before signing, and on sheets signed before roles were kept. */
    readonly checkedRole?: string;
    /** ISO time of issue, or of rendering for a draft. Handed in; nothing reads a clock. */
    readonly issuedAt: string;
    /** Absolute address of the public status page, or "" for a draft (no QR then). */
    readonly statusUrl: string;
    /** Head of the audit chain when it was made; "" for a draft. */
    readonly auditHead: string;
    /** Points changed since the revision before, marked with a triangle. */
    readonly changedPointIds: readonly string[];
    /** Unverified dimensions accepted by name at signing: point id, who. */
    readonly accepted: readonly { readonly pointId: string; readonly by: string }[];
  };
}

export interface SheetPage {
  readonly widthMm: number;
  readonly heightMm: number;
  /** Painted in order. */
  readonly items: readonly DisplayItem[];
  /** Where the logo goes, fitted inside; null = none. */
  readonly logoBox: PaperBox | null;
  /** Name in the PDF's page label and in the preview's tabs. */
  readonly name: string;
}
