/**
 * Reads the Item cell: a short trade word, then size, class, ends or text as the item takes them ("red 3", "wn 300",
 * "gate sw", "nozzle N3"). An empty cell lets the line's own elbow stand at a change of direction.
 */
import { NPS_SIZES } from "@/iso";
import type { AxisName, Item, Nps, RatingClass } from "@/iso";
import { refused, understood, type EntryResult } from "./entry-result";
import { itemEcho } from "./item-text";
import { ITEM_WORDS, type ItemWord } from "./item-words";

export interface ItemValue {
  readonly item: Item;
  readonly place: "field" | "field-fit" | null;
}

export const ITEM_HINT = "Type a short word such as wn, gate, tee, red 3, cap or fw, or choose from the list.";
export const NO_ITEM: Item = { kind: "none" };

const CLASSES: readonly RatingClass[] = [150, 300, 600, 900, 1500];
const AXIS_BY_WORD: Readonly<Record<string, AxisName>> = {
  e: "E", w: "W", n: "N", s: "S", u: "U", d: "D", east: "E", west: "W", north: "N", south: "S", up: "U", down: "D",
  bottom: "D", top: "U", fob: "D", fot: "U", bop: "D",
};

/** Words of the list with the longest first, so that "trim sr" is not read as "trim". */
const SPELLINGS: readonly { readonly text: string; readonly word: ItemWord }[] = ITEM_WORDS.flatMap((word) =>
  [word.word, ...word.also].map((text) => ({ text, word })),
).sort((a, b) => b.text.length - a.text.length);

/** Words whose first letters are what was typed, best first; all of them for an empty text. */
export function suggestItems(text: string): readonly ItemWord[] {
  const typed = text.trim().toLowerCase();
  if (typed === "") return ITEM_WORDS;
  const head = typed.split(" ")[0] ?? "";
  const scored = ITEM_WORDS.map((word) => ({ word, score: matchScore(word, typed, head) }));
  return scored.filter((row) => row.score < 9).sort((a, b) => a.score - b.score).map((row) => row.word);
}

/** 0 the word itself .. 4 within its name; 9 no match. */
function matchScore(word: ItemWord, typed: string, head: string): number {
  if (word.word === typed || word.also.includes(typed)) return 0;
  if (word.word === head || word.also.includes(head)) return 1;
  if (word.word.startsWith(typed)) return 2;
  if (word.also.some((also) => also.startsWith(typed))) return 3;
  return word.name.includes(typed) ? 4 : 9;
}

/** Reads an Item cell. @returns the item with its echo, or one sentence that says what to type. Never throws. */
export function parseItem(text: string): EntryResult<ItemValue> {
  const typed = text.trim().replace(/\s+/g, " ");
  if (typed === "" || typed === "-") return understood({ item: NO_ITEM, place: null }, "");
  const lower = typed.toLowerCase();
  const hit = SPELLINGS.find(({ text: word }) => lower === word || lower.startsWith(`${word} `));
  if (!hit) return guessItem(lower);
  const rest = typed.slice(hit.text.length).trim();
  const item = withRest(hit.word, rest);
  if (typeof item === "string") return refused(item);
  return understood({ item, place: hit.word.place ?? null }, itemEcho(item, hit.word.place ?? null));
}

/** A beginning that fits one word only is taken for it ("glo", "supp"). */
function guessItem(typed: string): EntryResult<ItemValue> {
  const near = ITEM_WORDS.filter((word) => word.word.startsWith(typed) || word.also.some((also) => also.startsWith(typed)));
  const only = near.length === 1 ? near[0] : undefined;
  if (!only || typed.length < 2) {
    const names = near.slice(0, 4).map((word) => word.word).join(", ");
    return refused(names ? `"${typed}" could be ${names}; type one of them.` : `"${typed.slice(0, 24)}" is no item. ${ITEM_HINT}`);
  }
  if (only.needsSize) return refused(`Type the size after it, such as ${only.after ?? only.word}.`);
  return understood({ item: only.item, place: only.place ?? null }, itemEcho(only.item, only.place ?? null));
}

