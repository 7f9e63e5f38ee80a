"use client";
import { useEffect, useRef, useState } from "react";
import type { RunDocument } from "@/iso";
import { dimensionMove, type DimensionEdit } from "./dimension-entry";

/** Where the field stands in the drawing's frame, px from its top left. */
export interface FieldPlace {
  readonly left: number;
  readonly top: number;
}

export interface DimensionFieldProps {
  readonly document: RunDocument;
  readonly edit: DimensionEdit;
  readonly place: FieldPlace;
  readonly onMove: (edit: DimensionEdit, moveText: string) => void;
  /** `byKey`: the focus goes back to the drawing. */
  readonly onClose: (byKey: boolean) => void;
}

/** A small field over a number of the drawing: Enter takes it with the Move cell's own reader, Esc leaves it as it was. */
export function DimensionField({ document, edit, place, onMove, onClose }: DimensionFieldProps) {
  const [typed, setTyped] = useState(edit.text);
  const [asked, setAsked] = useState(false);
  const field = useRef<HTMLInputElement>(null);
  const done = useRef(false);
  useEffect(() => field.current?.select(), []);
  const read = dimensionMove(document, edit, typed);
  const take = (byKey: boolean): void => {
    if (done.current) return;
    if (typed.trim() === edit.text.trim()) return leave(byKey);
    if (!read.ok) return setAsked(true);
    done.current = true;
    onMove(edit, read.value);
    onClose(byKey);
  };
  const leave = (byKey: boolean): void => {
    done.current = true;
    onClose(byKey);
  };
  return (
    <div style={{ left: place.left, top: place.top }} className="absolute z-20 w-44 -translate-x-1/2 -translate-y-1/2 max-sm:w-52">
      <input
        ref={field}
        data-dimension-field
        aria-label={`Length to row ${edit.target.row + 1}`}
        aria-invalid={asked && !read.ok ? true : undefined}
        aria-describedby="dimension-echo"
        value={typed}
        autoComplete="off"
        autoCapitalize="none"
        spellCheck={false}
        enterKeyHint="done"
        className="figure w-full border-2 border-dye bg-sheet outline-none px-2 py-1 shadow-md max-sm:min-h-11 max-sm:text-base"
        onChange={(event) => setTyped(event.target.value)}
        onBlur={() => (read.ok ? take(false) : leave(false))}
        onKeyDown={(event) => {
          event.stopPropagation();
          if (event.key === "Enter") take(true);
          if (event.key === "Escape") leave(true);
          if (event.key === "Enter" || event.key === "Escape") event.preventDefault();
        }}
      />
      <p id="dimension-echo" role={asked && !read.ok ? "alert" : undefined} className={`border border-t-0 bg-sheet px-2 py-0.5 text-xs ${read.ok ? "border-hair text-soft" : "border-alert text-alert"}`}>
        {read.ok ? read.understood : read.message}
      </p>
    </div>
  );
}
