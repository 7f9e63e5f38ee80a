/** Writes what stands at a point: the short text of its cell, the echo in full words, the caution beside it. */
import { formatTerm, type AxisName, type Item, type RatingClass, type UnitSystem } from "@/iso";
import { lengthEntryText } from "@/components/jobs/settings-text";
import { ITEM_WORDS, type ItemWord } from "./item-words";

type Place = "field" | "field-fit" | null;

export const TAKE_OUT_CAUTION = "Nominal take-out: measure the fitting in hand.";
export const TRIMMED_CAUTION = "Trimmed elbow: needs the engineer's permission.";
const AXIS_WORD: Readonly<Record<AxisName, string>> = { E: "east", W: "west", N: "north", S: "south", U: "up", D: "down" };
const END_WORD = { butt: "bw", socket: "sw", threaded: "th", flanged: "flg" } as const;
const END_NAME = { butt: "butt-weld", socket: "socket-weld", threaded: "threaded", flanged: "flanged" } as const;
const MATING_WORD = { "weld-neck": "", "slip-on": "so", "socket-weld": "swf", threaded: "thf", "lap-joint": "lj" } as const;
const GOES_WORD = { open: "", nozzle: "nozzle", continued: "cont", existing: "exist" } as const;
const GOES_NAME = { open: "", nozzle: "nozzle", continued: "continued", existing: "existing, verify" } as const;

/** The word of the list an item belongs to; null for the empty item. */
export function wordOf(item: Item, place: Place = null): ItemWord | null {
  return ITEM_WORDS.find((word) => sameWord(word, item, place)) ?? null;
}

