"use client";
import { memo, useState } from "react";
import { formatLength, formatTerm, parseLength, type Offset, type Point, type Problem, type Provenance, type RunDocument, type UnitSystem } from "@/iso";
import { Button } from "@/components/ui/button";
import type { Role } from "@/lib/rules/api-types";
import { CommitField } from "./commit-field";
import { lengthEntryText } from "@/components/jobs/settings-text";
import { jointPlace } from "./cell-commit";
import { pointPlace } from "./document-edits";
import { useEditor } from "./editor-context";
import { refused, understood, type EntryResult } from "./entry-result";
import { isTouchScreen } from "./touch-screen";
import { ItemDetail } from "./item-detail";
import { itemCaution, itemEcho } from "./item-text";
import { readOptionalLength } from "./length-reader";
import { MeasuredTakeOut } from "./measured-take-out";
import { StartsFields } from "./starts-fields";

export interface PointDetailProps {
  readonly document: RunDocument;
  readonly point: Point;
  readonly problems: readonly Problem[];
  readonly role: Role | null;
  readonly onTakeOut: () => Promise<unknown>;
}

/** What the grid has no column for, for the current row. */
export const PointDetail = memo(function PointDetail({ document, point, problems, role, onTakeOut }: PointDetailProps) {
  const { send, readOnly } = useEditor();
  const [open, setOpen] = useState(() => !isTouchScreen());
  const { units } = document.settings;
  const place = pointPlace(document, point.id);
  if (!place) return null;
  const target = { ...place, column: "move" as const };
  const patch = (change: Partial<Omit<Point, "id">>) => send({ type: "point-patch", pointId: point.id, patch: change });
  const fieldFit = Object.values(point.places).includes("field-fit");
  const caution = itemCaution(point.item);
  return (
    <details open={open} onToggle={(event) => setOpen(event.currentTarget.open)} className="border border-ink bg-sheet max-lg:sticky max-lg:bottom-0 max-lg:z-20 max-lg:max-h-[60dvh] max-lg:overflow-y-auto lg:border-t-0">
      <summary className="flex min-h-11 cursor-pointer flex-wrap items-center justify-between gap-x-4 px-3 py-2">
        <span className="font-bold">
          <span aria-hidden className="mr-2 inline-block font-normal text-dye">{open ? "Less" : "More"}</span>
          Row {place.row + 1}
          {point.item.kind === "none" ? "" : `: ${itemEcho(point.item, jointPlace(point), units)}`}
        </span>
        {caution ? <span className="text-sm text-caution">{caution}</span> : null}
      </summary>
      <div className="px-3 pb-3">
      <div key={point.id} className="grid items-end gap-3 min-[480px]:grid-cols-2 xl:grid-cols-3">
        <SecondReading point={point} units={units} readOnly={readOnly} onPatch={patch} />
        <CommitField label="Tool tolerance" hint="tape or laser, plus or minus" figure readOnly={readOnly} text={point.provenance.toleranceMm === null ? "" : lengthEntryText(point.provenance.toleranceMm, units)} read={readOptionalLength(units)} onCommit={(toleranceMm) => patch({ provenance: { ...point.provenance, toleranceMm } })} />
        {fieldFit ? (
          <CommitField label="Field-fit trim" hint="supplied extra; empty = the line's" figure readOnly={readOnly} text={point.trimMm === null ? "" : lengthEntryText(point.trimMm, units)} read={readOptionalLength(units)} onCommit={(trimMm) => patch({ trimMm })} />
        ) : null}
        <ItemDetail item={point.item} units={units} readOnly={readOnly} onItem={(item) => send({ type: "item-set", pointId: point.id, item })} />
      </div>
      <MeasuredTakeOut problems={problems.filter((problem) => problem.pointId === point.id)} units={units} role={role} onRecorded={onTakeOut} />
      <StartsFields key={`starts${point.id}`} point={point} readOnly={readOnly} onPoint={(next) => send({ type: "point-replace", point: next })} />
      {hasFieldWeld(point) ? <p className="mt-2 text-sm text-caution">Field weld: permit, isolate, gas test, fire watch. Do not pull, jack or heat to fit.</p> : null}
      <p className="mt-2 text-xs text-soft">{sourceWords(point.provenance)}</p>
      {readOnly ? null : (
        <div className="mt-2 flex flex-wrap gap-x-4 max-sm:hidden">
          <Button tone="quiet" className="px-0" onClick={() => send({ type: "row-insert", target })}>Row above</Button>
          <Button tone="quiet" className="px-0" onClick={() => send({ type: "row-double", target })}>Double</Button>
          <Button tone="quiet" className="px-0" onClick={() => send({ type: "row-move", target, by: -1 })}>Move up</Button>
          <Button tone="quiet" className="px-0" onClick={() => send({ type: "row-move", target, by: 1 })}>Move down</Button>
          <Button tone="quiet" className="px-0" onClick={() => send({ type: "row-remove", target })}>Remove row</Button>
        </div>
      )}
      </div>
    </details>
  );
});

function hasFieldWeld({ places }: Point): boolean {
  return [places.in, places.out, places.branch].some((place) => place === "field" || place === "field-fit");
}

function sourceWords({ kind, by, at }: Provenance): string {
  const source = kind === "from-drawing" ? "from drawing" : kind;
  return `Number ${source}${by ? ` by ${by}` : ""}${at ? `, ${at.slice(0, 10)}` : ""}.`;
}

interface SecondReadingProps {
  readonly point: Point;
  readonly units: UnitSystem;
  readonly readOnly: boolean;
  readonly onPatch: (change: Partial<Omit<Point, "id">>) => void;
}

/** A second reading of the same number: how far it is from the first, and either may stand. */
function SecondReading({ point, units, readOnly, onPatch }: SecondReadingProps) {
  const { second } = point.provenance;
  const first = offsetLengthMm(point.offset);
  const setSecond = (value: Provenance["second"]) => onPatch({ provenance: { ...point.provenance, second: value } });
  const take = (): void => {
    if (!second || point.offset.kind !== "polar") return;
    const { length } = point.offset;
    onPatch({ offset: { ...point.offset, length: second }, provenance: { ...point.provenance, second: length } });
  };
  return (
    <div>
      <CommitField label="Second reading" hint={second ? differenceWords(second.mm - first, units) : "of the same length"} figure readOnly={readOnly} text={second?.text ?? ""} read={readSecond(units)} onCommit={setSecond} />
      {second && point.offset.kind === "polar" && !readOnly ? (
        <Button tone="quiet" className="px-0" onClick={take}>
          Use it as the length
        </Button>
      ) : null}
    </div>
  );
}

function readSecond(units: UnitSystem): (text: string) => EntryResult<Provenance["second"]> {
  return (text) => {
    if (text.trim() === "") return understood(null, "");
    const length = parseLength(text, units);
    return length.ok ? understood({ text, mm: length.mm }, length.understood) : refused(length.message);
  };
}

function offsetLengthMm(offset: Offset): number {
  return offset.kind === "polar" || offset.kind === "slope" ? Math.abs(offset.length.mm) : Math.hypot(offset.e.mm, offset.n.mm, offset.u.mm);
}

/** Differences under half of what a term prints count as equal. */
function differenceWords(mm: number, units: UnitSystem): string {
  const text = formatTerm(Math.abs(mm), units);
  if (text === "0") return "agrees with the first";
  return `${Math.abs(mm) > 12 * 25.4 ? formatLength(Math.abs(mm), units) : text}${units === "metric" ? " mm" : Math.abs(mm) > 12 * 25.4 ? "" : " in"} ${mm > 0 ? "more" : "less"} than the first`;
}
