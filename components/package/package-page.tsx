"use client";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { useViewer } from "@/components/shell/use-viewer";
import { Button, ButtonLink, buttonClass } from "@/components/ui/button";
import { apiSend, failureText, refreshApi, useApi } from "@/components/ui/fetcher";
import { bytesText, countText, hashText, timeText } from "@/components/ui/format";
import { Loaded } from "@/components/ui/loaded";
import { Notice, useToast } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import { Table, type Column } from "@/components/ui/table";
import { TitleStrip } from "@/components/ui/title-strip";
import { usePageTitle } from "@/components/ui/use-page-title";
import type { Role } from "@/lib/rules/api-types";
import { isOpenPackage, outdatedText, PACKAGE_STATE_WORDS, type PackageDetail, type PackageSheetRow } from "@/lib/rules/packages";
import { canDo } from "@/lib/rules/permissions";
import { PackageFacts } from "./package-facts";
import { PackageProgress } from "./package-progress";
import { ReceiptDialog } from "./receipt-dialog";

/** Time between two looks while it is being made, ms. */
const LOOK_EVERY_MS = 1_000;

/** One package: how far it is, its file, what is in it and what of that is out of date. */
export function PackagePage({ packageId }: { readonly packageId: string }) {
  const one = useApi<PackageDetail>(`/api/packages/${packageId}`, { refreshInterval: (data) => (data && isOpenPackage(data.state) ? LOOK_EVERY_MS : 0) });
  return (
    <Loaded api={one} page label="Loading the package" lines={8}>
      {(data) => <Package one={data} />}
    </Loaded>
  );
}

function Package({ one }: { readonly one: PackageDetail }) {
  usePageTitle(`Package ${one.title}`);
  const role = useViewer().data?.role ?? "fitter";
  return (
    <>
      <TitleStrip
        kind={one.facts ? `Transmittal ${one.facts.number}` : "Package"}
        title={one.title}
        trail={[{ href: "/jobs", label: "Jobs" }, { href: `/jobs/${one.jobId}`, label: one.jobNumber }]}
        cells={[
          { label: "State", value: PACKAGE_STATE_WORDS[one.state] },
          { label: "Asked for", value: `${one.askedBy}, ${timeText(one.askedAt)}` },
          { label: "Sheets", value: String(one.sheets), figure: true },
          { label: "File", value: one.form === "pdf" ? "PDF" : "ZIP" },
          ...(one.pages === null ? [] : [{ label: "Pages", value: String(one.pages), figure: true }]),
          ...(one.bytes === null ? [] : [{ label: "Size", value: bytesText(one.bytes), figure: true }]),
        ]}
      />
      <PackageState one={one} role={role} />
      <PackageFacts one={one} />
      <Section title="What is in it">
        <Table caption="Sheets of the package" columns={COLUMNS} rows={one.rows} rowKey={(row) => row.revisionId} />
      </Section>
      {one.holders.length > 0 ? <Holders one={one} /> : null}
      {one.sha256 ? (
        <p className="text-sm text-soft">
          SHA-256 of the file: <span className="figure" title={one.sha256}>{hashText(one.sha256)}</span>. The status page of each sheet recognizes it.
        </p>
      ) : null}
      <p className="mt-6" data-screen-only>
        <ButtonLink href={`/jobs/${one.jobId}`} tone="quiet">
          Back to job {one.jobNumber}
        </ButtonLink>
      </p>
    </>
  );
}

const COLUMNS: readonly Column<PackageSheetRow>[] = [
  { key: "sheet", head: "Sheet", figure: true, cell: (row) => `${row.sheetNumber} rev ${row.code}` },
  { key: "spool", head: "Spool", cell: (row) => <Link className="text-dye underline underline-offset-4" href={`/spools/${row.spoolId}`}>{`${row.line} spool ${row.letter}`}</Link> },
  { key: "printed", head: "Printed as", cell: (row) => row.printed },
  { key: "now", head: "Now", cell: (row) => (row.outdated === null ? row.now : <strong className="text-caution">Out of date. {row.outdated}</strong>) },
];

