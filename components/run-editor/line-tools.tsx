"use client";
import { useState } from "react";
import { documentMirror, runReverse, type RunDocument } from "@/iso";
import { Button } from "@/components/ui/button";
import { ChoiceRow } from "@/components/ui/choice-row";
import { Dialog } from "@/components/ui/dialog";
import { failureText } from "@/components/ui/fetcher";
import { Select, TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import type { LineDetail } from "@/lib/rules/api-types";
import { freshId } from "./editor-ids";
import { InsertLine } from "./insert-line";
import { branchName } from "./point-grid";
import { saveCopy, type SavedCopy } from "./save-copy";

export interface LineToolsProps {
  readonly open: boolean;
  readonly line: LineDetail;
  readonly document: RunDocument;
  /** The current row's point: where another line goes in. */
  readonly pointId: string | null;
  readonly onDocument: (next: RunDocument) => void;
  readonly onSheets: (sheets: RunDocument["sheets"]) => void;
  readonly onClose: () => void;
}

/** What is done to a whole line or run: turned round, mirrored, another line put in, its drawing kept on one sheet. Each is one undo. */
export function LineTools(props: LineToolsProps) {
  return (
    <Dialog open={props.open} onClose={props.onClose} title={`Whole line ${props.document.number}`} wide>
      <LineToolsBody {...props} />
    </Dialog>
  );
}

function LineToolsBody({ line, document, pointId, onDocument, onSheets, onClose }: LineToolsProps) {
  const [trouble, setTrouble] = useState<string | null>(null);
  const { editable } = line;
  const take = (next: RunDocument): void => {
    onDocument(next);
    onClose();
  };
  return (
    <div className="grid gap-6">
      {trouble ? <Notice tone="trouble">{trouble}</Notice> : null}
      {editable ? (
        <>
          <ReverseRun document={document} line={line} onDocument={take} onTrouble={setTrouble} />
          <OppositeHand document={document} lineId={line.id} onDocument={take} onTrouble={setTrouble} />
          <InsertLine line={line} document={document} pointId={pointId} onDocument={take} onTrouble={setTrouble} />
        </>
      ) : null}
      <section aria-label="Sheets">
        <h3>Sheets of the isometric</h3>
        <p className="text-sm text-soft">A crowded isometric goes on to further sheets with match marks, unless it is kept on one.</p>
        <fieldset disabled={!editable}>
          <ChoiceRow label="Sheets of the isometric" value={document.sheets ?? "auto"} onChange={(sheets) => onSheets(sheets === "auto" ? undefined : sheets)} choices={[{ value: "auto", label: "As many as it needs" }, { value: "one", label: "One" }]} />
        </fieldset>
      </section>
    </div>
  );
}

interface ToolProps {
  readonly document: RunDocument;
  readonly onDocument: (next: RunDocument) => void;
  readonly onTrouble: (message: string | null) => void;
}

function ReverseRun({ document, line, onDocument, onTrouble }: ToolProps & { readonly line: LineDetail }) {
  const [runId, setRunId] = useState(document.runs[0]?.id ?? "");
  const reverse = (): void => {
    const result = runReverse(document, runId, line.takeOuts);
    if (result.ok) onDocument(result.document);
    else onTrouble(result.message);
  };
  return (
    <section aria-label="Turn a run round">
      <h3>Turn a run round</h3>
      <p className="text-sm text-soft">The run is described from its other end; everything stands where it stood, and marks that stick stay.</p>
      <div className="mt-2 flex flex-wrap items-end gap-3">
        <Select label="Run" className="min-w-0 flex-1 basis-60" value={runId} onChange={(event) => setRunId(event.target.value)} options={document.runs.map((run, i) => ({ value: run.id, label: i === 0 ? "Main run" : branchName(document, run) }))} />
        <Button onClick={reverse}>Turn it round</Button>
      </div>
    </section>
  );
}

function OppositeHand({ document, lineId, onDocument, onTrouble }: ToolProps & { readonly lineId: string }) {
  const [about, setAbout] = useState<"E" | "N">("E");
  const [number, setNumber] = useState(`${document.number}-OH`.slice(0, 60));
  const [made, setMade] = useState<SavedCopy | null>(null);
  const [busy, setBusy] = useState(false);
  const asNew = async (): Promise<void> => {
    setBusy(true);
    onTrouble(null);
    await saveCopy(lineId, documentMirror(document, about, () => freshId("p")), number).then(setMade, (failure: unknown) => onTrouble(failureText(failure)));
    setBusy(false);
  };
  return (
    <section aria-label="Opposite hand">
      <h3>Opposite hand</h3>
      <p className="text-sm text-soft">Mirrored about a vertical plane: stems, flat sides and bolt holes follow. Confirm that valves and flanges of the other hand are right.</p>
      <ChoiceRow label="Mirrored" value={about} onChange={setAbout} choices={[{ value: "E", label: "East and west change" }, { value: "N", label: "North and south change" }]} />
      <div className="mt-3 flex flex-wrap items-end gap-3">
        <TextField label="Number of the new line" figure className="min-w-0 flex-1 basis-48" maxLength={60} value={number} onChange={(event) => setNumber(event.target.value)} />
        <Button busy={busy} busyLabel="Making it" disabled={number.trim() === ""} onClick={() => void asNew()}>Make it a line of its own</Button>
        <Button onClick={() => onDocument(documentMirror(document, about))}>Mirror this line</Button>
      </div>
      {made ? <p className="mt-2">Made: <a className="inked" href={`/lines/${made.id}`}>{made.number}</a>.</p> : null}
    </section>
  );
}
