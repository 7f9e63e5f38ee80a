"use client";
import Link from "next/link";
import { useApi } from "@/components/ui/fetcher";
import { countText } from "@/components/ui/format";
import { Notice } from "@/components/ui/notice";
import type { CopyRow } from "@/lib/rules/copies";

/** Most sheets named in the line; more are counted. */
const NAMED = 4;

/** A line on the pages of whoever still holds prints of a sheet that is not to be worked from; nothing when they hold none. */
export function OwnWithdrawals() {
  const { data: rows } = useApi<readonly CopyRow[]>("/api/copies", { refreshInterval: 60_000 });
  if (!rows || rows.length === 0) return null;
  const sheets = [...new Map(rows.map((row) => [`${row.spoolId} ${row.code}`, row])).values()];
  return (
    <Notice tone="caution" word="Withdraw" className="mb-5">
      You hold {countText(rows.length, "copy", "copies")} of {sheets.length === 1 ? "a sheet that is" : "sheets that are"} not to be worked from. Take {rows.length === 1 ? "it" : "them"} out of use, then mark {rows.length === 1 ? "it" : "them"} on the spool&apos;s page:{" "}
      {sheets.slice(0, NAMED).map((row, n) => (
        <span key={row.id}>
          {n === 0 ? "" : ", "}
          <Link className="inked whitespace-nowrap" href={`/spools/${row.spoolId}#copies-out`}>
            <span className="figure">{row.sheetNumber || row.line}</span> rev <span className="figure">{row.code}</span>
          </Link>{" "}
          ({row.hold ? "HOLD" : row.state.toUpperCase()})
        </span>
      ))}
      {sheets.length > NAMED ? ` and ${sheets.length - NAMED} more.` : "."}
    </Notice>
  );
}
