"use client";
import Link from "next/link";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { useApi } from "@/components/ui/fetcher";
import { countText, timeText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { StateWord } from "@/components/ui/state-word";
import { Table, type Column } from "@/components/ui/table";
import { TitleStrip } from "@/components/ui/title-strip";
import { usePageTitle } from "@/components/ui/use-page-title";
import { byHolder, copyWords, type CopyRow } from "@/lib/rules/copies";

export interface WithdrawalListProps {
  /** Where the copies are read: a job's or a spool's. */
  readonly path: string;
  /** What it is the list of: "job", "spool"; and where its page is. */
  readonly of: "job" | "spool";
  readonly back: string;
}

/** Copies to take off the bench, person by person, to be printed and ticked on a round through the shop. */
export function WithdrawalList({ path, of, back }: WithdrawalListProps) {
  const copies = useApi<readonly CopyRow[]>(path);
  const named = useApi<Named>(`/api${back}`);
  const name = named.data ? nameOf(named.data) : "";
  usePageTitle(`Copies to withdraw ${name}`.trim());
  return (
    <>
      <TitleStrip
        kind="Copies to withdraw"
        title={name || `Prints and downloads of this ${of}'s dead or held sheets`}
        trail={[{ href: "/jobs", label: "Jobs" }, { href: back, label: name || (of === "job" ? "Job" : "Spool") }]}
        actions={<Button onClick={() => window.print()}>Print the list</Button>}
      />
      <Loaded api={copies} label="Loading copies">
        {(rows) => <Holders rows={rows.filter((row) => row.withdraw)} />}
      </Loaded>
    </>
  );
}

/** What a job and a spool answer of themselves. */
type Named = { readonly number: string; readonly title: string } | { readonly letter: string; readonly line: { readonly number: string } };

const nameOf = (named: Named): string => ("letter" in named ? `${named.line.number} spool ${named.letter}` : `Job ${named.number}, ${named.title}`);

function Holders({ rows }: { readonly rows: readonly CopyRow[] }) {
  if (rows.length === 0) return <EmptyState title="Nothing to withdraw">No copy of a sheet that is not to be worked from is still out.</EmptyState>;
  return (
    <>
      <p className="mb-4">
        {countText(rows.length, "copy", "copies")} still out on {timeText(new Date().toISOString())}. Take each off the bench or delete it, tick it here, then mark it as withdrawn on the spool&apos;s page.
      </p>
      {byHolder(rows).map(({ by, copies }) => (
        <section key={by} className="mb-6 break-inside-avoid" aria-label={by}>
          <h2 className="mb-2">
            {by}, {countText(copies.length, "copy", "copies")}
          </h2>
          <Table caption={`Copies of ${by}`} columns={COLUMNS} rows={copies} rowKey={(row) => row.id} />
        </section>
      ))}
    </>
  );
}

const COLUMNS: readonly Column<CopyRow>[] = [
  { key: "sheet", head: "Sheet", cell: (row) => row.sheetNumber, figure: true },
  { key: "code", head: "Rev", cell: (row) => row.code, figure: true },
  {
    key: "spool", head: "Spool",
    cell: (row) => (
      <Link className="inked whitespace-nowrap" href={`/spools/${row.spoolId}`}>
        <span className="figure">{row.line}</span> spool {row.spool}
      </Link>
    ),
  },
  { key: "state", head: "Revision is", cell: (row) => <StateWord state={row.state} hold={row.hold} /> },
  { key: "what", head: "What", cell: (row) => copyWords(row.marked) },
  { key: "at", head: "When", cell: (row) => <span className="whitespace-nowrap">{timeText(row.at)}</span> },
  { key: "done", head: "Withdrawn, by, date", cell: () => <Blank /> },
];

/** To be ticked and signed by hand. */
function Blank() {
  return <span aria-hidden className="inline-block h-6 w-40 border-b print:w-24 border-ink before:mr-2 before:inline-block before:size-4 before:border before:border-ink before:content-['']" />;
}
