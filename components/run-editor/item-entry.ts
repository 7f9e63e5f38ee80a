/**
 * Reads the Item cell: a short trade word, then size, class, ends or text as the item takes them ("red 3", "wn 300",
 * "gate sw", "nozzle N3"), then what changes from the point on ("+ spec B2 + ins 2 in"). An empty cell lets the line's
 * own elbow stand at a change of direction.
 */
import type { Item, UnitSystem } from "@/iso";
import { refused, understood, type EntryResult } from "./entry-result";
import { exampleOf, itemWithRest } from "./item-rest";
import { itemEcho } from "./item-text";
import { ITEM_WORDS, type ItemWord } from "./item-words";
import { RestReader, RestRefusal } from "./rest-reader";
import { parseStarts, startsEcho, type Starts } from "./starts-entry";

export interface ItemValue {
  readonly item: Item;
  readonly place: "field" | "field-fit" | null;
  /** What changes from the point on; null for nothing. */
  readonly starts: Starts | null;
}

export const ITEM_HINT = "Type a short word such as wn, gate, tee, red 3, cap or fw, or choose from the list.";
export const NO_ITEM: Item = { kind: "none" };

/** Words of the list with the longest first, so that "trim sr" is not read as "trim". */
const SPELLINGS: readonly { readonly text: string; readonly word: ItemWord }[] = ITEM_WORDS.flatMap((word) =>
  [word.word, ...word.also].map((text) => ({ text, word })),
).sort((a, b) => b.text.length - a.text.length);

/** Words whose first letters are what was typed, best first; all of them for an empty text. */
export function suggestItems(text: string): readonly ItemWord[] {
  const typed = text.trim().toLowerCase();
  if (typed === "") return ITEM_WORDS;
  if (typed.startsWith("+")) return [];
  const head = typed.split(" ")[0] ?? "";
  const scored = ITEM_WORDS.map((word) => ({ word, score: matchScore(word, typed, head) }));
  return scored.filter((row) => row.score < 9).sort((a, b) => a.score - b.score).map((row) => row.word);
}

/** 0 the word itself .. 5 within its group; 9 no match. */
function matchScore(word: ItemWord, typed: string, head: string): number {
  if (word.word === typed || word.also.includes(typed)) return 0;
  if (word.word === head || word.also.includes(head)) return 1;
  if (word.word.startsWith(typed)) return 2;
  if (word.also.some((also) => also.startsWith(typed))) return 3;
  if (word.name.includes(typed)) return 4;
  return typed.length > 2 && word.group.toLowerCase().startsWith(typed) ? 5 : 9;
}

/** Reads an Item cell. @returns the item with its echo, or one sentence that says what to type. Never throws. */
export function parseItem(text: string, units: UnitSystem = "imperial"): EntryResult<ItemValue> {
  const typed = text.trim().replace(/\s+/g, " ");
  const cut = /(^|\s)\+/.exec(typed);
  const head = cut ? typed.slice(0, cut.index).trim() : typed;
  const item = parseHead(head, units);
  if (!item.ok || !cut) return item.ok ? understood({ ...item.value, starts: null }, item.understood) : item;
  const starts = parseStarts(typed.slice(cut.index).trim());
  if (!starts.ok) return starts;
  return understood({ ...item.value, starts: starts.value }, [item.understood, startsEcho(starts.value)].filter((part) => part !== "").join("; "));
}

type Head = Omit<ItemValue, "starts">;

function parseHead(typed: string, units: UnitSystem): EntryResult<Head> {
  if (typed === "" || typed === "-") return understood({ item: NO_ITEM, place: null }, "");
  const lower = typed.toLowerCase();
  const hit = SPELLINGS.find(({ text: word }) => lower === word || lower.startsWith(`${word} `));
  if (!hit) return guessItem(lower);
  return made(hit.word, typed.slice(hit.text.length).trim(), units);
}

function made(word: ItemWord, rest: string, units: UnitSystem): EntryResult<Head> {
  if (rest === "" && word.needs) return refused(`Type ${word.needs} after it, such as ${exampleOf(word)}.`);
  try {
    const item = rest === "" ? word.item : itemWithRest(word, new RestReader(rest, units));
    return understood({ item, place: word.place ?? null }, itemEcho(item, word.place ?? null, units));
  } catch (failure) {
    if (failure instanceof RestRefusal) return refused(failure.message);
    throw failure;
  }
}

/** A beginning that fits one word only is taken for it ("glo", "supp"). */
function guessItem(typed: string): EntryResult<Head> {
  const near = ITEM_WORDS.filter((word) => word.word.startsWith(typed) || word.also.some((also) => also.startsWith(typed)));
  const only = near.length === 1 ? near[0] : undefined;
  if (!only || typed.length < 2) {
    const names = near.slice(0, 4).map((word) => word.word).join(", ");
    return refused(names ? `"${typed}" could be ${names}; type one of them.` : `"${typed.slice(0, 24)}" is no item. ${ITEM_HINT}`);
  }
  return made(only, "", "imperial");
}
