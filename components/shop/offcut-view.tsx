"use client";
import { useState } from "react";
import { formatLength, parseLength } from "@/iso";
import { NPS_OPTIONS } from "@/components/jobs/settings-text";
import { Button } from "@/components/ui/button";
import { apiSend, failureText, refreshApi, useApi } from "@/components/ui/fetcher";
import { Select, TextField } from "@/components/ui/field";
import { dayText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { Notice, useToast } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import { Table, type Column } from "@/components/ui/table";
import type { ShopSettings } from "@/lib/rules/api-types";
import type { OffcutRow } from "@/lib/rules/nest-plans";

const PATH = "/api/shop/offcuts";

/** Offcuts on the rack: what cutting plans returned, and what the owner entered. */
export function OffcutView({ shop, owner }: { readonly shop: ShopSettings; readonly owner: boolean }) {
  const offcuts = useApi<OffcutRow[]>(PATH);
  const say = useToast();
  const { units } = shop.defaults;
  const remove = async (row: OffcutRow) => {
    await apiSend("DELETE", `${PATH}/${row.id}`).then(() => say("Taken off the rack."), (failure: unknown) => say(failureText(failure), "trouble"));
    await refreshApi(PATH);
  };
  const columns: Column<OffcutRow>[] = [
    { key: "size", head: "Size", figure: true, cell: (row) => row.nps },
    { key: "schedule", head: "Schedule", cell: (row) => row.schedule },
    { key: "material", head: "Material", cell: (row) => row.material },
    { key: "length", head: "Length", figure: true, cell: (row) => formatLength(row.lengthMm, units) },
    { key: "heat", head: "Heat", figure: true, cell: (row) => row.heat || "not known" },
    { key: "added", head: "Put there", cell: (row) => `${dayText(row.addedAt)}, ${row.addedBy}` },
  ];
  if (owner) columns.push({ key: "do", head: "", cell: (row) => <Button tone="quiet" onClick={() => void remove(row)}>Take off the rack</Button> });
  return (
    <Section title="Offcuts on the rack">
      <Loaded api={offcuts} label="Loading offcuts">
        {(rows) => (rows.length === 0 ? <p className="text-soft">No offcut is on the rack.</p> : <Table caption="Offcuts on the rack" columns={columns} rows={rows} rowKey={(row) => row.id} />)}
      </Loaded>
      {owner ? <OffcutForm shop={shop} /> : null}
    </Section>
  );
}

function OffcutForm({ shop }: { readonly shop: ShopSettings }) {
  const { pipe, units } = shop.defaults;
  const say = useToast();
  const [typed, setTyped] = useState({ nps: pipe.nps as string, schedule: pipe.schedule, material: pipe.material, length: "", heat: "" });
  const [trouble, setTrouble] = useState<string | null>(null);
  const field = (name: keyof typeof typed) => ({ value: typed[name], onChange: (event: { target: { value: string } }) => setTyped({ ...typed, [name]: event.target.value }) });
  const add = async () => {
    const length = parseLength(typed.length, units);
    if (!length.ok) return setTrouble(length.message);
    setTrouble(null);
    try {
      const { nps, schedule, material, heat } = typed;
      await apiSend("POST", PATH, { nps, schedule, material, heat, lengthMm: length.mm });
      await refreshApi(PATH);
      setTyped({ ...typed, length: "", heat: "" });
      say("On the rack.");
    } catch (failure) {
      setTrouble(failureText(failure));
    }
  };
  return (
    <form
      noValidate
      className="mt-4"
      onSubmit={(event) => {
        event.preventDefault();
        void add();
      }}
    >
      {trouble ? (
        <Notice tone="trouble" className="mb-3">
          {trouble}
        </Notice>
      ) : null}
      <div className="grid grid-cols-2 items-end gap-3 lg:grid-cols-[8rem_8rem_1fr_10rem_10rem_auto]">
        <Select label="Size" options={NPS_OPTIONS} {...field("nps")} />
        <TextField label="Schedule" figure {...field("schedule")} />
        <TextField label="Material" className="col-span-2 lg:col-span-1" {...field("material")} />
        <TextField label="Length" figure {...field("length")} />
        <TextField label="Heat" figure maxLength={60} {...field("heat")} />
        <Button type="submit">Put on the rack</Button>
      </div>
    </form>
  );
}
