"use client";
import { Check, Select, TextField } from "@/components/ui/field";
import { PROVENANCE_LABEL, type ProvenanceKind } from "@/components/run-editor/provenance-entry";
import { SEPARATOR_WORDS, type Decimal, type Separator } from "@/lib/rules/exchange/csv-read";
import { FILE_UNITS, type FileUnit } from "@/lib/rules/exchange/read-length";
import type { GoodFile, ImportChoices, ImportFacts } from "./import-state";

export interface FileSettingsProps {
  readonly file: GoodFile;
  readonly facts: ImportFacts;
  readonly choices: ImportChoices;
  readonly onChange: (patch: Partial<ImportChoices>) => void;
  /** For what changes the columns themselves: they are matched anew. */
  readonly onReread: (patch: Partial<ImportChoices>) => void;
}

const SEPARATORS = (Object.entries(SEPARATOR_WORDS) as [Separator, string][]).map(([value, label]) => ({ value, label }));
const DECIMALS: readonly { readonly value: Decimal; readonly label: string }[] = [{ value: "point", label: "point, 1.5" }, { value: "comma", label: "comma, 1,5" }];
const FORMS = [{ value: "offset", label: "offsets from the point before" }, { value: "absolute", label: "positions on the line's axes" }];
const SOURCES = (Object.entries(PROVENANCE_LABEL) as [ProvenanceKind, string][]).map(([value, label]) => ({ value, label }));

/** How the file is to be read as a whole. */
export function FileSettings({ file, facts, choices, onChange, onReread }: FileSettingsProps) {
  return (
    <>
      <div className="grid gap-x-4 gap-y-3 sm:grid-cols-2 lg:grid-cols-3">
        {file.kind === "xlsx" ? (
          <Select label="Sheet" options={facts.tables.map(({ name }) => ({ value: name, label: name }))} value={choices.sheet} onChange={(event) => onReread({ sheet: event.target.value, hasHead: undefined })} />
        ) : (
          <>
            <Select label="Columns are parted by" options={SEPARATORS} value={choices.separator} onChange={(event) => onReread({ separator: event.target.value as Separator, hasHead: undefined })} />
            <Select label="Decimal sign" options={DECIMALS} value={choices.decimal} onChange={(event) => onChange({ decimal: event.target.value as Decimal })} />
          </>
        )}
        <Select label="Bare numbers are" options={FILE_UNITS} value={choices.unit} onChange={(event) => onChange({ unit: event.target.value as FileUnit })} />
        <Select label="East, north and up are" options={FORMS} value={choices.form} onChange={(event) => onChange({ form: event.target.value as "offset" | "absolute" })} />
        <Select label="Where a row names no source" options={SOURCES} value={choices.source} onChange={(event) => onChange({ source: event.target.value as ProvenanceKind })} />
        <div className="grid grid-cols-2 gap-2">
          <TextField label="From row" figure inputMode="numeric" placeholder="first" value={choices.fromRow} onChange={(event) => onChange({ fromRow: event.target.value })} />
          <TextField label="To row" figure inputMode="numeric" placeholder="last" value={choices.toRow} onChange={(event) => onChange({ toRow: event.target.value })} />
        </div>
      </div>
      <Check className="mt-1" label="The first row holds the heads of the columns" checked={choices.hasHead} onChange={(event) => onReread({ hasHead: event.target.checked })} />
    </>
  );
}
