"use client";
import { useDeferredValue, useMemo } from "react";
import { buildModel, drawModel } from "@/iso";
import type { Drawing, MarksRegister, Model, RunDocument, TakeOutWord, View } from "@/iso";
import { measureText } from "@/fonts/widths";

/** The model of a document, computed after the typing it follows from has been shown. */
export function useLineModel(document: RunDocument, marks: MarksRegister, takeOuts: readonly TakeOutWord[]): Model {
  const settled = useDeferredValue(document);
  return useMemo(() => buildModel(settled, marks, takeOuts), [settled, marks, takeOuts]);
}

export interface DrawingRoom {
  readonly widthMm: number;
  readonly heightMm: number;
}

export type DrawnLine = { readonly ok: true; readonly drawing: Drawing } | { readonly ok: false };

const SHOW_ALL = { items: true, welds: true, pieces: true, dimensions: true };

/** The drawing of a model; it comes after the cut lengths. A line that cannot be drawn yet is said so, never a broken page. */
export function useLineDrawing(model: Model, room: DrawingRoom, view: View | null): DrawnLine {
  const settled = useDeferredValue(model);
  const { widthMm, heightMm } = room;
  return useMemo(() => drawn(settled, { widthMm, heightMm }, view), [settled, widthMm, heightMm, view]);
}

export function drawn(model: Model, room: DrawingRoom, view: View | null): DrawnLine {
  if (model.legs.length === 0) return { ok: false };
  try {
    return { ok: true, drawing: drawModel(model, { ...room, measure: measureText, view, spool: null, show: SHOW_ALL }) };
  } catch (error) {
    console.error("The drawing failed", error);
    return { ok: false };
  }
}
