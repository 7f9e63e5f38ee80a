"use client";
import { Button } from "@/components/ui/button";
import { apiSend, failureText, refreshApi, useApi } from "@/components/ui/fetcher";
import { dayText, timeText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { Notice, useToast } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import { Table, type Column } from "@/components/ui/table";
import { endWarning, fingerprintText, type CertificateRow } from "@/lib/rules/certificates";
import { CertificateUploadForm } from "./certificate-upload-form";

const PATH = "/api/shop/certificate";
const ORIGINS = { made: "made here, self-signed", uploaded: "uploaded" } as const;

/** The certificate whose signature every signed sheet carries: in use, those before it, and how to replace it. */
export function CertificateView({ owner }: { readonly owner: boolean }) {
  const certificates = useApi<readonly CertificateRow[]>(PATH);
  return (
    <Loaded api={certificates} label="Loading the certificate" lines={6}>
      {(rows) => (
        <>
          <Section title="Certificate in use">
            <p className="mb-4 text-soft">
              Every sheet signed for fabrication carries a digital signature by this certificate: one changed byte,
              and a PDF reader says so. The seal is the shop&apos;s; the approval is the person&apos;s who signed.
            </p>
            {rows[0] ? <InUse row={rows[0]} /> : <Notice>There is none yet. The first signing makes one under the shop&apos;s name.</Notice>}
          </Section>
          {owner ? <Replace has={rows.length > 0} /> : null}
          {rows.length > 1 ? <Earlier rows={rows.slice(1)} /> : null}
        </>
      )}
    </Loaded>
  );
}

function InUse({ row }: { readonly row: CertificateRow }) {
  const warning = endWarning(row.validTo, new Date());
  const facts = [
    ["Name", row.subject],
    ["Issued by", row.issuer === row.subject ? "itself (self-signed)" : row.issuer],
    ["Good from", dayText(row.validFrom)],
    ["Good to", dayText(row.validTo)],
    ["In use since", `${timeText(row.at)}, ${row.by}, ${ORIGINS[row.origin]}`],
  ];
  return (
    <>
      {warning ? (
        <Notice tone="caution" className="mb-4">
          {warning}
        </Notice>
      ) : null}
      <dl className="grid border-t border-ink sm:grid-cols-3">
        {facts.map(([label, value]) => (
          <div key={label} className="border-b border-hair py-2 pr-3">
            <dt className="cell-label">{label}</dt>
            <dd className="break-words">{value}</dd>
          </div>
        ))}
        <div className="border-b border-hair py-2 pr-3 sm:col-span-3">
          <dt className="cell-label">SHA-256 of the certificate</dt>
          <dd className="figure text-sm break-all">{fingerprintText(row.fingerprint)}</dd>
        </div>
      </dl>
      <p className="mt-3">
        <a className="inked inline-flex min-h-11 items-center" download="shop-certificate.pem" href={`data:application/x-pem-file;base64,${btoa(row.pem)}`}>
          Download the certificate (without its key)
        </a>{" "}
        <span className="text-soft">A client whose reader is given it sees the signature as trusted.</span>
      </p>
    </>
  );
}

function Replace({ has }: { readonly has: boolean }) {
  const say = useToast();
  const make = async () => {
    try {
      await apiSend("POST", PATH);
      say("A new certificate is in use.");
    } catch (failure) {
      say(failureText(failure), "trouble");
    }
    await refreshApi(PATH);
  };
  return (
    <Section title={has ? "Replace it" : "Choose one"}>
      <p className="mb-4 text-soft">Sheets signed before stay as they are and stay valid.</p>
      <div className="grid gap-8 lg:grid-cols-2">
        <CertificateUploadForm path={PATH} />
        <div>
          <h3>Make one here</h3>
          <p className="mb-3 text-sm text-soft">Self-signed under the shop&apos;s name, good for ten years.</p>
          <Button onClick={() => void make()}>Make a certificate</Button>
        </div>
      </div>
    </Section>
  );
}

function Earlier({ rows }: { readonly rows: readonly CertificateRow[] }) {
  const columns: readonly Column<CertificateRow>[] = [
    { key: "subject", head: "Name", cell: (row) => row.subject },
    { key: "origin", head: "From", cell: (row) => ORIGINS[row.origin] },
    { key: "at", head: "In use since", cell: (row) => `${timeText(row.at)}, ${row.by}` },
    { key: "to", head: "Good to", cell: (row) => dayText(row.validTo) },
    { key: "print", head: "SHA-256", cell: (row) => <span className="figure text-sm break-all">{fingerprintText(row.fingerprint)}</span> },
  ];
  return (
    <Section title="Certificates before it">
      <Table caption="Certificates before it" columns={columns} rows={rows} rowKey={(row) => row.id} />
    </Section>
  );
}
