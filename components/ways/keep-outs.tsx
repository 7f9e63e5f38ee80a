"use client";
import type { UnitSystem } from "@/iso";
import { Button } from "@/components/ui/button";
import { Select, TextField } from "@/components/ui/field";
import { EMPTY_KEEP_OUT, readKeepOut, type KeepOutForm } from "./ways-settings";

export interface KeepOutsProps {
  readonly value: readonly KeepOutForm[];
  readonly units: UnitSystem;
  readonly onChange: (value: readonly KeepOutForm[]) => void;
}

const KINDS = [
  { value: "below", label: "all below a level" },
  { value: "above", label: "all above a level" },
  { value: "east", label: "all east of" },
  { value: "west", label: "all west of" },
  { value: "north", label: "all north of" },
  { value: "south", label: "all south of" },
  { value: "sphere", label: "a round space" },
  { value: "box", label: "a box" },
];

const FIRST: Readonly<Partial<Record<KeepOutForm["kind"], string>>> = { above: "Level", below: "Level", sphere: "Center, E, N, U", box: "One corner, E, N, U" };

/** What the pipe must keep clear of, one row each. */
export function KeepOuts({ value, units, onChange }: KeepOutsProps) {
  const set = (i: number, change: Partial<KeepOutForm>) => onChange(value.map((each, k) => (k === i ? { ...each, ...change } : each)));
  return (
    <fieldset className="min-w-0">
      <legend className="font-medium">Keep clear of</legend>
      {value.map((form, i) => {
        const read = readKeepOut(form, units, i + 1);
        const blank = form.a.trim() === "";
        const messages = read.ok || blank ? {} : read.messages;
        return (
          <div key={i} className="mt-2 grid grid-cols-2 items-end gap-2 border-l-[3px] border-hair pl-3 sm:grid-cols-5">
            <Select label="What" options={KINDS} value={form.kind} onChange={(event) => set(i, { kind: event.target.value as KeepOutForm["kind"] })} />
            <TextField label="Name" value={form.name} placeholder={`keep-out ${i + 1}`} onChange={(event) => set(i, { name: event.target.value })} />
            <TextField label={FIRST[form.kind] ?? "Line at"} figure value={form.a} error={messages.a} onChange={(event) => set(i, { a: event.target.value })} />
            {form.kind === "sphere" || form.kind === "box" ? (
              <TextField label={form.kind === "sphere" ? "Radius" : "Other corner"} figure value={form.b} error={messages.b} onChange={(event) => set(i, { b: event.target.value })} />
            ) : null}
            <TextField label="Clearance" figure value={form.clear} placeholder="0" error={messages.clear} onChange={(event) => set(i, { clear: event.target.value })} />
            <Button tone="quiet" onClick={() => onChange(value.filter((_, k) => k !== i))} aria-label={`Take out ${form.name || `keep-out ${i + 1}`}`}>
              Take out
            </Button>
          </div>
        );
      })}
      <Button tone="quiet" onClick={() => onChange([...value, EMPTY_KEEP_OUT])}>
        Add a space to keep clear of
      </Button>
      <p className="text-sm text-soft">Measured from the outside of the pipe. A level or line not typed yet counts for nothing.</p>
    </fieldset>
  );
}
