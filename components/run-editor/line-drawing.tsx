"use client";
import clsx from "clsx";
import { memo, useEffect, useRef, useState } from "react";
import type { MarksRegister, TakeOutWord, View } from "@/iso";
import { DrawingWindow, type WindowProps } from "./drawing-window";
import type { DrawingRoom } from "./draw-line";
import { LegendStrip } from "./legend-strip";
import { useLineDrawing } from "./use-line-model";

export interface LineDrawingProps extends Omit<WindowProps, "drawing"> {
  readonly marks: MarksRegister;
  readonly takeOuts: readonly TakeOutWord[];
  readonly view: View | null;
  readonly onView: ((view: View | null) => void) | null;
}

/** Screen pixels given to a millimetre of paper, so that 2.5 mm lettering stays readable. */
const PX_PER_MM = 3;
/** The room changes in steps, so that a dragged window edge does not redraw at each pixel. */
const ROOM_STEP_MM = 20;
/** Foot of the frame kept for the look buttons, px. */
const FOOT_PX = 52;

const VIEW_NAMES: Readonly<Record<View, string>> = { 1: "from south-west", 2: "from south-east", 3: "from north-east", 4: "from north-west" };
/** Way plant north points on the paper in each view, degrees from up, clockwise. */
const NORTH_DEG: Readonly<Record<View, number>> = { 1: -60, 2: 60, 3: 120, 4: -120 };
const VIEWS: readonly View[] = [1, 2, 3, 4];

/** The live isometric: what is pointed at finds its row, and the current row shows in the active colour. */
export const LineDrawing = memo(function LineDrawing({ model, marks, takeOuts, view, onView, activePointId, onPoint, document, onMove }: LineDrawingProps) {
  const frame = useRef<HTMLDivElement>(null);
  const room = useRoom(frame);
  const drawn = useLineDrawing(model, marks, takeOuts, room, view);
  return (
    <section aria-label="Isometric" className="flex min-h-0 min-w-0 flex-1 flex-col">
      <ViewButtons view={view} shown={drawn.drawing?.view ?? null} stays={view !== null && marks.sticky} onView={onView} />
      <div ref={frame} className="frame relative min-h-0 overflow-hidden [contain:strict] max-lg:h-[min(88vw,65dvh)] lg:flex-1">
        {drawn.drawing ? (
          <DrawingWindow drawing={drawn.drawing} model={drawn.model} activePointId={activePointId} onPoint={onPoint} document={document} onMove={onMove} />
        ) : (
          <p className="absolute inset-0 grid place-items-center p-6 text-center text-soft">
            {model.legs.length === 0 ? "The isometric grows here as you type the first legs." : drawn.pending ? "Drawing" : "This line cannot be drawn yet. See the findings."}
          </p>
        )}
        {drawn.drawing && drawn.pending ? <p className="pointer-events-none absolute left-3 top-2 text-xs text-soft">Drawing</p> : null}
      </div>
      {drawn.drawing ? <LegendStrip legend={drawn.drawing.legend} model={drawn.model} pointId={activePointId} /> : null}
    </section>
  );
});

function useRoom(frame: React.RefObject<HTMLDivElement | null>): DrawingRoom {
  const [room, setRoom] = useState<DrawingRoom>({ widthMm: 240, heightMm: 180 });
  useEffect(() => {
    const box = frame.current;
    if (!box || typeof ResizeObserver === "undefined") return;
    const observer = new ResizeObserver(([entry]) => {
      if (!entry || entry.contentRect.width === 0) return;
      const mm = (px: number, least: number): number => Math.max(least, Math.floor(px / PX_PER_MM / ROOM_STEP_MM) * ROOM_STEP_MM);
      setRoom({ widthMm: mm(entry.contentRect.width, 140), heightMm: mm(entry.contentRect.height - FOOT_PX, 120) });
    });
    observer.observe(box);
    return () => observer.disconnect();
  }, [frame]);
  return room;
}

interface ViewButtonsProps extends Pick<LineDrawingProps, "view" | "onView"> {
  /** View on the paper, also where it is only proposed. */
  readonly shown: View | null;
  /** Since its first issue the line is drawn from one side. */
  readonly stays: boolean;
}

function ViewButtons({ view, shown, stays, onView: ask }: ViewButtonsProps) {
  const onView = stays ? null : ask;
  return (
    <div role="group" aria-label="Looked at from" className="flex flex-wrap items-center gap-1 pb-1.5 text-sm">
      <button type="button" id="after-grid" disabled={!onView} aria-pressed={view === null} onClick={() => onView?.(null)} className={viewClass(view === null)}>
        Proposed{view === null && shown ? `: ${shown}` : ""}
        {view === null && shown ? <NorthMark view={shown} className="max-sm:hidden" /> : null}
      </button>
      {VIEWS.map((each) => (
        <button key={each} type="button" title={VIEW_NAMES[each]} disabled={!onView} aria-pressed={view === each} aria-label={`View ${each}, ${VIEW_NAMES[each]}`} onClick={() => onView?.(each)} className={viewClass(view === each)}>
          <span className="figure">{each}</span>
          <NorthMark view={each} />
        </button>
      ))}
      {stays ? <span className="text-soft">stays as first issued</span> : null}
    </div>
  );
}

/** A small N with the arrow as it lies on the paper. */
function NorthMark({ view, className }: { readonly view: View; readonly className?: string }) {
  return (
    <span aria-hidden className={clsx("inline-flex items-center gap-0.5 text-xs", className)}>
      N
      <svg viewBox="0 0 16 16" className="size-4" fill="none" stroke="currentColor" strokeWidth="1.6">
        <path d="M8 14V2M4.5 6 8 2l3.5 4" transform={`rotate(${NORTH_DEG[view]} 8 8)`} />
      </svg>
    </span>
  );
}

function viewClass(on: boolean): string {
  return clsx("inline-flex min-h-9 items-center gap-1.5 border px-2.5 max-sm:min-h-11 max-sm:px-2", on ? "border-dye bg-dye text-white" : "border-rule bg-sheet text-ink enabled:hover:border-dye disabled:text-soft");
}
