"use client";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { useApi } from "@/components/ui/fetcher";
import { Select } from "@/components/ui/field";
import { dayText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { StateWord } from "@/components/ui/state-word";
import { TitleStrip } from "@/components/ui/title-strip";
import { usePageTitle } from "@/components/ui/use-page-title";
import type { CompareChoice, CompareDetail } from "@/lib/rules/compare-types";
import { ComparedPair } from "./compared-pair";

export interface ComparePageProps {
  readonly spoolId: string;
  /** As the address says; null = as the server proposes. */
  readonly from: string | null;
  readonly to: string | null;
}

/** Two revisions of a spool, or one and the sheet as it would be now: overlaid, side by side, and as a list. */
export function ComparePage({ spoolId, from, to }: ComparePageProps) {
  const [pair, setPair] = useState({ from, to });
  const query = queryOf(pair.from, pair.to);
  const detail = useApi<CompareDetail>(`/api/spools/${spoolId}/compare?as=data${query}`, { keepPreviousData: true, revalidateOnFocus: false });
  const choose = (next: { readonly from: string; readonly to: string }): void => {
    setPair(next);
    window.history.replaceState(null, "", `/spools/${spoolId}/compare?${queryOf(next.from, next.to).slice(1)}`);
  };
  return (
    <Loaded api={detail} page label="Loading the comparison" lines={10}>
      {(data) => <Compare detail={data} onChoose={choose} />}
    </Loaded>
  );
}

function queryOf(from: string | null, to: string | null): string {
  return `${from === null ? "" : `&from=${encodeURIComponent(from)}`}${to === null ? "" : `&to=${encodeURIComponent(to)}`}`;
}

interface CompareProps {
  readonly detail: CompareDetail;
  readonly onChoose: (pair: { readonly from: string; readonly to: string }) => void;
}

function Compare({ detail, onChoose }: CompareProps) {
  const { spool, line, job, choices, pair } = detail;
  usePageTitle(`Compare revisions of ${line.number} spool ${spool.letter}`);
  const chosen = (id: string | undefined): CompareChoice | undefined => choices.find((choice) => choice.id === id);
  const [from, to] = [chosen(pair?.from), chosen(pair?.to)];
  return (
    <>
      <TitleStrip
        kind="Compare"
        title={
          <>
            <span className="figure">{line.number}</span> spool {spool.letter}
          </>
        }
        trail={[
          { href: "/jobs", label: "Jobs" },
          { href: `/jobs/${job.id}`, label: job.number },
          { href: `/spools/${spool.id}`, label: `${line.number} spool ${spool.letter}` },
        ]}
        actions={
          pair ? (
            <a
              className="inline-flex min-h-11 items-center border border-ink bg-sheet px-4 font-medium hover:border-dye hover:bg-dye-tint"
              href={`/api/spools/${spool.id}/compare?as=pdf${queryOf(pair.from, pair.to)}`}
              target="_blank"
              rel="noreferrer"
            >
              Print the comparison (PDF)
            </a>
          ) : null
        }
        cells={[
          { label: "Sheet", value: spool.sheetNumber || "not numbered yet", figure: spool.sheetNumber !== "" },
          ...(from ? [{ label: "From", value: <SideWords choice={from} /> }] : []),
          ...(to ? [{ label: "To", value: <SideWords choice={to} /> }] : []),
        ]}
      />
      {pair && from && to ? (
        <>
          <Choosers choices={choices} from={pair.from} to={pair.to} onChoose={onChoose} />
          <ComparedPair key={`${pair.from} ${pair.to}`} before={pair.before} after={pair.after} />
        </>
      ) : (
        <EmptyState title="Nothing to compare yet">A comparison needs two revisions of the spool, or one and a draft. This spool has {choices.length === 1 ? "one of them" : "none"}.</EmptyState>
      )}
    </>
  );
}

function SideWords({ choice }: { readonly choice: CompareChoice }) {
  return (
    <span className="inline-flex flex-wrap items-center gap-x-3">
      {choice.id === "draft" ? "As it would be now" : <span className="figure">Rev {choice.code}</span>}
      <StateWord state={choice.state} hold={choice.hold} />
    </span>
  );
}

interface ChoosersProps extends CompareProps {
  readonly from: string;
  readonly to: string;
}

function Choosers({ choices, from, to, onChoose }: Omit<ChoosersProps, "detail"> & { readonly choices: readonly CompareChoice[] }) {
  const options = choices.map(({ id, code, description, at }) => ({ value: id, label: id === "draft" ? "Draft, as it would be now" : `Rev ${code}, ${dayText(at)}: ${description}` }));
  const other = (id: string): string => choices.find((choice) => choice.id !== id)?.id ?? id;
  return (
    <div className="mb-5 grid items-end gap-3 sm:grid-cols-[minmax(0,1fr)_auto_minmax(0,1fr)]" data-screen-only>
      <Select label="From" options={options} value={from} onChange={({ target: { value } }) => onChoose({ from: value, to: value === to ? (from === value ? other(value) : from) : to })} />
      <Button onClick={() => onChoose({ from: to, to: from })}>Swap</Button>
      <Select label="To" options={options} value={to} onChange={({ target: { value } }) => onChoose({ from: value === from ? (to === value ? other(value) : to) : from, to: value })} />
    </div>
  );
}
