"use client";
import { startTransition, useEffect, useRef, useState } from "react";
import type { Drawing, MarksRegister, Model, RunDocument, TakeOutWord, View } from "@/iso";
import { drawLine, modelOf, type DrawingRoom, type ModelRequest } from "./draw-line";
import { KeyPause } from "./key-pause";
import { LatestQueue, workerOrNull } from "./latest-queue";

/** Quiet after a keystroke before what is typed is drawn, ms: typing itself never waits for the model or the drawing. */
const PREVIEW_QUIET_MS = 160;

/** The document, with what is being typed in it once the typing pauses; a committed entry shows at once. */
export function useSettledPreview(document: RunDocument, preview: RunDocument | null): RunDocument {
  const [settled, setSettled] = useState<{ readonly base: RunDocument; readonly preview: RunDocument } | null>(null);
  useEffect(() => {
    if (preview === null) return;
    const timer = setTimeout(() => startTransition(() => setSettled({ base: document, preview })), PREVIEW_QUIET_MS);
    return () => clearTimeout(timer);
  }, [document, preview]);
  return preview !== null && settled?.base === document ? settled.preview : document;
}

/** The model of a document, made beside the page; until a new one comes the one before stays. */
export function useLineModel(document: RunDocument, marks: MarksRegister, takeOuts: readonly TakeOutWord[]): Model {
  const [made, setMade] = useState(() => ({ request: { document, marks, takeOuts }, model: modelOf({ document, marks, takeOuts }) }));
  const queue = useRef<LatestQueue<ModelRequest, Model> | null>(null);
  const asked = useRef<ModelRequest>(made.request);
  useEffect(() => {
    const pause = new KeyPause();
    const opened = new LatestQueue<ModelRequest, Model>({
      start: () => workerOrNull(() => new Worker(new URL("./model-worker.ts", import.meta.url), { type: "module", name: "model" })),
      sent: (request) => request,
      here: modelOf,
      report: (request, model) => pause.hold(() => startTransition(() => setMade({ request, model }))),
    });
    queue.current = opened;
    return () => {
      pause.close();
      opened.close();
    };
  }, []);
  useEffect(() => {
    const { current } = asked;
    if (current.document === document && current.marks === marks && current.takeOuts === takeOuts) return;
    asked.current = { document, marks, takeOuts };
    queue.current?.ask(asked.current);
  }, [document, marks, takeOuts]);
  return made.model;
}

export interface DrawnLine {
  /** The newest drawing there is; null before the first, or when the line cannot be drawn. */
  readonly drawing: Drawing | null;
  /** The model it shows. */
  readonly model: Model;
  /** A newer one is being drawn. */
  readonly pending: boolean;
}

interface DrawAsk {
  readonly model: Model;
  readonly marks: MarksRegister;
  readonly takeOuts: readonly TakeOutWord[];
  readonly room: DrawingRoom;
  readonly view: View | null;
}

/** The drawing of a model, made beside the page; until it comes the one before stays. */
export function useLineDrawing(model: Model, marks: MarksRegister, takeOuts: readonly TakeOutWord[], room: DrawingRoom, view: View | null): DrawnLine {
  const { widthMm, heightMm } = room;
  const [shown, setShown] = useState<{ readonly drawing: Drawing | null; readonly model: Model } | null>(null);
  const queue = useRef<LatestQueue<DrawAsk, Drawing | null> | null>(null);
  useEffect(() => {
    const pause = new KeyPause();
    const opened = new LatestQueue<DrawAsk, Drawing | null>({
      start: () => workerOrNull(() => new Worker(new URL("./drawing-worker.ts", import.meta.url), { type: "module", name: "isometric" })),
      // The worker builds the model again: the document is far smaller to send.
      sent: (ask) => ({ document: ask.model.document, marks: ask.marks, takeOuts: ask.takeOuts, room: ask.room, view: ask.view }),
      here: (ask) => drawLine(ask.model, ask.room, ask.view),
      report: (ask, drawing) => pause.hold(() => startTransition(() => setShown({ drawing, model: ask.model }))),
    });
    queue.current = opened;
    return () => {
      pause.close();
      opened.close();
    };
  }, []);
  useEffect(() => {
    if (model.legs.length > 0) queue.current?.ask({ model, marks, takeOuts, room: { widthMm, heightMm }, view });
  }, [model, marks, takeOuts, widthMm, heightMm, view]);
  if (model.legs.length === 0) return { drawing: null, model, pending: false };
  return { drawing: shown?.drawing ?? null, model: shown?.model ?? model, pending: shown === null || shown.model !== model };
}
