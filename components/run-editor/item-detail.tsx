"use client";
import type { ReactNode } from "react";
import { NPS_SIZES, type AxisName, type Item, type Nps, type UnitSystem } from "@/iso";
import { lengthEntryText } from "@/components/jobs/settings-text";
import { Select } from "@/components/ui/field";
import { CommitField } from "./commit-field";
import { FlangeDetail } from "./flange-detail";
import { AXES, CLASSES, ratingOf, type Option } from "./item-options";
import { readOptionalLength, readText } from "./length-reader";

export interface ItemDetailProps {
  readonly item: Item;
  readonly units: UnitSystem;
  readonly readOnly: boolean;
  readonly onItem: (item: Item) => void;
}

const SIZES: readonly Option[] = NPS_SIZES.map((nps) => ({ value: nps, label: `NPS ${nps}` }));
const FORGED: readonly Option[] = [{ value: "socket", label: "socket-weld" }, { value: "threaded", label: "threaded" }];
const PIPE: readonly Option[] = [{ value: "butt", label: "butt-weld" }, ...FORGED];
const PART: readonly Option[] = [{ value: "flanged", label: "flanged" }, ...PIPE];
const MATING: readonly Option[] = [{ value: "weld-neck", label: "weld-neck" }, { value: "slip-on", label: "slip-on" }, { value: "socket-weld", label: "socket-weld" }, { value: "threaded", label: "threaded" }, { value: "lap-joint", label: "lap-joint" }];
const SET: readonly Option[] = [{ value: "on", label: "set on" }, { value: "in", label: "set in" }];
const ENDS: readonly Option[] = [
  { value: "open", label: "open end" }, { value: "field-weld", label: "field weld" }, { value: "continued", label: "continued on" },
  { value: "existing", label: "existing, verify" }, { value: "vent", label: "vent" }, { value: "drain", label: "drain" },
];

