"use client";
import clsx from "clsx";
import { useState, type DragEvent } from "react";
import { timeText } from "@/components/ui/format";
import { FileButton } from "@/components/ui/file-button";
import { Notice } from "@/components/ui/notice";
import type { StatusDetail } from "@/lib/rules/api-types";
import { fileSha256 } from "./hash";

type Result = { readonly name: string; readonly sha256: string | null } | null;

/** Tells whether a PDF on the reader's disk is one of this revision's. The file stays on the reader's device. */
export function FileCheck({
  status,
  onReread,
}: {
  readonly status: StatusDetail;
  /** Reads the sheet's standing again: a copy may have been printed since the page was opened. */
  readonly onReread: () => Promise<unknown>;
}) {
  const [result, setResult] = useState<Result>(null);
  const [over, setOver] = useState(false);
  const check = async (file: File | null | undefined) => {
    if (!file) return;
    const sha256 = await fileSha256(file);
    if (!status.sheets.some((sheet) => sheet.sha256 === sha256)) await onReread().catch(() => undefined);
    setResult({ name: file.name, sha256 });
  };
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    void check(event.dataTransfer.files[0]);
  };
  return (
    <section aria-labelledby="file-check" className="mt-6">
      <h2 id="file-check">Is this PDF the one?</h2>
      <div
        onDragOver={(event) => {
          event.preventDefault();
          setOver(true);
        }}
        onDragLeave={() => setOver(false)}
        onDrop={drop}
        className={clsx(
          "mt-2 flex flex-wrap items-center justify-between gap-4 border-2 border-dashed p-4",
          over ? "border-dye bg-dye-tint" : "border-rule",
        )}
      >
        <p className="min-w-0 grow basis-56">
          Drop a PDF of this sheet here, or choose it. It is compared on your device and not sent anywhere.
        </p>
        <FileButton label="Choose a PDF" accept="application/pdf" onFile={(file) => void check(file)} />
      </div>
      <div role="status" className="mt-3">
        {result ? <Answer result={result} status={status} /> : null}
      </div>
    </section>
  );
}

const KIND_WORDS = { review: "the PDF submitted for review", fabrication: "the signed original" } as const;

type Known = StatusDetail["sheets"][number];

/** Which of the files that were stored or printed here it is. */
function matchWords({ kind, marked, at }: Known): string {
  if (marked === null) return KIND_WORDS[kind];
  return `a copy printed ${timeText(at)}, marked ${marked}, of ${KIND_WORDS[kind]}`;
}

function SignatureLeft() {
  return (
    <span className="mt-1 block">
      Marking changed the file, so the copy carries no digital signature. The signed original has it; compare its SHA-256
      below.
    </span>
  );
}

function Answer({ result, status }: { readonly result: NonNullable<Result>; readonly status: StatusDetail }) {
  if (result.sha256 === null)
    return <Notice tone="caution">This browser compares files only on a page opened by https.</Notice>;
  const match = status.sheets.find((sheet) => sheet.sha256 === result.sha256);
  const hash = <span className="figure mt-1 block text-sm break-all">SHA-256 {result.sha256}</span>;
  if (!match) {
    return (
      <Notice tone="trouble" word="Not recognized">
        {result.name} is not ours: no PDF of revision {status.code} was stored or printed here with these bytes.
        One changed byte is enough. It may be altered, or of another revision.
        {hash}
      </Notice>
    );
  }
  return (
    <Notice tone={status.current && match.kind === "fabrication" ? "done" : "caution"} word="Recognized">
      {result.name} is {matchWords(match)} of revision {status.code}, unaltered.{" "}
      {status.current
        ? match.kind === "review"
          ? "Work from the signed one instead."
          : "That revision is current."
        : "That revision is NOT CURRENT."}
      {match.marked !== null && status.signature ? <SignatureLeft /> : null}
      {hash}
    </Notice>
  );
}
