"use client";
import Link from "next/link";
import type { RunDocument } from "@/iso";
import { ExchangeButton } from "@/components/exchange/exchange-button";
import { Button, ButtonLink } from "@/components/ui/button";
import { usePageTitle } from "@/components/ui/use-page-title";
import type { LineDetail } from "@/lib/rules/api-types";
import { useEditor } from "./editor-context";
import { SaveStatus } from "./save-status";
import type { Autosave } from "./use-autosave";

export type EditorPanel = "help" | "settings" | "closing" | "notes" | "line";

/** What stands beside the grid. */
export type EditorLook = "isometric" | "shape" | "sheet";

export interface EditorHeadProps {
  readonly line: LineDetail;
  readonly document: RunDocument;
  readonly save: Autosave;
  readonly canUndo: boolean;
  readonly canRedo: boolean;
  readonly look: EditorLook;
  readonly onLook: (look: EditorLook) => void;
  readonly onPanel: (panel: EditorPanel) => void;
}

/** Which line this is, whether it is saved, and what can be opened. Low, so that the grid starts high on the page. */
export function EditorHead({ line, document, save, canUndo, canRedo, look, onLook, onPanel }: EditorHeadProps) {
  const { send, readOnly } = useEditor();
  const { pipe, units, ratingClass } = document.settings;
  usePageTitle(`${document.number} ${document.title}`.trim());
  return (
    <header className="mb-3 border-y border-ink py-2">
      <div className="flex flex-wrap items-center justify-between gap-x-6 gap-y-2">
        <div className="min-w-0">
          <nav aria-label="Where you are" className="flex flex-wrap items-center gap-x-2 text-sm">
            <Link href="/jobs" className="inked inline-flex min-h-8 items-center">Jobs</Link>
            <span aria-hidden>/</span>
            <Link href={`/jobs/${line.job.id}`} className="inked inline-flex min-h-8 items-center">
              {line.job.number} {line.job.title}
            </Link>
          </nav>
          <h1 className="break-words text-2xl">
            <span className="figure">{document.number}</span> <span className="font-normal">{document.title}</span>
          </h1>
          <p className="text-sm text-soft">
            NPS {pipe.nps} {pipe.schedule}, {pipe.material}, class {ratingClass}, {units === "metric" ? "millimetres" : "feet and inches"}
          </p>
        </div>
        <div className="flex flex-wrap items-center gap-1.5 [&_button]:px-2.5 [&_button]:text-sm sm:[&_button]:min-h-9" data-screen-only>
          {readOnly ? null : <SaveStatus state={save.state} onSave={save.saveNow} />}
          {readOnly ? null : (
            <>
              <Button onClick={() => send({ type: "undo" })} disabled={!canUndo}>Undo</Button>
              <Button onClick={() => send({ type: "redo" })} disabled={!canRedo}>Redo</Button>
            </>
          )}
          <Button onClick={() => onPanel("closing")}>Close between ends</Button>
          <Button onClick={() => onPanel("line")}>Whole line</Button>
          <Button onClick={() => onPanel("notes")}>Notes</Button>
          <Button onClick={() => onPanel("settings")}>Line settings</Button>
          <Button onClick={() => onLook(look === "shape" ? "isometric" : "shape")} aria-pressed={look === "shape"}>{look === "shape" ? "Isometric" : "True shape"}</Button>
          <Button onClick={() => onLook(look === "sheet" ? "isometric" : "sheet")} aria-pressed={look === "sheet"}>{look === "sheet" ? "Isometric" : "Sheet"}</Button>
          <ButtonLink className="px-2.5 text-sm sm:min-h-9" href={`/lines/${line.id}/survey`}>Survey</ButtonLink>
          <ExchangeButton line={line} document={document} />
          <Button onClick={() => onPanel("help")}>Keys</Button>
        </div>
      </div>
    </header>
  );
}
