"use client";
import { useCallback, useMemo } from "react";
import type { CloseBetweenInput, Model, RunDocument, TakeOutWord, Way, WaysInput } from "@/iso";
import { WaysPanel, type WaysAsked } from "@/components/ways/ways-panel";
import { isBareEnd, type ClosingForm, type EndForm } from "./closing-form";
import { planWayInsert, type InsertStamp } from "./closing-insert";

export interface ClosingWaysProps {
  readonly form: ClosingForm;
  readonly input: CloseBetweenInput;
  readonly model: Model;
  readonly takeOuts: readonly TakeOutWord[];
  readonly stamp: InsertStamp;
  /** null when the reader may not edit. */
  readonly onInsert: ((document: RunDocument) => void) | null;
}

/** Every way to close between the dialog's two ends, each to be put into the run. */
export function ClosingWays({ form, input, model, takeOuts, stamp, onInsert }: ClosingWaysProps) {
  const asked = useMemo((): WaysAsked => {
    const end = (from: EndForm, at: CloseBetweenInput["end0"], straightMm: number) => ({ ...at, straightMm, ...(isFixed(model, from) ? { fixed: true } : {}) });
    return {
      end0: end(form.end0, input.end0, input.tangents?.end0Mm ?? 0), end1: end(form.end1, input.end1, input.tangents?.end1Mm ?? 0),
      nps: form.nps, rootGapMm: input.rootGapMm, ...(input.toleranceMm === undefined ? {} : { toleranceMm: input.toleranceMm }),
    };
  }, [form, input, model]);
  const plan = useCallback((way: Way, question: WaysInput) => planWayInsert(form, way, question, model, stamp), [form, model, stamp]);
  const insert = useCallback(
    (way: Way, question: WaysInput) => {
      const planned = planWayInsert(form, way, question, model, stamp);
      if (planned.ok) onInsert?.(planned.document);
    },
    [form, model, stamp, onInsert],
  );
  return <WaysPanel asked={asked} model={model} takeOuts={takeOuts} plan={plan} onInsert={onInsert ? insert : null} />;
}

/** A fitting of the run cannot be cut back; bare pipe, and an end typed or surveyed, can. */
function isFixed(model: Model, end: EndForm): boolean {
  return end.pointId !== "" && !isBareEnd(model, end.pointId);
}
