/** Reads the Joint cell: where the welds and bolted faces of a point are made. One word speaks of the weld on the near side. */
import type { Place, Point } from "@/iso";
import { refused, understood, type EntryResult } from "./entry-result";

export type Places = Point["places"];
type Side = keyof Places;

const PLACE_WORDS: Readonly<Record<string, Place>> = {
  s: "shop", shop: "shop",
  f: "field", field: "field", fw: "field",
  ff: "field-fit", fit: "field-fit", ffw: "field-fit", "field-fit": "field-fit",
};
const SIDE_WORDS: Readonly<Record<string, Side>> = {
  in: "in", before: "in", out: "out", after: "out", branch: "branch", b: "branch",
  bolts: "bolts", bolt: "bolts", bolted: "bolts", face: "bolts", faces: "bolts",
};
const PLACE_LABEL: Readonly<Record<Place, string>> = { shop: "shop", field: "field", "field-fit": "field-fit" };
const SIDE_LABEL: Readonly<Record<Side, string>> = { in: "before it", out: "after it", branch: "on the branch", bolts: "at the bolted faces" };
const SIDES: readonly Side[] = ["in", "out", "branch", "bolts"];

export const PLACE_HINT = "Type shop, field or fit; add in, out or branch to name the weld, or bolts for the bolted faces, such as field out or field bolts.";
const BOLTS_HINT = "Bolted faces are shop or field: nothing is trimmed there.";

/**
 * Reads "field", "f", "fit", "field out", "in shop out field", "field bolts".
 * @param nearSide the weld meant by a bare word: "out" at a run's first point, else "in".
 */
export function parsePlaces(text: string, nearSide: "in" | "out"): EntryResult<Places> {
  const words = text.trim().toLowerCase().split(/[\s,;]+/).filter((word) => word !== "");
  const places: Places = {};
  for (let at = 0; at < words.length; ) {
    const [first, second] = [words[at] ?? "", words[at + 1] ?? ""];
    const place = PLACE_WORDS[first] ?? PLACE_WORDS[second];
    const side = SIDE_WORDS[first] ?? (PLACE_WORDS[first] ? SIDE_WORDS[second] : undefined);
    if (!place || (!PLACE_WORDS[first] && !side)) return refused(PLACE_HINT);
    if (side === "bolts" && place === "field-fit") return refused(BOLTS_HINT);
    places[side ?? nearSide] = place;
    at += side ? 2 : 1;
  }
  const stored = withoutShop(places);
  return understood(stored, placesEcho(stored));
}

/** Shop is what every weld is by itself, so it is not stored. A face at the run's end is field by itself, so there shop is. */
function withoutShop(places: Places): Places {
  return Object.fromEntries(namedSides(places).map((side) => [side, places[side]]));
}

/** Sides whose place differs from what stands there unsaid, in the order of SIDES. */
function namedSides(places: Places): readonly Side[] {
  return SIDES.filter((side) => places[side] !== undefined && (side === "bolts" || places[side] !== "shop"));
}

export function placesText(places: Places, nearSide: "in" | "out"): string {
  const named = namedSides(places);
  const only = named.length === 1 && named[0] === nearSide;
  return named.map((side) => (only ? shortPlace(places[side]) : `${shortPlace(places[side])} ${side}`)).join(", ");
}

function shortPlace(place: Place | undefined): string {
  return place === "field-fit" ? "fit" : (place ?? "shop");
}

export function placesEcho(places: Places): string {
  const named = namedSides(places);
  if (named.length === 0) return "shop welds";
  return named.map((side) => `${PLACE_LABEL[places[side] ?? "shop"]} ${SIDE_LABEL[side]}`).join(", ");
}
