"use client";
import { fittedPointName, type AsFittedDocument, type FittedPoint, type ReadAs, type Wanted } from "@/iso";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/field";

const CELL = "figure min-h-11 w-full border border-rule bg-sheet px-2 text-ink";
const AXES = ["E", "N", "U"] as const;

export const READ_AS_OPTIONS: readonly { value: ReadAs; label: string }[] = [
  { value: "inches", label: "inches" }, { value: "feet", label: "decimal feet" }, { value: "millimetres", label: "millimetres" }, { value: "metres", label: "metres" },
];

/** Every place that can be measured, by what it is stored as. */
function placeOptions(wanted: Wanted) {
  return [
    { value: "", label: "choose" },
    ...wanted.faces.flatMap(({ mark, holes }) => [
      { value: `${mark}:centre`, label: `End ${mark}, centre` },
      { value: `${mark}:axis`, label: `End ${mark}, on its axis` },
      ...(holes ? [{ value: `${mark}:hole`, label: `End ${mark}, bolt hole` }] : []),
    ]),
    ...wanted.corners.map(({ mark }) => ({ value: `${mark}:centre`, label: `Corner ${mark}` })),
  ];
}

export interface PointsProps {
  readonly document: AsFittedDocument;
  readonly wanted: Wanted;
  readonly freshId: () => string;
  readonly onChange: (document: AsFittedDocument) => void;
}

/** The measured points: what each is, and its three numbers as typed. A row of cells on a desk, a card on a phone. */
export function AsFittedPoints({ document, wanted, freshId, onChange }: PointsProps) {
  const set = (id: string, part: Partial<FittedPoint>) => onChange({ ...document, points: document.points.map((point) => (point.id === id ? { ...point, ...part } : point)) });
  const add = () => onChange({ ...document, points: [...document.points, { id: freshId(), of: "", what: "centre", at: ["", "", ""], leftOut: false }] });
  return (
    <>
      <ul className="space-y-2">
        {document.points.map((point, n) => (
          <PointRow
            key={point.id} point={point} row={n + 1} wanted={wanted} onChange={(part) => set(point.id, part)}
            onRemove={() => onChange({ ...document, points: document.points.filter((one) => one.id !== point.id) })}
          />
        ))}
      </ul>
      <Button className="mt-3" onClick={add}>Add a point</Button>
    </>
  );
}

function PointRow({ point, row, wanted, onChange, onRemove }: { readonly point: FittedPoint; readonly row: number; readonly wanted: Wanted; readonly onChange: (part: Partial<FittedPoint>) => void; readonly onRemove: () => void }) {
  const name = point.of === "" ? `Point ${row}` : fittedPointName(point);
  return (
    <li aria-label={name} className="grid grid-cols-3 items-end gap-2 border-b border-hair pb-2 md:grid-cols-[14rem_repeat(3,minmax(0,1fr))_auto]">
      <Select
        label="Point" className="col-span-3 md:col-span-1" options={placeOptions(wanted)} value={point.of === "" ? "" : `${point.of}:${point.what}`}
        onChange={(event) => {
          const [of = "", what = "centre"] = event.target.value.split(":");
          onChange({ of, what: what as FittedPoint["what"] });
        }}
      />
      {AXES.map((axis, i) => (
        <label key={axis} className="min-w-0">
          <span className="block text-sm text-soft">{axis}</span>
          <input
            type="text" inputMode="text" autoComplete="off" maxLength={60} aria-label={`${name}, ${axis}`} className={CELL} value={point.at[i] ?? ""}
            onChange={(event) => onChange({ at: point.at.map((text, k) => (k === i ? event.target.value : text)) })}
          />
        </label>
      ))}
      <div className="col-span-3 flex items-center justify-end gap-3 md:col-span-1">
        <label className="flex min-h-11 items-center gap-2 text-sm">
          <input type="checkbox" className="size-5" checked={point.leftOut} onChange={(event) => onChange({ leftOut: event.target.checked })} />
          left out
        </label>
        <Button tone="quiet" aria-label={`Remove ${name}`} onClick={onRemove}>Remove</Button>
      </div>
    </li>
  );
}
