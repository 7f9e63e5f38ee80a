/**
 * What may follow each item's short word, read into the item. Each reader throws RestRefusal with the sentence to show.
 * A little long, because the readers of all items stand side by side.
 */
import type { Item } from "@/iso";
import type { ItemWord } from "./item-words";
import { axisOf, readClass, readNps, RestRefusal, type RestReader } from "./rest-reader";

type Of<K extends Item["kind"]> = Extract<Item, { kind: K }>;
type Ends = "butt" | "socket" | "threaded";

const TEXT_LIMIT = 120;
const PIPE_ENDS: Readonly<Record<string, Ends>> = {
  bw: "butt", butt: "butt", weld: "butt", sw: "socket", socket: "socket", th: "threaded", thd: "threaded", threaded: "threaded", scr: "threaded",
};
const PART_ENDS: Readonly<Record<string, Ends | "flanged">> = { ...PIPE_ENDS, flg: "flanged", fl: "flanged", flanged: "flanged" };
const MATING: Readonly<Record<string, Of<"valve">["mating"]>> = { wn: "weld-neck", so: "slip-on", swf: "socket-weld", thf: "threaded", lj: "lap-joint" };
const GOES: Readonly<Record<string, Of<"flange">["goes"]>> = { nozzle: "nozzle", noz: "nozzle", cont: "continued", continued: "continued", exist: "existing", existing: "existing" };
const LENGTH_WORDS = new Set(["f2f", "ftf", "len", "long"]);

/** The item of a word with what was typed after it. @throws RestRefusal */
export function itemWithRest(word: ItemWord, rest: RestReader): Item {
  const { item } = word;
  switch (item.kind) {
    case "flange": return flangeWith(item, rest);
    case "valve": return valveWith(item, rest);
    case "instrument": return instrumentWith(item, rest);
    case "tee": case "cross": return teeWith(word, item, rest);
    case "outlet": return outletWith(word, item, rest);
    case "stub-in": return stubWith(word, item, rest);
    case "reducer": return reducerWith(word, item, rest);
    case "return": return returnWith(item, rest);
    case "mitre": return mitreWith(item, rest);
    case "bend": return alone(word, { ...item, radiusMm: bendRadius(rest) }, rest);
    case "cap": case "coupling": return formed(word, item, rest);
    case "union": return alone(word, { ...item, ends: socketOr(word, rest) ?? item.ends }, rest);
    case "end": case "support": return { ...item, text: rest.rest().slice(0, TEXT_LIMIT) };
    default: return alone(word, item, rest);
  }
}

/** Nothing more may follow. */
function alone<T extends Item>(word: ItemWord, item: T, rest: RestReader): T {
  if (!rest.done) throw new RestRefusal(word.after ? `Type ${word.word} such as ${word.after}; "${rest.rest().slice(0, 24)}" means nothing there.` : `Nothing follows ${word.word}; type it alone.`);
  return item;
}

function flangeWith(item: Of<"flange">, rest: RestReader): Item {
  let next = item;
  const text: string[] = [];
  while (!rest.done) {
    const word = rest.peek();
    const rating = next.ratingClass === null ? readClass(word) : null;
    const goes = GOES[word];
    if (text.length > 0) text.push(rest.rest());
    else if (rating) next = { ...next, ratingClass: (rest.take(), rating) };
    else if (word === "turn") next = { ...next, boltHoles: boltTurn(rest) };
    else if (word === "gsk" || word === "gasket") next = (rest.take(), gasketWith(next, rest));
    else if (next.flange === "lap-joint" && (word === "short" || word === "long")) next = (rest.take(), lapWith(next, word));
    else if (goes) next = (rest.take(), { ...next, goes });
    else text.push(rest.take());
  }
  return { ...next, text: text.join(" ").slice(0, TEXT_LIMIT) };
}

/** "turn 22.5 s": degrees clockwise, and the side the face is looked at from. */
function boltTurn(rest: RestReader): Of<"flange">["boltHoles"] {
  rest.take();
  const turnDeg = rest.degrees("the turn of the bolt holes");
  if (rest.peek() === "from") rest.take();
  return { turnDeg, from: rest.axis("the side the holes are looked at from after the turn") };
}

/** "gsk 3/32" is a thickness; "gsk before" says which face of a pair the point marks. */
function gasketWith(item: Of<"flange">, rest: RestReader): Of<"flange"> {
  const word = rest.peek();
  if (word !== "before" && word !== "after") return { ...item, gasketMm: rest.length("the gasket's thickness") };
  rest.take();
  return { ...item, gasketSide: word };
}

function lapWith(item: Of<"flange">, stub: "short" | "long"): Of<"flange"> {
  const { stubEnd: _before, ...plain } = item;
  return stub === "short" ? { ...plain, stubEnd: "short" } : plain;
}

function valveWith(item: Of<"valve">, rest: RestReader): Item {
  let next = item;
  const tag: string[] = [];
  while (!rest.done) {
    const word = rest.peek();
    const rating = next.ratingClass === null ? readClass(word) : null;
    const ends = PART_ENDS[word];
    const mating = MATING[word];
    if (rating) next = { ...next, ratingClass: (rest.take(), rating) };
    else if (ends) next = { ...next, ends: (rest.take(), ends) };
    else if (mating) next = { ...next, mating: (rest.take(), mating) };
    else if (word === "stem") next = (rest.take(), { ...next, stem: rest.axis("the way the stem points") });
    else if (LENGTH_WORDS.has(word)) next = (rest.take(), { ...next, faceToFaceMm: rest.length("the measured face to face") });
    else tag.push(rest.take());
  }
  return { ...next, tag: tag.join(" ").slice(0, TEXT_LIMIT) };
}