/** The item with what was typed after its word, or a sentence. */
function withRest(word: ItemWord, rest: string): Item | string {
  const { item } = word;
  if (rest === "") return word.needsSize ? `Type the size after it, such as ${word.after ?? word.word}.` : item;
  switch (item.kind) {
    case "flange": return withFlangeRest(item, rest);
    case "valve": return withValveRest(item, rest);
    case "tee": return withTeeRest(item, rest);
    case "outlet": case "stub-in": {
      const nps = readNps(rest);
      return nps ? { ...item, branchNps: nps } : sizeMessage(word);
    }
    case "reducer": return withReducerRest(word, item, rest);
    case "end": case "support": return { ...item, text: rest.slice(0, 120) };
    default: return `Nothing follows ${word.word}; type it alone.`;
  }
}

function withFlangeRest(item: Extract<Item, { kind: "flange" }>, rest: string): Item {
  let next = item;
  const text: string[] = [];
  for (const word of rest.split(" ")) {
    const rating = readClass(word);
    if (rating && next.ratingClass === null) next = { ...next, ratingClass: rating };
    else text.push(word);
  }
  return { ...next, text: text.join(" ").slice(0, 120) };
}

const VALVE_ENDS = { bw: "butt", butt: "butt", sw: "socket", socket: "socket", flg: "flanged", flanged: "flanged" } as const;
const VALVE_MATING = { wn: "weld-neck", so: "slip-on", swf: "socket-weld" } as const;

function withValveRest(item: Extract<Item, { kind: "valve" }>, rest: string): Item {
  let next = item;
  const tag: string[] = [];
  for (const word of rest.split(" ")) {
    const lower = word.toLowerCase();
    const rating = readClass(word);
    if (rating && next.ratingClass === null) next = { ...next, ratingClass: rating };
    else if (lower in VALVE_ENDS) next = { ...next, ends: VALVE_ENDS[lower as keyof typeof VALVE_ENDS] };
    else if (lower in VALVE_MATING) next = { ...next, mating: VALVE_MATING[lower as keyof typeof VALVE_MATING] };
    else tag.push(word);
  }
  return { ...next, tag: tag.join(" ").slice(0, 120) };
}

function withTeeRest(item: Extract<Item, { kind: "tee" }>, rest: string): Item | string {
  let next = item;
  for (const word of rest.split(" ")) {
    const nps = readNps(word);
    if (/^(sw|socket)$/i.test(word)) next = { ...next, ends: "socket" };
    else if (nps) next = { ...next, branchNps: nps };
    else return "Type the branch size after tee, such as tee 2, and sw for sockets.";
  }
  return next;
}

function withReducerRest(word: ItemWord, item: Extract<Item, { kind: "reducer" }>, rest: string): Item | string {
  const [size = "", ...others] = rest.replace(/^(to|x) /i, "").split(" ");
  const nps = readNps(size);
  if (!nps) return sizeMessage(word);
  let next: Extract<Item, { kind: "reducer" }> = { ...item, toNps: nps };
  for (const other of others) {
    const lower = other.toLowerCase();
    const axis = AXIS_BY_WORD[lower];
    if (lower === "flat") continue;
    if (axis) next = { ...next, flat: axis };
    else next = { ...next, toSchedule: other.replace(/^sch\.?/i, "").toUpperCase().slice(0, 12) || null };
  }
  if (next.shape === "concentric" && next.flat) return "A concentric reducer has no flat side; type ecc for an eccentric one.";
  return next;
}

function sizeMessage(word: ItemWord): string {
  return `Type a pipe size after ${word.word}, such as ${word.after ?? word.word}.`;
}

function readClass(word: string): RatingClass | null {
  const value = Number(word.replace(/^(cl|class|#)/i, "").replace(/#$/, ""));
  return CLASSES.find((rating) => rating === value) ?? null;
}

/** "2", "1-1/2", `2"`, "1.5"; null when the tables have no such size. */
export function readNps(text: string): Nps | null {
  const plain = text.replace(/["″]$/, "").replace(/^(nps|x)/i, "").replace(" ", "-");
  const decimal: Readonly<Record<string, string>> = { "0.5": "1/2", ".5": "1/2", "0.75": "3/4", ".75": "3/4", "1.25": "1-1/4", "1.5": "1-1/2", "2.5": "2-1/2", "3.5": "3-1/2" };
  const named = decimal[plain] ?? plain;
  return NPS_SIZES.find((size) => size === named) ?? null;
}
