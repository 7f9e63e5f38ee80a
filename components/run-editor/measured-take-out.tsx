"use client";
import { useState } from "react";
import { parseLength, type Problem, type UnitSystem } from "@/iso";
import { Button } from "@/components/ui/button";
import { apiSend, failureText, refreshApi, useApi } from "@/components/ui/fetcher";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { canDo } from "@/lib/rules/permissions";
import type { PersonRow, Role } from "@/lib/rules/api-types";

export interface MeasuredTakeOutProps {
  /** Findings of the current row that speak of a take-out. */
  readonly problems: readonly Problem[];
  readonly units: UnitSystem;
  /** null = not known; then nobody is offered the entry. */
  readonly role: Role | null;
  /** Reads the shop's words again after one was recorded. */
  readonly onRecorded: () => Promise<unknown>;
}

/** A size the tables do not have, or have from memory: the shop's own value, entered where it is missed by whoever may. */
export function MeasuredTakeOut({ problems, units, role, onRecorded }: MeasuredTakeOutProps) {
  const open = problems.filter((problem) => problem.catalogueKey !== undefined);
  if (open.length === 0) return null;
  const may = role !== null && canDo(role, "take-outs.change");
  return (
    <div className="mt-3 grid gap-2">
      {open.map((problem) => (
        <Notice key={problem.catalogueKey} tone={problem.severity === "stop" ? "trouble" : "caution"} word={problem.severity === "stop" ? "Size missing" : "From memory"}>
          {problem.text}
          {may ? <ValueForm catalogueKey={problem.catalogueKey ?? ""} units={units} onRecorded={onRecorded} /> : <WhoMay />}
        </Notice>
      ))}
    </div>
  );
}

function WhoMay() {
  const people = useApi<PersonRow[]>("/api/shop/people");
  const owners = (people.data ?? []).filter((person) => person.role === "owner").map((person) => person.name);
  return <p className="mt-1 text-sm">The shop&apos;s owner enters it{owners.length > 0 ? `: ${owners.join(", ")}` : ""}, here or under Shop, Take-outs.</p>;
}

function ValueForm({ catalogueKey, units, onRecorded }: { readonly catalogueKey: string; readonly units: UnitSystem; readonly onRecorded: () => Promise<unknown> }) {
  const [typed, setTyped] = useState("");
  const [trouble, setTrouble] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const parsed = typed.trim() === "" ? null : parseLength(typed, units);
  const record = async (): Promise<void> => {
    if (!parsed?.ok) return;
    setBusy(true);
    setTrouble(null);
    try {
      await apiSend("POST", "/api/shop/take-outs", { key: catalogueKey, valueMm: parsed.mm });
      await refreshApi("/api/shop");
      await onRecorded();
    } catch (failure) {
      setTrouble(failureText(failure));
    }
    setBusy(false);
  };
  return (
    <div className="mt-2 flex flex-wrap items-end gap-3">
      <TextField
        label="What the shop measured"
        figure
        className="min-w-0 flex-1 basis-40"
        value={typed}
        error={trouble ?? (parsed && !parsed.ok ? parsed.message : undefined)}
        hint={parsed?.ok ? `Understood: ${parsed.understood}` : "Kept for the shop, with your name and the day."}
        onChange={(event) => setTyped(event.target.value)}
        onKeyDown={(event) => {
          if (event.key === "Enter") void record();
        }}
      />
      <Button busy={busy} busyLabel="Recording" disabled={!parsed?.ok} onClick={() => void record()}>Use it</Button>
    </div>
  );
}
