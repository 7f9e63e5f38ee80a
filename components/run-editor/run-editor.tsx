"use client";
import { useCallback, useDeferredValue, useEffect, useMemo, useRef, useState } from "react";
import { parseRunDocument, type View } from "@/iso";
import { Notice } from "@/components/ui/notice";
import type { LineDetail, Viewer } from "@/lib/rules/api-types";
import type { CellTarget } from "./cell-commit";
import { BlockBar } from "./block-bar";
import { CloseDialog } from "./close-dialog";
import type { DimensionEdit } from "./dimension-entry";
import { runOf } from "./document-edits";
import { readDraft, type StoredDraft } from "./draft-store";
import { EditorContext, type Send } from "./editor-context";
import { EditorHead, type EditorLook, type EditorPanel } from "./editor-head";
import { waitingDrafts } from "./drafts";
import { CutPanels, FindingPanels } from "./finding-panels";
import { KeyHelp } from "./key-help";
import { LineDrawing } from "./line-drawing";
import { LineTools } from "./line-tools";
import { NotesDialog } from "./notes-dialog";
import { PasteReportNotice } from "./paste-report";
import { PointDetail } from "./point-detail";
import { PointGrid } from "./point-grid";
import { ConflictBanner } from "./save-status";
import { SettingsDrawer } from "./settings-drawer";
import { LineSheet } from "./line-sheet";
import { PointedStore } from "./pointed-store";
import { ShapeDoor } from "./shape-door";
import { isTouchScreen } from "./touch-screen";
import { endsAsked } from "./surveyed-ends";
import { useAutosave } from "./use-autosave";
import { useBlockText } from "./use-block-text";
import { makeStamp, useEditorState } from "./use-editor-state";
import { useLineModel, useSettledPreview } from "./use-line-model";
import { useUndoKeys } from "./use-undo-keys";

export interface RunEditorProps {
  readonly line: LineDetail;
  readonly viewer: Pick<Viewer, "personId" | "name"> & Partial<Pick<Viewer, "role">>;
  /** Reads the line's uploads and the shop's take-outs again. */
  readonly onUploads: () => Promise<unknown>;
}

