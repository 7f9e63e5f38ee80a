"use client";
import { Select } from "@/components/ui/field";
import { cellShown } from "@/lib/rules/exchange/import-cell";
import { POINT_COLUMNS, type PointColumn } from "@/lib/rules/exchange/point-columns";
import { columnName } from "@/lib/rules/exchange/read-points";
import type { ImportChoices, ImportFacts } from "./import-state";

const SAMPLES = 3;
const OPTIONS = [{ value: "", label: "left out" }, ...POINT_COLUMNS.map(({ key, means }) => ({ value: key, label: means }))];

export interface ColumnStepProps {
  readonly facts: ImportFacts;
  readonly choices: ImportChoices;
  readonly onChange: (patch: Partial<ImportChoices>) => void;
}

/** Each column of the file with a few of its values and what it means; suggested by its head, changeable. */
export function ColumnStep({ facts, choices, onChange }: ColumnStepProps) {
  const set = (at: number, key: PointColumn | null): void => onChange({ match: facts.heads.map((_, index) => (index === at ? key : (choices.match[index] ?? null))) });
  return (
    <ul className="grid gap-x-4 gap-y-3 sm:grid-cols-2 lg:grid-cols-3">
      {facts.heads.map((head, index) => (
        <li key={index} className="min-w-0">
          <Select
            label={<span className="block truncate">{head.trim() || `Column ${columnName(index)}`}</span>}
            hint={<span className="figure block truncate">{samples(facts, index)}</span>}
            options={OPTIONS}
            value={choices.match[index] ?? ""}
            onChange={(event) => set(index, (event.target.value || null) as PointColumn | null)}
          />
        </li>
      ))}
    </ul>
  );
}

function samples({ rows }: ImportFacts, index: number): string {
  const values: string[] = [];
  for (const { cells } of rows) {
    const value = cellShown(cells[index]);
    if (value !== "") values.push(value);
    if (values.length === SAMPLES) break;
  }
  return values.length === 0 ? "empty" : values.join(" | ");
}
