"use client";
import clsx from "clsx";
import { useState } from "react";
import type { RunDocument } from "@/iso";
import { Button } from "@/components/ui/button";
import { apiGet, failureText } from "@/components/ui/fetcher";
import { timeText } from "@/components/ui/format";
import { Notice } from "@/components/ui/notice";
import type { LineDetail } from "@/lib/rules/api-types";
import { saveCopy } from "./save-copy";
import { clockText, saveWords, type SaveState } from "./save-state";

/** One line of words: whether the server has what is on screen. */
export function SaveStatus({ state, onSave }: { readonly state: SaveState; readonly onSave: () => void }) {
  const bad = state.kind === "failed" || state.kind === "conflict";
  return (
    <span className="inline-flex flex-wrap items-center gap-x-3">
      <span role="status" data-save={state.kind} className={clsx("inline-flex items-center gap-2 text-sm", bad ? "font-medium text-alert" : "text-soft")}>
        <svg aria-hidden viewBox="0 0 12 12" className="size-3 shrink-0" fill={state.kind === "saved" ? "currentColor" : "none"} stroke="currentColor" strokeWidth="1.8">
          {bad ? <path d="M2 2l8 8M10 2 2 10" /> : <circle cx="6" cy="6" r="4.4" />}
        </svg>
        {saveWords(state)}
      </span>
      {state.kind === "failed" ? (
        <Button tone="quiet" onClick={onSave}>
          Save now
        </Button>
      ) : null}
    </span>
  );
}

export interface ConflictBannerProps {
  readonly lineId: string;
  readonly state: Extract<SaveState, { kind: "conflict" }>;
  /** What this editor holds. */
  readonly mine: RunDocument;
  readonly onTheirs: (line: LineDetail) => void;
}

/** Two people saved one line: says who, and keeps both versions; nothing is overwritten. */
export function ConflictBanner({ lineId, state, mine, onTheirs }: ConflictBannerProps) {
  const [busy, setBusy] = useState(false);
  const [trouble, setTrouble] = useState<string | null>(null);
  const [copy, setCopy] = useState<{ readonly id: string; readonly number: string } | null>(null);
  const run = async (work: () => Promise<void>): Promise<void> => {
    setBusy(true);
    setTrouble(null);
    await work().catch((failure: unknown) => setTrouble(failureText(failure)));
    setBusy(false);
  };
  const keepCopy = () => run(async () => setCopy(await saveCopy(lineId, mine, copyNumber(mine.number))));
  const loadTheirs = () => run(async () => onTheirs(await apiGet<LineDetail>(`/api/lines/${lineId}`)));
  return (
    <Notice tone="trouble" word="Saved by someone else" className="mb-3">
      <span>
        {state.by} saved this line {clockText(state.at)} while you were typing. Nothing of yours or theirs is overwritten. Keep yours as a line of its own, or load theirs; Undo after that puts yours in place of theirs.
      </span>
      {trouble ? <p className="mt-2 font-medium text-alert">{trouble}</p> : null}
      {copy ? (
        <p className="mt-2">
          Yours is kept as{" "}
          <a className="inked" href={`/lines/${copy.id}`}>
            {copy.number}
          </a>
          .
        </p>
      ) : null}
      <span className="mt-3 flex flex-wrap gap-3">
        <Button busy={busy} onClick={() => void keepCopy()} disabled={copy !== null}>
          Keep mine as a copy
        </Button>
        <Button onClick={() => downloadDocument(mine)}>Download mine</Button>
        <Button tone="primary" busy={busy} onClick={() => void loadTheirs()}>
          Load theirs
        </Button>
      </span>
    </Notice>
  );
}

function copyNumber(number: string): string {
  return `${number.slice(0, 36)} copy, ${timeText(new Date().toISOString())}`;
}

export function downloadDocument(mine: RunDocument): void {
  const url = URL.createObjectURL(new Blob([JSON.stringify(mine, null, 2)], { type: "application/json" }));
  const link = document.createElement("a");
  link.href = url;
  link.download = `${mine.number.replace(/[^\w.-]+/g, "-")}.json`;
  link.click();
  URL.revokeObjectURL(url);
}
