/** Sends a survey when there is a signal and keeps it in the browser always. One per open page; no React in here. */
import type { SurveyDocument } from "@/iso";
import type { SaveLineResult } from "@/lib/rules/api-types";
import type { SaveSurveyConflict, SurveyDetail } from "@/lib/rules/survey-api-types";
import { chooseSide, mergeSurveys, type SurveyConflict } from "./survey-merge";
import type { KeptSurvey, SurveyStore } from "./survey-store";

export type SyncWord =
  | { readonly kind: "saved"; readonly at: string | null }
  /** Kept in this browser, not yet on the server. */
  | { readonly kind: "kept"; readonly why: string | null }
  | { readonly kind: "sending" }
  | { readonly kind: "conflict"; readonly by: string }
  /** The browser keeps nothing: only what is sent is safe. */
  | { readonly kind: "not-kept"; readonly why: string };

export interface SyncView {
  readonly document: SurveyDocument;
  readonly word: SyncWord;
  readonly conflicts: readonly SurveyConflict[];
}

export type SendAnswer =
  | { readonly kind: "saved"; readonly result: SaveLineResult }
  | { readonly kind: "conflict"; readonly conflict: SaveSurveyConflict }
  | { readonly kind: "offline" }
  | { readonly kind: "refused"; readonly message: string };

export interface SyncParts {
  readonly store: SurveyStore | null;
  readonly send: (document: SurveyDocument, version: number) => Promise<SendAnswer>;
  readonly show: (view: SyncView) => void;
  readonly now: () => string;
}

const alike = (a: SurveyDocument, b: SurveyDocument): boolean => a === b || JSON.stringify(a) === JSON.stringify(b);

export class SurveySync {
  private document: SurveyDocument;
  private base: SurveyDocument;
  private version: number;
  private conflicts: readonly SurveyConflict[] = [];
  private word: SyncWord = { kind: "saved", at: null };
  private busy: Promise<void> | null = null;
  private writing: Promise<void> = Promise.resolve();
  private theirName = "Somebody";
  /** Base and version before the other hand's copy came in; kept until every row is decided, so that a reload asks again. */
  private asked: { readonly base: SurveyDocument; readonly version: number } | null = null;

  constructor(private readonly parts: SyncParts, private readonly personId: string, private readonly detail: SurveyDetail, kept: KeptSurvey | null) {
    this.document = kept?.document ?? detail.document;
    this.base = kept?.base ?? detail.document;
    this.version = kept?.version ?? detail.version;
    if (this.unsent) this.word = { kind: "kept", why: null };
  }

  get unsent(): boolean {
    return !alike(this.document, this.base);
  }

  view(): SyncView {
    return { document: this.document, word: this.word, conflicts: this.conflicts };
  }

  /** A fresh copy came from the server while ours lay here: join them before anything is sent. */
  meet(detail: SurveyDetail): Promise<void> {
    if (detail.version !== this.version && this.conflicts.length === 0) this.join(detail.document, detail.version, detail.updatedBy ?? "Somebody");
    return this.keep();
  }

  /** A change of the page: on the disk first, the server later. */
  async change(document: SurveyDocument): Promise<void> {
    this.document = document;
    this.tell(this.conflicts.length > 0 ? this.word : { kind: "kept", why: null });
    await this.keep();
  }

  /** Decides one row both changed; when the last is decided the result can be sent. */
  async choose(conflict: SurveyConflict, side: "mine" | "theirs"): Promise<void> {
    this.document = chooseSide(this.document, conflict, side);
    this.conflicts = this.conflicts.filter((each) => each.id !== conflict.id || each.list !== conflict.list);
    this.tell(this.conflicts.length > 0 ? { kind: "conflict", by: this.theirName } : { kind: "kept", why: null });
    await this.keep();
    if (this.conflicts.length === 0) await this.sendNow();
  }

  /** Sends what is unsent; a second call waits for the first. */
  sendNow(): Promise<void> {
    this.busy ??= this.sendOnce().finally(() => (this.busy = null));
    return this.busy;
  }

  private async sendOnce(): Promise<void> {
    if (this.conflicts.length > 0) return;
    if (!this.unsent) return this.tell({ kind: "saved", at: this.word.kind === "saved" ? this.word.at : null });
    const sent = this.document;
    this.tell({ kind: "sending" });
    const answer = await this.parts.send(sent, this.version);
    if (answer.kind === "saved") {
      this.base = sent;
      this.version = answer.result.version;
      this.tell(this.unsent ? { kind: "kept", why: null } : { kind: "saved", at: answer.result.savedAt });
    } else if (answer.kind === "conflict") {
      this.join(answer.conflict.document, answer.conflict.currentVersion, answer.conflict.by);
    } else this.tell({ kind: "kept", why: answer.kind === "offline" ? null : answer.message });
    await this.keep();
  }

  private join(theirs: SurveyDocument, version: number, by: string): void {
    const merged = mergeSurveys(this.base, this.document, theirs);
    this.asked = { base: this.base, version: this.version };
    this.document = merged.document;
    this.base = theirs;
    this.version = version;
    this.conflicts = merged.conflicts;
    this.theirName = by;
    this.tell(merged.conflicts.length > 0 ? { kind: "conflict", by } : this.unsent ? { kind: "kept", why: null } : { kind: "saved", at: null });
  }

  /** One write after the other, so that the disk ends with the newest. */
  private keep(): Promise<void> {
    const { store, now } = this.parts;
    if (store === null) {
      if (this.unsent) this.tell({ kind: "not-kept", why: "This browser keeps nothing. Stay on this page until it says saved." });
      return Promise.resolve();
    }
    const { base, version } = this.conflicts.length > 0 && this.asked ? this.asked : { base: this.base, version: this.version };
    const kept: KeptSurvey = { lineId: this.detail.line.id, personId: this.personId, document: this.document, base, version, detail: { ...this.detail, document: base, version }, at: now() };
    this.writing = this.writing.then(() => store.write(kept)).catch(() => this.tell({ kind: "not-kept", why: "This browser could not keep the last change. Stay on this page until it says saved." }));
    return this.writing;
  }

  private tell(word: SyncWord): void {
    this.word = word;
    this.parts.show(this.view());
  }
}

/** The state in words for the head of the page. */
export function syncWords(word: SyncWord): string {
  switch (word.kind) {
    case "saved": return "Saved on the server";
    case "kept": return word.why ? `Kept on this device. Not on the server: ${word.why}` : "Kept on this device, sent when there is a signal";
    case "sending": return "Sending";
    case "conflict": return `${word.by} changed the same rows. Choose below; nothing is lost.`;
    case "not-kept": return word.why;
  }
}