/** A line being typed: grid, isometric, findings, cut list; saves by itself. */
export function RunEditor({ line, viewer, onUploads }: RunEditorProps) {
  const [draft] = useState(() => (line.editable ? unsentDraft(line, viewer.personId) : null));
  // Work kept from before somebody else's save starts from the older version, so that the save tells of it.
  const [base] = useState(() => ({ document: line.document, version: draft?.version ?? line.version }));
  const [state, send] = useEditorState(base.document, viewer.name, line.editable);
  const [asked] = useState(() => endsAsked(window.location.search));
  const [panel, setPanel] = useState<EditorPanel | null>(asked ? "closing" : null);
  const [look, setLook] = useState<EditorLook>("isometric");
  const { document, cursor } = state;
  const save = useAutosave({ lineId: line.id, personId: viewer.personId, document, base, enabled: line.editable });
  useRestoredDraft(draft, send);
  const model = useLineModel(useSettledPreview(document, state.preview), line.marks, line.takeOuts);
  const point = runOf(document, cursor.runId)?.points[cursor.row] ?? null;
  const [pointed] = useState(() => new PointedStore());
  const blockTextNow = useBlockText(state);
  // What follows the cursor beside the grid comes after the key's own echo.
  const followed = useDeferredValue(point);
  const followedId = followed?.id ?? null;
  const followedDocument = useDeferredValue(document);
  const doors = useMemo(() => ({ send, openHelp: () => setPanel("help"), readOnly: !line.editable, blockText: blockTextNow, pointed }), [send, line.editable, blockTextNow, pointed]);
  const showPoint = useCallback((pointId: string, focus = !isTouchScreen()) => send({ type: "show-point", pointId, focus }), [send]);
  const showCell = useCallback((target: CellTarget) => send({ type: "cursor", target, focus: true }), [send]);
  const takeNumber = useCallback((edit: DimensionEdit, text: string) => send({ type: "commit", target: edit.target, text, step: "stay" }), [send]);
  const setView = useCallback((view: View | null) => send({ type: "document-patch", patch: { view } }), [send]);
  const waiting = useMemo(() => waitingDrafts(document, state.drafts), [document, state.drafts]);
  useUndoKeys(send, line.editable);
  const close = (): void => setPanel(null);
  return (
    <EditorContext value={doors}>
      <EditorHead
        line={line}
        document={document}
        save={save}
        canUndo={state.past.length > 0}
        canRedo={state.future.length > 0}
        look={look}
        onLook={setLook}
        onPanel={setPanel}
      />
      {line.editable ? null : <Notice className="mb-3">You read this line; a detailer or the owner changes it.</Notice>}
      {draft ? <Notice word="Restored" className="mb-3">Entries of yours that were not saved were kept in this browser and are back. Undo takes them out.</Notice> : null}
      {save.state.kind === "conflict" ? (
        <ConflictBanner
          lineId={line.id}
          state={save.state}
          mine={document}
          onTheirs={(theirs) => {
            send({ type: "replace", document: theirs.document });
            save.rebase(theirs.document, theirs.version);
          }}
        />
      ) : null}
      <div className="flex flex-col gap-x-5 gap-y-4 lg:grid lg:grid-cols-[minmax(36rem,46fr)_minmax(0,54fr)]">
        <div className="contents lg:order-2 lg:block lg:min-w-0">
          <div className="order-1 flex min-h-64 flex-col lg:h-[max(30rem,calc(100dvh-13.5rem))]">
            {look === "sheet" ? <LineSheet line={line} document={document} model={model} /> : look === "shape" ? <ShapeDoor model={model} activePointId={followedId} /> : <LineDrawing model={model} marks={line.marks} takeOuts={line.takeOuts} view={document.view} onView={line.editable ? setView : null} activePointId={followedId} onPoint={showPoint} document={followedDocument} onMove={line.editable ? takeNumber : null} />}
          </div>
          <div className="order-3 mt-4 min-w-0">
            <CutPanels line={line} model={model} activePointId={followedId} onPoint={showPoint} />
          </div>
        </div>
        <div className="contents lg:order-1 lg:block lg:min-w-0">
          <div className="order-2 min-w-0">
            <PasteReportNotice report={state.report} />
            <BlockBar state={state} />
            <div className="border-t border-ink lg:max-h-[max(24rem,calc(100dvh-19rem))] lg:overflow-y-auto lg:border-x lg:border-b lg:bg-paper lg:[contain:layout_paint_style]">
              <PointGrid state={state} problems={model.problems} />
            </div>
            {followed ? <PointDetail document={followedDocument} point={followed} problems={model.problems} role={viewer.role ?? null} onTakeOut={onUploads} /> : null}
          </div>
          <div className="order-4 mt-4 min-w-0">
            <FindingPanels line={line} model={model} waiting={waiting} activePointId={followedId} onPoint={showPoint} onCell={showCell} onUploads={onUploads} />
          </div>
        </div>
      </div>
      <KeyHelp open={panel === "help"} units={document.settings.units} onClose={close} />
      <SettingsDrawer open={panel === "settings"} document={document} editable={line.editable} onChange={(patch) => send({ type: "document-patch", patch })} onClose={close} />
      <NotesDialog open={panel === "notes"} document={document} spools={model.spools.map((spool) => spool.letter)} editable={line.editable} onChange={(patch) => send({ type: "document-patch", patch })} onClose={close} />
      <LineTools
        open={panel === "line"}
        line={line}
        document={document}
        pointId={point?.id ?? null}
        onDocument={({ runs, notes, title, view }) => send({ type: "document-patch", patch: { runs, notes, title, view } })}
        onSheets={(sheets) => send({ type: "document-patch", patch: { sheets } })}
        onClose={close}
      />
      <CloseDialog
        open={panel === "closing"}
        model={model}
        takeOuts={line.takeOuts}
        pointId={point?.id ?? null}
        stamp={() => makeStamp(viewer.name)}
        lineId={line.id}
        asked={asked}
        onInsert={
          line.editable
            ? (next) => {
                send({ type: "document-patch", patch: { runs: next.runs } });
                close();
              }
            : null
        }
        onClose={close}
      />
    </EditorContext>
  );
}

/** What this person typed here and the server never got; null when it has it all. */
function unsentDraft(line: LineDetail, personId: string): StoredDraft | null {
  const draft = readDraft(line.id, personId);
  const stored = parseRunDocument(line.document);
  const same = draft !== null && JSON.stringify(draft.document) === JSON.stringify(stored.ok ? stored.document : line.document);
  return same ? null : draft;
}

/** Brings a draft back as one step that can be undone. */
function useRestoredDraft(draft: StoredDraft | null, send: Send): void {
  const done = useRef(false);
  useEffect(() => {
    if (!draft || done.current) return;
    done.current = true;
    send({ type: "replace", document: draft.document });
  }, [draft, send]);
}
