"use client";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { apiGet, failureText, useApi } from "@/components/ui/fetcher";
import { hashText, timeText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { Notice, useToast } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import { Table, type Column } from "@/components/ui/table";
import type { AuditPage, AuditRow } from "@/lib/rules/api-types";

const COLUMNS: readonly Column<AuditRow>[] = [
  { key: "seq", head: "No.", figure: true, cell: (row) => row.seq },
  { key: "at", head: "When", cell: (row) => <span className="whitespace-nowrap">{timeText(row.at)}</span> },
  { key: "actor", head: "Who", cell: (row) => row.actor },
  { key: "text", head: "What", cell: (row) => row.text },
  {
    key: "hash",
    head: "Link",
    cell: (row) => (
      <span className="figure text-sm text-soft" title={row.hash}>
        {hashText(row.hash)}
      </span>
    ),
  },
];

/** Every change in the shop, newest first, each linked by hash to the one before, with the verdict on the whole chain. */
export function AuditView() {
  const audit = useApi<AuditPage>("/api/shop/audit");
  return (
    <Section title="Log">
      <Loaded api={audit} label="Loading the log" lines={8}>
        {(page) => (
          <>
            <ChainVerdict page={page} />
            {page.rows.length === 0 ? (
              <EmptyState title="Nothing logged yet">Every change shows here from now on.</EmptyState>
            ) : (
              <Rows key={page.head.hash} first={page} />
            )}
          </>
        )}
      </Loaded>
    </Section>
  );
}

/** Whether the chain is whole, in words and shape. */
export function ChainVerdict({ page }: { readonly page: Pick<AuditPage, "head" | "broken"> }) {
  if (page.broken) {
    return (
      <Notice tone="trouble" word="Chain broken" className="mb-4">
        {page.broken}
      </Notice>
    );
  }
  return (
    <Notice tone="done" word="Chain whole" className="mb-4">
      All {page.head.seq} entries link up. Head <span className="figure break-all">{page.head.hash}</span>
    </Notice>
  );
}

function Rows({ first }: { readonly first: AuditPage }) {
  const say = useToast();
  const [older, setOlder] = useState<readonly AuditRow[]>([]);
  const [next, setNext] = useState(first.nextBefore);
  const [busy, setBusy] = useState(false);
  const more = async () => {
    setBusy(true);
    try {
      const page = await apiGet<AuditPage>(`/api/shop/audit?before=${next}`);
      setOlder((now) => [...now, ...page.rows]);
      setNext(page.nextBefore);
    } catch (failure) {
      say(failureText(failure), "trouble");
    } finally {
      setBusy(false);
    }
  };
  return (
    <>
      <Table
        caption="Log"
        columns={COLUMNS}
        rows={[...first.rows, ...older]}
        rowKey={(row) => String(row.seq)}
      />
      {next === null ? null : (
        <Button className="mt-4" busy={busy} busyLabel="Loading" onClick={() => void more()}>
          Older entries
        </Button>
      )}
    </>
  );
}
