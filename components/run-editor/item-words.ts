/**
 * The trade's short words for what stands at a point. Each row is one word the Item cell offers: what it makes, what
 * it is called in full, and what else may be typed for it. Common shop usage, no list of anyone's.
 */
import type { Item } from "@/iso";

export interface ItemWord {
  readonly word: string;
  readonly name: string;
  readonly also: readonly string[];
  /** The item the bare word makes; sizes and classes typed after it are read into it. */
  readonly item: Item;
  /** Weld place that comes with the word ("fw"). */
  readonly place?: "field" | "field-fit";
  /** What may follow, as an example. */
  readonly after?: string;
  /** A size must follow. */
  readonly needsSize?: boolean;
  /** True where a table's take-out is used, so that the caution of nominal take-outs belongs beside it. */
  readonly takeOut: boolean;
}

const flange = (kind: "weld-neck" | "slip-on" | "socket-weld" | "blind"): Item => ({
  kind: "flange", flange: kind, ratingClass: null, boltHoles: "straddle", gasketSide: "after", goes: "open", text: "",
});
const valve = (kind: "gate" | "globe" | "check" | "ball" | "butterfly"): Item => ({
  kind: "valve", valve: kind, ends: "flanged", ratingClass: null, mating: "weld-neck", stem: null, faceToFaceMm: null, tag: "",
});
const elbow = (kind: Extract<Item, { kind: "elbow" }>["elbow"]): Item => ({ kind: "elbow", elbow: kind });
const end = (goes: Extract<Item, { kind: "end" }>["goes"]): Item => ({ kind: "end", goes, text: "" });
/** Stands in for a size that is still to be typed. */
const SIZE_TO_COME = "2" as const;

export const ITEM_WORDS: readonly ItemWord[] = [
  { word: "wn", name: "weld-neck flange", also: ["weldneck", "weld-neck", "wnrf"], item: flange("weld-neck"), after: "wn 300", takeOut: true },
  { word: "so", name: "slip-on flange", also: ["slipon", "slip-on", "sorf"], item: flange("slip-on"), after: "so 150", takeOut: true },
  { word: "swf", name: "socket-weld flange", also: ["sw-flange"], item: flange("socket-weld"), after: "swf 300", takeOut: true },
  { word: "blind", name: "blind flange", also: ["bl", "bf"], item: flange("blind"), after: "blind 150", takeOut: true },
  { word: "nozzle", name: "weld-neck flange on a nozzle", also: ["noz"], item: { ...flange("weld-neck"), goes: "nozzle" } as Item, after: "nozzle N3", takeOut: true },
  { word: "gate", name: "gate valve", also: ["gv"], item: valve("gate"), after: "gate 300, gate bw, gate sw", takeOut: true },
  { word: "globe", name: "globe valve", also: ["glv"], item: valve("globe"), after: "globe 300", takeOut: true },
  { word: "check", name: "check valve", also: ["chk", "cv"], item: valve("check"), after: "check 150", takeOut: true },
  { word: "ball", name: "ball valve", also: ["bv"], item: valve("ball"), after: "ball 150", takeOut: true },
  { word: "bfly", name: "butterfly valve", also: ["butterfly", "btfly"], item: valve("butterfly"), after: "bfly 150", takeOut: true },
  { word: "90", name: "long-radius 90 elbow", also: ["ell", "elbow", "lr", "lr90", "l90"], item: elbow("lr-90"), takeOut: true },
  { word: "sr", name: "short-radius 90 elbow", also: ["sr90", "s90"], item: elbow("sr-90"), takeOut: true },
  { word: "45", name: "long-radius 45 elbow", also: ["lr45", "l45"], item: elbow("lr-45"), takeOut: true },
  { word: "trim", name: "trimmed long-radius elbow", also: ["cut", "trimmed"], item: elbow("trimmed-lr"), takeOut: true },
  { word: "trim sr", name: "trimmed short-radius elbow", also: ["cut sr", "trimmed sr"], item: elbow("trimmed-sr"), takeOut: true },
  { word: "sw90", name: "socket-weld 90 elbow", also: ["sw-90"], item: elbow("sw-90"), takeOut: true },
  { word: "sw45", name: "socket-weld 45 elbow", also: ["sw-45"], item: elbow("sw-45"), takeOut: true },
  { word: "tee", name: "tee", also: ["t"], item: { kind: "tee", ends: "butt", branchNps: null }, after: "tee 2, tee sw", takeOut: true },
  { word: "outlet", name: "branch outlet", also: ["ol", "let"], item: { kind: "outlet", branchNps: SIZE_TO_COME }, after: "outlet 2", needsSize: true, takeOut: true },
  { word: "stub", name: "stub-in branch", also: ["stubin", "stub-in"], item: { kind: "stub-in", branchNps: SIZE_TO_COME }, after: "stub 2", needsSize: true, takeOut: false },
  { word: "red", name: "concentric reducer", also: ["conc", "reducer", "cred"], item: { kind: "reducer", shape: "concentric", toNps: SIZE_TO_COME, toSchedule: null, flat: null }, after: "red 3", needsSize: true, takeOut: true },
  { word: "ecc", name: "eccentric reducer", also: ["ered", "eccentric"], item: { kind: "reducer", shape: "eccentric", toNps: SIZE_TO_COME, toSchedule: null, flat: "D" }, after: "ecc 3 flat d", needsSize: true, takeOut: true },
  { word: "cap", name: "cap", also: ["c"], item: { kind: "cap" }, takeOut: true },
  { word: "cpl", name: "coupling", also: ["coupling", "full"], item: { kind: "coupling", half: false }, takeOut: true },
  { word: "half", name: "half coupling", also: ["hcpl", "half-coupling"], item: { kind: "coupling", half: true }, takeOut: true },
  { word: "weld", name: "weld on straight pipe", also: ["w", "joint", "bw"], item: { kind: "joint" }, takeOut: false },
  { word: "fw", name: "field weld on straight pipe", also: ["field"], item: { kind: "joint" }, place: "field", takeOut: false },
  { word: "ffw", name: "field-fit weld on straight pipe", also: ["fit"], item: { kind: "joint" }, place: "field-fit", takeOut: false },
  { word: "sup", name: "support", also: ["support", "ps"], item: { kind: "support", text: "" }, after: "sup shoe", takeOut: false },
  { word: "end", name: "open pipe end, beveled", also: ["open", "be"], item: end("open"), takeOut: false },
  { word: "end fw", name: "pipe end, field weld", also: ["end field"], item: end("field-weld"), after: "end fw to L-204", takeOut: false },
  { word: "cont", name: "continued on another line", also: ["continued", "to"], item: end("continued"), after: "cont L-204", takeOut: false },
  { word: "exist", name: "existing pipe, verify", also: ["existing", "ex"], item: end("existing"), after: "exist 4 in header", takeOut: false },
];
