"use client";
import { useRef, useState, type ClipboardEvent, type KeyboardEvent, type PointerEvent } from "react";
import type { CellTarget, Column } from "./cell-commit";
import { keyIntent, type KeyIntent } from "./cell-keys";
import { useEditor } from "./editor-context";
import type { Draft } from "./editor-types";
import { suggestItems } from "./item-entry";
import type { ItemWord } from "./item-words";
import { isTable } from "./paste";

export interface TypedCell {
  readonly runId: string;
  readonly row: number;
  readonly column: Column;
  readonly text: string;
  readonly draft: Draft | null;
  readonly active: boolean;
  readonly first: boolean;
  readonly last: boolean;
}

/** The typing of one cell: its text until it is committed, the list under it, and what each key does. */
export function useCellTyping(props: TypedCell) {
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
