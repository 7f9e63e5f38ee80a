"use client";
import clsx from "clsx";
import { memo, useId, useRef, useState, type ClipboardEvent, type KeyboardEvent, type PointerEvent } from "react";
import { useEditor } from "./editor-context";
import type { CellTarget, Column } from "./cell-commit";
import { keyIntent, type KeyIntent } from "./cell-keys";
import type { Draft, TypingEcho } from "./editor-types";
import { suggestItems } from "./item-entry";
import { ItemPicker } from "./item-picker";
import type { ItemWord } from "./item-words";
import { isTable } from "./paste";

export const COLUMN_LABEL: Readonly<Record<Column, string>> = {
  move: "Move", item: "Item", joint: "Joint", source: "Source", note: "Note",
};
const COLUMN_INDEX: Readonly<Record<Column, number>> = { move: 2, item: 3, joint: 4, source: 5, note: 6 };

/** A sentence longer than its column hangs over the rows below while its cell is the current one. */
const HANGING = "sm:absolute sm:top-[calc(100%-1.1rem)] sm:z-20 sm:w-72 sm:max-w-none sm:border sm:border-alert sm:bg-sheet sm:py-1.5 sm:shadow-md";

export interface GridCellProps {
  readonly runId: string;
  readonly row: number;
  readonly column: Column;
  /** Name of the row for a screen reader: "row 3". */
  readonly rowName: string;
  readonly text: string;
  readonly echo: string;
  readonly placeholder: string;
  readonly draft: Draft | null;
  readonly active: boolean;
  /** Within a block of several cells. */
  readonly inBlock: boolean;
  readonly typing: TypingEcho | null;
  readonly first: boolean;
  readonly last: boolean;
}

/** One cell: an entry field that takes the text, shows how it was understood, and keeps a text it did not understand. */
export const GridCell = memo(function GridCell(props: GridCellProps) {
  const { column, active, draft, rowName } = props;
  const id = useId();
  const cell = useCellTyping(props);
  const message = cell.typed === null ? (draft?.message ?? null) : null;
  const echo = cell.typed !== null ? (props.typing?.words ?? "") : props.echo;
  const unclear = cell.typed !== null && props.typing !== null && !props.typing.ok;
  return (
    <div role="gridcell" aria-colindex={COLUMN_INDEX[column]} aria-selected={props.inBlock || undefined} className={clsx("relative min-w-0 border-hair px-1 py-1 sm:border-l", props.inBlock && "bg-dye/15", column === "move" && "max-sm:col-span-2")}>
      <span aria-hidden className="cell-label block px-1 sm:hidden">
        {COLUMN_LABEL[column]}
      </span>
      <input
        {...cell.input}
        id={id}
        data-cell={`${props.runId}|${props.row}|${column}`}
        aria-label={`${COLUMN_LABEL[column]}, ${rowName}`}
        aria-describedby={`${id}-echo`}
        aria-invalid={message ? true : undefined}
        {...(column === "item" ? { role: "combobox", "aria-expanded": cell.list.length > 0, "aria-controls": `${id}-list`, "aria-autocomplete": "list" as const, "aria-activedescendant": cell.picked === null ? undefined : `${id}-list-${cell.picked}` } : {})}
        placeholder={cell.input.readOnly ? "" : props.placeholder}
        tabIndex={active ? 0 : -1}
        autoComplete="off"
        autoCapitalize="none"
        autoCorrect="off"
        spellCheck={column === "note"}
        enterKeyHint="next"
        className={clsx(
          "w-full min-w-0 border px-1.5 py-1 leading-6 -outline-offset-1 max-sm:min-h-11 max-sm:text-base placeholder:text-soft/85",
          column === "move" || column === "item" ? "figure text-[0.9375rem]" : "text-sm",
          message ? "border-alert bg-alert-tint" : active ? "border-dye bg-sheet" : "border-transparent bg-transparent hover:border-rule max-sm:border-hair",
        )}
      />
      <p id={`${id}-echo`} role={message ? "alert" : undefined} className={clsx("px-1.5 text-xs leading-[1.1rem] max-sm:empty:hidden sm:min-h-[1.1rem]", message ? clsx("font-medium text-alert", active ? [HANGING, column === "move" || column === "item" ? "sm:left-1" : "sm:right-1"] : "sm:line-clamp-2") : unclear ? "text-caution" : "text-soft")}>
        {message ?? echo}
      </p>
      {cell.list.length > 0 ? <ItemPicker id={`${id}-list`} words={cell.list} picked={cell.picked} grouped={cell.grouped} onTake={cell.take} /> : null}
    </div>
  );
});

