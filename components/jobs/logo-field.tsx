"use client";
import { useEffect, useRef, useState } from "react";
import type { TitleBlock } from "@/iso";
import { Button } from "@/components/ui/button";
import { apiSend, apiUpload, failureText } from "@/components/ui/fetcher";
import { FileButton } from "@/components/ui/file-button";
import { bytesText } from "@/components/ui/format";
import { logoAddress } from "@/components/ui/logo-address";
import { Notice } from "@/components/ui/notice";
import { LOGO_MAX_BYTES } from "@/lib/rules/write-bodies";

export interface LogoFieldProps {
  /** Where it is put and deleted. */
  readonly path: string;
  readonly logo: TitleBlock["logo"];
  readonly editable: boolean;
  readonly onChanged: () => void;
  /** Told the address of a chosen file, and null when there is none any more. */
  readonly onPreview?: (address: string | null) => void;
}

/** The logo of the title block: shown as it is, chosen, previewed, then sent. */
export function LogoField({ path, logo, editable, onChanged, onPreview }: LogoFieldProps) {
  const { file, preview, setFile } = useChosenFile(onPreview);
  const [trouble, setTrouble] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const shown = preview ?? (logo ? logoAddress(logo) : null);
  const run = async (work: () => Promise<unknown>) => {
    setBusy(true);
    setTrouble(null);
    try {
      await work();
      setFile(null);
      onChanged();
    } catch (failure) {
      setTrouble(failureText(failure));
    } finally {
      setBusy(false);
    }
  };
  const choose = (chosen: File | null) => {
    setTrouble(
      chosen && chosen.size > LOGO_MAX_BYTES
        ? `A logo may have ${bytesText(LOGO_MAX_BYTES)}; this one has ${bytesText(chosen.size)}.`
        : null,
    );
    setFile(chosen && chosen.size <= LOGO_MAX_BYTES ? chosen : null);
  };
  return (
    <div>
      <h3>Logo</h3>
      <p className="mb-3 text-sm text-soft">
        PNG, JPEG or SVG, at most {bytesText(LOGO_MAX_BYTES)}. It prints in the corner of the title block.
      </p>
      <div className="mb-3 flex h-28 w-full max-w-xs items-center justify-center border border-rule bg-white p-3">
        {shown ? (
          // eslint-disable-next-line @next/next/no-img-element -- a few kilobytes from our own store or the reader's disk
          <img
            src={shown}
            alt={file ? "Preview of the chosen logo" : "Logo in use"}
            className="max-h-full max-w-full"
          />
        ) : (
          <span className="text-soft">No logo</span>
        )}
      </div>
      {trouble ? (
        <Notice tone="trouble" className="mb-3">
          {trouble}
        </Notice>
      ) : null}
      {editable ? (
        <div className="flex flex-wrap items-center gap-3">
          <FileButton
            label={logo || file ? "Choose another" : "Choose a logo"}
            accept="image/png,image/jpeg,image/svg+xml"
            onFile={choose}
          />
          {file ? (
            <Button
              tone="primary"
              busy={busy}
              busyLabel="Sending"
              onClick={() => void run(() => apiUpload("PUT", path, file))}
            >
              Use this logo
            </Button>
          ) : null}
          {logo && !file ? (
            <Button tone="quiet" busy={busy} onClick={() => void run(() => apiSend("DELETE", path))}>
              Remove the logo
            </Button>
          ) : null}
        </div>
      ) : null}
    </div>
  );
}

/** A chosen file with an address to show it by, let go of when another is chosen or the page is left. */
function useChosenFile(onPreview?: (address: string | null) => void) {
  const [chosen, setChosen] = useState<{ readonly file: File; readonly url: string } | null>(null);
  const held = useRef<string | null>(null);
  const hold = (file: File | null) => {
    if (held.current) URL.revokeObjectURL(held.current);
    held.current = file ? URL.createObjectURL(file) : null;
    setChosen(file && held.current ? { file, url: held.current } : null);
    onPreview?.(held.current);
  };
  useEffect(() => () => void (held.current && URL.revokeObjectURL(held.current)), []);
  return { file: chosen?.file ?? null, preview: chosen?.url ?? null, setFile: hold };
}
