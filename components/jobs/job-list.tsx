"use client";
import Link from "next/link";
import { useState } from "react";
import { useViewer } from "@/components/shell/use-viewer";
import { Button } from "@/components/ui/button";
import { ChoiceRow } from "@/components/ui/choice-row";
import { OwnWithdrawals } from "@/components/spool/own-withdrawals";
import { EmptyState } from "@/components/ui/empty-state";
import { useApi } from "@/components/ui/fetcher";
import { countText, dayText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { SearchField } from "@/components/ui/search-field";
import { Table, type Column } from "@/components/ui/table";
import { TitleStrip } from "@/components/ui/title-strip";
import type { JobRow } from "@/lib/rules/api-types";
import { canDo } from "@/lib/rules/permissions";
import { NewJobDialog } from "./new-job-dialog";
import { useList } from "./use-list";

type Filter = "open" | "for-review" | "held" | "closed" | "all";

const FILTERS: Readonly<Record<Filter, (job: JobRow) => boolean>> = {
  open: (job) => job.open,
  "for-review": (job) => job.forReview > 0,
  held: (job) => job.held > 0,
  closed: (job) => !job.open,
  all: () => true,
};

const KEYS: Readonly<Record<string, (job: JobRow) => string | number>> = {
  number: (job) => job.number,
  client: (job) => job.client,
  lines: (job) => job.lines,
  spools: (job) => job.spools,
  forReview: (job) => job.forReview,
  forFabrication: (job) => job.forFabrication,
  updatedAt: (job) => job.updatedAt,
};

const textOf = (job: JobRow) => `${job.number} ${job.title} ${job.client}`;

const COLUMNS: readonly Column<JobRow>[] = [
  {
    key: "number",
    head: "Job",
    sortable: true,
    cell: (job) => (
      <Link
        href={`/jobs/${job.id}`}
        className="inked inline-flex min-h-8 flex-wrap items-baseline gap-x-2 font-medium"
      >
        <span className="figure">{job.number}</span> {job.title}
      </Link>
    ),
  },
  {
    key: "client",
    head: "Client",
    sortable: true,
    cell: (job) => job.client || <span className="text-soft">none</span>,
  },
  { key: "lines", head: "Lines", figure: true, sortable: true, cell: (job) => job.lines },
  { key: "spools", head: "Spools", figure: true, sortable: true, cell: (job) => job.spools },
  { key: "forReview", head: "For review", figure: true, sortable: true, cell: (job) => job.forReview },
  {
    key: "forFabrication",
    head: "For fabrication",
    figure: true,
    sortable: true,
    cell: (job) => job.forFabrication,
  },
  {
    key: "held",
    head: "On hold",
    figure: true,
    cell: (job) => (job.held > 0 ? <strong className="text-alert">{job.held} HOLD</strong> : 0),
  },
  {
    key: "updatedAt",
    head: "Changed",
    sortable: true,
    cell: (job) => <span className="whitespace-nowrap">{dayText(job.updatedAt)}</span>,
  },
];

/** Every job of the shop. */
export function JobList() {
  const jobs = useApi<readonly JobRow[]>("/api/jobs");
  const viewer = useViewer();
  const [adding, setAdding] = useState(false);
  const mayAdd = viewer.data ? canDo(viewer.data.role, "lines.change") : false;
  const add = (
    <Button tone="primary" onClick={() => setAdding(true)}>
      New job
    </Button>
  );
  return (
    <>
      <TitleStrip title="Jobs" actions={mayAdd ? add : null} />
      <OwnWithdrawals />
      <Loaded api={jobs} label="Loading jobs">
        {(rows) =>
          rows.length === 0 ? (
            <EmptyState title="No job yet" action={mayAdd ? add : null}>
              {mayAdd
                ? "A job holds lines; a line is described point by point and gives its spool sheets. Start with the job."
                : "Jobs show here once a detailer opens one."}
            </EmptyState>
          ) : (
            <Jobs rows={rows} />
          )
        }
      </Loaded>
      <NewJobDialog open={adding} onClose={() => setAdding(false)} />
    </>
  );
}

function Jobs({ rows }: { readonly rows: readonly JobRow[] }) {
  const [filter, setFilter] = useState<Filter>("open");
  const list = useList({
    rows,
    textOf,
    keys: KEYS,
    start: { key: "updatedAt", descending: true },
    keep: FILTERS[filter],
  });
  const choice = (value: Filter, word: string) => ({
    value,
    label: `${word} (${rows.filter(FILTERS[value]).length})`,
  });
  return (
    <>
      <div className="mb-3 flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
        <ChoiceRow
          label="Which jobs"
          value={filter}
          onChange={setFilter}
          choices={[
            choice("open", "Open"),
            choice("for-review", "With reviews"),
            choice("held", "With holds"),
            choice("closed", "Closed"),
            choice("all", "All"),
          ]}
        />
        <SearchField label="Search number, title, client" value={list.search} onChange={list.setSearch} />
      </div>
      {list.shown.length === 0 ? (
        <EmptyState title="No job matches">Change the search or choose All.</EmptyState>
      ) : (
        <Table
          caption="Jobs"
          columns={COLUMNS}
          rows={list.shown}
          rowKey={(job) => job.id}
          sort={list.sort}
          onSort={list.sortBy}
        />
      )}
      <p className="mt-3 text-sm text-soft" role="status">
        {countText(list.shown.length, "job")} shown of {rows.length}
      </p>
    </>
  );
}
