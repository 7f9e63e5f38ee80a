"use client";
import { useCallback, useState } from "react";
import type { SheetInput } from "@/iso";
import { useViewer } from "@/components/shell/use-viewer";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions } from "@/components/ui/dialog";
import { Check } from "@/components/ui/field";
import { timeText } from "@/components/ui/format";
import { StateWord } from "@/components/ui/state-word";
import { CutTable } from "./cut-table";
import { PrintPart } from "./print-part";
import type { SpoolFacts } from "./spool-facts";

/** Prints the cut list after the reader acknowledged to verify by tape. */
export function CutPrint({
  input,
  facts,
  jobNumber,
}: {
  readonly input: SheetInput;
  readonly facts: SpoolFacts;
  readonly jobNumber: string;
}) {
  const [asking, setAsking] = useState(false);
  const [printing, setPrinting] = useState(false);
  const printed = useCallback(() => setPrinting(false), []);
  return (
    <>
      <Button data-screen-only onClick={() => setAsking(true)}>
        Print the cut list
      </Button>
      <Dialog open={asking} onClose={() => setAsking(false)} title="Print the cut list">
        <Acknowledge
          onGo={() => {
            setAsking(false);
            setPrinting(true);
          }}
        />
      </Dialog>
      <PrintPart printing={printing} onPrinted={printed}>
        <PrintedCutList input={input} facts={facts} jobNumber={jobNumber} />
      </PrintPart>
    </>
  );
}

function Acknowledge({ onGo }: { readonly onGo: () => void }) {
  const [read, setRead] = useState(false);
  return (
    <>
      <p>Every length on the list is computed from the dimensions entered, with nominal take-outs.</p>
      <Check
        className="mt-3"
        checked={read}
        onChange={(event) => setRead(event.target.checked)}
        label="I will verify each length by tape, two readings, before cutting."
      />
      <DialogActions>
        <Button tone="primary" disabled={!read} onClick={onGo}>
          Print
        </Button>
      </DialogActions>
    </>
  );
}

function PrintedCutList({
  input,
  facts,
  jobNumber,
}: {
  readonly input: SheetInput;
  readonly facts: SpoolFacts;
  readonly jobNumber: string;
}) {
  const viewer = useViewer();
  const { revision } = input;
  return (
    <article className="p-2">
      <h1 className="mb-1 text-2xl">Cut list, spool {input.spool}</h1>
      <StateWord state={revision.state} hold={revision.hold} className="mb-2 text-lg" />
      <p className="figure mb-3">
        Job {jobNumber} / Line {input.document.number} / Sheet {revision.sheetNumber || "not numbered"} / Rev{" "}
        {revision.code || "none"}
      </p>
      <CutTable facts={facts} units={input.units} />
      <p className="mt-4 text-sm">
        Uncontrolled print, made {timeText(new Date().toISOString())} by {viewer.data?.name ?? ""}. A layout
        and records aid: code, WPS, design and acceptance come from the engineer, the owner and local law.
      </p>
    </article>
  );
}
