"use client";
import { useEffect, useId, useRef, type ReactNode } from "react";

export interface DialogProps {
  readonly open: boolean;
  readonly title: string;
  readonly onClose: () => void;
  readonly children: ReactNode;
  /** Wide for forms with columns. */
  readonly wide?: boolean;
}

/**
 * The browser's own modal dialog: focus stays inside, Escape closes, focus returns to what opened it. The content is
 * mounted only while open, so a form inside starts fresh each time.
 */
export function Dialog({ open, title, onClose, children, wide }: DialogProps) {
  const box = useRef<HTMLDialogElement>(null);
  const titleId = useId();
  useEffect(() => {
    const dialog = box.current;
    if (!dialog) return;
    if (open && !dialog.open) dialog.showModal?.();
    if (!open && dialog.open) dialog.close();
  }, [open]);
  return (
    <dialog
      ref={box}
      aria-labelledby={titleId}
      onClose={onClose}
      onCancel={(event) => {
        if (event.target === event.currentTarget) onClose();
      }}
      className={`m-auto max-h-[92dvh] w-[calc(100vw-1.5rem)] overflow-y-auto border border-ink bg-sheet p-0 ${wide ? "max-w-4xl" : "max-w-xl"}`}
    >
      {open ? (
        <div className="p-5 sm:p-7">
          <div className="mb-4 flex items-start justify-between gap-4 border-b border-ink pb-3">
            <h2 id={titleId} className="text-xl">
              {title}
            </h2>
            <button
              type="button"
              onClick={onClose}
              className="-mt-1 min-h-11 min-w-11 px-2 font-medium text-dye underline underline-offset-4"
            >
              Close
            </button>
          </div>
          {children}
        </div>
      ) : null}
    </dialog>
  );
}

/** The row of buttons at a dialog's foot. */
export function DialogActions({ children }: { readonly children: ReactNode }) {
  return <div className="mt-6 flex flex-wrap items-center justify-end gap-3">{children}</div>;
}
