"use client";
import Link from "next/link";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { apiSend, failureText, refreshApi, useApi } from "@/components/ui/fetcher";
import { countText, timeText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { Notice, useToast } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import { StateWord } from "@/components/ui/state-word";
import { Table, type Column } from "@/components/ui/table";
import type { Role } from "@/lib/rules/api-types";
import { copyWords, type CopyRow } from "@/lib/rules/copies";

/** Who printed or downloaded which revision of the spool, and what has to come off the bench. */
export function CopiesOut({ spoolId, role }: { readonly spoolId: string; readonly role: Role }) {
  const path = `/api/spools/${spoolId}/copies`;
  const copies = useApi<readonly CopyRow[]>(path);
  return (
    <Section title="Copies out" id="copies-out">
      <Loaded api={copies} label="Loading copies">
        {(rows) => (rows.length === 0 ? <NoCopies /> : <Copies rows={rows} role={role} paths={[path, "/api/copies"]} list={`/spools/${spoolId}/withdrawals`} />)}
      </Loaded>
    </Section>
  );
}

function NoCopies() {
  return <p className="text-soft">Nobody printed or downloaded a sheet of this spool yet.</p>;
}

/** Prints and downloads of a job's dead or held sheets, until each is marked; nothing when there are none. */
export function JobWithdrawals({ jobId, role }: { readonly jobId: string; readonly role: Role }) {
  const path = `/api/jobs/${jobId}/copies`;
  const { data: rows } = useApi<readonly CopyRow[]>(path);
  if (!rows || rows.length === 0) return null;
  return (
    <Section title="Copies to withdraw">
      <Copies rows={rows} role={role} paths={[path, "/api/copies"]} list={`/jobs/${jobId}/withdrawals`} named />
    </Section>
  );
}

interface CopiesProps {
  readonly rows: readonly CopyRow[];
  readonly role: Role;
  /** What to read again after a change. */
  readonly paths: readonly string[];
  /** Page with those to withdraw, to be printed. */
  readonly list: string;
  /** Whether each row says which spool it is of. */
  readonly named?: boolean;
}

function Copies({ rows, role, paths, list, named = false }: CopiesProps) {
  const { busy, withdraw } = useWithdraw(paths);
  const mayMark = (row: CopyRow) => row.withdrawn === null && (role !== "fitter" || row.mine);
  const due = rows.filter((row) => row.withdraw);
  const dueMine = due.filter(mayMark);
  const columns: Column<CopyRow>[] = [
    ...(named ? [spoolColumn] : []),
    { key: "by", head: "Who", cell: (row) => row.by },
    { key: "at", head: "When", cell: (row) => timeText(row.at) },
    { key: "what", head: "What", cell: (row) => `${copyWords(row.marked)}${row.kind === "review" ? ", for review" : ""}` },
    { key: "code", head: "Rev", cell: (row) => row.code, figure: true },
    { key: "state", head: "Revision is", cell: (row) => <StateWord state={row.state} hold={row.hold} /> },
    {
      key: "withdrawn",
      head: "Withdrawn",
      cell: (row) => <Withdrawal row={row} mayMark={mayMark(row)} busy={busy} onMark={() => withdraw([row.id])} />,
    },
  ];
  return (
    <>
      {due.length > 0 ? (
        <Notice tone="caution" word="Withdraw" className="mb-4">
          {countText(due.length, "copy", "copies")} of a sheet that is not to be worked from {due.length === 1 ? "is" : "are"} still
          out. Take each off the bench or delete it, then mark it.{" "}
          <Link className="inked" href={list}>
            A list to print, by who holds them
          </Link>
          {dueMine.length > 1 ? (
            <Button className="mt-3 block" busy={busy} onClick={() => withdraw(dueMine.map((row) => row.id))}>
              Mark all {dueMine.length} withdrawn
            </Button>
          ) : null}
        </Notice>
      ) : null}
      <Table caption="Copies out" columns={columns} rows={rows} rowKey={(row) => row.id} />
    </>
  );
}

const spoolColumn: Column<CopyRow> = {
  key: "spool",
  head: "Spool",
  cell: (row) => (
    <Link className="inked" href={`/spools/${row.spoolId}`}>
      <span className="figure">{row.line}</span> spool {row.spool}
    </Link>
  ),
};

interface WithdrawalProps {
  readonly row: CopyRow;
  readonly mayMark: boolean;
  readonly busy: boolean;
  readonly onMark: () => void;
}

function Withdrawal({ row, mayMark, busy, onMark }: WithdrawalProps) {
  if (row.withdrawn) {
    return (
      <span>
        {row.withdrawn.by}, {timeText(row.withdrawn.at)}
      </span>
    );
  }
  return (
    <span className="flex flex-wrap items-center gap-3">
      {row.withdraw ? <strong className="text-alert">To withdraw</strong> : <span>Out</span>}
      {mayMark ? (
        <Button tone="quiet" busy={busy} onClick={onMark} aria-label={`Mark the copy of ${row.by} from ${timeText(row.at)} as withdrawn`}>
          Mark withdrawn
        </Button>
      ) : null}
    </span>
  );
}

function useWithdraw(paths: readonly string[]) {
  const say = useToast();
  const [busy, setBusy] = useState(false);
  const run = async (copyIds: readonly string[]) => {
    setBusy(true);
    try {
      await apiSend("POST", "/api/copies/withdraw", { copyIds });
      say(copyIds.length === 1 ? "Copy marked as withdrawn." : `${copyIds.length} copies marked as withdrawn.`);
    } catch (failure) {
      say(failureText(failure), "trouble");
    } finally {
      await refreshApi(...paths);
      setBusy(false);
    }
  };
  return { busy, withdraw: (copyIds: readonly string[]) => void run(copyIds) };
}
