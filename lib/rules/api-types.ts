/**
 * What travels between route handlers and pages, as plain JSON. Queries return these shapes, components take them.
 * Times are ISO strings. Errors are always ApiError with a plain sentence.
 */
import type { LineSettings, RunDocument } from "@/iso";
import type { NestingSettings } from "./nest-plans";
import type { MarksRegister, RevisionState, SheetInput, SheetSize, TakeOutWord, TitleBlock } from "@/iso";

export type Role = "owner" | "detailer" | "inspector" | "fitter";

export interface ApiError {
  /** Plain sentence for the user. */
  readonly message: string;
  /** For programs: "unauthenticated" | "forbidden" | "not-found" | "invalid" | "conflict" | "throttled" | "too-large" | "gone" | "failed". */
  readonly code: string;
  /** Field name -> sentence, for forms. */
  readonly fields?: Readonly<Record<string, string>>;
}

export interface Viewer {
  readonly personId: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly shop: { readonly id: string; readonly name: string };
  readonly shops: readonly { readonly id: string; readonly name: string; readonly role: Role }[];
  readonly demo: boolean;
}

export interface PersonRow {
  readonly id: string; // membership id
  readonly personId: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly joinedAt: string;
  readonly you: boolean;
}

export interface InvitationRow {
  readonly id: string;
  readonly email: string;
  readonly role: Role;
  readonly createdAt: string;
  readonly expiresAt: string;
}

export interface SessionRow {
  readonly id: string;
  readonly createdAt: string;
  readonly lastSeenAt: string;
  readonly device: string;
  readonly current: boolean;
}

export interface ShopSettings {
  readonly name: string;
  readonly titleBlock: TitleBlock;
  readonly sheetSize: SheetSize;
  readonly defaults: LineSettings;
  /** Stock lengths on the rack. */
  readonly stock: readonly { readonly nps: string; readonly schedule: string; readonly material: string; readonly lengthMm: number; readonly quantity: number | null; readonly cost?: number; readonly heat?: string }[];
  /** How lengths are cut up. */
  readonly nesting: NestingSettings;
  readonly takeOuts: readonly TakeOutWord[];
}

export interface JobRow {
  readonly id: string;
  readonly number: string;
  readonly title: string;
  readonly client: string;
  readonly open: boolean;
  readonly lines: number;
  readonly spools: number;
  readonly forReview: number;
  readonly forFabrication: number;
  readonly held: number;
  readonly updatedAt: string;
}

export interface JobSettings {
  readonly number: string;
  readonly title: string;
  readonly client: string;
  readonly area: string;
  readonly open: boolean;
  readonly fields: TitleBlock["fields"];
  /** Absent or empty = the usual order. */
  readonly titleOrder?: readonly string[];
  readonly logo: TitleBlock["logo"];
  readonly sheetSize: SheetSize;
  /** Which way plant north lies from true north, degrees clockwise; printed beside the arrow. */
  readonly plantNorthDeg: number;
  readonly defaults: LineSettings;
}

export interface JobDetail extends JobSettings {
  readonly id: string;
  readonly lines: readonly LineRow[];
}

export interface SpoolRow {
  readonly id: string;
  readonly letter: string;
  readonly sheetNumber: string | null;
  /** State of its newest revision; "draft" when it has none. */
  readonly state: RevisionState;
  readonly hold: boolean;
  readonly code: string | null;
}

export interface LineRow {
  readonly id: string;
  readonly number: string;
  readonly title: string;
  readonly size: string;
  readonly material: string;
  readonly points: number;
  readonly spools: readonly SpoolRow[];
  readonly updatedAt: string;
  readonly updatedBy: string;
}

export interface LineDetail {
  readonly id: string;
  readonly job: { readonly id: string; readonly number: string; readonly title: string };
  /** Version for conflict detection; a save sends the one it started from. */
  readonly version: number;
  readonly document: RunDocument;
  readonly marks: MarksRegister;
  readonly takeOuts: readonly TakeOutWord[];
  readonly titleBlock: TitleBlock;
  readonly sheetSize: SheetSize;
  readonly spools: readonly SpoolRow[];
  readonly uploads: readonly UploadRow[];
  readonly updatedAt: string;
  readonly updatedBy: string;
  /** Whether the viewer may edit it. */
  readonly editable: boolean;
}

export interface SaveLineResult {
  readonly version: number;
  readonly savedAt: string;
}

export interface SaveLineConflict extends ApiError {
  readonly currentVersion: number;
  readonly by: string;
  readonly at: string;
}

export interface UploadRow {
  readonly id: string;
  readonly name: string;
  readonly type: string;
  readonly bytes: number;
  readonly at: string;
  readonly by: string;
}

