"use client";
import clsx from "clsx";
import { useEffect, useRef } from "react";
import { TAKE_OUT_CAUTION } from "./item-text";
import type { ItemWord } from "./item-words";

/** The list under an Item cell: short word, full name, an example of what may follow; the caution stands at its foot. */
export function ItemPicker({ id, words, picked, onTake }: { readonly id: string; readonly words: readonly ItemWord[]; readonly picked: number | null; readonly onTake: (word: ItemWord) => void }) {
  const box = useRef<HTMLUListElement>(null);
  useEffect(() => {
    box.current?.parentElement?.scrollIntoView?.({ block: "nearest" });
  }, []);
  useEffect(() => {
    if (picked !== null) box.current?.children[picked]?.scrollIntoView?.({ block: "nearest" });
  }, [picked]);
  return (
    <div className="absolute left-0 top-[calc(100%-1.1rem)] z-30 w-80 max-w-[calc(100vw-2rem)] border border-ink bg-sheet shadow-md max-sm:w-[calc(100vw-3.5rem)]">
      <ul ref={box} id={id} role="listbox" aria-label="Items" className="max-h-72 overflow-y-auto">
        {words.map((word, i) => (
          <li
            key={word.word}
            id={`${id}-${i}`}
            role="option"
            aria-selected={i === picked}
            // Taken on press, before the field's blur commits the half-typed text.
            onPointerDown={(event) => {
              event.preventDefault();
              onTake(word);
            }}
            className={clsx("grid cursor-pointer grid-cols-[4.5rem_1fr] gap-2 px-2 py-1.5 max-sm:py-2.5", i === picked ? "bg-dye text-white" : "hover:bg-dye-tint")}
          >
            <span className="figure font-medium">{word.word}</span>
            <span className="min-w-0 text-sm">
              {word.name}
              {word.after ? <span className={clsx("figure block text-xs", i === picked ? "text-white" : "text-soft")}>{word.after}</span> : null}
            </span>
          </li>
        ))}
      </ul>
      <p className="border-t border-hair bg-caution-tint px-2 py-1.5 text-xs text-caution">{TAKE_OUT_CAUTION}</p>
    </div>
  );
}
