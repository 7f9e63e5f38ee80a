"use client";
import clsx from "clsx";
import { memo, useCallback, useMemo, useRef, useState, type KeyboardEvent, type MouseEvent, type PointerEvent } from "react";
import type { Drawing, Model, PaperPoint, Ref, RunDocument } from "@/iso";
import { useToast } from "@/components/ui/notice";
import { CutCard } from "./cut-card";
import { dimensionEdit, isOverall, OVERALL_WORDS, type DimensionEdit } from "./dimension-entry";
import { DimensionField, type FieldPlace } from "./dimension-field";
import { DrawingItems, parseRef } from "./drawing-items";
import { pieceFinder, pointFinder, type PointOfRef } from "./drawing-refs";
import { useEditor } from "./editor-context";
import { usePointed } from "./pointed-store";
import { useDrag, useWheel } from "./use-drawing-hand";
import { fitViewport, panViewport, viewportCentre, zoomViewport, type Viewport } from "./viewport";

const ZOOM_STEP = 1.25;
const PAN_STEP = 0.12;

export interface WindowProps {
  readonly drawing: Drawing;
  readonly model: Model;
  readonly activePointId: string | null;
  readonly onPoint: (pointId: string, focus?: boolean) => void;
  /** What the numbers on the drawing are edited in. */
  readonly document: RunDocument;
  /** null for a reader: a press on a number finds its row. */
  readonly onMove: ((edit: DimensionEdit, moveText: string) => void) | null;
}

interface OpenField {
  readonly edit: DimensionEdit;
  readonly place: FieldPlace;
}

/** The drawing under a hand: parts find their rows, numbers are edited in place, cut lengths show their arithmetic. */
export function DrawingWindow({ drawing, model, activePointId, onPoint, document, onMove }: WindowProps) {
  const fitted = useMemo(() => fitViewport(drawing.bounds), [drawing.bounds]);
  /** null = follows the drawing as it grows. */
  const [look, setLook] = useState<Viewport | null>(null);
  const [field, setField] = useState<OpenField | null>(null);
  const shown = look ?? fitted;
  const svg = useRef<SVGSVGElement>(null);
  const pointOf = useMemo(() => pointFinder(model), [model]);
  const cut = useCutCard(model, activePointId);
  const say = useToast();
  const zoom = useCallback((factor: number, about?: PaperPoint) => setLook((now) => zoomViewport(now ?? fitted, about ?? viewportCentre(now ?? fitted), factor)), [fitted]);
  useWheel(svg, zoom);
  const drag = useDrag(svg, shown, setLook);
  /** Opens the field over a point's number, or in the middle where the number is not on paper. */
  const editNumber = (pointId: string): boolean => {
    const edit = onMove ? dimensionEdit(document, pointId) : null;
    const box = svg.current;
    if (!edit || !box) return false;
    setField({ edit, place: placeOf(box, pointId) });
    return true;
  };
  const onClick = (event: MouseEvent<SVGSVGElement>): void => {
    if (drag.moved()) return;
    const ref = refUnder(event.target);
    const pointId = ref ? pointOf(ref) : null;
    if (!ref || !pointId) return;
    if (onMove && isOverall(ref)) return say(OVERALL_WORDS);
    if (ref.kind === "dimension" && editNumber(pointId)) return onPoint(pointId, false);
    onPoint(pointId);
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    const neighbour = event.key === "PageDown" ? 1 : event.key === "PageUp" ? -1 : 0;
    const next = keyedView(event.key, shown);
    if (event.key === "Enter" && activePointId) editNumber(activePointId);
    else if (neighbour !== 0) stepPoint(model, activePointId, neighbour, onPoint);
    else if (next) setLook(next === "fit" ? null : next);
    else return;
    event.preventDefault();
  };
  return (
    <>
      <svg
        ref={svg}
        role="img"
        aria-label={`Isometric of line ${model.document.number}. Page Up and Page Down go from point to point, Enter edits the number there. Plus, minus and the arrow keys move the look; 0 shows all.`}
        tabIndex={0}
        viewBox={`${shown.x} ${shown.y} ${shown.width} ${shown.height}`}
        preserveAspectRatio="xMidYMid meet"
        onClick={onClick}
        onKeyDown={onKeyDown}
        {...drag.handlers}
        {...cut.handlers}
        className={clsx("absolute will-change-transform inset-x-1 top-1 h-[calc(100%-0.25rem-52px)] w-[calc(100%-0.5rem)] select-none", look ? "touch-none" : "touch-pan-y", onMove && "[&_text[data-ref^='dimension:']]:cursor-text")}
      >
        <DrawingItems items={drawing.items} touchable />
        <PickedItems drawing={drawing} pointOf={pointOf} activePointId={activePointId} />
      </svg>
      {cut.piece && !field ? <CutCard model={model} piece={cut.piece} /> : null}
      {field && onMove ? (
        <DimensionField
          key={field.edit.pointId}
          document={document}
          edit={field.edit}
          place={field.place}
          onMove={onMove}
          onClose={(byKey) => {
            setField(null);
            if (byKey) svg.current?.focus({ preventScroll: true });
          }}
        />
      ) : null}
      <div data-screen-only className="absolute bottom-2 right-2 flex border border-rule bg-sheet">
        {onMove && activePointId ? <LookButton label="Edit the number of this row" sign="Edit" onPress={() => editNumber(activePointId)} /> : null}
        <LookButton label="Closer" sign="+" onPress={() => zoom(1 / ZOOM_STEP)} />
        <LookButton label="Wider" sign="−" onPress={() => zoom(ZOOM_STEP)} />
        <LookButton label="Show all" sign="All" onPress={() => setLook(null)} />
      </div>
    </>
  );
}

