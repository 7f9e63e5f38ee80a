"use client";
import { useState } from "react";
import type { RunDocument } from "@/iso";
import { freshId } from "@/components/run-editor/editor-ids";
import { Button } from "@/components/ui/button";
import { DialogActions } from "@/components/ui/dialog";
import { Check } from "@/components/ui/field";
import { FileButton } from "@/components/ui/file-button";
import { Notice } from "@/components/ui/notice";
import { ENCODING_WORDS } from "@/lib/rules/exchange/csv-read";
import { countWords, IMPORT_MAX_BYTES, IMPORT_MAX_ROWS } from "@/lib/rules/exchange/import-cell";
import { headsKey } from "@/lib/rules/exchange/point-columns";
import { rememberColumns } from "./column-memory";
import { ColumnStep } from "./column-step";
import { FaultTable, GoodPreview } from "./import-findings";
import { FileSettings } from "./file-settings";
import { firstChoices, useImportFacts, type GoodFile, type ImportChoices } from "./import-state";
import { readImportFile } from "./read-file";
import { TargetStep, type TargetStepProps } from "./target-step";

export interface ImportViewProps {
  readonly document: RunDocument;
  /** Who brings them in, for the provenance of rows that do not say. */
  readonly by: string;
  readonly onImport: (document: RunDocument) => void;
}

const FRESH = { point: () => freshId("p"), run: () => freshId("r") };

/** A file of points: choose it, match its columns, see what is wrong with it, bring the good rows in. */
export function ImportView({ document, by, onImport }: ImportViewProps) {
  const [file, setFile] = useState<GoodFile | null>(null);
  // Each choosing starts afresh, of the same file mended too.
  const [turn, setTurn] = useState(0);
  const [trouble, setTrouble] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const choose = async (chosen: File | null): Promise<void> => {
    if (!chosen) return;
    setBusy(true);
    setTrouble(null);
    const read = await readImportFile(chosen).catch(() => ({ ok: false as const, message: "The file could not be opened. Choose it again." }));
    setBusy(false);
    setTurn((now) => now + 1);
    setFile(read.ok ? read : null);
    setTrouble(read.ok ? null : read.message);
  };
  return (
    <>
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <FileButton label={file ? "Choose another file" : "Choose a file"} accept=".csv,.txt,.tsv,.xlsx,text/csv" onFile={(chosen) => void choose(chosen)} />
        <p className="min-w-0 break-words text-sm text-soft" role="status">
          {busy ? "Reading the file" : file ? fileWords(file) : `CSV or XLSX, at most ${IMPORT_MAX_BYTES / 1024 / 1024} MB and ${countWords(IMPORT_MAX_ROWS)} rows, one point a row. The file is read here in your browser.`}
        </p>
      </div>
      {trouble ? <Notice tone="trouble" className="mt-4">{trouble}</Notice> : null}
      {file ? <ImportSteps key={turn} file={file} document={document} by={by} onImport={onImport} /> : null}
    </>
  );
}

function fileWords(file: GoodFile): string {
  return file.kind === "csv" ? `${file.name}, ${ENCODING_WORDS[file.encoding]} text` : `${file.name}, workbook`;
}

function ImportSteps({ file, document, by, onImport }: ImportViewProps & { readonly file: GoodFile }) {
  const [choices, setChoices] = useState<ImportChoices>(() => firstChoices(file, document));
  const facts = useImportFacts(file, choices, document, by, FRESH);
  const change = (patch: Partial<ImportChoices>): void => setChoices((now) => ({ ...now, leaveOut: false, ...patch }));
  const reread = (patch: Partial<ImportChoices>): void => setChoices((now) => firstChoices(file, document, { ...now, ...patch }));
  const bad = facts.read?.badRows.length ?? 0;
  const ready = facts.plan?.ok === true && (bad === 0 || choices.leaveOut);
  const bringIn = (): void => {
    if (!facts.plan?.ok) return;
    rememberColumns(headsKey(facts.heads), { match: choices.match, unit: choices.unit, form: choices.form });
    onImport(facts.plan.document);
  };
  return (
    <>
      <StepHead n={1} title="What the file is" />
      <FileSettings file={file} facts={facts} choices={choices} onChange={change} onReread={reread} />
      <StepHead n={2} title="What its columns mean" />
      <ColumnStep facts={facts} choices={choices} onChange={change} />
      {facts.refusal ? <Notice tone="caution" className="mt-4">{facts.refusal}</Notice> : null}
      <Understood document={document} facts={facts} choices={choices} onChange={change} onLeaveOut={(leaveOut) => setChoices((now) => ({ ...now, leaveOut }))} />
      <DialogActions>
        <Button tone="primary" disabled={!ready} onClick={bringIn}>
          {facts.plan?.ok ? `Bring in ${countWords(facts.plan.points)} ${facts.plan.points === 1 ? "point" : "points"}` : "Bring in"}
        </Button>
      </DialogActions>
    </>
  );
}

interface UnderstoodProps extends TargetStepProps {
  readonly onLeaveOut: (leaveOut: boolean) => void;
}

/** What the rows came to, those not understood first, and where the others go. */
function Understood({ document, facts, choices, onChange, onLeaveOut }: UnderstoodProps) {
  if (!facts.read) return null;
  const bad = facts.read.badRows.length;
  return (
    <>
      <StepHead n={3} title="What was understood" />
      {bad > 0 ? <FaultTable faults={facts.read.faults} badRows={bad} /> : null}
      <GoodPreview good={facts.read.good} units={document.settings.units} />
      <StepHead n={4} title="Where it goes" />
      <TargetStep document={document} facts={facts} choices={choices} onChange={onChange} />
      {bad > 0 ? (
        <Check
          className="mt-3"
          checked={choices.leaveOut}
          onChange={(event) => onLeaveOut(event.target.checked)}
          label={`Leave out the ${countWords(bad)} ${bad === 1 ? "row" : "rows"} listed above. An offset is measured from the row before it, so what follows a missing row shifts unless rows give positions.`}
        />
      ) : null}
      {facts.plan && !facts.plan.ok ? <Notice tone="caution" className="mt-3">{facts.plan.message}</Notice> : null}
    </>
  );
}

function StepHead({ n, title }: { readonly n: number; readonly title: string }) {
  return (
    <h3 className="mt-6 mb-2 border-b border-hair pb-1 font-bold">
      <span className="figure mr-2">{n}</span>
      {title}
    </h3>
  );
}
