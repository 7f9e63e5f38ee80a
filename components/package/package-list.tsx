"use client";
import Link from "next/link";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { useApi } from "@/components/ui/fetcher";
import { bytesText, countText, timeText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { Table, type Column } from "@/components/ui/table";
import type { JobDetail } from "@/lib/rules/api-types";
import { isOpenPackage, PACKAGE_STATE_WORDS, type PackageRow } from "@/lib/rules/packages";
import { PackageDialog } from "./package-dialog";
import { PackageProgress } from "./package-progress";

/** Time between two looks while one is being made, ms. */
const LOOK_EVERY_MS = 1_500;

const COLUMNS: readonly Column<PackageRow>[] = [
  {
    key: "title", head: "Package", cell: (one) => (
      <Link className="text-dye underline underline-offset-4" href={`/packages/${one.id}`}>
        {one.transmittal ? `Transmittal ${one.transmittal}: ` : ""}
        {one.title}
      </Link>
    ),
  },
  { key: "state", head: "State", cell: (one) => <PackageStanding one={one} /> },
  { key: "sheets", head: "Sheets", figure: true, cell: (one) => one.sheets },
  { key: "file", head: "File", cell: (one) => `${one.form === "pdf" ? "PDF" : "ZIP"}${one.bytes === null ? "" : `, ${bytesText(one.bytes)}`}` },
  { key: "asked", head: "Asked for", cell: (one) => `${one.askedBy}, ${timeText(one.askedAt)}` },
];

function PackageStanding({ one }: { readonly one: PackageRow }) {
  if (one.state === "making") return <PackageProgress one={one} />;
  return (
    <>
      <strong>{PACKAGE_STATE_WORDS[one.state]}</strong>
      {one.outdated > 0 ? <span className="block text-caution">{countText(one.outdated, "sheet")} out of date</span> : null}
    </>
  );
}

/** The job's packages, and the door to a new one. */
export function PackageList({ job }: { readonly job: JobDetail }) {
  const packages = useApi<PackageRow[]>(`/api/jobs/${job.id}/packages`, { refreshInterval: (rows) => (rows?.some((one) => isOpenPackage(one.state)) ? LOOK_EVERY_MS : 0) });
  const [asking, setAsking] = useState(false);
  const add = (
    <Button tone="primary" onClick={() => setAsking(true)}>
      New package
    </Button>
  );
  return (
    <>
      <Loaded api={packages} label="Loading packages">
        {(rows) =>
          rows.length === 0 ? (
            <EmptyState title="No package yet" action={add}>
              A package is the job&apos;s sheets in one file, with bookmarks and an index: for the printer, the bench or the client.
            </EmptyState>
          ) : (
            <>
              <div className="mb-3 flex justify-end">{add}</div>
              <Table caption="Packages" columns={COLUMNS} rows={rows} rowKey={(one) => one.id} />
            </>
          )
        }
      </Loaded>
      <PackageDialog job={job} open={asking} onClose={() => setAsking(false)} />
    </>
  );
}
