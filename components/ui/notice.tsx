"use client";
import clsx from "clsx";
import { createContext, useCallback, useContext, useMemo, useState, type ReactNode } from "react";

export type NoticeTone = "note" | "caution" | "trouble" | "done";

const TONES: Readonly<Record<NoticeTone, { box: string; word: string }>> = {
  note: { box: "border-dye bg-dye-tint", word: "Note" },
  caution: { box: "border-caution bg-caution-tint", word: "Caution" },
  trouble: { box: "border-alert bg-alert-tint", word: "Not done" },
  done: { box: "border-good bg-sheet", word: "Done" },
};

/** A ruled remark; its first word says what kind it is, so that colour is never alone. */
export function Notice({
  tone = "note",
  word,
  children,
  className,
}: {
  readonly tone?: NoticeTone;
  readonly word?: string;
  readonly children: ReactNode;
  readonly className?: string;
}) {
  return (
    <div
      role={tone === "trouble" ? "alert" : undefined}
      className={clsx("border-l-4 px-4 py-3", TONES[tone].box, className)}
    >
      <strong className="mr-2">{word ?? TONES[tone].word}.</strong>
      {children}
    </div>
  );
}

interface ToastItem {
  readonly id: number;
  readonly tone: NoticeTone;
  readonly text: string;
}

type Say = (text: string, tone?: NoticeTone) => void;
const ToastContext = createContext<Say>(() => undefined);

/** How long a toast stays, ms; trouble stays until it is closed. */
const TOAST_MS = 6_000;

/** Holds the short messages at the foot of the window; wrap the app in it once. */
export function ToastRegion({ children }: { readonly children: ReactNode }) {
  const [items, setItems] = useState<readonly ToastItem[]>([]);
  const close = useCallback((id: number) => setItems((now) => now.filter((item) => item.id !== id)), []);
  const say = useCallback<Say>(
    (text, tone = "done") => {
      const id = Date.now() + Math.random();
      setItems((now) => [...now.slice(-2), { id, tone, text }]);
      if (tone !== "trouble") setTimeout(() => close(id), TOAST_MS);
    },
    [close],
  );
  const value = useMemo(() => say, [say]);
  return (
    <ToastContext.Provider value={value}>
      {children}
      <div
        aria-live="polite"
        data-screen-only
        className="fixed inset-x-3 bottom-3 z-50 mx-auto max-w-xl space-y-2"
      >
        {items.map((item) => (
          <div
            key={item.id}
            className={clsx(
              "flex items-center gap-3 border border-l-4 bg-sheet px-4 py-2 shadow-md",
              item.tone === "trouble" ? "border-alert" : "border-dye",
            )}
          >
            <p className="min-w-0 flex-1">{item.text}</p>
            <button
              type="button"
              onClick={() => close(item.id)}
              className="min-h-11 px-2 text-dye underline underline-offset-4"
            >
              Close
            </button>
          </div>
        ))}
      </div>
    </ToastContext.Provider>
  );
}

/** Says a short sentence at the foot of the window. */
export function useToast(): Say {
  return useContext(ToastContext);
}
