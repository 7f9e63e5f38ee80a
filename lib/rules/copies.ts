/** Printed and downloaded copies of sheets, and which of them have to come back. Pure. */
import type { RevisionState } from "@/iso";
import { copyWord } from "./copy-words";

/** How a download of the stored bytes is told from marked copies. */
export const ORIGINAL = "ORIGINAL";
/** What a copy of a revision that may be worked to carries. */
export const UNCONTROLLED = "UNCONTROLLED COPY";

export interface CopyRow {
  readonly id: string;
  readonly by: string;
  /** Whether the viewer took it. */
  readonly mine: boolean;
  readonly at: string;
  readonly kind: "review" | "fabrication";
  /** ORIGINAL, or the word across the copy, or UNCONTROLLED COPY. */
  readonly marked: string;
  readonly spoolId: string;
  readonly line: string;
  readonly spool: string;
  readonly sheetNumber: string;
  readonly code: string;
  readonly state: RevisionState;
  readonly hold: boolean;
  /** It looks like a sheet to work from, and its revision is none any more. */
  readonly withdraw: boolean;
  readonly withdrawn: { readonly by: string; readonly at: string } | null;
}

export interface CopyFacts {
  readonly kind: "review" | "fabrication";
  readonly marked: string;
  readonly state: RevisionState;
  readonly hold: boolean;
  readonly withdrawn: boolean;
}

/** Whether somebody might work to it: a copy with a word across it looks dead by itself, as does one for review. */
export function looksLive({ kind, marked }: Pick<CopyFacts, "kind" | "marked">): boolean {
  return kind === "fabrication" && (marked === ORIGINAL || marked === UNCONTROLLED);
}

/** Whether it has to be taken off the bench: it looks like a sheet to work from, and its revision is none any more. */
export function mustWithdraw({ kind, marked, state, hold, withdrawn }: CopyFacts): boolean {
  return looksLive({ kind, marked }) && !withdrawn && copyWord(state, hold) !== null;
}

/** "Printed" or "Downloaded", with the word across it. */
export function copyWords(marked: string): string {
  if (marked === ORIGINAL) return "Downloaded, unmarked";
  return marked === UNCONTROLLED ? "Printed" : `Printed, ${marked} across it`;
}

/** What a holder is told in a mail of the copies out in their name; "" when there are none. */
export function holderNote(copies: readonly { readonly marked: string; readonly at: string }[]): string {
  if (copies.length === 0) return "";
  const lines = copies.map(({ marked, at }) => `- ${copyWords(marked)}, ${at.slice(0, 16).replace("T", " ")} UTC`);
  return `\n\nCopies out in your name:\n${lines.join("\n")}\nTake them out of use, then mark them as withdrawn on the spool's page.`;
}

/** Copies by who took them, those with the most first; each person's newest first. */
export function byHolder(rows: readonly CopyRow[]): { readonly by: string; readonly copies: readonly CopyRow[] }[] {
  const holders = new Map<string, CopyRow[]>();
  for (const row of rows) holders.set(row.by, [...(holders.get(row.by) ?? []), row]);
  return [...holders].map(([by, copies]) => ({ by, copies: [...copies].sort((p, q) => q.at.localeCompare(p.at)) })).sort((p, q) => q.copies.length - p.copies.length || p.by.localeCompare(q.by));
}
