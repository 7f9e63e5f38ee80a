"use client";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Check, Select, TextField } from "@/components/ui/field";
import { countText } from "@/components/ui/format";
import { STATE_WORDS } from "@/iso";
import type { PackageCandidate } from "@/lib/rules/packages";

interface SheetChoiceProps {
  readonly sheets: readonly PackageCandidate[];
  readonly chosen: ReadonlySet<string>;
  readonly onChange: (ids: ReadonlySet<string>) => void;
  readonly error?: string | undefined;
}

/** The job's sheets by line, narrowed by state and by what is typed; whole lines or single spools. */
export function SheetChoice({ sheets, chosen, onChange, error }: SheetChoiceProps) {
  const [state, setState] = useState("all");
  const [word, setWord] = useState("");
  const shown = sheets.filter((sheet) => isInState(sheet, state) && nameOf(sheet).toLowerCase().includes(word.trim().toLowerCase()));
  const choose = (ids: readonly string[], on: boolean) => onChange(new Set(on ? [...chosen, ...ids] : [...chosen].filter((id) => !ids.includes(id))));
  const ids = shown.map((sheet) => sheet.revisionId);
  const lines = groupedByLine(shown);
  return (
    <fieldset className="mb-4">
      <legend className="mb-2 font-medium">Sheets</legend>
      <div className="mb-2 grid gap-3 sm:grid-cols-2">
        <Select label="In state" options={statesOf(sheets)} value={state} onChange={(event) => setState(event.target.value)} />
        <TextField label="Line, spool or sheet" hint="Narrows the list" value={word} onChange={(event) => setWord(event.target.value)} />
      </div>
      <div className="flex flex-wrap items-center justify-between gap-x-4">
        <p role="status" className="text-sm text-soft">
          {countText(chosen.size, "sheet")} chosen of {sheets.length}
          {shown.length < sheets.length ? `, ${shown.length} shown` : ""}
        </p>
        <span className="flex gap-4">
          <Button tone="quiet" onClick={() => choose(ids, true)}>Choose all shown</Button>
          <Button tone="quiet" onClick={() => choose(ids, false)}>Choose none</Button>
        </span>
      </div>
      <ul tabIndex={0} aria-label="Sheets by line" className="max-h-72 overflow-y-auto border-y border-hair">
        {[...lines].map(([line, rows]) => (
          <LineChoice key={line} line={line} sheets={rows} chosen={chosen} onChoose={choose} />
        ))}
        {shown.length === 0 ? <li className="py-3 text-soft">No sheet fits. Change the state or what is typed.</li> : null}
      </ul>
      {error ? <p role="alert" className="mt-1 text-sm font-medium text-alert">{error}</p> : null}
    </fieldset>
  );
}

function groupedByLine(sheets: readonly PackageCandidate[]): Map<string, PackageCandidate[]> {
  const lines = new Map<string, PackageCandidate[]>();
  for (const sheet of sheets) lines.set(sheet.line, [...(lines.get(sheet.line) ?? []), sheet]);
  return lines;
}

const nameOf = ({ line, letter, sheetNumber }: PackageCandidate) => `${line} spool ${letter} sheet ${sheetNumber}`;

function isInState(sheet: PackageCandidate, state: string): boolean {
  return state === "all" || (state === "hold" ? sheet.hold : sheet.state === state && !sheet.hold);
}

function statesOf(sheets: readonly PackageCandidate[]) {
  const count = (state: string) => sheets.filter((sheet) => isInState(sheet, state)).length;
  const states = (["for-fabrication", "as-built", "for-review"] as const).map((state) => ({ value: state, label: `${STATE_WORDS[state]} (${count(state)})` }));
  return [{ value: "all", label: `Every state (${sheets.length})` }, ...states, { value: "hold", label: `HOLD (${count("hold")})` }];
}

interface LineChoiceProps {
  readonly line: string;
  readonly sheets: readonly PackageCandidate[];
  readonly chosen: ReadonlySet<string>;
  readonly onChoose: (ids: readonly string[], on: boolean) => void;
}

function LineChoice({ line, sheets, chosen, onChoose }: LineChoiceProps) {
  const ids = sheets.map((sheet) => sheet.revisionId);
  return (
    <li className="border-b border-hair py-1 last:border-0">
      <Check label={<span>Line <span className="figure">{line}</span></span>} checked={ids.every((id) => chosen.has(id))} onChange={(event) => onChoose(ids, event.target.checked)} />
      <div className="ml-8 flex flex-wrap gap-x-6">
        {sheets.map((sheet) => (
          <Check key={sheet.revisionId} label={<SheetLabel sheet={sheet} />} checked={chosen.has(sheet.revisionId)} onChange={(event) => onChoose([sheet.revisionId], event.target.checked)} />
        ))}
      </div>
    </li>
  );
}

function SheetLabel({ sheet }: { readonly sheet: PackageCandidate }) {
  return (
    <span>
      Spool {sheet.letter}, <span className="figure">{sheet.sheetNumber}</span> rev {sheet.code}
      <span className="ml-2 text-sm text-soft">
        {STATE_WORDS[sheet.state]}
        {sheet.hold ? ", HOLD" : ""}
      </span>
    </span>
  );
}
