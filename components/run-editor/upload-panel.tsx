"use client";
import { useState, type DragEvent } from "react";
import { Button } from "@/components/ui/button";
import { apiSend, failureText } from "@/components/ui/fetcher";
import { bytesText, timeText } from "@/components/ui/format";
import { Notice } from "@/components/ui/notice";
import { FileButton } from "@/components/ui/file-button";
import type { UploadRow } from "@/lib/rules/api-types";
import { UPLOAD_MAX_BYTES } from "@/lib/rules/write-bodies";
import { sendFile } from "./send-file";

export interface UploadPanelProps {
  readonly lineId: string;
  readonly uploads: readonly UploadRow[];
  readonly editable: boolean;
  readonly onChanged: () => Promise<unknown>;
}

interface Sending {
  readonly name: string;
  readonly part: number;
}

const ACCEPT = "image/png,image/jpeg,image/webp,application/pdf";

/** Sketches and photos of the line: dropped or chosen, sent one after the other, opened in a new tab. */
export function UploadPanel({ lineId, uploads, editable, onChanged }: UploadPanelProps) {
  const [sending, setSending] = useState<Sending | null>(null);
  const [trouble, setTrouble] = useState<string | null>(null);
  const [over, setOver] = useState(false);
  const sendAll = async (files: readonly File[]): Promise<void> => {
    setTrouble(null);
    try {
      for (const file of files) {
        if (file.size > UPLOAD_MAX_BYTES) throw new Error(`${file.name} has ${bytesText(file.size)}; a file may have ${bytesText(UPLOAD_MAX_BYTES)}.`);
        await sendFile(`/api/lines/${lineId}/uploads`, file, (part) => setSending({ name: file.name, part }));
      }
    } catch (failure) {
      setTrouble(failure instanceof Error && failure.name === "Error" ? failure.message : failureText(failure));
    }
    setSending(null);
    await onChanged();
  };
  const drop = (event: DragEvent): void => {
    event.preventDefault();
    setOver(false);
    if (editable) void sendAll([...event.dataTransfer.files]);
  };
  const remove = async (id: string): Promise<void> => {
    setTrouble(null);
    await apiSend("DELETE", `/api/uploads/${id}`).catch((failure: unknown) => setTrouble(failureText(failure)));
    await onChanged();
  };
  return (
    <div
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
      className={over && editable ? "outline-2 outline-dashed outline-offset-4 outline-dye" : undefined}
    >
      {trouble ? <Notice tone="trouble" className="mb-3">{trouble}</Notice> : null}
      {editable ? (
        <div className="mb-3 flex flex-wrap items-center gap-3">
          <FileButton label="Add a sketch or photo" accept={ACCEPT} onFile={(file) => file && void sendAll([file])} />
          <span className="text-sm text-soft max-sm:hidden">or drop files here; pictures or PDF, at most {bytesText(UPLOAD_MAX_BYTES)} each</span>
        </div>
      ) : null}
      {sending ? (
        <p role="status" className="mb-3 text-sm">
          Sending {sending.name}: <span className="figure">{Math.round(sending.part * 100)} %</span>
          <progress aria-label={`Sending ${sending.name}`} value={sending.part} max={1} className="mt-1 block h-2 w-full accent-dye" />
        </p>
      ) : null}
      {uploads.length === 0 ? (
        <p className="py-2 text-soft">No sketch or photo yet.</p>
      ) : (
        <ul className="grid grid-cols-2 gap-3 sm:grid-cols-3">
          {uploads.map((upload) => (
            <Thumb key={upload.id} upload={upload} onRemove={editable ? () => void remove(upload.id) : null} />
          ))}
        </ul>
      )}
    </div>
  );
}

function Thumb({ upload, onRemove }: { readonly upload: UploadRow; readonly onRemove: (() => void) | null }) {
  const href = `/api/uploads/${upload.id}`;
  const picture = upload.type.startsWith("image/") && upload.type !== "image/svg+xml";
  return (
    <li className="min-w-0 border border-hair bg-sheet p-2">
      <a href={href} target="_blank" rel="noreferrer" className="block">
        <span className="grid h-28 place-items-center overflow-hidden bg-shade">
          {/* eslint-disable-next-line @next/next/no-img-element -- the shop's own file behind its session; no optimizer may fetch it */}
          {picture ? <img src={href} alt="" loading="lazy" className="max-h-full max-w-full object-contain" /> : <span className="figure text-sm">{upload.type === "application/pdf" ? "PDF" : "file"}</span>}
        </span>
        <span className="inked mt-1 block truncate text-sm">{upload.name}</span>
      </a>
      <p className="text-xs text-soft">
        {bytesText(upload.bytes)}, {upload.by}, {timeText(upload.at)}
      </p>
      {onRemove ? (
        <Button tone="quiet" className="px-0 text-sm" aria-label={`Remove ${upload.name}`} onClick={onRemove}>
          Remove
        </Button>
      ) : null}
    </li>
  );
}
