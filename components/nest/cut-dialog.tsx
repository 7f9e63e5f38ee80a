"use client";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { apiSend, failureText, refreshApi } from "@/components/ui/fetcher";
import { Check, TextField } from "@/components/ui/field";
import { Notice, useToast } from "@/components/ui/notice";
import type { NestDetail } from "@/lib/rules/nest-plans";
import type { PlanGroup } from "@/lib/rules/nest-table";
import { barWord } from "./plan-group";

interface CutDialogProps {
  readonly nest: NestDetail;
  readonly groups: readonly PlanGroup[];
  readonly open: boolean;
  readonly onClose: () => void;
}

/** Locks the plan: heats are read off the lengths whose heat is not known, so that their rests keep it. */
export function CutDialog({ nest, groups, open, onClose }: CutDialogProps) {
  return (
    <Dialog open={open} onClose={onClose} title="Cutting begins">
      <CutForm nest={nest} groups={groups} onClose={onClose} />
    </Dialog>
  );
}

function CutForm({ nest, groups, onClose }: Omit<CutDialogProps, "open">) {
  const say = useToast();
  const [heats, setHeats] = useState<Readonly<Record<string, string>>>({});
  const [verified, setVerified] = useState(false);
  const [busy, setBusy] = useState(false);
  const [trouble, setTrouble] = useState<string | null>(null);
  const unknown = groups.flatMap((plan) => plan.bars.filter((bar) => bar.heat === "").map((bar) => ({ bar, units: plan.group.units })));
  const lock = async () => {
    setBusy(true);
    setTrouble(null);
    try {
      await apiSend("POST", `/api/nests/${nest.id}/cut`, { heats, verified });
      await refreshApi("/api/nests", "/api/shop", "/api/jobs");
      say("The plan is locked. Its stock is off the rack.");
      onClose();
    } catch (failure) {
      setTrouble(failureText(failure));
    } finally {
      setBusy(false);
    }
  };
  return (
    <form
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        void lock();
      }}
    >
      {trouble ? (
        <Notice tone="trouble" className="mb-4">
          {trouble}
        </Notice>
      ) : null}
      <p className="mb-4">Locking takes the plan&apos;s lengths and offcuts off the rack and puts its rests back. It cannot be undone.</p>
      {unknown.length > 0 ? <p className="mb-3">The heat of these lengths is not known. Read it off the pipe:</p> : null}
      <div className="mb-4 space-y-3">
        {unknown.map(({ bar, units }) => (
          <TextField
            key={bar.key}
            label={`${bar.number}: ${barWord(bar, units)}`}
            figure
            maxLength={60}
            value={heats[bar.key] ?? ""}
            onChange={(event) => setHeats({ ...heats, [bar.key]: event.target.value })}
          />
        ))}
      </div>
      <Check label="The lengths are in hand and their heat numbers are checked." checked={verified} onChange={(event) => setVerified(event.target.checked)} />
      <div className="mt-5 flex flex-wrap justify-end gap-3">
        <Button onClick={onClose}>Not yet</Button>
        <Button type="submit" tone="primary" busy={busy} busyLabel="Locking" disabled={!verified}>
          Lock the plan
        </Button>
      </div>
    </form>
  );
}
