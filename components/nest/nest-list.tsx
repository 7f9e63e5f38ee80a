"use client";
import Link from "next/link";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { useApi } from "@/components/ui/fetcher";
import { timeText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { Table, type Column } from "@/components/ui/table";
import type { JobDetail, Role } from "@/lib/rules/api-types";
import { NEST_STATE_WORDS, type NestRow } from "@/lib/rules/nest-plans";
import { canDo } from "@/lib/rules/permissions";
import { NestDialog } from "./nest-dialog";

const COLUMNS: readonly Column<NestRow>[] = [
  { key: "title", head: "Plan", cell: (nest) => <Link className="text-dye underline underline-offset-4" href={`/nests/${nest.id}`}>{nest.title}</Link> },
  { key: "state", head: "State", cell: (nest) => <strong>{NEST_STATE_WORDS[nest.state]}</strong> },
  { key: "pieces", head: "Pieces", figure: true, cell: (nest) => nest.pieces },
  { key: "asked", head: "Asked for", cell: (nest) => `${nest.askedBy}, ${timeText(nest.askedAt)}` },
];

/** The job's cutting plans, and the door to a new one. */
export function NestList({ job, role }: { readonly job: JobDetail; readonly role: Role }) {
  const nests = useApi<NestRow[]>(`/api/jobs/${job.id}/nests`);
  const [asking, setAsking] = useState(false);
  const add = canDo(role, "nests.change") ? (
    <Button tone="primary" onClick={() => setAsking(true)}>
      New cutting plan
    </Button>
  ) : null;
  return (
    <>
      <Loaded api={nests} label="Loading cutting plans">
        {(rows) =>
          rows.length === 0 ? (
            <EmptyState title="No cutting plan yet" action={add}>
              A cutting plan says which piece is cut from which length or offcut, so that the least pipe is used.
            </EmptyState>
          ) : (
            <>
              <div className="mb-3 flex justify-end">{add}</div>
              <Table caption="Cutting plans" columns={COLUMNS} rows={rows} rowKey={(nest) => nest.id} />
            </>
          )
        }
      </Loaded>
      <NestDialog job={job} open={asking} onClose={() => setAsking(false)} />
    </>
  );
}
