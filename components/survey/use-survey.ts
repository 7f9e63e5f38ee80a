"use client";
import { useCallback, useEffect, useRef, useState } from "react";
import type { SurveyDocument } from "@/iso";
import { useViewer } from "@/components/shell/use-viewer";
import { apiGet, apiSend, ApiFailure, failureText } from "@/components/ui/fetcher";
import type { SaveLineResult } from "@/lib/rules/api-types";
import type { SaveSurveyConflict, SurveyDetail } from "@/lib/rules/survey-api-types";
import { canDo } from "@/lib/rules/permissions";
import { openSurveyStore, type SurveyStore } from "./survey-store";
import { SurveySync, type SendAnswer, type SyncView } from "./survey-sync";
import type { SurveyConflict } from "./survey-merge";

/** Quiet time after a change before it is sent, and between tries without a signal, ms. */
const QUIET_MS = 900;
const RETRY_MS = 10_000;

export interface OpenSurvey {
  readonly detail: SurveyDetail;
  readonly personId: string;
  readonly store: SurveyStore | null;
  /** Whether the reader may open the line itself; not known, so no, without a signal. */
  readonly readsLine: boolean;
  readonly view: SyncView;
  readonly change: (document: SurveyDocument) => void;
  readonly choose: (conflict: SurveyConflict, side: "mine" | "theirs") => void;
  readonly sendNow: () => void;
}

export type SurveyLoading = { readonly kind: "loading" } | { readonly kind: "failed"; readonly message: string } | { readonly kind: "open"; readonly survey: OpenSurvey };

async function send(lineId: string, document: SurveyDocument, version: number): Promise<SendAnswer> {
  try {
    return { kind: "saved", result: await apiSend<SaveLineResult>("PUT", `/api/lines/${lineId}/survey`, { document, version }) };
  } catch (failure) {
    if (!(failure instanceof ApiFailure)) return { kind: "refused", message: failureText(failure) };
    const body = failure.body as Partial<SaveSurveyConflict> | null;
    if (failure.status === 409 && body?.document && typeof body.currentVersion === "number") return { kind: "conflict", conflict: body as SaveSurveyConflict };
    return failure.status === 0 || failure.status >= 500 ? { kind: "offline" } : { kind: "refused", message: failure.message };
  }
}

/** Opens the survey of a line: from the server, or from this device when there is no signal. */
export function useSurvey(lineId: string): SurveyLoading {
  const viewer = useViewer();
  const person = viewer.data?.personId ?? null;
  const silent = viewer.error !== undefined && viewer.error.status !== 401;
  const [state, setState] = useState<SurveyLoading>({ kind: "loading" });
  const [view, setView] = useState<SyncView | null>(null);
  const sync = useRef<SurveySync | null>(null);
  const opening = useRef<Opening | null>(null);
  useEffect(() => () => {
    opening.current = null;
  }, [lineId]);
  useEffect(() => {
    if (person === null && !silent) return;
    // Who signed in is heard of late when the signal was away: what is open already goes on, with all that was typed.
    if (opening.current && (person === null || opening.current.personId === person)) return;
    const own: Opening = { personId: person };
    opening.current = own;
    void openOne(lineId, person, (next) => opening.current === own && setView(next)).then((opened) => {
      if (opening.current !== own) return;
      if (typeof opened === "string") return setState({ kind: "failed", message: opened });
      own.personId = opened.personId;
      sync.current = opened.sync;
      setView(opened.sync.view());
      setState({ kind: "open", survey: { detail: opened.detail, personId: opened.personId, store: opened.store, readsLine: false, view: opened.sync.view(), change: () => undefined, choose: () => undefined, sendNow: () => undefined } });
    });
  }, [lineId, person, silent]);
  const change = useCallback((document: SurveyDocument) => void sync.current?.change(document), []);
  const choose = useCallback((conflict: SurveyConflict, side: "mine" | "theirs") => void sync.current?.choose(conflict, side), []);
  const sendNow = useCallback(() => void sync.current?.sendNow(), []);
  useSending(view, sendNow);
  return state.kind === "open" && view ? { kind: "open", survey: { ...state.survey, readsLine: viewer.data ? canDo(viewer.data.role, "lines.read") : false, view, change, choose, sendNow } } : state;
}

/** The opening that counts, and whose survey it is; null while nobody is known. */
interface Opening {
  personId: string | null;
}

interface Opened {
  readonly sync: SurveySync;
  readonly detail: SurveyDetail;
  readonly personId: string;
  readonly store: SurveyStore | null;
}

/** The opened survey, or the sentence why there is none. */
async function openOne(lineId: string, person: string | null, show: (view: SyncView) => void): Promise<Opened | string> {
  const store = await openSurveyStore().catch(() => null);
  const kept = (await store?.read(lineId, person).catch(() => null)) ?? null;
  const fresh = await apiGet<SurveyDetail>(`/api/lines/${lineId}/survey`).catch((failure: unknown) => failure);
  const answered = fresh instanceof Error ? null : (fresh as SurveyDetail);
  const lost = fresh instanceof ApiFailure && fresh.status !== 0 && fresh.status < 500;
  if (answered === null && (kept === null || lost)) return failureText(fresh);
  const detail = answered ?? kept!.detail;
  const personId = person ?? kept?.personId ?? "";
  const sync = new SurveySync({ store, send: (document, version) => send(lineId, document, version), show, now: () => new Date().toISOString() }, personId, detail, kept);
  if (answered) await sync.meet(answered);
  return { sync, detail, personId, store };
}

/** Sends after each quiet moment, when the signal returns, and again and again while it does not. */
function useSending(view: SyncView | null, sendNow: () => void): void {
  const waiting = view?.word.kind === "kept" || view?.word.kind === "not-kept";
  useEffect(() => {
    if (!waiting) return;
    const soon = setTimeout(sendNow, QUIET_MS);
    const again = setInterval(sendNow, RETRY_MS);
    return () => {
      clearTimeout(soon);
      clearInterval(again);
    };
  }, [waiting, view?.document, sendNow]);
  useEffect(() => {
    const hidden = () => document.visibilityState === "hidden" && sendNow();
    window.addEventListener("online", sendNow);
    document.addEventListener("visibilitychange", hidden);
    return () => {
      window.removeEventListener("online", sendNow);
      document.removeEventListener("visibilitychange", hidden);
    };
  }, [sendNow]);
}