/** What belongs to the current row and to the row under the pointer, once more in the active colour. */
const PickedItems = memo(function PickedItems({ drawing, pointOf, activePointId }: { readonly drawing: Drawing; readonly pointOf: PointOfRef; readonly activePointId: string | null }) {
  const pointed = usePointed(useEditor().pointed);
  const byPoint = useMemo(() => {
    const found = new Map<string, Drawing["items"][number][]>();
    for (const item of drawing.items) {
      const id = item.ref ? pointOf(item.ref) : null;
      if (id !== null) found.set(id, [...(found.get(id) ?? []), item]);
    }
    return found;
  }, [drawing, pointOf]);
  const ids = [...new Set([activePointId, pointed])].filter((id): id is string => id !== null);
  return (
    <g pointerEvents="none">
      {ids.map((id) => (
        <DrawingItems key={id} items={byPoint.get(id) ?? NOTHING} active />
      ))}
    </g>
  );
});

const NOTHING: Drawing["items"] = [];

/** The piece whose pipe or mark the pointer rests on; with the drawing focused by key, that of the current row. */
function useCutCard(model: Model, activePointId: string | null) {
  const [key, setKey] = useState<string | null>(null);
  const [focused, setFocused] = useState(false);
  const pieceOf = useMemo(() => pieceFinder(model), [model]);
  const pointed = key === null ? null : model.pieces.find((piece) => piece.key === key);
  const current = focused && activePointId ? model.pieces.find((piece) => piece.legId === activePointId) : null;
  const handlers = {
    onPointerOver: (event: PointerEvent<SVGSVGElement>) => {
      const ref = event.pointerType === "touch" ? null : refUnder(event.target);
      setKey(ref ? pieceOf(ref) : null);
    },
    onPointerLeave: () => setKey(null),
    onFocus: (event: { currentTarget: SVGSVGElement }) => setFocused(event.currentTarget.matches(":focus-visible")),
    onBlur: () => setFocused(false),
  };
  return { piece: pointed ?? current ?? null, handlers };
}

function refUnder(target: EventTarget): Ref | null {
  return parseRef((target as Element).closest("[data-ref]")?.getAttribute("data-ref") ?? "");
}

/** Place of a point's number in the frame; its middle where the number is not on paper. */
function placeOf(svg: SVGSVGElement, pointId: string): FieldPlace {
  const frame = svg.parentElement?.getBoundingClientRect();
  const number = [...svg.querySelectorAll("text[data-ref]")].find((text) => text.getAttribute("data-ref") === `dimension:${pointId}`)?.getBoundingClientRect();
  if (!frame) return { left: 0, top: 0 };
  if (!number) return { left: frame.width / 2, top: frame.height / 2 };
  const margin = Math.min(104, frame.width / 2);
  const left = number.left + number.width / 2 - frame.left;
  return { left: Math.max(margin, Math.min(frame.width - margin, left)), top: Math.max(32, Math.min(frame.height - 60, number.top + number.height / 2 - frame.top)) };
}

function stepPoint(model: Model, activePointId: string | null, by: number, onPoint: WindowProps["onPoint"]): void {
  const at = model.nodes.findIndex((node) => node.pointId === activePointId);
  const next = model.nodes[at + by];
  if (next) onPoint(next.pointId, false);
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
