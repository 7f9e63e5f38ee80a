"use client";
import { useMemo, useState } from "react";
import type { TakeOutWord, UnitSystem } from "@/iso";
import { Button } from "@/components/ui/button";
import { ChoiceRow } from "@/components/ui/choice-row";
import { EmptyState } from "@/components/ui/empty-state";
import { useApi } from "@/components/ui/fetcher";
import { countText, dayText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { SearchField } from "@/components/ui/search-field";
import { Section } from "@/components/ui/section";
import { Table, type Column } from "@/components/ui/table";
import type { ShopSettings } from "@/lib/rules/api-types";
import { TakeOutDialog } from "./take-out-dialog";
import { takeOutRows, type TakeOutRow } from "./take-out-rows";

type Filter = "open" | "ours" | "missing" | "weights" | "all";
const MOST_SHOWN = 60;

/** Catalogue take-outs: those from memory wait for the shop's word; any may be replaced by what the shop measured. */
export function TakeOutView({ owner }: { readonly owner: boolean }) {
  const shop = useApi<ShopSettings>("/api/shop");
  return (
    <Section title="Take-outs">
      <p className="mb-4 max-w-prose text-soft">
        Take-outs are nominal: measure the fitting in hand. One from memory is marked unverified on every cut
        list until the owner confirms it or enters what the shop measured. What no table has, and the weights of
        valves and forged fittings, are the shop&apos;s to enter.
      </p>
      <Loaded api={shop} label="Loading take-outs">
        {(data) => <TakeOuts words={data.takeOuts} units={data.defaults.units} owner={owner} />}
      </Loaded>
    </Section>
  );
}

const FILTERS: Readonly<Record<Filter, (row: TakeOutRow) => boolean>> = {
  open: (row) => row.fromMemory && row.word === null,
  ours: (row) => row.word !== null,
  missing: (row) => row.kind === "missing",
  weights: (row) => row.kind === "weight",
  all: (row) => row.kind === "table",
};

function TakeOuts({
  words,
  units,
  owner,
}: {
  readonly words: readonly TakeOutWord[];
  readonly units: UnitSystem;
  readonly owner: boolean;
}) {
  const rows = useMemo(() => takeOutRows(words, units), [words, units]);
  const [filter, setFilter] = useState<Filter>("open");
  const [search, setSearch] = useState("");
  const [editing, setEditing] = useState<TakeOutRow | null>(null);
  const parts = search.toLowerCase().split(/\s+/).filter(Boolean);
  const found = rows.filter(
    (row) => FILTERS[filter](row) && parts.every((part) => row.words.toLowerCase().includes(part)),
  );
  const choice = (value: Filter, word: string) => ({
    value,
    label: `${word} (${rows.filter(FILTERS[value]).length})`,
  });
  return (
    <>
      <div className="mb-3 flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
        <ChoiceRow
          label="Which take-outs"
          value={filter}
          onChange={setFilter}
          choices={[choice("open", "To confirm"), choice("ours", "With our word"), choice("missing", "In no table"), choice("weights", "Weights"), choice("all", "All tables")]}
        />
        <SearchField label="Search fitting, size" value={search} onChange={setSearch} />
      </div>
      {found.length === 0 ? (
        <EmptyState title="None here">Change the search, or choose All tables.</EmptyState>
      ) : (
        <Table
          caption="Take-outs"
          columns={columnsFor(units, owner, setEditing)}
          rows={found.slice(0, MOST_SHOWN)}
          rowKey={(row) => row.key}
        />
      )}
      <p role="status" className="mt-3 text-sm text-soft">
        {found.length > MOST_SHOWN
          ? `The first ${MOST_SHOWN} of ${found.length} are shown; search to narrow.`
          : countText(found.length, "take-out")}
      </p>
      <TakeOutDialog row={editing} units={units} onClose={() => setEditing(null)} />
    </>
  );
}

function columnsFor(
  units: UnitSystem,
  owner: boolean,
  onEdit: (row: TakeOutRow) => void,
): readonly Column<TakeOutRow>[] {
  const columns: Column<TakeOutRow>[] = [
    {
      key: "words",
      head: "Fitting",
      cell: (row) => <span className="inline-block first-letter:uppercase">{row.words}</span>,
    },
    {
      key: "value",
      head: units === "metric" ? "Take-out, mm" : "Take-out, in",
      figure: true,
      cell: (row) => row.value,
    },
    { key: "source", head: "Source", cell: (row) => <span className="text-sm">{row.standard}</span> },
    {
      key: "word",
      head: "Our word",
      cell: (row) =>
        row.word ? (
          <span className="text-sm">
            {row.word.valueMm === null ? "Confirmed" : row.kind === "weight" ? "Weighed" : "Measured"} by {row.word.by}, {dayText(row.word.at)}
          </span>
        ) : row.fromMemory ? (
          <strong className="text-caution">Unverified</strong>
        ) : row.kind === "missing" ? (
          <strong className="text-caution">Missing</strong>
        ) : (
          <span className="text-soft">{row.kind === "weight" ? "not known" : "none needed"}</span>
        ),
    },
  ];
  if (owner) {
    columns.push({
      key: "edit",
      head: "",
      cell: (row) => (
        <Button onClick={() => onEdit(row)} aria-label={`${editWord(row)} ${row.words}`}>
          {editWord(row)}
        </Button>
      ),
    });
  }
  return columns;
}

function editWord(row: TakeOutRow): string {
  if (row.word !== null) return "Change";
  return row.kind !== "table" ? "Enter" : row.fromMemory ? "Confirm" : "Change";
}
