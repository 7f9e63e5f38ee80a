import clsx from "clsx";
import type { ReactNode } from "react";
import { STATE_WORDS, type RevisionState } from "@/iso";

const INKS: Readonly<Record<RevisionState | "hold", string>> = {
  draft: "text-soft",
  "for-review": "text-dye",
  returned: "text-caution",
  "for-fabrication": "text-good",
  superseded: "text-soft",
  void: "text-alert",
  "as-built": "text-ink",
  hold: "text-alert",
};

/** One shape per state, told apart without colour: drawn on a 16 x 16 field. */
function StateShape({ state }: { readonly state: RevisionState | "hold" }) {
  return (
    <svg
      aria-hidden
      viewBox="0 0 16 16"
      data-shape={state}
      className="size-4 shrink-0"
      fill="none"
      stroke="currentColor"
      strokeWidth="1.8"
    >
      {SHAPES[state]}
    </svg>
  );
}

const SHAPES: Readonly<Record<RevisionState | "hold", ReactNode>> = {
  draft: <rect x="2" y="2" width="12" height="12" strokeDasharray="3 2.4" />,
  "for-review": (
    <>
      <circle cx="8" cy="8" r="6" />
      <path d="M8 2a6 6 0 0 1 0 12z" fill="currentColor" />
    </>
  ),
  returned: <path d="M7 2 2 7l5 5M2.5 7H10a4 4 0 0 1 4 4v3" />,
  "for-fabrication": <circle cx="8" cy="8" r="6.4" fill="currentColor" />,
  superseded: <path d="M2 2h12v12H2zM2 14 14 2" />,
  void: <path d="M2 2l12 12M14 2 2 14" strokeWidth="2.4" />,
  "as-built": (
    <>
      <path d="M8 1 15 8l-7 7-7-7z" />
      <path d="M8 5 11 8l-3 3-3-3z" fill="currentColor" />
    </>
  ),
  hold: <path d="M5.2 1.5h5.6l3.7 3.7v5.6l-3.7 3.7H5.2l-3.7-3.7V5.2zM4.5 8h7" />,
};

export interface StateWordProps {
  readonly state: RevisionState;
  readonly hold?: boolean;
  readonly className?: string;
}

/** A revision's state: shape and word together; HOLD stands before the state it lies on. */
export function StateWord({ state, hold, className }: StateWordProps) {
  return (
    <span className={clsx("inline-flex flex-wrap items-center gap-x-3 gap-y-1 text-sm font-bold", className)}>
      {hold ? (
        <span className={clsx("inline-flex items-center gap-1.5 whitespace-nowrap", INKS.hold)}>
          <StateShape state="hold" />
          HOLD
        </span>
      ) : null}
      <span
        className={clsx(
          "inline-flex items-center gap-1.5 whitespace-nowrap",
          INKS[state],
          state === "superseded" && "line-through decoration-1",
        )}
      >
        <StateShape state={state} />
        {STATE_WORDS[state]}
      </span>
    </span>
  );
}
