/** A small run that shows a closing by itself: a stub at each end, so that the one drawing code draws it. Pure. */
import type { CloseBetweenInput, ClosingFound, Item, Point, RunDocument, Vec3 } from "@/iso";
import type { ClosingForm } from "./closing-form";
import { FROM_DRAWING } from "./document-edits";
import { offsetBetween } from "./closing-insert";

/** Length of existing pipe drawn behind each end, in bend radii. */
const STUB_RADII = 2.5;

export function closingPicture(form: ClosingForm, found: ClosingFound, input: CloseBetweenInput, document: RunDocument): RunDocument {
  const back = (end: CloseBetweenInput["end0"], radius: number): Vec3 => {
    const size = Math.hypot(...end.direction) || 1;
    return end.position.map((p, i) => p - ((end.direction[i] ?? 0) / size) * radius * STUB_RADII) as unknown as Vec3;
  };
  const existing = (text: string): Item => ({ kind: "end", goes: "existing", text });
  const places: readonly (readonly [Vec3, Item])[] = [
    [back(input.end0, input.radius0Mm), existing("END 0")],
    ...found.bends.map((bend): readonly [Vec3, Item] => {
      const size = (bend.end === 0 ? form.end0 : form.end1).radius === "SR" ? "sr" : "lr";
      return [bend.workingPoint, { kind: "elbow", elbow: bend.elbow === "90" ? `${size}-90` : `trimmed-${size}` }];
    }),
    [back(input.end1, input.radius1Mm), existing("END 1")],
  ];
  const { settings } = document;
  const points = places.map(([place, item], i): Point => ({
    id: `c${i}`, item, places: {}, trimMm: null, note: "",
    offset: offsetBetween(i === 0 ? [0, 0, 0] : (places[i - 1]?.[0] ?? [0, 0, 0]), place, settings.units),
    provenance: { ...FROM_DRAWING, kind: "calculated" },
  }));
  const pipe = { ...settings.pipe, nps: form.nps };
  return { ...document, number: "closing", view: null, notes: [], settings: { ...settings, pipe }, runs: [{ id: "closing", name: "", from: null, pipe: null, points }] };
}
