"use client";
import clsx from "clsx";
import { memo, useCallback, useEffect, useMemo, useRef, useState, type KeyboardEvent, type MouseEvent } from "react";
import type { Drawing, Model, PaperPoint, View } from "@/iso";
import { DrawingItems, parseRef } from "./drawing-items";
import { pointFinder } from "./drawing-refs";
import type { DrawingRoom } from "./draw-line";
import { useLineDrawing } from "./use-line-model";
import { useDrag, useWheel } from "./use-drawing-hand";
import { fitViewport, panViewport, viewportCentre, zoomViewport, type Viewport } from "./viewport";

export interface LineDrawingProps {
  readonly model: Model;
  readonly view: View | null;
  readonly onView: ((view: View | null) => void) | null;
  readonly activePointId: string | null;
  readonly onPoint: (pointId: string) => void;
}

/** Screen pixels given to a millimetre of paper, so that 2.5 mm lettering stays readable. */
const PX_PER_MM = 3;
/** The room changes in steps, so that a dragged window edge does not redraw at each pixel. */
const ROOM_STEP_MM = 20;
/** Foot of the frame kept for the look buttons, px. */
const FOOT_PX = 52;
const ZOOM_STEP = 1.25;
const PAN_STEP = 0.12;

const VIEW_NAMES: Readonly<Record<View, string>> = { 1: "from south-west", 2: "from south-east", 3: "from north-east", 4: "from north-west" };
/** Way plant north points on the paper in each view, degrees from up, clockwise. */
const NORTH_DEG: Readonly<Record<View, number>> = { 1: -60, 2: 60, 3: 120, 4: -120 };
const VIEWS: readonly View[] = [1, 2, 3, 4];

/** The live isometric: what is pointed at finds its row, and the current row shows in the active colour. */
export const LineDrawing = memo(function LineDrawing({ model, view, onView, activePointId, onPoint }: LineDrawingProps) {
  const frame = useRef<HTMLDivElement>(null);
  const room = useRoom(frame);
  const drawn = useLineDrawing(model, room, view);
  return (
    <section aria-label="Isometric" className="flex min-h-0 min-w-0 flex-1 flex-col">
      <ViewButtons view={view} shown={drawn.drawing?.view ?? null} onView={onView} />
      <div ref={frame} className="frame relative min-h-0 overflow-hidden max-lg:h-[min(88vw,65dvh)] lg:flex-1">
        {drawn.drawing ? (
          <DrawingWindow drawing={drawn.drawing} model={drawn.model} activePointId={activePointId} onPoint={onPoint} />
        ) : (
          <p className="absolute inset-0 grid place-items-center p-6 text-center text-soft">
            {model.legs.length === 0 ? "The isometric grows here as you type the first legs." : drawn.pending ? "Drawing" : "This line cannot be drawn yet. See the findings."}
          </p>
        )}
        {drawn.drawing && drawn.pending ? <p className="pointer-events-none absolute left-3 top-2 text-xs text-soft">Drawing</p> : null}
      </div>
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

function ViewButtons({ view, shown, onView }: { readonly view: View | null; readonly shown: View | null; readonly onView: LineDrawingProps["onView"] }) {
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

interface WindowProps extends Pick<LineDrawingProps, "activePointId" | "onPoint" | "model"> {
  readonly drawing: Drawing;
}

function DrawingWindow({ drawing, model, activePointId, onPoint }: WindowProps) {
  const fitted = useMemo(() => fitViewport(drawing.bounds), [drawing.bounds]);
  /** null = follows the drawing as it grows. */
  const [look, setLook] = useState<Viewport | null>(null);
  const shown = look ?? fitted;
  const svg = useRef<SVGSVGElement>(null);
  const pointOf = useMemo(() => pointFinder(model), [model]);
  const active = useMemo(() => drawing.items.filter((item) => item.ref && activePointId && pointOf(item.ref) === activePointId), [drawing, activePointId, pointOf]);
  const zoom = useCallback((factor: number, about?: PaperPoint) => setLook((now) => zoomViewport(now ?? fitted, about ?? viewportCentre(now ?? fitted), factor)), [fitted]);
  useWheel(svg, zoom);
  const drag = useDrag(svg, shown, setLook);
  const onClick = (event: MouseEvent<SVGSVGElement>): void => {
    if (drag.moved()) return;
    const ref = parseRef((event.target as Element).closest("[data-ref]")?.getAttribute("data-ref") ?? "");
    const pointId = ref ? pointOf(ref) : null;
    if (pointId) onPoint(pointId);
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    const next = keyedView(event.key, shown);
    if (!next) return;
    event.preventDefault();
    setLook(next === "fit" ? null : next);
  };
  return (
    <>
      <svg
        ref={svg}
        role="img"
        aria-label={`Isometric of line ${model.document.number}. Plus, minus and the arrow keys move the look; 0 shows all.`}
        tabIndex={0}
        viewBox={`${shown.x} ${shown.y} ${shown.width} ${shown.height}`}
        preserveAspectRatio="xMidYMid meet"
        onClick={onClick}
        onKeyDown={onKeyDown}
        {...drag.handlers}
        className={clsx("absolute inset-x-1 top-1 h-[calc(100%-0.25rem-52px)] w-[calc(100%-0.5rem)] select-none", look ? "touch-none" : "touch-pan-y")}
      >
        <DrawingItems items={drawing.items} touchable />
        <g pointerEvents="none">
          <DrawingItems items={active} active />
        </g>
      </svg>
      <div data-screen-only className="absolute bottom-2 right-2 flex border border-rule bg-sheet">
        <LookButton label="Closer" sign="+" onPress={() => zoom(1 / ZOOM_STEP)} />
        <LookButton label="Wider" sign="−" onPress={() => zoom(ZOOM_STEP)} />
        <LookButton label="Show all" sign="All" onPress={() => setLook(null)} />
      </div>
    </>
  );
}

function LookButton({ label, sign, onPress }: { readonly label: string; readonly sign: string; readonly onPress: () => void }) {
  return (
    <button type="button" aria-label={label} title={label} onClick={onPress} className="min-h-9 min-w-9 border-l border-hair px-2 first:border-l-0 hover:bg-dye-tint max-sm:min-h-11 max-sm:min-w-11">
      {sign}
    </button>
  );
}

function keyedView(key: string, shown: Viewport): Viewport | "fit" | null {
  switch (key) {
    case "+": case "=": return zoomViewport(shown, viewportCentre(shown), 1 / ZOOM_STEP);
    case "-": return zoomViewport(shown, viewportCentre(shown), ZOOM_STEP);
    case "0": return "fit";
    case "ArrowLeft": return panViewport(shown, -PAN_STEP, 0);
    case "ArrowRight": return panViewport(shown, PAN_STEP, 0);
    case "ArrowUp": return panViewport(shown, 0, -PAN_STEP);
    case "ArrowDown": return panViewport(shown, 0, PAN_STEP);
    default: return null;
  }
}
