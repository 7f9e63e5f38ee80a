"use client";
import { useApi } from "@/components/ui/fetcher";
import { timeText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { StateWord } from "@/components/ui/state-word";
import { usePageTitle } from "@/components/ui/use-page-title";
import type { StatusDetail } from "@/lib/rules/api-types";
import { FileCheck } from "./file-check";
import { Verdict } from "./verdict";

/** What the QR code of a sheet leads to; no sign-in, nothing but the sheet's standing. */
export function StatusPage({ token }: { readonly token: string }) {
  const status = useApi<StatusDetail>(`/api/status/${encodeURIComponent(token)}`, {
    refreshInterval: 60_000,
  });
  return (
    <div className="mx-auto max-w-3xl">
      <Loaded api={status} page label="Looking up the sheet">
        {(data) => <Status status={data} onReread={() => status.mutate()} />}
      </Loaded>
    </div>
  );
}

function Status({
  status,
  onReread,
}: {
  readonly status: StatusDetail;
  readonly onReread: () => Promise<StatusDetail | undefined>;
}) {
  usePageTitle(
    `Sheet ${status.sheetNumber} rev ${status.code}, ${status.current ? "CURRENT" : "NOT CURRENT"}`,
  );
  const facts = [
    { label: "Sheet", figure: true, value: status.sheetNumber },
    { label: "Revision", figure: true, value: status.code },
    { label: "Line", figure: true, value: status.line },
    { label: "Spool", figure: true, value: status.spool },
    { label: "Shop", figure: false, value: status.shop },
    { label: "Issued", figure: false, value: timeText(status.issuedAt) },
  ];
  return (
    <div className="frame p-5 sm:p-8">
      <Verdict status={status} />
      <div className="mt-4">
        <StateWord state={status.state} hold={status.hold} className="text-lg" />
      </div>
      <dl className="mt-5 grid grid-cols-2 border-t border-ink sm:grid-cols-3">
        {facts.map((fact) => (
          <div key={fact.label} className="border-b border-hair py-2 pr-3">
            <dt className="cell-label">{fact.label}</dt>
            <dd className={fact.figure ? "figure break-words" : "break-words"}>{fact.value}</dd>
          </div>
        ))}
      </dl>
      <FileCheck status={status} onReread={onReread} />
    </div>
  );
}
