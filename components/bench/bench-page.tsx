"use client";
import { useState } from "react";
import { useViewer } from "@/components/shell/use-viewer";
import { OwnWithdrawals } from "@/components/spool/own-withdrawals";
import { useList } from "@/components/jobs/use-list";
import { ChoiceRow } from "@/components/ui/choice-row";
import { EmptyState } from "@/components/ui/empty-state";
import { useApi } from "@/components/ui/fetcher";
import { Loaded } from "@/components/ui/loaded";
import { SearchField } from "@/components/ui/search-field";
import { TitleStrip } from "@/components/ui/title-strip";
import type { BenchRow, Role } from "@/lib/rules/api-types";
import { BenchCard } from "./bench-card";

type Filter = "to-do" | "built" | "held" | "all";

const isBuilt = (row: BenchRow) =>
  row.state === "as-built" || (row.cut >= row.pieces && row.welded >= row.welds);
const FILTERS: Readonly<Record<Filter, (row: BenchRow) => boolean>> = {
  "to-do": (row) => !row.hold && !isBuilt(row),
  held: (row) => row.hold,
  built: isBuilt,
  all: () => true,
};

const KEYS: Readonly<Record<string, (row: BenchRow) => string>> = { issuedAt: (row) => row.issuedAt };
const textOf = (row: BenchRow) => `${row.sheetNumber} ${row.line} ${row.letter} ${row.job} ${row.code}`;

/** Issued sheets, newest first: phone first, made for gloves. */
export function BenchPage() {
  const bench = useApi<readonly BenchRow[]>("/api/bench", { refreshInterval: 60_000 });
  const viewer = useViewer();
  return (
    <>
      <TitleStrip title="Bench" kind="Issued sheets" />
      <OwnWithdrawals />
      <Loaded api={bench} label="Loading issued sheets" lines={8}>
        {(rows) =>
          rows.length === 0 ? (
            <EmptyState title="No sheet is issued yet">
              A sheet comes here when an inspector signs it FOR FABRICATION.
            </EmptyState>
          ) : (
            <Bench rows={rows} role={viewer.data?.role ?? "fitter"} />
          )
        }
      </Loaded>
    </>
  );
}

function Bench({ rows, role }: { readonly rows: readonly BenchRow[]; readonly role: Role }) {
  const [filter, setFilter] = useState<Filter>("to-do");
  const list = useList({
    rows,
    textOf,
    keys: KEYS,
    start: { key: "issuedAt", descending: true },
    keep: FILTERS[filter],
  });
  const choice = (value: Filter, word: string) => ({
    value,
    label: `${word} (${rows.filter(FILTERS[value]).length})`,
  });
  return (
    <>
      <div className="mb-4 flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
        <ChoiceRow
          label="Which sheets"
          value={filter}
          onChange={setFilter}
          choices={[
            choice("to-do", "To do"),
            choice("held", "On hold"),
            choice("built", "Done"),
            choice("all", "All"),
          ]}
        />
        <SearchField label="Search sheet, line, job" value={list.search} onChange={list.setSearch} />
      </div>
      {list.shown.length === 0 ? (
        <EmptyState title="No sheet matches">Change the search or choose All.</EmptyState>
      ) : (
        <ul className="grid items-start gap-5 lg:grid-cols-2">
          {list.shown.map((row) => (
            <BenchCard key={row.revisionId} row={row} role={role} />
          ))}
        </ul>
      )}
    </>
  );
}