function sameWord(word: ItemWord, item: Item, place: Place): boolean {
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
export function itemText(item: Item, place: Place = null, units: UnitSystem = "imperial"): string {
  const word = wordOf(item, place)?.word;
  if (!word) return "";
  return [word, ...itemTail(item, (mm) => lengthEntryText(mm, units))].filter((part) => part !== "").join(" ");
}

type LengthText = (mm: number) => string;

function itemTail(item: Item, length: LengthText): readonly string[] {
  switch (item.kind) {
    case "flange": return flangeTail(item, length);
    case "valve": return [
      classText(item.ratingClass), item.ends === "flanged" ? "" : END_WORD[item.ends], MATING_WORD[item.mating],
      item.stem ? `stem ${item.stem.toLowerCase()}` : "", item.faceToFaceMm ? `f2f ${length(item.faceToFaceMm)}` : "", item.tag,
    ];
    case "instrument": return [classText(item.ratingClass), item.ends === "threaded" ? "" : END_WORD[item.ends], item.lengthMm ? `f2f ${length(item.lengthMm)}` : "", item.tag];
    case "tee": case "cross": return [item.branchNps ?? "", item.ends === "butt" ? "" : END_WORD[item.ends]];
    case "outlet": return [item.branchNps, item.ends ? END_WORD[item.ends] : "", item.set ?? ""];
    case "stub-in": return [item.branchNps, item.set ?? "", item.padMm ? `pad ${length(item.padMm)}` : ""];
    case "reducer": return [item.toNps, item.toSchedule ?? "", item.flat ? `flat ${item.flat.toLowerCase()}` : ""];
    case "return": return [item.radius === "SR" ? "sr" : "", item.toward.toLowerCase()];
    case "mitre": return [String(item.pieces), item.radiusMm ? `r ${length(item.radiusMm)}` : ""];
    case "bend": return [length(item.radiusMm)];
    case "cap": case "coupling": return [item.ends && !(item.kind === "cap" && item.ends === "butt") ? END_WORD[item.ends] : ""];
    case "union": return [item.ends === "threaded" ? "th" : ""];
    case "end": case "support": return [item.text];
    default: return [];
  }
}

function flangeTail(item: Extract<Item, { kind: "flange" }>, length: LengthText): readonly string[] {
  const nozzleWord = item.flange === "weld-neck" && item.goes === "nozzle";
  return [
    classText(item.ratingClass), item.stubEnd === "short" ? "short" : "",
    item.boltHoles === "straddle" ? "" : `turn ${item.boltHoles.turnDeg} ${item.boltHoles.from.toLowerCase()}`,
    item.gasketMm ? `gsk ${length(item.gasketMm)}` : "", item.gasketSide === "before" ? "gsk before" : "",
    nozzleWord ? "" : GOES_WORD[item.goes], item.text,
  ];
}

function classText(rating: RatingClass | null): string {
  return rating === null ? "" : String(rating);
}

/** The echo: what the item is in full words. */
export function itemEcho(item: Item, place: Place = null, units: UnitSystem = "imperial"): string {
  const name = wordOf(item, place)?.name ?? "";
  const length = (mm: number): string => `${formatTerm(mm, units)} ${units === "metric" ? "mm" : "in"}`;
  switch (item.kind) {
    case "flange": return flangeEcho(item, name, length);
    case "valve": return words(`${END_NAME[item.ends]} ${name}`, item.ratingClass && `class ${item.ratingClass}`, item.stem && `stem ${AXIS_WORD[item.stem]}`, item.faceToFaceMm && `${length(item.faceToFaceMm)} face to face as measured`, item.tag);
    case "instrument": return words(`${END_NAME[item.ends]} ${name}`, item.ratingClass && `class ${item.ratingClass}`, item.lengthMm && `${length(item.lengthMm)} face to face`, item.tag);
    case "tee": case "cross": return words(`${item.ends === "butt" ? "" : `${END_NAME[item.ends]} `}${item.branchNps ? "reducing " : ""}${item.kind}`, item.branchNps && `branch NPS ${item.branchNps}`);
    case "outlet": return words(`${item.ends && item.ends !== "butt" ? `${END_NAME[item.ends]} ` : ""}${name} NPS ${item.branchNps}`, item.set && `set ${item.set}`);
    case "stub-in": return words(`${name} NPS ${item.branchNps}`, item.set && `set ${item.set}`, item.padMm && `pad ${length(item.padMm)} OD`);
    case "reducer": return words(`${name} to NPS ${item.toNps}`, item.toSchedule && `schedule ${item.toSchedule}`, item.flat && `flat side ${AXIS_WORD[item.flat]}`);
    case "return": return `${item.radius === "SR" ? "short" : "long"}-radius 180 return, second leg ${AXIS_WORD[item.toward]}`;
    case "mitre": return words(`${name} of ${item.pieces} pieces`, item.radiusMm && `radius ${length(item.radiusMm)}`);
    case "bend": return `${name}, radius ${length(item.radiusMm)}`;
    case "cap": case "coupling": case "union": return item.ends && item.ends !== "butt" ? `${END_NAME[item.ends]} ${name}` : name;
    case "end": case "support": return words(name, item.text);
    default: return name;
  }
}

function flangeEcho(item: Extract<Item, { kind: "flange" }>, name: string, length: LengthText): string {
  const turned = item.boltHoles === "straddle" ? "" : `holes turned ${item.boltHoles.turnDeg}° seen from ${AXIS_WORD[item.boltHoles.from]}`;
  const goes = item.flange === "weld-neck" && item.goes === "nozzle" ? "" : GOES_NAME[item.goes];
  return words(name, item.stubEnd === "short" && "short stub end", item.ratingClass && `class ${item.ratingClass}`, turned, item.gasketMm && `gasket ${length(item.gasketMm)}`, item.gasketSide === "before" && "the face after the gasket", goes, item.text);
}

function words(...parts: readonly (string | number | false | null | undefined)[]): string {
  return parts.filter((part) => part !== "" && part !== null && part !== undefined && part !== false && part !== 0).join(", ");
}

/** The caution that belongs beside an item, or null. */
export function itemCaution(item: Item): string | null {
  if (item.kind === "elbow" && item.elbow.startsWith("trimmed")) return TRIMMED_CAUTION;
  return wordOf(item)?.takeOut ? TAKE_OUT_CAUTION : null;
}
