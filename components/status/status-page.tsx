"use client";
import { useApi } from "@/components/ui/fetcher";
import { timeText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { StateWord } from "@/components/ui/state-word";
import { usePageTitle } from "@/components/ui/use-page-title";
import type { StatusDetail } from "@/lib/rules/api-types";
import { FileCheck } from "./file-check";
import { fingerprintText } from "@/lib/rules/certificates";
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
      {status.signature ? <SignatureFacts signature={status.signature} /> : null}
      <FileCheck status={status} onReread={onReread} />
    </div>
  );
}

/** The signed original, by which any copy or printout can be traced back, and whose signature it carries. */
function SignatureFacts({ signature }: { readonly signature: NonNullable<StatusDetail["signature"]> }) {
  const facts = [
    { label: "Signed original, SHA-256", value: signature.sha256 },
    { label: "Digitally signed by the certificate of", value: signature.subject, words: true },
    { label: "Certificate, SHA-256", value: fingerprintText(signature.fingerprint) },
  ];
  return (
    <section aria-labelledby="signature" className="mt-6">
      <h2 id="signature">Signature</h2>
      <dl className="mt-2 border-t border-ink">
        {facts.map((fact) => (
          <div key={fact.label} className="border-b border-hair py-2">
            <dt className="cell-label">{fact.label}</dt>
            <dd className={fact.words ? "break-words" : "figure text-sm break-all"}>{fact.value}</dd>
          </div>
        ))}
      </dl>
      <p className="mt-2 text-soft">
        A printed or marked copy carries no digital signature, since marking changes the file; its filing margin names the
        original by the SHA-256 above. The unmarked original is to be had on the spool&apos;s page.
      </p>
    </section>
  );
}
