"use client";
import clsx from "clsx";
import { useMemo, useRef, type KeyboardEvent, type MouseEvent, type PointerEvent } from "react";
import type { CompareRow, Drawing } from "@/iso";
import { DrawingItems } from "@/components/run-editor/drawing-items";
import { useDrag } from "@/components/run-editor/use-drawing-hand";
import { panViewport, viewportCentre, zoomViewport, type Viewport } from "@/components/run-editor/viewport";
import { nextRow, pickedItems, rowsByRef, type DrawingSide } from "./compare-picks";
import { PickedGlow } from "./picked-glow";

const ZOOM_STEP = 1.3;
const PAN_STEP = 0.12;

export interface CompareDrawingProps {
  readonly drawing: Drawing;
  readonly side: DrawingSide;
  readonly label: string;
  readonly rows: readonly CompareRow[];
  readonly current: number | null;
  readonly pointed: number | null;
  readonly onCurrent: (no: number | null) => void;
  readonly onPointed: (no: number | null) => void;
  /** What is shown; both drawings of a pair share it. */
  readonly shown: Viewport;
  /** Whether the reader has looked closer than all of it. */
  readonly close: boolean;
  /** null = all of it again. */
  readonly onLook: (view: Viewport | null) => void;
  readonly className?: string;
}

/** One drawing of a comparison: its parts find their rows, a drag or the keys move the look of every drawing beside it. */
export function CompareDrawing({ drawing, side, label, rows, current, pointed, onCurrent, onPointed, shown, close, onLook, className }: CompareDrawingProps) {
  const svg = useRef<SVGSVGElement>(null);
  const drag = useDrag(svg, shown, onLook);
  const byRef = useMemo(() => rowsByRef(rows, side), [rows, side]);
  const picked = useMemo(() => pickedItems(drawing.items, rows, side, new Set([current, pointed].filter((no): no is number => no !== null))), [drawing, rows, side, current, pointed]);
  const under = (target: EventTarget): readonly number[] => byRef.get((target as Element).closest("[data-ref]")?.getAttribute("data-ref") ?? "") ?? [];
  const onClick = (event: MouseEvent): void => {
    if (!drag.moved()) onCurrent(nextRow(under(event.target), current));
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    const next = keyedView(event.key, shown);
    if (next === null) return;
    event.preventDefault();
    onLook(next === "all" ? null : next);
  };
  return (
    <div className={clsx("relative border border-ink bg-white", className)}>
      <svg
        ref={svg}
        role="img"
        aria-label={`${label}. Plus, minus and the arrow keys move the look; 0 shows all.`}
        tabIndex={0}
        viewBox={`${shown.x} ${shown.y} ${shown.width} ${shown.height}`}
        preserveAspectRatio="xMidYMid meet"
        onClick={onClick}
        onKeyDown={onKeyDown}
        onPointerOver={(event: PointerEvent) => onPointed(event.pointerType === "touch" ? null : (under(event.target)[0] ?? null))}
        onPointerLeave={() => onPointed(null)}
        {...drag.handlers}
        className={clsx("block size-full select-none", close ? "touch-none" : "touch-pan-y")}
      >
        <PickedGlow items={picked} />
        <DrawingItems items={drawing.items} touchable />
      </svg>
      <div data-screen-only className="absolute right-2 bottom-2 flex border border-rule bg-sheet">
        <Look label="Closer" sign="+" onPress={() => onLook(zoomViewport(shown, viewportCentre(shown), 1 / ZOOM_STEP))} />
        <Look label="Wider" sign="−" onPress={() => onLook(zoomViewport(shown, viewportCentre(shown), ZOOM_STEP))} />
        <Look label="Show all" sign="All" onPress={() => onLook(null)} />
      </div>
    </div>
  );
}

function Look({ label, sign, onPress }: { readonly label: string; readonly sign: string; readonly onPress: () => void }) {
  return (
    <button type="button" aria-label={label} title={label} onClick={onPress} className="min-h-11 min-w-11 border-l border-hair px-2 first:border-l-0 hover:bg-dye-tint">
      {sign}
    </button>
  );
}

function keyedView(key: string, shown: Viewport): Viewport | "all" | null {
  switch (key) {
    case "+": case "=": return zoomViewport(shown, viewportCentre(shown), 1 / ZOOM_STEP);
    case "-": return zoomViewport(shown, viewportCentre(shown), ZOOM_STEP);
    case "0": return "all";
    case "ArrowLeft": return panViewport(shown, -PAN_STEP, 0);
    case "ArrowRight": return panViewport(shown, PAN_STEP, 0);
    case "ArrowUp": return panViewport(shown, 0, -PAN_STEP);
    case "ArrowDown": return panViewport(shown, 0, PAN_STEP);
    default: return null;
  }
}
