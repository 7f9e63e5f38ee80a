"use client";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { apiSend, failureText, useApi } from "@/components/ui/fetcher";
import { Check, Select, TextField } from "@/components/ui/field";
import { Loaded } from "@/components/ui/loaded";
import { Notice } from "@/components/ui/notice";
import type { JobDetail, LineRow, ShopSettings } from "@/lib/rules/api-types";

interface NestDialogProps {
  readonly job: JobDetail;
  readonly open: boolean;
  readonly onClose: () => void;
}

/** Which spools to plan, with which saw, from which heat. */
export function NestDialog({ job, open, onClose }: NestDialogProps) {
  const shop = useApi<ShopSettings>(open ? "/api/shop" : null);
  return (
    <Dialog open={open} onClose={onClose} title="New cutting plan" wide>
      <Loaded api={shop} label="Loading the rack">
        {(data) => <NestForm job={job} shop={data} onClose={onClose} />}
      </Loaded>
    </Dialog>
  );
}

const SEARCHES = [
  { value: "2", label: "2 seconds" },
  { value: "5", label: "5 seconds" },
  { value: "20", label: "20 seconds" },
] as const;

function NestForm({ job, shop, onClose }: { readonly job: JobDetail; readonly shop: ShopSettings; readonly onClose: () => void }) {
  const router = useRouter();
  const lines = job.lines.filter((line) => line.spools.length > 0);
  const [chosen, setChosen] = useState<ReadonlySet<string>>(new Set());
  const [saw, setSaw] = useState(shop.nesting.saws[0]?.name ?? "");
  const [heat, setHeat] = useState("");
  const [seconds, setSeconds] = useState("5");
  const [busy, setBusy] = useState(false);
  const [trouble, setTrouble] = useState<string | null>(null);
  const choose = (ids: readonly string[], on: boolean) => setChosen(new Set(on ? [...chosen, ...ids] : [...chosen].filter((id) => !ids.includes(id))));
  const all = lines.flatMap((line) => line.spools.map((spool) => spool.id));
  const send = async () => {
    setBusy(true);
    setTrouble(null);
    try {
      const { id } = await apiSend<{ id: string }>("POST", `/api/jobs/${job.id}/nests`, { spoolIds: [...chosen], saw, heat, seconds: Number(seconds) });
      router.push(`/nests/${id}`);
    } catch (failure) {
      setTrouble(failureText(failure));
      setBusy(false);
    }
  };
  return (
    <form
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        void send();
      }}
    >
      {trouble ? (
        <Notice tone="trouble" className="mb-4">
          {trouble}
        </Notice>
      ) : null}
      {shop.stock.length === 0 ? (
        <Notice tone="caution" className="mb-4">
          The rack is empty. The owner enters the lengths under Shop, Stock.
        </Notice>
      ) : null}
      <fieldset className="mb-4">
        <legend className="mb-2 font-medium">Spools</legend>
        <Check label="The whole job" checked={chosen.size === all.length && all.length > 0} onChange={(event) => choose(all, event.target.checked)} />
        <ul className="max-h-72 overflow-y-auto border-y border-hair">
          {lines.map((line) => (
            <LineChoice key={line.id} line={line} chosen={chosen} onChoose={choose} />
          ))}
        </ul>
      </fieldset>
      <div className="mb-4 grid gap-3 sm:grid-cols-3">
        <Select label="Saw" options={shop.nesting.saws.map(({ name, kerfMm }) => ({ value: name, label: `${name}, cut of ${kerfMm} mm` }))} value={saw} onChange={(event) => setSaw(event.target.value)} />
        <TextField label="Only heat" hint="Empty: any" figure maxLength={60} value={heat} onChange={(event) => setHeat(event.target.value)} />
        <Select label="Search for" options={SEARCHES} value={seconds} onChange={(event) => setSeconds(event.target.value)} />
      </div>
      <div className="flex flex-wrap justify-end gap-3">
        <Button onClick={onClose}>Close</Button>
        <Button type="submit" tone="primary" busy={busy} busyLabel="Asking" disabled={chosen.size === 0}>
          Make the plan
        </Button>
      </div>
    </form>
  );
}

function LineChoice({ line, chosen, onChoose }: { readonly line: LineRow; readonly chosen: ReadonlySet<string>; readonly onChoose: (ids: readonly string[], on: boolean) => void }) {
  const ids = line.spools.map((spool) => spool.id);
  return (
    <li className="border-b border-hair py-1 last:border-0">
      <Check label={<span>Line <span className="figure">{line.number}</span></span>} checked={ids.every((id) => chosen.has(id))} onChange={(event) => onChoose(ids, event.target.checked)} />
      {line.spools.length > 1 ? (
        <div className="ml-8 flex flex-wrap gap-x-6">
          {line.spools.map((spool) => (
            <Check key={spool.id} label={`Spool ${spool.letter}`} checked={chosen.has(spool.id)} onChange={(event) => onChoose([spool.id], event.target.checked)} />
          ))}
        </div>
      ) : null}
    </li>
  );
}
