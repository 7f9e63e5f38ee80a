/** Packages as they are asked for, stored and shown: sheets of a job in one PDF or one zip. Pure. */
import { STATE_WORDS, type RevisionState, type SheetPart, type SheetSize } from "@/iso";
import { copyWord } from "./copy-words";

export type PackageState = "waiting" | "making" | "ready" | "failed" | "cancelled";

export const PACKAGE_STATE_WORDS: Readonly<Record<PackageState, string>> = {
  waiting: "Waiting its turn", making: "Being made", ready: "Ready", failed: "Not made", cancelled: "Cancelled",
};

/** Parts of a sheet set that a package may hold beside the signed spool sheets, in the order they print. */
export const PACKAGE_EXTRAS = ["cuts", "welds", "bench", "templates", "legend"] as const satisfies readonly SheetPart[];
export type PackageExtra = (typeof PACKAGE_EXTRAS)[number];

/** States a sheet may be packed in. Dead ones have their copies printed one by one. */
export const PACKED_STATES = ["for-fabrication", "as-built", "for-review"] as const satisfies readonly RevisionState[];

/** Most sheets of one package: more are several packages. */
export const MOST_SHEETS = 1_000;

export interface Transmittal {
  readonly number: string;
  /** YYYY-MM-DD. */
  readonly date: string;
  readonly purpose: string;
  readonly recipient: string;
  /** YYYY-MM-DD, or "" when no answer is asked for. */
  readonly replyBy: string;
  readonly remark: string;
}

/** A sheet as it was when the package was asked for. */
export interface PackedSheet {
  readonly revisionId: string;
  readonly sheetId: string;
  readonly spoolId: string;
  readonly kind: "review" | "fabrication";
  readonly sheetNumber: string;
  readonly code: string;
  readonly state: RevisionState;
  readonly hold: boolean;
  readonly line: string;
  readonly letter: string;
  readonly sha256: string;
  readonly objectKey: string;
  /** Whether the stored bytes carry the shop's signature. */
  readonly signed: boolean;
}

export interface PackageOptions {
  readonly form: "pdf" | "zip";
  /** Of a zip: copies marked as uncontrolled, or the signed originals unaltered. One PDF holds marked copies only. */
  readonly copies: "marked" | "originals";
  readonly extras: readonly PackageExtra[];
  /** Paper of what is made for the package; null = as each sheet was issued. The spool sheets stay as issued. */
  readonly paper: SheetSize | null;
}

/** Everything the result follows from. */
export interface PackageSource extends PackageOptions {
  readonly version: 1;
  readonly title: string;
  readonly jobNumber: string;
  readonly jobTitle: string;
  readonly client: string;
  readonly area: string;
  readonly shopName: string;
  readonly frontPaper: SheetSize;
  readonly printedBy: string;
  /** ISO time it was asked for: the time every page says it was printed at. */
  readonly printedAt: string;
  /** Absolute address of the package's own page. */
  readonly address: string;
  readonly transmittal: Transmittal | null;
  /** By line, then spool letter. */
  readonly sheets: readonly PackedSheet[];
  /** Sheets in one part. */
  readonly partSheets: number;
}

export interface PackageRow {
  readonly id: string;
  readonly title: string;
  readonly state: PackageState;
  readonly form: "pdf" | "zip";
  readonly transmittal: string | null;
  readonly sheets: number;
  /** Sheets prepared so far. */
  readonly prepared: number;
  readonly bytes: number | null;
  readonly pages: number | null;
  readonly problem: string | null;
  readonly askedBy: string;
  readonly askedAt: string;
  /** Of a package that is ready: how many of its sheets are not current any more. */
  readonly outdated: number;
}

/** A sheet of a package as its page shows it. */
export interface PackageSheetRow {
  readonly revisionId: string;
  readonly spoolId: string;
  readonly sheetNumber: string;
  readonly code: string;
  readonly line: string;
  readonly letter: string;
  /** As printed in it, and as it is now. */
  readonly printed: string;
  readonly now: string;
  /** Why its page is not to be worked to any more, as a sentence; null while it is current. */
  readonly outdated: string | null;
}

export interface PackageDetail extends PackageRow {
  readonly jobId: string;
  readonly jobNumber: string;
  readonly fileName: string;
  readonly sha256: string | null;
  readonly doneAt: string | null;
  readonly options: PackageOptions;
  readonly facts: Transmittal | null;
  readonly receipt: { readonly receivedBy: string; readonly receivedOn: string; readonly remark: string; readonly by: string; readonly at: string } | null;
  readonly rows: readonly PackageSheetRow[];
  /** Copies of it out in people's names. */
  readonly holders: readonly { readonly name: string; readonly at: string; readonly out: number }[];
}

/** A sheet that may be packed, for choosing. */
export interface PackageCandidate {
  readonly revisionId: string;
  readonly lineId: string;
  readonly line: string;
  readonly letter: string;
  readonly sheetNumber: string;
  readonly code: string;
  readonly state: (typeof PACKED_STATES)[number];
  readonly hold: boolean;
}

export function isOpenPackage(state: PackageState): boolean {
  return state === "waiting" || state === "making";
}

interface Standing {
  readonly state: RevisionState;
  readonly hold: boolean;
}

/** "FOR FABRICATION", "FOR FABRICATION, HOLD". */
export function standingWords({ state, hold }: Standing): string {
  return hold ? `${STATE_WORDS[state]}, HOLD` : STATE_WORDS[state];
}

/**
 * Why a page printed in one state is not to be worked to now, as a sentence; null while it is current. AS-BUILT after
 * FOR FABRICATION is the same sheet, built. @param liveCode code of the spool's live revision, "" = none
 */
export function outdatedSentence(printed: Standing, now: Standing, kind: PackedSheet["kind"], liveCode: string): string | null {
  if (kind === "review" && now.state !== "for-review") return `It was for review; it is ${STATE_WORDS[now.state]} now.`;
  const word = copyWord(now.state, now.hold);
  if (word === copyWord(printed.state, printed.hold)) return null;
  if (word === null) return "Its hold was released since.";
  if (word === "HOLD") return "It is on HOLD since.";
  return word === "SUPERSEDED" && liveCode !== "" ? `It is superseded by revision ${liveCode}.` : `It is ${word} since.`;
}

/** "1 of 3 sheets is not current any more." */
export function outdatedText(outdated: number, sheets: number): string {
  return `${outdated} of ${sheets} ${sheets === 1 ? "sheet" : "sheets"} ${outdated === 1 ? "is" : "are"} not current any more.`;
}
