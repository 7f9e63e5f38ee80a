"use client";
/** The hand on the drawing: wheel and pinch look closer or wider, a drag moves the look, a still press points. */
import { useEffect, useRef, type PointerEvent, type RefObject } from "react";
import type { PaperPoint } from "@/iso";
import { zoomViewport, type Viewport } from "./viewport";

const WHEEL_STEP = 1.25;
/** Pixels a press may wander and still be a press. */
const STILL_PX = 5;

/** Paper point under a place on screen. */
function paperAt(svg: SVGSVGElement, clientX: number, clientY: number): PaperPoint | null {
  const matrix = svg.getScreenCTM?.();
  if (!matrix) return null;
  const point = new DOMPoint(clientX, clientY).matrixTransform(matrix.inverse());
  return [point.x, point.y];
}

/** React's wheel listener is passive, so the page would scroll along; this one is not. */
export function useWheel(svg: RefObject<SVGSVGElement | null>, zoom: (factor: number, about?: PaperPoint) => void): void {
  useEffect(() => {
    const box = svg.current;
    if (!box) return;
    const onWheel = (event: WheelEvent): void => {
      event.preventDefault();
      zoom(event.deltaY > 0 ? WHEEL_STEP : 1 / WHEEL_STEP, paperAt(box, event.clientX, event.clientY) ?? undefined);
    };
    box.addEventListener("wheel", onWheel, { passive: false });
    return () => box.removeEventListener("wheel", onWheel);
  }, [svg, zoom]);
}

interface Finger {
  readonly x: number;
  readonly y: number;
}

interface Grip {
  readonly from: Viewport;
  readonly fingers: ReadonlyMap<number, Finger>;
}

/** Handlers of the drawing; `moved` says whether the last press was a drag or a pinch. */
export function useDrag(svg: RefObject<SVGSVGElement | null>, shown: Viewport, setLook: (view: Viewport) => void) {
  const fingers = useRef(new Map<number, Finger>());
  const grip = useRef<Grip | null>(null);
  const moved = useRef(false);
  /** A finger put down or lifted starts the move anew from where things are. */
  const regrip = (): void => {
    grip.current = fingers.current.size > 0 ? { from: shown, fingers: new Map(fingers.current) } : null;
  };
  const lift = (event: PointerEvent<SVGSVGElement>): void => {
    fingers.current.delete(event.pointerId);
    regrip();
  };
  const handlers = {
    onPointerDown: (event: PointerEvent<SVGSVGElement>) => {
      if (fingers.current.size === 0) moved.current = false;
      fingers.current.set(event.pointerId, { x: event.clientX, y: event.clientY });
      regrip();
    },
    onPointerMove: (event: PointerEvent<SVGSVGElement>) => {
      const scale = svg.current?.getScreenCTM?.()?.a;
      if (!grip.current || !scale || !fingers.current.has(event.pointerId)) return;
      fingers.current.set(event.pointerId, { x: event.clientX, y: event.clientY });
      const start = grip.current.fingers.get(event.pointerId);
      if (!moved.current && start && Math.hypot(event.clientX - start.x, event.clientY - start.y) < STILL_PX) return;
      if (!moved.current) svg.current?.setPointerCapture(event.pointerId);
      moved.current = true;
      setLook(gripped(grip.current, fingers.current, scale, svg.current));
    },
    onPointerUp: lift,
    onPointerCancel: lift,
  };
  return { moved: () => moved.current, handlers };
}

/** The look after the fingers moved: one drags, two also scale about their middle. */
function gripped({ from, fingers: before }: Grip, now: ReadonlyMap<number, Finger>, scale: number, svg: SVGSVGElement | null): Viewport {
  const [a0, b0] = [...before.values()];
  const [a1, b1] = [...now.values()];
  if (!a0 || !a1) return from;
  const [start, end] = [middle(a0, b0), middle(a1, b1)];
  const dragged = { ...from, x: from.x - (end.x - start.x) / scale, y: from.y - (end.y - start.y) / scale };
  if (!b0 || !b1 || !svg) return dragged;
  const factor = Math.hypot(a0.x - b0.x, a0.y - b0.y) / Math.max(1, Math.hypot(a1.x - b1.x, a1.y - b1.y));
  return zoomViewport(dragged, [dragged.x + dragged.width / 2, dragged.y + dragged.height / 2], factor);
}

function middle(a: Finger, b: Finger | undefined): Finger {
  return b ? { x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 } : a;
}