/** The typing of one cell: its text until it is committed, the list under it, and what each key does. */
function useCellTyping(props: GridCellProps) {
  const { send, openHelp, readOnly, blockText } = useEditor();
  const target: CellTarget = { runId: props.runId, row: props.row, column: props.column };
  const [typed, setTyped] = useState<string | null>(null);
  const [editing, setEditing] = useState(false);
  const [listWanted, setListWanted] = useState(false);
  const [picked, setPicked] = useState<number | null>(null);
  const field = useRef<HTMLInputElement>(null);
  const list: readonly ItemWord[] = props.column === "item" && listWanted && !readOnly ? suggestItems(typed ?? "") : [];

  const reset = (): void => {
    setTyped(null);
    setEditing(false);
    setListWanted(false);
    setPicked(null);
  };
  const type = (text: string): void => {
    setTyped(text);
    setEditing(true);
    setListWanted(props.column === "item");
    setPicked(null);
    send({ type: "typing", target, text });
  };
  const commit = (text: string, step: Extract<KeyIntent, { kind: "commit" }>["step"]): void => {
    reset();
    if (readOnly) send({ type: "step", step });
    else send({ type: "commit", target, text, step });
  };
  /** A word that still needs its size or radius goes into the cell and waits for it. */
  const take = (word: ItemWord, step: Extract<KeyIntent, { kind: "commit" }>["step"] = "stay"): void => {
    if (!word.needs) return commit(word.word, step);
    type(`${word.word} `);
    setListWanted(false);
    field.current?.focus();
  };
  const act = (intent: KeyIntent): void => {
    switch (intent.kind) {
      case "commit": return commit(typed ?? props.text, intent.step);
      case "take": {
        const word = picked === null ? undefined : list[picked];
        return word ? take(word, intent.step) : commit(typed ?? props.text, intent.step);
      }
      case "step": return send({ type: "step", step: intent.step });
      case "list": return setPicked((now) => (now === null ? (intent.by > 0 ? 0 : list.length - 1) : (now + intent.by + list.length) % list.length));
      case "edit": {
        setEditing(true);
        setListWanted(props.column === "item");
        return field.current?.setSelectionRange(props.text.length, props.text.length);
      }
      case "cancel": {
        reset();
        return send({ type: "drop", target });
      }
      case "leave": return document.getElementById("after-grid")?.focus();
      case "help": return openHelp();
      case "extend": return send({ type: "extend", step: intent.step });
      case "pick-rows": return intent.all ? send({ type: "pick-run", runId: target.runId }) : send({ type: "pick-rows", runId: target.runId, from: target.row, to: target.row });
      case "let-go": return send({ type: "let-go" });
      default: return actOnRow(intent);
    }
  };
  const actOnRow = (intent: KeyIntent): void => {
    if (readOnly) return;
    if (intent.kind === "undo" || intent.kind === "redo") return send({ type: intent.kind });
    if (typed !== null) commit(typed, "stay");
    switch (intent.kind) {
      case "move": return send({ type: "row-move", target, by: intent.by });
      case "double": return send({ type: "row-double", target });
      case "fill": return send({ type: "fill", series: intent.series });
      case "clear": return send({ type: "clear" });
      case "insert": return send({ type: "row-insert", target });
      case "remove": return send({ type: "row-remove", target });
    }
  };
  /** Puts the block on the clipboard; a single cell's text goes there as the browser does it. */
  const toClipboard = (event: ClipboardEvent, cutting: boolean): void => {
    const text = typed === null ? blockText() : null;
    if (text === null) return;
    event.preventDefault();
    event.clipboardData.setData("text/plain", text);
    if (cutting && !readOnly) send({ type: "cut" });
  };
  const input = {
    ref: field,
    value: typed ?? props.text,
    readOnly,
    onChange: (event: { target: HTMLInputElement }) => type(event.target.value),
    onFocus: (event: { target: HTMLInputElement }) => {
      event.target.select();
      if (!props.active) send({ type: "cursor", target, focus: false });
    },
    onBlur: () => {
      setListWanted(false);
      setEditing(false);
      if (typed !== null) commit(typed, "stay");
    },
    onDoubleClick: () => setEditing(true),
    onPointerDown: (event: PointerEvent<HTMLInputElement>) => {
      if (!event.shiftKey) return props.active ? send({ type: "let-go" }) : undefined;
      event.preventDefault();
      send({ type: "stretch", target, rows: false });
    },
    onCopy: (event: ClipboardEvent) => toClipboard(event, false),
    onCut: (event: ClipboardEvent) => toClipboard(event, true),
    onPaste: (event: ClipboardEvent) => {
      const text = event.clipboardData.getData("text/plain");
      if (readOnly || (!isTable(text) && blockText() === null)) return;
      event.preventDefault();
      reset();
      send({ type: "paste", target, text });
    },
    onKeyDown: (event: KeyboardEvent) => {
      if (event.nativeEvent.isComposing) return;
      const mood = { editing: editing || typed !== null || props.draft !== null, listOpen: list.length > 0, picked: picked !== null, first: props.first, last: props.last, block: blockText() !== null, freeText: props.column === "note" };
      const intent = keyIntent({ key: event.key, ctrl: event.ctrlKey || event.metaKey, shift: event.shiftKey, alt: event.altKey }, mood);
      if (!intent) return;
      event.preventDefault();
      act(intent);
    },
  };
  return { typed, list, picked, grouped: (typed ?? "").trim() === "", take: (word: ItemWord) => take(word), input };
}
