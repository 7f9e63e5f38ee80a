"use client";
import { startTransition, useCallback, useEffect, useMemo, useRef, useState } from "react";
import { quickWays, sortWays, threeElbowRefusal, uniqueWays, type Way, type WayPreference, type WayRefusal, type WaysInput } from "@/iso";
import { workerOrNull } from "@/components/run-editor/latest-queue";
import { WaySearch } from "./way-search";
import type { WaySearchNews } from "./way-messages";
import { searchAndTell } from "./ways-worker";

/** Quiet after a change before the long search starts, ms. */
const QUIET_MS = 400;

export interface WaysShown {
  /** What is wrong with the question; null when it can be asked. */
  readonly problem: string | null;
  readonly ways: readonly Way[];
  readonly refusals: readonly WayRefusal[];
  readonly notes: readonly string[];
  /** State of the long search. */
  readonly search: { readonly done: number; readonly total: number; readonly found: number; readonly state: "waiting" | "running" | "stopped" | "finished" };
  readonly cancel: () => void;
  readonly again: () => void;
}

interface Searched {
  readonly asked: WaysInput | null;
  readonly news: WaySearchNews | null;
  readonly stopped: boolean;
}

const NOTHING: Searched = { asked: null, news: null, stopped: false };

/** The ways of a question: the quick ones at once, three elbows as they are found. */
export function useWays(input: WaysInput, preference: WayPreference): WaysShown {
  const quick = useMemo(() => quickWays(input), [input]);
  const [searched, setSearched] = useState<Searched>(NOTHING);
  const search = useRef<WaySearch | null>(null);
  const begin = useCallback(() => {
    search.current?.cancel();
    const next = new WaySearch({
      start: () => workerOrNull(() => new Worker(new URL("./ways-worker.ts", import.meta.url), { type: "module", name: "ways" })),
      here: (request, tell) => searchAndTell(request, tell, () => performance.now()),
      report: (news) => startTransition(() => setSearched({ asked: input, news, stopped: false })),
    });
    search.current = next;
    setSearched({ asked: input, news: null, stopped: false });
    next.ask(input);
  }, [input]);
  useEffect(() => {
    if (!quick.ok) return;
    const timer = setTimeout(begin, QUIET_MS);
    return () => {
      clearTimeout(timer);
      search.current?.cancel();
    };
  }, [begin, quick.ok]);
  const cancel = useCallback(() => {
    search.current?.cancel();
    setSearched((now) => ({ ...now, stopped: true }));
  }, []);
  const news = searched.asked === input ? searched.news : null;
  const ways = useMemo(() => (quick.ok ? sortWays(uniqueWays([...quick.ways, ...(news?.ways ?? [])]), preference) : []), [quick, news, preference]);
  const refusal = useMemo(() => (news?.finished && news.found === 0 ? threeElbowRefusal(input) : null), [news, input]);
  const state = searched.asked !== input ? "waiting" : news?.finished ? "finished" : searched.stopped ? "stopped" : "running";
  return {
    problem: quick.ok ? null : quick.sentence, ways, refusals: [...(quick.ok ? quick.refusals : []), ...(refusal ? [refusal] : [])], notes: quick.ok ? quick.notes : [],
    search: { done: news?.done ?? 0, total: news?.total ?? 0, found: news?.found ?? 0, state }, cancel, again: begin,
  };
}
