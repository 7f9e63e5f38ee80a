"use client";
import { useCallback, useEffect, useRef, useState } from "react";
import { ApiFailure, apiUpload, failureText } from "@/components/ui/fetcher";
import { FileButton } from "@/components/ui/file-button";
import { Notice } from "@/components/ui/notice";
import { UPLOAD_MAX_BYTES } from "@/lib/rules/write-bodies";
import type { KeptPhoto } from "./survey-store";
import type { OpenSurvey } from "./use-survey";

const RETRY_MS = 15_000;

/** Photos of the survey: kept on the device at once, sent with the line's sketches when there is a signal. */
export function PhotoPanel({ survey: { detail, personId, store } }: { readonly survey: OpenSurvey }) {
  const lineId = detail.line.id;
  const [waiting, setWaiting] = useState<readonly KeptPhoto[]>([]);
  const [sent, setSent] = useState<readonly string[]>(() => detail.uploads.map((upload) => upload.name));
  const [trouble, setTrouble] = useState<string | null>(null);
  const busy = useRef(false);
  const sendAll = useCallback(async () => {
    if (busy.current || store === null) return;
    busy.current = true;
    try {
      for (const photo of await store.photos(lineId)) {
        await apiUpload("POST", `/api/lines/${lineId}/survey/photos`, new File([photo.bytes], photo.name, { type: photo.type }));
        await store.removePhoto(photo.id);
        setSent((now) => [...now, photo.name]);
      }
      setTrouble(null);
    } catch (failure) {
      setTrouble(failure instanceof ApiFailure && failure.status === 0 ? null : failureText(failure));
    } finally {
      busy.current = false;
      setWaiting(await store.photos(lineId));
    }
  }, [store, lineId]);
  useEffect(() => {
    const first = setTimeout(() => void sendAll());
    const again = setInterval(() => void sendAll(), RETRY_MS);
    const online = () => void sendAll();
    window.addEventListener("online", online);
    return () => {
      clearTimeout(first);
      clearInterval(again);
      window.removeEventListener("online", online);
    };
  }, [sendAll]);
  const add = async (file: File | null) => {
    if (file === null) return;
    if (file.size > UPLOAD_MAX_BYTES) return setTrouble(`${file.name} is too large; a photo may have 10 MB.`);
    if (store === null) return setTrouble("This browser keeps nothing, so a photo cannot wait for a signal here.");
    await store.addPhoto({ id: crypto.randomUUID(), lineId, personId, name: file.name, type: file.type, bytes: await file.arrayBuffer(), at: new Date().toISOString() });
    setWaiting(await store.photos(lineId));
    await sendAll();
  };
  return (
    <section aria-label="Photos">
      <h2 className="mb-2">Photos</h2>
      <FileButton label="Add a photo" accept="image/png,image/jpeg,image/webp,application/pdf" onFile={(file) => void add(file)} />
      {trouble ? <Notice tone="trouble" className="mt-2">{trouble}</Notice> : null}
      <ul className="mt-2">
        {sent.map((name, at) => <li key={`${at}${name}`}>{name}</li>)}
        {waiting.map((photo) => <li key={photo.id}>{photo.name} <span className="text-caution">waits for a signal</span></li>)}
      </ul>
    </section>
  );
}
