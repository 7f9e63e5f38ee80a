"use client";
import Link from "next/link";
import { useState, type ReactNode } from "react";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { countText, dayText } from "@/components/ui/format";
import { SearchField } from "@/components/ui/search-field";
import { StateWord } from "@/components/ui/state-word";
import { Table, type Column } from "@/components/ui/table";
import type { JobDetail, LineRow, Role, SpoolRow } from "@/lib/rules/api-types";
import { canDo } from "@/lib/rules/permissions";
import { LineDialog } from "./line-dialog";
import { StateFilter, keepByState, type StateChoice } from "./state-filter";
import { useList } from "./use-list";

const KEYS: Readonly<Record<string, (line: LineRow) => string | number>> = {
  number: (line) => line.number,
  size: (line) => line.size,
  points: (line) => line.points,
  updatedAt: (line) => line.updatedAt,
};
const textOf = (line: LineRow) =>
  [line.number, line.title, line.size, line.material, ...line.spools.map((s) => s.sheetNumber ?? "")].join(
    " ",
  );

type Adding = { readonly copyOf: LineRow | null } | null;

/** The lines of a job. */
export function LineList({ job, role }: { readonly job: JobDetail; readonly role: Role }) {
  const [adding, setAdding] = useState<Adding>(null);
  const mayChange = canDo(role, "lines.change");
  const add = (
    <Button tone="primary" onClick={() => setAdding({ copyOf: null })}>
      New line
    </Button>
  );
  return (
    <>
      {job.lines.length === 0 ? (
        <EmptyState title="No line yet" action={mayChange ? add : null}>
          {mayChange
            ? "A line is one run of pipe with its branches. Give it its number, then type its points."
            : "Lines show here once a detailer describes one."}
        </EmptyState>
      ) : (
        <Lines
          job={job}
          role={role}
          add={mayChange ? add : null}
          onCopy={(line) => setAdding({ copyOf: line })}
        />
      )}
      <LineDialog jobId={job.id} adding={adding} onClose={() => setAdding(null)} />
    </>
  );
}

interface LinesProps {
  readonly job: JobDetail;
  readonly role: Role;
  readonly add: ReactNode;
  readonly onCopy: (line: LineRow) => void;
}

function Lines({ job, role, add, onCopy }: LinesProps) {
  const [state, setState] = useState<StateChoice>("all");
  const list = useList({
    rows: job.lines,
    textOf,
    keys: KEYS,
    start: { key: "number", descending: false },
    keep: (line) => keepByState(line, state),
  });
  return (
    <>
      <div className="mb-3 flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
        <div className="flex w-full flex-wrap items-end gap-3 sm:w-auto">
          <SearchField
            label="Search line, size, sheet number"
            value={list.search}
            onChange={list.setSearch}
          />
          <StateFilter lines={job.lines} value={state} onChange={setState} />
        </div>
        {add}
      </div>
      {list.shown.length === 0 ? (
        <EmptyState title="No line matches">Change the search or choose every state.</EmptyState>
      ) : (
        <Table
          caption="Lines"
          columns={columns(role, onCopy)}
          rows={list.shown}
          rowKey={(line) => line.id}
          sort={list.sort}
          onSort={list.sortBy}
        />
      )}
      <p className="mt-3 text-sm text-soft" role="status">
        {countText(list.shown.length, "line")} shown of {job.lines.length}
      </p>
    </>
  );
}

function columns(role: Role, onCopy: (line: LineRow) => void): readonly Column<LineRow>[] {
  const reads = canDo(role, "lines.read");
  const base: Column<LineRow>[] = [
    {
      key: "number",
      head: "Line",
      sortable: true,
      cell: (line) => <LineName line={line} link={reads} />,
    },
    {
      key: "size",
      head: "Size",
      sortable: true,
      cell: (line) => <span className="figure">{line.size}</span>,
    },
    { key: "material", head: "Material", cell: (line) => line.material },
    { key: "spools", head: "Spools", cell: (line) => <Spools spools={line.spools} /> },
  ];
  if (!reads) return base;
  base.splice(3, 0, {
    key: "points",
    head: "Points",
    figure: true,
    sortable: true,
    cell: (line) => line.points,
  });
  base.push({
    key: "updatedAt",
    head: "Changed",
    sortable: true,
    cell: (line) => (
      <span className="block">
        <span className="whitespace-nowrap">{dayText(line.updatedAt)}</span>
        <span className="block text-sm text-soft">{line.updatedBy}</span>
      </span>
    ),
  });
  if (canDo(role, "lines.change")) {
    base.push({
      key: "copy",
      head: "",
      cell: (line) => (
        <Button tone="quiet" aria-label={`Copy line ${line.number}`} onClick={() => onCopy(line)}>
          Copy
        </Button>
      ),
    });
  }
  return base;
}

function LineName({ line, link }: { readonly line: LineRow; readonly link: boolean }) {
  const name = <span className="figure font-medium">{line.number}</span>;
  return (
    <>
      {link ? (
        <Link href={`/lines/${line.id}`} className="inked inline-flex min-h-8 items-center">
          {name}
        </Link>
      ) : (
        name
      )}
      {line.title ? <span className="block text-sm text-soft">{line.title}</span> : null}
    </>
  );
}

function Spools({ spools }: { readonly spools: readonly SpoolRow[] }) {
  if (spools.length === 0) return <span className="text-soft">none yet</span>;
  return (
    <ul className="space-y-1">
      {spools.map((spool) => (
        <li key={spool.id} className="flex flex-wrap items-center gap-x-3">
          <Link
            href={`/spools/${spool.id}`}
            className="inked figure inline-flex min-h-8 items-center font-medium"
          >
            Spool {spool.letter}
            {spool.code ? ` rev ${spool.code}` : ""}
          </Link>
          <StateWord state={spool.state} hold={spool.hold} />
          {spool.sheetNumber ? <span className="figure text-sm text-soft">{spool.sheetNumber}</span> : null}
        </li>
      ))}
    </ul>
  );
}