function instrumentWith(item: Of<"instrument">, rest: RestReader): Item {
  let next = item;
  const tag: string[] = [];
  while (!rest.done) {
    const word = rest.peek();
    const rating = next.ratingClass === null ? readClass(word) : null;
    const ends = PART_ENDS[word];
    if (rating) next = { ...next, ratingClass: (rest.take(), rating) };
    else if (ends) next = { ...next, ends: (rest.take(), ends) };
    else if (LENGTH_WORDS.has(word)) next = (rest.take(), { ...next, lengthMm: rest.length("its face to face") });
    else tag.push(rest.take());
  }
  return { ...next, tag: tag.join(" ").slice(0, TEXT_LIMIT) };
}

function teeWith<T extends Of<"tee"> | Of<"cross">>(word: ItemWord, item: T, rest: RestReader): T {
  let next = item;
  while (!rest.done) {
    const typed = rest.take();
    const ends = PIPE_ENDS[typed.toLowerCase()];
    const nps = readNps(typed);
    if (ends) next = { ...next, ends };
    else if (nps) next = { ...next, branchNps: nps };
    else throw new RestRefusal(`Type the branch size after ${word.word}, such as ${word.word} 2, and sw or th for sockets or threads.`);
  }
  return next;
}

function outletWith(word: ItemWord, item: Of<"outlet">, rest: RestReader): Item {
  let next: Of<"outlet"> = { ...item, branchNps: sizeNext(word, rest) };
  while (!rest.done) {
    const typed = rest.take().toLowerCase();
    const ends = PIPE_ENDS[typed];
    if (ends) next = { ...next, ends };
    else if (typed === "in" || typed === "on") next = { ...next, set: typed };
    else throw new RestRefusal(`After the size of an outlet: sw or th for its end, in or on for how it is set.`);
  }
  return next;
}

function stubWith(word: ItemWord, item: Of<"stub-in">, rest: RestReader): Item {
  let next: Of<"stub-in"> = { ...item, branchNps: sizeNext(word, rest) };
  while (!rest.done) {
    const typed = rest.take().toLowerCase();
    if (typed === "in" || typed === "on") next = { ...next, set: typed };
    else if (typed === "pad") next = { ...next, padMm: rest.length("the pad's outside diameter") };
    else throw new RestRefusal(`After the size of a stub-in: in or on for how it is set, pad with its outside diameter.`);
  }
  return next;
}

function reducerWith(word: ItemWord, item: Of<"reducer">, rest: RestReader): Item {
  if (rest.peek() === "to" || rest.peek() === "x") rest.take();
  let next: Of<"reducer"> = { ...item, toNps: sizeNext(word, rest) };
  while (!rest.done) {
    const typed = rest.take();
    const axis = axisOf(typed);
    if (typed.toLowerCase() === "flat") continue;
    if (axis) next = { ...next, flat: axis };
    else next = { ...next, toSchedule: typed.replace(/^sch\.?/i, "").toUpperCase().slice(0, 12) || null };
  }
  if (next.shape === "concentric" && next.flat) throw new RestRefusal("A concentric reducer has no flat side; type ecc for an eccentric one.");
  return next;
}

function returnWith(item: Of<"return">, rest: RestReader): Item {
  const radius = rest.peek() === "sr" || rest.peek() === "lr" ? (rest.take().toUpperCase() as "SR" | "LR") : item.radius;
  const toward = rest.axis("the way the second leg of the return lies");
  if (!rest.done) throw new RestRefusal("Type a return as ret u, or ret sr n for a short radius.");
  return { ...item, radius, toward };
}

const MOST_PIECES = 5;

function mitreWith(item: Of<"mitre">, rest: RestReader): Item {
  let next = item;
  while (!rest.done) {
    const word = rest.take().toLowerCase();
    const pieces = Number(word);
    if (word === "r" || word === "radius") next = { ...next, radiusMm: rest.length("the radius of the miter") };
    else if (Number.isInteger(pieces) && pieces >= 2 && pieces <= MOST_PIECES) next = { ...next, pieces };
    else throw new RestRefusal("Type the pieces of a miter, 2 to 5, and r with its radius: miter 4 r 18.");
  }
  return next;
}

function bendRadius(rest: RestReader): number {
  if (rest.peek() === "r" || rest.peek() === "radius") rest.take();
  return rest.length("the bend's center-line radius");
}

function formed<T extends Of<"cap"> | Of<"coupling">>(word: ItemWord, item: T, rest: RestReader): T {
  const typed = rest.peek();
  if (item.kind === "cap" && PIPE_ENDS[typed] === "butt") return alone(word, (rest.take(), item), rest);
  const ends = socketOr(word, rest);
  return alone(word, ends ? { ...item, ends } : item, rest);
}

function socketOr(word: ItemWord, rest: RestReader): "socket" | "threaded" | null {
  if (rest.done) return null;
  const ends = PIPE_ENDS[rest.peek()];
  if (ends !== "socket" && ends !== "threaded") throw new RestRefusal(`After ${word.word} type sw or th, or nothing.`);
  rest.take();
  return ends;
}

function sizeNext(word: ItemWord, rest: RestReader) {
  const nps = readNps(rest.take());
  if (!nps) throw new RestRefusal(`Type a pipe size after ${word.word}, such as ${exampleOf(word)}.`);
  return nps;
}

/** The first of a word's examples. */
export function exampleOf(word: ItemWord): string {
  return (word.after ?? word.word).split(",")[0] ?? word.word;
}
