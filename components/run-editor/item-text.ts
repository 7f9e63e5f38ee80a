/** Writes what stands at a point: the short text of its cell, the echo in full words, the caution beside it. */
import type { AxisName, Item, RatingClass } from "@/iso";
import { ITEM_WORDS, type ItemWord } from "./item-words";

export const TAKE_OUT_CAUTION = "Nominal take-out: measure the fitting in hand.";
export const TRIMMED_CAUTION = "Trimmed elbow: needs the engineer's permission.";
const AXIS_WORD: Readonly<Record<AxisName, string>> = { E: "east", W: "west", N: "north", S: "south", U: "up", D: "down" };

/** The word of the list an item belongs to; null for the empty item. */
export function wordOf(item: Item, place: "field" | "field-fit" | null = null): ItemWord | null {
  return ITEM_WORDS.find((word) => sameWord(word, item, place)) ?? null;
}

function sameWord(word: ItemWord, item: Item, place: "field" | "field-fit" | null): boolean {
  const own = word.item;
  if (own.kind === "flange" && item.kind === "flange") return own.flange === item.flange && (own.goes === "nozzle") === (item.goes === "nozzle" && item.flange === "weld-neck");
  if (own.kind === "valve" && item.kind === "valve") return own.valve === item.valve;
  if (own.kind === "elbow" && item.kind === "elbow") return own.elbow === item.elbow;
  if (own.kind === "reducer" && item.kind === "reducer") return own.shape === item.shape;
  if (own.kind === "coupling" && item.kind === "coupling") return own.half === item.half;
  if (own.kind === "end" && item.kind === "end") return own.goes === item.goes;
  if (own.kind === "joint" && item.kind === "joint") return (word.place ?? null) === place;
  return own.kind === item.kind;
}

/** The text an Item cell shows for a stored item: short, and read back it gives the same item. */
export function itemText(item: Item, place: "field" | "field-fit" | null = null): string {
  const word = wordOf(item, place)?.word;
  if (!word) return "";
  return [word, ...itemTail(item)].filter((part) => part !== "").join(" ");
}

function itemTail(item: Item): readonly string[] {
  switch (item.kind) {
    case "flange": return [classText(item.ratingClass), item.text];
    case "valve": return [classText(item.ratingClass), item.ends === "butt" ? "bw" : item.ends === "socket" ? "sw" : "", item.mating === "slip-on" ? "so" : item.mating === "socket-weld" ? "swf" : "", item.tag];
    case "tee": return [item.branchNps ?? "", item.ends === "socket" ? "sw" : ""];
    case "outlet": case "stub-in": return [item.branchNps];
    case "reducer": return [item.toNps, item.toSchedule ?? "", item.flat ? `flat ${item.flat.toLowerCase()}` : ""];
    case "end": case "support": return [item.text];
    default: return [];
  }
}

function classText(rating: RatingClass | null): string {
  return rating === null ? "" : String(rating);
}

/** The echo: what the item is in full words. */
export function itemEcho(item: Item, place: "field" | "field-fit" | null = null): string {
  const name = wordOf(item, place)?.name ?? "";
  switch (item.kind) {
    case "flange": return words(name, item.ratingClass && `class ${item.ratingClass}`, item.text);
    case "valve": return words(`${item.ends === "butt" ? "butt-weld" : item.ends === "socket" ? "socket-weld" : "flanged"} ${name}`, item.ratingClass && `class ${item.ratingClass}`, item.tag);
    case "tee": return words(`${item.ends === "socket" ? "socket-weld " : ""}${item.branchNps ? "reducing tee" : "tee"}`, item.branchNps && `branch NPS ${item.branchNps}`);
    case "outlet": case "stub-in": return `${name} NPS ${item.branchNps}`;
    case "reducer": return words(`${name} to NPS ${item.toNps}`, item.toSchedule && `schedule ${item.toSchedule}`, item.flat && `flat side ${AXIS_WORD[item.flat]}`);
    case "end": case "support": return words(name, item.text);
    default: return name;
  }
}

function words(...parts: readonly (string | number | false | null | undefined)[]): string {
  return parts.filter((part) => part !== "" && part !== null && part !== undefined && part !== false).join(", ");
}

/** The caution that belongs beside an item, or null. */
export function itemCaution(item: Item): string | null {
  if (item.kind === "elbow" && item.elbow.startsWith("trimmed")) return TRIMMED_CAUTION;
  return wordOf(item)?.takeOut ? TAKE_OUT_CAUTION : null;
}
