"use client";
import { startTransition, useDeferredValue, useEffect, useMemo, useRef, useState } from "react";
import { buildModel, type Drawing, type MarksRegister, type Model, type RunDocument, type TakeOutWord, type View } from "@/iso";
import { DrawingQueue } from "./drawing-queue";
import type { DrawingRoom } from "./draw-line";

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

/** The model of a document, computed after the typing it follows from has been shown. */
export function useLineModel(document: RunDocument, marks: MarksRegister, takeOuts: readonly TakeOutWord[]): Model {
  const settled = useDeferredValue(document);
  return useMemo(() => buildModel(settled, marks, takeOuts), [settled, marks, takeOuts]);
}

export interface DrawnLine {
  /** The newest drawing there is; null before the first, or when the line cannot be drawn. */
  readonly drawing: Drawing | null;
  /** The model it shows. */
  readonly model: Model;
  /** A newer one is being drawn. */
  readonly pending: boolean;
}

/** The drawing of a model, made beside the page; until it comes the one before stays. */
export function useLineDrawing(model: Model, room: DrawingRoom, view: View | null): DrawnLine {
  const { widthMm, heightMm } = room;
  const [shown, setShown] = useState<{ readonly drawing: Drawing | null; readonly model: Model } | null>(null);
  const queue = useRef<DrawingQueue | null>(null);
  useEffect(() => {
    const made = new DrawingQueue((ask, answer) => startTransition(() => setShown({ drawing: answer.drawing, model: ask.model })));
    queue.current = made;
    return () => made.close();
  }, []);
  useEffect(() => {
    if (model.legs.length > 0) queue.current?.ask({ model, room: { widthMm, heightMm }, view });
  }, [model, widthMm, heightMm, view]);
  if (model.legs.length === 0) return { drawing: null, model, pending: false };
  return { drawing: shown?.drawing ?? null, model: shown?.model ?? model, pending: shown === null || shown.model !== model };
}