/** What it waits for, how far it is, or its file. */
function PackageState({ one, role }: { readonly one: PackageDetail; readonly role: Role }) {
  const path = `/api/packages/${one.id}`;
  const { busy, act } = useActions(path);
  const cancel = <Button tone="quiet" busy={busy} onClick={() => act(() => apiSend("POST", `${path}/cancel`))}>Cancel the package</Button>;
  if (one.state === "waiting") {
    return <Notice className="mb-4" word="Waiting"><span role="status">It is begun as soon as the one before it is done.</span> {cancel}</Notice>;
  }
  if (one.state === "making") {
    return <Notice className="mb-4" word="Being made"><div role="status" className="my-2"><PackageProgress one={one} /></div>You may leave this page; it goes on. {cancel}</Notice>;
  }
  if (one.state === "failed") return <Notice tone="trouble" className="mb-4" word="Not made">{one.problem} <Again one={one} /></Notice>;
  if (one.state === "cancelled") return <Notice className="mb-4" word="Cancelled">Nothing was kept of it. <Again one={one} /></Notice>;
  return <ReadyPackage one={one} role={role} />;
}

function ReadyPackage({ one, role }: { readonly one: PackageDetail; readonly role: Role }) {
  const file = `/api/packages/${one.id}/file`;
  const [noting, setNoting] = useState(false);
  // The list of holders is read anew once the download has begun.
  const taken = () => void setTimeout(() => void refreshApi(`/api/packages/${one.id}`), 2_000);
  return (
    <>
      {one.outdated > 0 ? (
        <Notice tone="caution" word="Out of date" className="mb-4">
          {outdatedText(one.outdated, one.sheets)} Withdraw the prints of {one.outdated === 1 ? "it" : "them"} and make the package again.{" "}
          {canDo(role, "revisions.review") ? <a className="text-dye underline underline-offset-4" href={`${file}?outdated=1`} onClick={taken}>Save it for the record only</a> : null}
        </Notice>
      ) : null}
      <div className="mb-5 flex flex-wrap items-center gap-3" data-screen-only>
        {one.outdated === 0 ? <a className={buttonClass("primary")} href={file} onClick={taken}>Save the {one.form === "pdf" ? "PDF" : "ZIP"}</a> : null}
        <Again one={one} />
        {one.facts && one.receipt === null && canDo(role, "packages.receipt") ? <Button onClick={() => setNoting(true)}>Note the acknowledgement</Button> : null}
      </div>
      <ReceiptDialog packageId={one.id} open={noting} onClose={() => setNoting(false)} />
    </>
  );
}

function Again({ one }: { readonly one: PackageDetail }) {
  const router = useRouter();
  const { busy, act } = useActions(`/api/packages/${one.id}`);
  const again = () => act(async () => router.push(`/packages/${(await apiSend<{ id: string }>("POST", `/api/packages/${one.id}/again`)).id}`));
  return <Button busy={busy} busyLabel="Asking" onClick={again}>Make it again with current sheets</Button>;
}

function Holders({ one }: { readonly one: PackageDetail }) {
  return (
    <Section title="Who has it">
      <ul>
        {one.holders.map((holder) => (
          <li key={holder.name + holder.at} className="border-b border-hair py-2">
            <strong>{holder.name}</strong>, {timeText(holder.at)}: {holder.out === 0 ? "every copy withdrawn" : `${countText(holder.out, "sheet")} out`}
          </li>
        ))}
      </ul>
    </Section>
  );
}

function useActions(path: string) {
  const say = useToast();
  const [busy, setBusy] = useState(false);
  const act = (work: () => Promise<unknown>) => {
    setBusy(true);
    void work()
      .catch((failure: unknown) => say(failureText(failure), "trouble"))
      .then(() => refreshApi(path))
      .finally(() => setBusy(false));
  };
  return { busy, act };
}
