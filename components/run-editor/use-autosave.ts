"use client";
import { useCallback, useEffect, useMemo, useRef, useState } from "react";
import type { RunDocument } from "@/iso";
import { apiSend, ApiFailure, failureText } from "@/components/ui/fetcher";
import type { SaveLineConflict, SaveLineResult } from "@/lib/rules/api-types";
import { clearDraft, writeDraft } from "./draft-store";
import { retryDelayMs, type SaveState } from "./save-state";

/** Quiet time after an entry before it is sent, ms. */
const QUIET_MS = 800;
/** Browsers refuse a larger body on a request that outlives its page; the draft in this browser covers the rest. */
const KEEPALIVE_BYTES = 60_000;

export interface AutosaveOptions {
  readonly lineId: string;
  readonly personId: string;
  readonly document: RunDocument;
  /** Document and version the server is known to hold. */
  readonly base: { readonly document: RunDocument; readonly version: number };
  readonly enabled: boolean;
}

export interface Autosave {
  readonly state: SaveState;
  readonly saveNow: () => void;
  /** The server's document was loaded over ours: go on from its version. */
  readonly rebase: (document: RunDocument, version: number) => void;
}

/** Sends the document after each quiet moment, tells of a conflict, keeps a draft in the browser while unsent. */
export function useAutosave(options: AutosaveOptions): Autosave {
  const [state, setState] = useState<SaveState>({ kind: "saved", at: null });
  const saver = useRef<Saver | null>(null);
  if (saver.current === null) saver.current = new Saver(options, setState);
  const { document, enabled } = options;
  useEffect(() => {
    if (enabled) saver.current?.changed(document);
  }, [document, enabled]);
  useEffect(() => {
    const now = saver.current;
    if (!now || !enabled) return;
    return now.listen();
  }, [enabled]);
  const saveNow = useCallback(() => void saver.current?.send(), []);
  const rebase = useCallback((next: RunDocument, version: number) => saver.current?.rebase(next, version), []);
  return useMemo(() => ({ state, saveNow, rebase }), [state, saveNow, rebase]);
}

/** Keeps what is sent, what is known to be stored, and the timer between them; one per open line. */
class Saver {
  private latest: RunDocument;
  private stored: RunDocument;
  private version: number;
  private timer: ReturnType<typeof setTimeout> | null = null;
  private busy = false;
  private stopped = false;
  private failures = 0;

  constructor(private readonly options: AutosaveOptions, private readonly report: (state: SaveState) => void) {
    this.latest = options.base.document;
    this.stored = options.base.document;
    this.version = options.base.version;
  }

  private get unsent(): boolean {
    return this.latest !== this.stored;
  }

  changed(document: RunDocument): void {
    this.latest = document;
    if (!this.unsent || this.stopped) return;
    this.keepDraft();
    this.report({ kind: "waiting" });
    this.later(QUIET_MS);
  }

  rebase(document: RunDocument, version: number): void {
    this.stored = document;
    this.latest = document;
    this.version = version;
    this.stopped = false;
    this.failures = 0;
    clearDraft(this.options.lineId, this.options.personId);
    this.report({ kind: "saved", at: null });
  }

  private keepDraft(): void {
    const { lineId, personId } = this.options;
    writeDraft(lineId, personId, { document: this.latest, version: this.version, at: new Date().toISOString() });
  }

  private later(ms: number): void {
    if (this.timer) clearTimeout(this.timer);
    this.timer = setTimeout(() => void this.send(), ms);
  }

  async send(): Promise<void> {
    if (this.timer) clearTimeout(this.timer);
    if (this.busy || this.stopped || !this.unsent) return;
    const sent = this.latest;
    this.busy = true;
    this.report({ kind: "saving" });
    try {
      const result = await apiSend<SaveLineResult>("PUT", `/api/lines/${this.options.lineId}`, { document: sent, version: this.version });
      this.succeeded(sent, result);
    } catch (failure) {
      this.failed(failure);
    } finally {
      this.busy = false;
    }
    if (this.unsent && !this.stopped && this.failures === 0) this.later(QUIET_MS);
  }

  private succeeded(sent: RunDocument, result: SaveLineResult): void {
    this.stored = sent;
    this.version = result.version;
    this.failures = 0;
    if (this.unsent) return this.keepDraft();
    clearDraft(this.options.lineId, this.options.personId);
    this.report({ kind: "saved", at: result.savedAt });
  }

  private failed(failure: unknown): void {
    const conflict = conflictOf(failure);
    if (conflict) {
      this.stopped = true;
      return this.report({ kind: "conflict", by: conflict.by, at: conflict.at, currentVersion: conflict.currentVersion });
    }
    this.failures += 1;
    this.keepDraft();
    const offline = failure instanceof ApiFailure && failure.status === 0;
    this.report({ kind: "failed", message: offline ? "no connection. It is kept in this browser and sent when the connection is back." : failureText(failure) });
    if (offline || (failure instanceof ApiFailure && failure.status >= 500)) this.later(retryDelayMs(this.failures));
  }

  /** Leaving the window saves at once; a hidden page sends with a request that outlives it. */
  listen(): () => void {
    const now = (): void => void this.send();
    const hide = (): void => {
      if (document.visibilityState === "hidden") this.lastSend();
    };
    window.addEventListener("blur", now);
    window.addEventListener("online", now);
    window.addEventListener("pagehide", hide);
    document.addEventListener("visibilitychange", hide);
    return () => {
      window.removeEventListener("blur", now);
      window.removeEventListener("online", now);
      window.removeEventListener("pagehide", hide);
      document.removeEventListener("visibilitychange", hide);
      void this.send();
    };
  }

  private lastSend(): void {
    if (!this.unsent || this.busy || this.stopped) return;
    const body = JSON.stringify({ document: this.latest, version: this.version });
    if (body.length > KEEPALIVE_BYTES) return void this.send();
    const sent = this.latest;
    this.busy = true;
    if (this.timer) clearTimeout(this.timer);
    fetch(`/api/lines/${this.options.lineId}`, { method: "PUT", keepalive: true, credentials: "same-origin", headers: { "content-type": "application/json" }, body })
      .then(async (response) => {
        if (response.ok) this.succeeded(sent, (await response.json()) as SaveLineResult);
      })
      // The page may be gone; the draft in this browser tells of it next time.
      .catch(() => undefined)
      .finally(() => {
        this.busy = false;
        if (this.unsent && !this.stopped) this.later(QUIET_MS);
      });
  }
}

function conflictOf(failure: unknown): SaveLineConflict | null {
  if (!(failure instanceof ApiFailure) || failure.status !== 409) return null;
  const body = failure.body as Partial<SaveLineConflict> | null;
  return typeof body?.currentVersion === "number" ? { message: failure.message, code: failure.code, currentVersion: body.currentVersion, by: String(body.by ?? "Somebody"), at: String(body.at ?? "") } : null;
}