export interface RevisionSummary {
  readonly id: string;
  readonly spoolId: string;
  readonly code: string;
  readonly state: RevisionState;
  readonly hold: boolean;
  readonly description: string;
  readonly submittedBy: string;
  readonly submittedAt: string;
  readonly signedBy: string | null;
  readonly signedAt: string | null;
  readonly returnReason: string | null;
  readonly holdReason: string | null;
  /** SHA-256 of the stored PDFs, newest last: the one for review, then the signed one. */
  readonly sheets: readonly { readonly id: string; readonly kind: "review" | "fabrication"; readonly sha256: string; readonly bytes: number; readonly at: string }[];
  readonly statusPath: string;
}

export interface SpoolDetail {
  readonly id: string;
  readonly letter: string;
  readonly sheetNumber: string | null;
  readonly line: { readonly id: string; readonly number: string; readonly title: string };
  readonly job: { readonly id: string; readonly number: string; readonly title: string };
  readonly revisions: readonly RevisionSummary[];
  /** What the sheet would be made from now; null for those who see issued sheets only. */
  readonly draft: SheetInput | null;
  /** Frozen input of the live (for fabrication or as-built) revision; null when there is none. */
  readonly live: { readonly revisionId: string; readonly input: SheetInput } | null;
  readonly work: readonly WorkEntry[];
  readonly can: { readonly submit: boolean; readonly sign: boolean; readonly hold: boolean; readonly log: boolean };
  /** Why the viewer may not submit or sign, in words; null when they may. */
  readonly why: { readonly submit: string | null; readonly sign: string | null };
}

export interface ReviewDetail {
  readonly revision: RevisionSummary;
  readonly spool: { readonly id: string; readonly letter: string; readonly sheetNumber: string };
  readonly line: { readonly id: string; readonly number: string };
  readonly job: { readonly id: string; readonly number: string };
  readonly input: SheetInput;
  /** Frozen input of the revision it would supersede; null for the first. */
  readonly before: SheetInput | null;
  readonly changes: readonly Change[];
  /** Dimensions that block release until each is accepted by name. */
  readonly unverified: readonly { readonly pointId: string; readonly text: string }[];
  /** Work already recorded against the revision before: pieces cut, welds made. */
  readonly impact: readonly string[];
  readonly can: { readonly sign: boolean; readonly return: boolean; readonly hold: boolean; readonly void: boolean };
  readonly why: string | null;
}

export interface Change {
  readonly kind: "added" | "removed" | "changed";
  readonly what: "point" | "piece" | "weld" | "material" | "setting" | "note";
  readonly mark: string;
  readonly text: string;
  readonly before: string | null;
  readonly after: string | null;
  readonly pointId: string | null;
}

export type WorkKind = "cut" | "fit-up" | "weld" | "visual" | "actual";

export interface WorkEntry {
  readonly id: string;
  readonly kind: WorkKind;
  /** Piece mark, weld number or dimension name. */
  readonly mark: string;
  /** Stable key of the piece or joint. */
  readonly key: string;
  readonly values: Readonly<Record<string, string>>;
  readonly by: string;
  readonly at: string;
  readonly revisionCode: string;
}

export interface BenchRow {
  readonly spoolId: string;
  readonly revisionId: string;
  readonly sheetNumber: string;
  readonly letter: string;
  readonly line: string;
  readonly job: string;
  readonly code: string;
  readonly hold: boolean;
  readonly state: RevisionState;
  readonly issuedAt: string;
  readonly cut: number;
  readonly pieces: number;
  readonly welded: number;
  readonly welds: number;
}

export interface AuditRow {
  readonly seq: number;
  readonly at: string;
  readonly actor: string;
  readonly type: string;
  /** Plain sentence. */
  readonly text: string;
  readonly hash: string;
}

export interface AuditPage {
  readonly rows: readonly AuditRow[];
  readonly head: { readonly seq: number; readonly hash: string };
  /** Result of walking the whole chain: null when whole, else a sentence saying where it breaks. */
  readonly broken: string | null;
  readonly nextBefore: number | null;
}

export interface StatusDetail {
  readonly sheetNumber: string;
  readonly shop: string;
  readonly line: string;
  readonly spool: string;
  readonly code: string;
  readonly state: RevisionState;
  readonly hold: boolean;
  /** True when this revision is the live one and not on hold. */
  readonly current: boolean;
  readonly issuedAt: string;
  /** Code of the live revision of this spool, when it is another one. */
  readonly liveCode: string | null;
  /** SHA-256 of every stored PDF of this revision and of every marked copy of one; `marked` null = the stored one itself. */
  readonly sheets: readonly { readonly sha256: string; readonly kind: "review" | "fabrication"; readonly marked: string | null; readonly at: string }[];
  /** The certificate whose signature the signed original carries; null when it carries none. */
  readonly signature: { readonly sha256: string; readonly subject: string; readonly fingerprint: string } | null;
}

export interface OutboxMail {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly at: string;
}
