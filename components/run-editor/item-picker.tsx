"use client";
import clsx from "clsx";
import { Fragment, useEffect, useRef } from "react";
import { TAKE_OUT_CAUTION } from "./item-text";
import type { ItemWord } from "./item-words";

/** The list under an Item cell, in its groups: short word, full name, examples of what may follow; the caution at its foot. */
export function ItemPicker({ id, words, picked, grouped, onTake }: { readonly id: string; readonly words: readonly ItemWord[]; readonly picked: number | null; readonly grouped: boolean; readonly onTake: (word: ItemWord) => void }) {
  const box = useRef<HTMLDivElement>(null);
  useEffect(() => {
    box.current?.parentElement?.scrollIntoView?.({ block: "nearest" });
  }, []);
  useEffect(() => {
    if (picked !== null) box.current?.querySelector(`[id="${id}-${picked}"]`)?.scrollIntoView?.({ block: "nearest" });
  }, [picked, id]);
  return (
    <div className="absolute left-0 top-[calc(100%-1.1rem)] z-30 w-80 max-w-[calc(100vw-2rem)] border border-ink bg-sheet shadow-md max-sm:w-[calc(100vw-3.5rem)]">
      <div ref={box} id={id} role="listbox" aria-label="Items" className="max-h-80 overflow-y-auto">
        {words.map((word, i) => (
          <Fragment key={word.word}>
            {grouped && words[i - 1]?.group !== word.group ? (
              <div role="presentation" className="cell-label sticky top-0 border-y border-hair bg-shade px-2 py-0.5 first:border-t-0">
                {word.group}
              </div>
            ) : null}
            <WordOption id={`${id}-${i}`} word={word} on={i === picked} onTake={onTake} />
          </Fragment>
        ))}
      </div>
      <p className="border-t border-hair bg-caution-tint px-2 py-1.5 text-xs text-caution">{TAKE_OUT_CAUTION}</p>
    </div>
  );
}

function WordOption({ id, word, on, onTake }: { readonly id: string; readonly word: ItemWord; readonly on: boolean; readonly onTake: (word: ItemWord) => void }) {
  return (
    <div
      id={id}
      role="option"
      aria-selected={on}
      // Taken on press, before the field's blur commits the half-typed text.
      onPointerDown={(event) => {
        event.preventDefault();
        onTake(word);
      }}
      className={clsx("grid cursor-pointer grid-cols-[4.5rem_1fr] gap-2 px-2 py-1.5 max-sm:py-2.5", on ? "bg-dye text-white" : "hover:bg-dye-tint")}
    >
      <span className="figure font-medium">{word.word}</span>
      <span className="min-w-0 text-sm">
        {word.name}
        {word.after ? <span className={clsx("figure block text-xs", on ? "text-white" : "text-soft")}>{word.after}</span> : null}
      </span>
    </div>
  );
}
