import { describe, expect, it } from "vitest";
import { keyIntent, type CellMood, type KeyPress } from "@/components/run-editor/cell-keys";

const REST: CellMood = { editing: false, listOpen: false, picked: false, first: false, last: false, block: false, freeText: false };
const press = (key: string, held: Partial<KeyPress> = {}): KeyPress => ({ key, ctrl: false, shift: false, alt: false, ...held });

describe("keys of a cell", () => {
  it.each([
    ["Enter", {}, REST, { kind: "commit", step: "next-row" }],
    ["Enter", {}, { ...REST, picked: true, listOpen: true }, { kind: "take", step: "next-row" }],
    ["Tab", {}, REST, { kind: "commit", step: "right" }],
    ["Tab", { shift: true }, REST, { kind: "commit", step: "left" }],
    ["ArrowDown", {}, { ...REST, listOpen: true }, { kind: "list", by: 1 }],
    ["ArrowDown", {}, REST, { kind: "commit", step: "down" }],
    ["ArrowLeft", {}, REST, { kind: "commit", step: "left" }],
    ["Home", {}, REST, { kind: "step", step: "row-start" }],
    ["End", { ctrl: true }, REST, { kind: "step", step: "last" }],
    ["Enter", { ctrl: true }, REST, { kind: "insert" }],
    ["Delete", { ctrl: true }, REST, { kind: "remove" }],
    ["ArrowUp", { alt: true }, REST, { kind: "move", by: -1 }],
    ["z", { ctrl: true }, REST, { kind: "undo" }],
    ["z", { ctrl: true }, { ...REST, editing: true }, { kind: "cancel" }],
    ["y", { ctrl: true }, REST, { kind: "redo" }],
    ["Z", { ctrl: true, shift: true }, REST, { kind: "redo" }],
    ["Escape", {}, { ...REST, editing: true }, { kind: "cancel" }],
    ["Escape", {}, REST, { kind: "leave" }],
    ["?", { shift: true }, REST, { kind: "help" }],
  ] as const)("%s %o", (key, held, mood, intent) => {
    expect(keyIntent(press(key, held), mood)).toEqual(intent);
  });

  it.each([
    ["ArrowLeft", { ...REST, editing: true }],
    ["Home", { ...REST, editing: true }],
    ["?", { ...REST, freeText: true }],
    ["Tab", { ...REST, last: true }],
    ["e", REST],
  ] as const)("leaves %s to the browser when it belongs to it", (key, mood) => {
    expect(keyIntent(press(key), mood)).toBeNull();
  });
});