/** What an item takes beyond its short word, by picking; each can be typed after the word as well. */
export function ItemDetail({ item, units, readOnly, onItem }: ItemDetailProps): ReactNode {
  const choose = (label: string, value: string, options: readonly Option[], set: (value: string) => Item) => (
    <Select key={label} label={label} options={options} value={value} disabled={readOnly} onChange={(event) => onItem(set(event.target.value))} />
  );
  const text = (label: string, value: string, set: (value: string) => Item, placeholder = "") => (
    <CommitField key={`${label}${value}`} label={label} text={value} placeholder={placeholder} readOnly={readOnly} read={readText} onCommit={(next) => onItem(set(next))} />
  );
  const length = (label: string, hint: string, mm: number | null | undefined, set: (mm: number | null) => Item) => (
    <CommitField key={`${label}${mm}`} label={label} hint={hint} figure readOnly={readOnly} text={mm ? lengthEntryText(mm, units) : ""} read={readOptionalLength(units)} onCommit={(next) => onItem(set(next === 0 ? null : next))} />
  );
  switch (item.kind) {
    case "flange": return <FlangeDetail item={item} units={units} readOnly={readOnly} onItem={onItem} />;
    case "valve":
      return (
        <>
          {choose("Class", String(item.ratingClass ?? ""), CLASSES, (value) => ({ ...item, ratingClass: ratingOf(value) }))}
          {choose("Ends", item.ends, PART, (value) => ({ ...item, ends: value as typeof item.ends }))}
          {item.ends === "flanged" ? choose("Mating flanges", item.mating, MATING, (value) => ({ ...item, mating: value as typeof item.mating })) : null}
          {choose("Stem", item.stem ?? "", [{ value: "", label: "up, or north on a riser" }, ...AXES], (value) => ({ ...item, stem: value === "" ? null : (value as AxisName) }))}
          {text("Tag", item.tag, (value) => ({ ...item, tag: value }), "V-101")}
          {length("Measured face to face", "in place of the table's", item.faceToFaceMm, (faceToFaceMm) => ({ ...item, faceToFaceMm }))}
        </>
      );
    case "instrument":
      return (
        <>
          {text("Tag", item.tag, (value) => ({ ...item, tag: value }), "PI-101")}
          {choose("Ends", item.ends, PART, (value) => ({ ...item, ends: value as typeof item.ends }))}
          {item.ends === "flanged" ? choose("Class", String(item.ratingClass ?? ""), CLASSES, (value) => ({ ...item, ratingClass: ratingOf(value) })) : null}
          {length("Face to face", "within a run; empty at an end", item.lengthMm, (mm) => ({ ...item, lengthMm: mm ?? 0 }))}
        </>
      );
    case "tee":
    case "cross":
      return (
        <>
          {choose("Branch size", item.branchNps ?? "", [{ value: "", label: "same as the run" }, ...SIZES], (value) => ({ ...item, branchNps: value === "" ? null : (value as Nps) }))}
          {choose("Ends", item.ends, PIPE, (value) => ({ ...item, ends: value as typeof item.ends }))}
        </>
      );
    case "outlet":
      return (
        <>
          {choose("Branch size", item.branchNps, SIZES, (value) => ({ ...item, branchNps: value as Nps }))}
          {choose("Branch end", item.ends ?? "butt", PIPE, (value) => ({ ...item, ends: value as "butt" }))}
          {choose("How it is set", item.set ?? "on", SET, (value) => ({ ...item, set: value as "on" }))}
        </>
      );
    case "stub-in":
      return (
        <>
          {choose("Branch size", item.branchNps, SIZES, (value) => ({ ...item, branchNps: value as Nps }))}
          {choose("How it is set", item.set ?? "on", SET, (value) => ({ ...item, set: value as "on" }))}
          {length("Pad, outside diameter", "as given; empty = no pad", item.padMm, (mm) => padded(item, mm))}
        </>
      );
    case "reducer":
      return (
        <>
          {choose("To size", item.toNps, SIZES, (value) => ({ ...item, toNps: value as Nps }))}
          {text("Schedule after it", item.toSchedule ?? "", (value) => ({ ...item, toSchedule: value.slice(0, 12) || null }), "the line's")}
          {item.shape === "eccentric" ? choose("Flat side", item.flat ?? "D", AXES, (value) => ({ ...item, flat: value as AxisName })) : null}
        </>
      );
    case "return":
      return (
        <>
          {choose("Radius", item.radius, [{ value: "LR", label: "long" }, { value: "SR", label: "short" }], (value) => ({ ...item, radius: value as "LR" }))}
          {choose("Second leg lies", item.toward, AXES, (value) => ({ ...item, toward: value as AxisName }))}
        </>
      );
    case "mitre":
      return (
        <>
          {choose("Pieces", String(item.pieces), ["2", "3", "4", "5"].map((value) => ({ value, label: value })), (value) => ({ ...item, pieces: Number(value) }))}
          {length("Radius", "empty = 1.5 NPS", item.radiusMm, (radiusMm) => ({ ...item, radiusMm }))}
        </>
      );
    case "bend": return length("Center-line radius", "", item.radiusMm, (mm) => ({ ...item, radiusMm: mm ?? item.radiusMm }));
    case "union": return choose("Ends", item.ends, FORGED, (value) => ({ ...item, ends: value as "socket" }));
    case "coupling": return choose("Ends", item.ends ?? "socket", FORGED, (value) => ({ ...item, ends: value as "socket" }));
    case "cap": return choose("End", item.ends ?? "butt", PIPE, (value) => ({ ...item, ends: value as "butt" }));
    case "end":
      return (
        <>
          {choose("Goes to", item.goes, ENDS, (value) => ({ ...item, goes: value as typeof item.goes }))}
          {text("Name printed there", item.text, (value) => ({ ...item, text: value }), "L-204")}
        </>
      );
    case "support": return text("Support", item.text, (value) => ({ ...item, text: value }), "shoe, PS-12");
    default: return null;
  }
}

function padded({ padMm: _before, ...item }: Extract<Item, { kind: "stub-in" }>, mm: number | null): Item {
  return mm === null ? item : { ...item, padMm: mm };
}
