"use client";
import type { AxisName, Item, UnitSystem } from "@/iso";
import { lengthEntryText } from "@/components/jobs/settings-text";
import { Select } from "@/components/ui/field";
import { CommitField } from "./commit-field";
import { AXES, CLASSES, ratingOf } from "./item-options";
import { readDegrees, readOptionalLength, readText } from "./length-reader";

type Flange = Extract<Item, { kind: "flange" }>;

export interface FlangeDetailProps {
  readonly item: Flange;
  readonly units: UnitSystem;
  readonly readOnly: boolean;
  readonly onItem: (item: Item) => void;
}

const SIDES = [{ value: "after", label: "the face before the gasket" }, { value: "before", label: "the face after the gasket" }];
const GOES = [{ value: "open", label: "not said" }, { value: "nozzle", label: "nozzle" }, { value: "continued", label: "continued" }, { value: "existing", label: "existing, verify" }];
const STUBS = [{ value: "long", label: "long" }, { value: "short", label: "short" }];

/** A flange's class, holes, gasket, stub end and where it goes. */
export function FlangeDetail({ item, units, readOnly, onItem }: FlangeDetailProps) {
  return (
    <>
      <Select label="Class" options={CLASSES} disabled={readOnly} value={String(item.ratingClass ?? "")} onChange={(event) => onItem({ ...item, ratingClass: ratingOf(event.target.value) })} />
      {item.flange === "lap-joint" ? <Select label="Stub end" options={STUBS} disabled={readOnly} value={item.stubEnd ?? "long"} onChange={(event) => onItem({ ...item, stubEnd: event.target.value as "long" })} /> : null}
      <BoltHoles item={item} readOnly={readOnly} onItem={onItem} />
      <CommitField key={`gasket${item.gasketMm}`} label="Gasket" hint="thickness; empty = the line's" figure readOnly={readOnly} text={item.gasketMm === undefined ? "" : lengthEntryText(item.gasketMm, units)} read={readOptionalLength(units)} onCommit={(mm) => onItem(gasketed(item, mm))} />
      <Select label="In a pair, the point is" options={SIDES} disabled={readOnly} value={item.gasketSide} onChange={(event) => onItem({ ...item, gasketSide: event.target.value as "before" })} />
      <Select label="Goes to" options={GOES} disabled={readOnly} value={item.goes} onChange={(event) => onItem({ ...item, goes: event.target.value as Flange["goes"] })} />
      <CommitField key={`name${item.text}`} label="Name printed there" text={item.text} placeholder="N3" readOnly={readOnly} read={readText} onCommit={(text) => onItem({ ...item, text })} />
    </>
  );
}

function gasketed({ gasketMm: _before, ...item }: Flange, mm: number | null): Item {
  return mm === null ? item : { ...item, gasketMm: mm };
}

function BoltHoles({ item, readOnly, onItem }: Omit<FlangeDetailProps, "units">) {
  const turned = item.boltHoles === "straddle" ? null : item.boltHoles;
  return (
    <>
      <Select
        label="Bolt holes"
        disabled={readOnly}
        value={turned ? "turned" : "straddle"}
        options={[{ value: "straddle", label: "straddle the center line" }, { value: "turned", label: "turned" }]}
        onChange={(event) => onItem({ ...item, boltHoles: event.target.value === "straddle" ? "straddle" : { turnDeg: 0, from: "S" } })}
      />
      {turned ? (
        <>
          <CommitField label="Turned, degrees clockwise" figure readOnly={readOnly} text={String(turned.turnDeg)} read={readDegrees} onCommit={(turnDeg) => onItem({ ...item, boltHoles: { ...turned, turnDeg } })} />
          <Select label="Looked at from" disabled={readOnly} value={turned.from} options={AXES} onChange={(event) => onItem({ ...item, boltHoles: { ...turned, from: event.target.value as AxisName } })} />
        </>
      ) : null}
    </>
  );
}
