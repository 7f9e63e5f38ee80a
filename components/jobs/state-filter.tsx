"use client";
import { STATE_WORDS, type RevisionState } from "@/iso";
import type { LineRow } from "@/lib/rules/api-types";
import { Select } from "@/components/ui/field";

export type StateChoice = RevisionState | "hold" | "all";

/** Whether a line has a spool in the chosen state. */
export function keepByState(line: LineRow, choice: StateChoice): boolean {
  if (choice === "all") return true;
  return line.spools.some((spool) => (choice === "hold" ? spool.hold : spool.state === choice));
}

/** Narrows lines to those with a spool in one state; each state with its count of spools. */
export function StateFilter({
  lines,
  value,
  onChange,
}: {
  readonly lines: readonly LineRow[];
  readonly value: StateChoice;
  readonly onChange: (value: StateChoice) => void;
}) {
  const spools = lines.flatMap((line) => line.spools);
  const states = (Object.keys(STATE_WORDS) as RevisionState[]).map((state) => ({
    value: state,
    label: `${STATE_WORDS[state]} (${spools.filter((s) => s.state === state).length})`,
  }));
  const options = [
    { value: "all", label: `Every state (${spools.length})` },
    { value: "hold", label: `HOLD (${spools.filter((s) => s.hold).length})` },
    ...states,
  ];
  return (
    <Select
      label="Spools in state"
      className="w-full sm:w-64"
      options={options}
      value={value}
      onChange={(event) => onChange(event.target.value as StateChoice)}
    />
  );
}
